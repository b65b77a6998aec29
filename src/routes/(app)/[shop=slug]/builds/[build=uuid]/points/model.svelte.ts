import { curveSpec, shownValue, type Curved } from '$lib/charts/curves';
import { layCharts, type ChartLayout, type ChartSpec, type TravelSpec } from '$lib/charts/multiples';
import type { Domain } from '$lib/charts/scale';
import { travelSpec } from '$lib/charts/travel';
import { axleGeometry, rightCorner } from '$lib/domain/axle';
import { entryOf, POINT_ORDER, POINTS } from '$lib/domain/points';
import { drawnEntry, drawnState, tyreOf, type DrawnTyre } from '$lib/drawing/corner';
import type { DimensionKey, DimensionText } from '$lib/drawing/figures';
import type { SheetMode, SheetSpec, SideCell } from '$lib/drawing/layout';
import type { MarkKey, MarkKind } from '$lib/drawing/linkage';
import type { Hand } from '$lib/drawing/projection';
import { reuse } from '$lib/drawing/reuse';
import type { DrawnCorner } from '$lib/drawing/scene';
import { SheetModel } from '$lib/drawing/sheet.svelte';
import { readTrammel } from '$lib/drawing/trammel';
import {
	KinematicsError,
	solveCorner,
	sweepBump,
	type CornerGeometry,
	type CornerState,
	type Vec3
} from '$lib/kinematics';
import type { AxleDocument, CornerEntry, FigureKey } from '$lib/schemas/axle';
import type { BuildFacts } from '$lib/schemas/build';
import type { Preferences } from '$lib/schemas/preferences';
import type { DraftEditor } from '$lib/state/draft.svelte';
import type { Selection } from '$lib/state/selection.svelte';
import type { Solution } from '$lib/state/solution.svelte';
import { CURVES, plotCurves, type Plot } from './curves';
import { dimensionTexts } from './dimensionTexts';
import { figureRows, type FigureRow } from './figures';
import { placeWords } from './words';

/** An earlier revision that lies under the drawing. */
export interface Previous {
	letter: string;
	document: AxleDocument;
}

/** What the model reads; getters, so that it follows them. */
export interface PointsSource {
	readonly editor: DraftEditor;
	readonly selection: Selection;
	readonly solution: Solution;
	readonly preferences: Preferences;
	readonly build: BuildFacts;
	readonly previous: Previous | null;
	/** The corner shown faintly while nothing is typed. */
	readonly example: AxleDocument;
	readonly width: number;
	readonly height: number;
	readonly mode: SheetMode;
}

export const MARK_NAMES = Object.fromEntries(Object.values(POINTS).map(({ key, name }) => [key, name])) as Record<
	MarkKey,
	string
>;
export const MARK_KINDS = Object.fromEntries(Object.values(POINTS).map(({ key, kind }) => [key, kind])) as Record<
	MarkKey,
	MarkKind
>;

/** The corner of a side as it was entered; a right side that mirrors the left is drawn as the left. */
export function cornerOf(document: AxleDocument, side: Hand): { corner: CornerEntry; hand: Hand } {
	return side === 'right' && document.right !== 'mirror'
		? { corner: document.right, hand: 'right' }
		: { corner: document.left, hand: 'left' };
}

function geometryOf(document: AxleDocument, hand: Hand): CornerGeometry | null {
	const read = axleGeometry(document);
	if ('missing' in read) return null;
	return hand === 'right' ? rightCorner(read.axle) : read.left;
}

/** Gives null where the kernel refuses; an earlier revision that does not reach this travel is left undrawn. */
function tryState(geometry: CornerGeometry, travel: number): CornerState | null {
	try {
		return solveCorner(geometry, { travel, rack: 0 });
	} catch (error) {
		if (error instanceof KinematicsError) return null;
		throw error;
	}
}

/** Over the curves stands the switch of what is shown there. */
const SWITCH_ROOM = 20;

/** Everything the Points page shows, from the editor, the solution and the selection. */
export class PointsModel {
	readonly #source: PointsSource;
	readonly sheet: SheetModel;
	/** Whether a press on a point sets the trammel rather than the selection. */
	measuring = $state(false);
	/** Whether the previous revision lies under the drawing. */
	ghosted = $state(true);
	/** What stands beside the front view where not everything has room. */
	beside = $state<SideCell>('curves');
	/** What is shown alone on a narrow screen. */
	alone = $state<SheetSpec['cell']>('front');
	/** The dimension being typed. */
	typing = $state<DimensionKey | null>(null);
	/** Where the point came from while it is dragged, mm. */
	from = $state.raw<{ key: MarkKey; place: Vec3 } | null>(null);

	constructor(source: PointsSource) {
		this.#source = source;
		const model = this as PointsModel;
		this.sheet = new SheetModel({
			get width() {
				return source.width;
			},
			get height() {
				return source.height;
			},
			get mode() {
				return source.mode;
			},
			get hand() {
				return model.hand;
			},
			get cell() {
				return source.mode === 'single' ? model.alone : model.beside;
			},
			get corner() {
				return model.corner;
			},
			get atRide() {
				return model.atRide;
			},
			get ghosts() {
				return model.ghosts;
			},
			get dimensions() {
				return model.dimensions;
			},
			get holdStill() {
				return source.editor.dragging;
			}
		});
	}

	get edit(): number {
		return this.#source.editor.revisionCounter;
	}

	readonly #entered = $derived.by(() => cornerOf(this.#source.editor.document, this.#source.selection.side));
	readonly hand: Hand = $derived(this.#entered.hand);
	readonly #radius: number | null = $derived(this.#entered.corner.wheel.loadedRadius);
	readonly tyre: DrawnTyre = $derived.by(() => tyreOf(this.#radius, this.#source.build.tyreSize));
	readonly #typed: DrawnCorner = $derived(drawnEntry(this.#entered.corner, this.hand, this.tyre));
	/** True while not one point is typed: the sheet shows its example and one act. */
	readonly empty: boolean = $derived(Object.keys(this.#typed.places).length === 0);
	readonly #faulty: boolean = $derived.by(() => this.#source.solution.error !== null);

	/** The solved state the drawing shows: at the travel slide, or the nearest that is reached. */
	readonly state: CornerState | null = $derived.by(() => {
		const { solution } = this.#source;
		if (solution.atTravel) return solution.atTravel;
		return (solution.travel > 0 ? solution.sweep?.states.at(-1) : solution.sweep?.states[0]) ?? null;
	});

	readonly #exampleCorner: DrawnCorner = $derived.by(() => {
		const { example } = this.#source;
		const geometry = geometryOf(example, 'left');
		const state = geometry && tryState(geometry, 0);
		return state
			? { ...drawnState(state, tyreOf(geometry.wheel.loadedRadius, '')), rollCentre: null }
			: drawnEntry(example.left, 'left', this.tyre);
	});

	#lastCorner: DrawnCorner | undefined;
	readonly corner: DrawnCorner = $derived.by(() => {
		const drawn = this.empty ? this.#exampleCorner : this.state ? drawnState(this.state, this.tyre) : this.#typed;
		this.#lastCorner = reuse(this.#lastCorner, drawn);
		return this.#lastCorner;
	});

	/** What the sheet's room is worked out from. */
	readonly atRide: DrawnCorner = $derived.by(() => {
		const { ride } = this.#source.solution;
		if (this.empty) return this.#exampleCorner;
		return ride ? drawnState(ride, this.tyre) : this.#typed;
	});

	readonly #previous = $derived.by(() => {
		const { previous, solution } = this.#source;
		const geometry = previous && geometryOf(previous.document, this.hand);
		const ride = geometry && tryState(geometry, 0);
		if (!previous || !geometry || !ride) return null;
		try {
			return { letter: previous.letter, geometry, ride, sweep: sweepBump(geometry, solution.range) };
		} catch (error) {
			if (error instanceof KinematicsError) return null;
			throw error;
		}
	});

	readonly previousLetter: string | null = $derived(this.#previous?.letter ?? null);

	readonly ghosts: DrawnCorner[] = $derived.by(() => {
		const { solution } = this.#source;
		if (this.empty) return [];
		if (this.#faulty) return solution.lastGood ? [drawnState(solution.lastGood.ride, this.tyre)] : [];
		if (!this.ghosted || !this.#previous) return [];
		const state = tryState(this.#previous.geometry, solution.travel);
		return state ? [drawnState(state, this.tyre)] : [];
	});

	#lastRows: FigureRow[] | undefined;
	readonly rows: FigureRow[] = $derived.by(() => {
		const { solution, preferences } = this.#source;
		const solved = solution.lastGood;
		if (!solved || this.empty) return [];
		const now = this.#faulty ? solved.ride : (this.state ?? solved.ride);
		this.#lastRows = reuse(this.#lastRows, figureRows(solved, now, preferences));
		return this.#lastRows;
	});

	/** Bars, arms and marks at fault. */
	readonly miss: readonly string[] = $derived.by(() => {
		if (!this.#faulty) return [];
		const { error } = this.#source.solution;
		return [error?.at, error?.locks].filter((name) => name !== undefined);
	});

	readonly dimensions: Partial<Record<DimensionKey, DimensionText>> = $derived.by(() => {
		const { state, rows, empty } = this;
		const { editor, preferences, solution } = this.#source;
		const { wheel } = this.#entered.corner;
		if (!state || empty || !solution.ride) return {};
		return dimensionTexts({ state, ride: solution.ride, wheel, rows, preferences, readOnly: editor.readOnly });
	});

	/** Marks say name and coordinates, so that a view can be read without seeing it. */
	#lastNames: Record<MarkKey, string> | undefined;
	readonly names: Record<MarkKey, string> = $derived.by(() => {
		const { preferences, build, editor } = this.#source;
		// Nobody hears forty names a second: they follow when the drag ends.
		if (editor.dragging && this.#lastNames) return this.#lastNames;
		const names = { ...MARK_NAMES };
		for (const key of POINT_ORDER) {
			const place = this.entry(key);
			if (!place) continue;
			const said = placeWords(place, build.datum, this.hand, preferences);
			names[key] = `${MARK_NAMES[key]}, ${said.out}, ${said.up}, ${said.fore}`;
		}
		this.#lastNames = reuse(this.#lastNames, names);
		return this.#lastNames;
	});

	#lastTravel: TravelSpec | undefined;
	readonly travel: TravelSpec = $derived.by(() => {
		const { solution, preferences } = this.#source;
		const spec = travelSpec(this.state?.travel ?? 0, solution.range, solution.sweep, preferences);
		this.#lastTravel = reuse(this.#lastTravel, spec);
		return this.#lastTravel;
	});
	readonly #domain: Domain = $derived(this.travel.domain);

	readonly #curved: Curved[] = $derived.by(() => {
		const { solution } = this.#source;
		const curved: Curved[] = [];
		if (solution.ride && solution.sweep) curved.push({ label: this.name, ride: solution.ride, sweep: solution.sweep });
		if (this.ghosted && this.#previous && curved.length) {
			curved.push({ label: this.#previous.letter, ride: this.#previous.ride, sweep: this.#previous.sweep });
		}
		return curved;
	});

	/** Where the curves stand beside the front view, or null where the sheet has no room for them now. */
	readonly plot: Plot | null = $derived.by(() => {
		const { charts, wheelY } = this.sheet.layout;
		const headroom = this.#source.mode === 'narrow' ? SWITCH_ROOM : 0;
		return charts && plotCurves(charts, wheelY, this.#domain, headroom);
	});

	/** The curves; the slide moves over them and leaves them as they are. */
	#lastCurves: ChartSpec[] | undefined;
	readonly curves: ChartSpec[] = $derived.by(() => {
		const count = this.#curved.length ? (this.plot?.count ?? 0) : 0;
		this.#lastCurves = reuse(
			this.#lastCurves,
			CURVES.slice(0, count).map((key) => this.#curve(key))
		);
		return this.#lastCurves;
	});
	#lastLayouts: ChartLayout[] = [];
	readonly curveLayouts: ChartLayout[] = $derived.by(() => {
		const laid = this.plot ? layCharts(this.curves, this.plot.left, this.plot.width) : [];
		// A layout holds its scale as a function: the same edges and domain are the same layout.
		this.#lastLayouts = laid.map((one, k) => {
			const last = this.#lastLayouts[k];
			const same =
				last && last.left === one.left && last.right === one.right && String(last.domain) === String(one.domain);
			return same ? last : one;
		});
		return this.#lastLayouts;
	});

	/** What stands at the cursor of a curve. */
	cursor(key: string): number | null {
		const { solution, preferences } = this.#source;
		return shownValue(key as FigureKey, this.state, solution.ride, preferences);
	}

	#curve(key: FigureKey): ChartSpec {
		const { editor, preferences } = this.#source;
		return curveSpec(key, this.#curved, null, editor.document.targets, preferences);
	}

	/** One figure's chart on its own, for a phone. */
	chart(key: FigureKey): ChartSpec | null {
		return this.#curved.length ? { ...this.#curve(key), cursorValue: this.cursor(key) } : null;
	}

	/** What stands at the end of the curve in hand. */
	name = $state('draft');

	/** What the trammel reads, mm; null until it stands on two points. */
	readonly trammel = $derived.by(() => {
		const { selection, editor } = this.#source;
		const [first, second] = selection.trammel ?? [null, null];
		const { places } = this.corner;
		const [a, b] = [first && places[first], second && places[second]];
		if (!first || !second || !a || !b) return null;
		const { document } = editor;
		const other =
			document.right === 'mirror'
				? null
				: drawnEntry(
						this.hand === 'left' ? document.right : document.left,
						this.hand === 'left' ? 'right' : 'left',
						this.tyre
					).places;
		const pair = other && other[first] && other[second] ? ([other[first], other[second]] as const) : null;
		return { first, second, mirrored: pair === null, ...readTrammel(a, b, pair, this.hand) };
	});

	entry(key: MarkKey): Vec3 | null {
		const entry = entryOf(this.#entered.corner, key);
		return entry && entry.every((value) => value !== null) ? (entry as Vec3) : null;
	}
}
