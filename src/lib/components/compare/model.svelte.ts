import { curveSpec, shownValue } from '$lib/charts/curves';
import type { ChartSpec, TravelSpec } from '$lib/charts/multiples';
import { travelSpec } from '$lib/charts/travel';
import { roomOf, type Room } from '$lib/components/travel/plan';
import { solveDocument, stateAt, whyUnsolved, type SolvedCorner } from '$lib/components/travel/solve';
import { rightEntry } from '$lib/domain/difference';
import type { Side } from '$lib/domain/datum';
import { drawnEntry, drawnState, tyreOf } from '$lib/drawing/corner';
import { extentsOf, type Extents } from '$lib/drawing/layout';
import type { DrawnCorner } from '$lib/drawing/scene';
import type { CornerState, SweepRange } from '$lib/kinematics';
import type { FigureKey } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';
import { fromDisplay } from '$lib/units';
import { atStart, type CompareEntry } from './entries';

/** What the comparison is worked out from; read anew whenever it changes. */
export interface CompareSource {
	/** In the order in which they were chosen. */
	readonly entries: readonly CompareEntry[];
	readonly side: Side;
	readonly range: SweepRange;
	readonly figures: readonly FigureKey[];
	readonly tyreSize: string;
	readonly preferences: Preferences;
}

/** One geometry with what came of solving it. */
export interface ComparedCorner extends CompareEntry {
	solved: SolvedCorner | null;
	/** Why it cannot be solved, one sentence; null where it can. */
	why: string | null;
}

const FALLBACK = { centre: [0, 700, 300] as const, tyre: { radius: 300, width: 190, shoulder: 30 } };

/** Two to four geometries over one travel. What the slide moves hangs on the slide alone. */
export class CompareModel {
	readonly #source: CompareSource;
	/** Where the slide was put, mm. */
	asked = $state(0);

	constructor(source: CompareSource) {
		this.#source = source;
	}

	readonly corners: readonly ComparedCorner[] = $derived.by(() => {
		const { entries, side, range } = this.#source;
		return entries.map((entry) => {
			const outcome = solveDocument(entry.document, side, range);
			return { ...entry, solved: outcome.solved, why: whyUnsolved(atStart(entry.name), outcome) };
		});
	});
	/** Those that can be solved, newest first, as the series are drawn. */
	readonly drawn: readonly (ComparedCorner & { solved: SolvedCorner })[] = $derived.by(() =>
		this.corners
			.filter((one): one is ComparedCorner & { solved: SolvedCorner } => one.solved !== null)
			.sort((a, b) => a.seriesIndex - b.seriesIndex)
	);

	/** How far the slide goes, mm: as far as any of them does. */
	readonly #reach = $derived.by(() => {
		const { range } = this.#source;
		const reaches = this.drawn.map(({ solved }) => solved.reach);
		return reaches.length === 0
			? { low: range.from, high: range.to }
			: { low: Math.min(...reaches.map(({ low }) => low)), high: Math.max(...reaches.map(({ high }) => high)) };
	});
	readonly travel: number = $derived(Math.max(this.#reach.low, Math.min(this.#reach.high, this.asked)));

	/** The state of each corner at the slide, in their order; null where it cannot be solved or does not reach. */
	readonly states: readonly (CornerState | null)[] = $derived.by(() => {
		const { travel } = this;
		return this.corners.map(({ solved }) => solved && (travel === 0 ? solved.ride : stateAt(solved.geometry, travel)));
	});

	/** The charts without their cursors. Bands are the newest one's targets. */
	readonly charts: readonly ChartSpec[] = $derived.by(() => {
		const { figures, preferences } = this.#source;
		const curved = this.drawn.map(({ key, seriesIndex, solved }) => ({
			label: key,
			seriesIndex,
			ride: solved.ride,
			sweep: solved.sweep
		}));
		const targets = this.drawn[0]?.document.targets ?? [];
		return figures.map((key) => curveSpec(key, curved, null, targets, preferences));
	});
	/** The newest one's figure at the cursor of each chart, in the shown unit. */
	readonly cursors: readonly (number | null)[] = $derived.by(() => {
		const { figures, preferences } = this.#source;
		const first = this.drawn[0] ?? null;
		const state = first && (this.states[this.corners.findIndex(({ key }) => key === first.key)] ?? null);
		return figures.map((key) => shownValue(key, state, first?.solved.ride ?? null, preferences));
	});
	/** The slide; where it ends before the range does, every one of them binds there. */
	readonly slide: TravelSpec = $derived.by(() => {
		const { range, preferences } = this.#source;
		const { low, high } = this.#reach;
		const ends = this.drawn.map(({ solved }) => solved.sweep);
		return travelSpec(
			this.travel,
			range,
			{
				lowLimit: ends.map(({ lowLimit }) => lowLimit).find((limit) => limit?.value === low),
				highLimit: ends.map(({ highLimit }) => highLimit).find((limit) => limit?.value === high)
			},
			preferences
		);
	});

	slideTo(shown: number): void {
		this.asked = fromDisplay(shown, 'length', this.#source.preferences);
	}

	#entered(entry: CompareEntry): DrawnCorner {
		const { side, tyreSize } = this.#source;
		const corner = side === 'right' ? rightEntry(entry.document) : entry.document.left;
		return drawnEntry(corner, side, tyreOf(corner.wheel.loadedRadius, tyreSize));
	}

	#asDrawn(entry: CompareEntry, state: CornerState): DrawnCorner {
		const { side, tyreSize } = this.#source;
		const { wheel } = side === 'right' ? rightEntry(entry.document) : entry.document.left;
		return drawnState(state, tyreOf(wheel.loadedRadius, tyreSize));
	}

	/** Each corner as it is drawn at the slide, oldest first so that the newest lies on top. One that cannot be solved shows its points as entered. */
	readonly shown: readonly { key: string; seriesIndex: number; corner: DrawnCorner }[] = $derived.by(() =>
		this.corners
			.map((one, k) => {
				const state = this.states[k];
				const corner = state ? this.#asDrawn(one, state) : one.solved ? null : this.#entered(one);
				return corner && { key: one.key, seriesIndex: one.seriesIndex, corner };
			})
			.filter((one) => one !== null)
			.sort((a, b) => b.seriesIndex - a.seriesIndex)
	);
	/** Each at ride height: what the views find room for, so that they keep still while the slide moves. */
	readonly #still: readonly DrawnCorner[] = $derived.by(() =>
		this.corners.map((one) => (one.solved ? this.#asDrawn(one, one.solved.ride) : this.#entered(one)))
	);
	/** The same as `shown`, at ride height whatever the slide says. */
	readonly shownAtRide: CompareModel['shown'] = $derived.by(() =>
		this.corners
			.map(({ key, seriesIndex }, k) => {
				const corner = this.#still[k];
				return corner && { key, seriesIndex, corner };
			})
			.filter((one) => one !== undefined)
			.sort((a, b) => b.seriesIndex - a.seriesIndex)
	);
	/** The newest corner at ride height. */
	readonly atRide: DrawnCorner | null = $derived.by(() => {
		const newest = this.drawn[0] ?? this.corners[0];
		return (newest && this.#still[this.corners.findIndex(({ key }) => key === newest.key)]) ?? null;
	});
	readonly room: Room = $derived.by(() => {
		const { low, high } = this.#reach;
		const rooms = this.#still.map((one) => roomOf(one, low, high));
		const most = (pick: (room: Room) => number) => Math.max(0, ...rooms.map(pick));
		return { outboard: most((r) => r.outboard), rise: most((r) => r.rise), drop: most((r) => r.drop) };
	});
	readonly extents: Extents = $derived.by(() => {
		const each = this.#still.map((one) => extentsOf(one.places, one.wheel ?? FALLBACK));
		const [first] = each;
		if (!first) return extentsOf({}, FALLBACK);
		return each.reduce(
			(all, one) => ({
				...all,
				outboard: Math.max(all.outboard, one.outboard),
				top: Math.max(all.top, one.top),
				fore: Math.max(all.fore, one.fore),
				aft: Math.max(all.aft, one.aft),
				pointsFore: Math.max(all.pointsFore, one.pointsFore),
				pointsAft: Math.max(all.pointsAft, one.pointsAft)
			}),
			first
		);
	});
}
