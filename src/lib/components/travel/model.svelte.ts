import { curveSpec, shownValue, type Curved } from '$lib/charts/curves';
import type { ChartSpec, TravelSpec } from '$lib/charts/multiples';
import { travelSpec } from '$lib/charts/travel';
import type { Side } from '$lib/domain/datum';
import { drawnEntry, drawnState, tyreOf } from '$lib/drawing/corner';
import type { Hand } from '$lib/drawing/projection';
import type { DrawnCorner } from '$lib/drawing/scene';
import type { CornerState, SweepRange } from '$lib/kinematics';
import type { AxleDocument, FigureKey } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';
import { fromDisplay } from '$lib/units';
import { roomOf, type Room } from './plan';
import { solveDocument, stateAt, type Outcome, type SolvedCorner } from './solve';

/** What the model is worked out from; read anew whenever it changes. */
export interface TravelSource {
	readonly document: AxleDocument;
	/** What stands at the end of its curves. */
	readonly name: string;
	readonly side: Side;
	readonly range: SweepRange;
	readonly figures: readonly FigureKey[];
	readonly previous: { letter: string; document: AxleDocument } | null;
	readonly tyreSize: string;
	readonly preferences: Preferences;
}

/** A corner over travel: its curves, the place of the slide, and what stands there. What the slide moves hangs on the slide alone. */
export class TravelModel {
	readonly #source: TravelSource;
	/** Where the slide was put, mm; the state shown is the nearest that is reached. */
	asked = $state(0);

	constructor(source: TravelSource) {
		this.#source = source;
	}

	/** The corner worked on: a right side only where it was entered on its own. */
	readonly hand: Hand = $derived.by(() =>
		this.#source.side === 'right' && this.#source.document.right !== 'mirror' ? 'right' : 'left'
	);
	readonly outcome: Outcome = $derived.by(() => solveDocument(this.#source.document, this.hand, this.#source.range));
	readonly solved: SolvedCorner | null = $derived(this.outcome.solved);
	readonly #previous: SolvedCorner | null = $derived.by(() => {
		const { previous, range } = this.#source;
		return previous && solveDocument(previous.document, this.hand, range).solved;
	});
	/** Whether there is a previous revision, but none that can be drawn. */
	readonly previousFails: boolean = $derived.by(() => this.#source.previous !== null && this.#previous === null);

	/** Where the slide stands, mm. */
	readonly travel: number = $derived.by(() => {
		const { range } = this.#source;
		const { low, high } = this.solved?.reach ?? { low: range.from, high: range.to };
		return Math.max(low, Math.min(high, this.asked));
	});
	readonly state: CornerState | null = $derived.by(() => {
		const { solved, travel } = this;
		return solved && (travel === 0 ? solved.ride : stateAt(solved.geometry, travel));
	});
	/** The previous revision at the slide; null where it does not reach. */
	readonly #previousState: CornerState | null = $derived.by(() => {
		const previous = this.#previous;
		return previous && (this.travel === 0 ? previous.ride : stateAt(previous.geometry, this.travel));
	});

	readonly #curved: readonly Curved[] = $derived.by(() => {
		const { solved } = this;
		const { name, previous } = this.#source;
		if (!solved) return [];
		const own = { label: name, ride: solved.ride, sweep: solved.sweep, seriesIndex: 0 };
		const under = this.#previous;
		return under && previous
			? [own, { label: previous.letter, ride: under.ride, sweep: under.sweep, seriesIndex: 1 }]
			: [own];
	});
	/** The charts without their cursors: they change with geometry, range, choice and units, never with the slide. */
	readonly charts: readonly ChartSpec[] = $derived.by(() => {
		const { figures, document, preferences } = this.#source;
		return figures.map((key) => curveSpec(key, this.#curved, null, document.targets, preferences));
	});
	/** What stands at the cursor of each chart, in the shown unit. */
	readonly cursors: readonly (number | null)[] = $derived.by(() => {
		const { figures, preferences } = this.#source;
		return figures.map((key) => shownValue(key, this.state, this.solved?.ride ?? null, preferences));
	});
	readonly slide: TravelSpec = $derived.by(() => {
		const { range, preferences } = this.#source;
		return travelSpec(this.travel, range, this.solved?.sweep ?? null, preferences);
	});

	slideTo(shown: number): void {
		this.asked = fromDisplay(shown, 'length', this.#source.preferences);
	}

	readonly #tyre = $derived.by(() => {
		const { document, tyreSize } = this.#source;
		const corner = this.hand === 'right' && document.right !== 'mirror' ? document.right : document.left;
		return { corner, tyre: tyreOf(corner.wheel.loadedRadius, tyreSize) };
	});
	readonly #entered: DrawnCorner = $derived(drawnEntry(this.#tyre.corner, this.hand, this.#tyre.tyre));
	readonly atRide: DrawnCorner = $derived(this.solved ? drawnState(this.solved.ride, this.#tyre.tyre) : this.#entered);
	/** What is drawn: the corner at the slide, or the points as entered where it cannot be solved. */
	readonly corner: DrawnCorner = $derived(this.state ? drawnState(this.state, this.#tyre.tyre) : this.#entered);
	readonly ghost: DrawnCorner | null = $derived(
		this.#previousState && drawnState(this.#previousState, this.#tyre.tyre)
	);
	/** True while not one point is typed. */
	readonly empty: boolean = $derived(Object.keys(this.#entered.places).length === 0);
	/** What the front view has to find room for: it keeps still while the slide moves. */
	readonly room: Room = $derived.by(() => {
		const { range } = this.#source;
		const { low, high } = this.solved?.reach ?? { low: range.from, high: range.to };
		return roomOf(this.atRide, low, high);
	});
	/** Links and points at fault. */
	readonly miss: readonly string[] = $derived.by(() => {
		const { error } = this.outcome;
		return [error?.at, error?.locks].filter((name) => name !== undefined);
	});
}
