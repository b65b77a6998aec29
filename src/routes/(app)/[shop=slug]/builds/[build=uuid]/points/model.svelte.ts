import { AXIS_ROOM, layCharts, type ChartSpec } from '$lib/charts/multiples';
import { linear } from '$lib/charts/scale';
import { axleGeometry, rightCorner } from '$lib/domain/axle';
import { OUTPUTS } from '$lib/domain/outputs';
import { POINTS } from '$lib/domain/points';
import type { DimensionKey, DimensionText } from '$lib/drawing/figures';
import type { SheetMode, SheetSpec, SideCell } from '$lib/drawing/layout';
import type { MarkKey, MarkKind } from '$lib/drawing/linkage';
import type { Hand } from '$lib/drawing/projection';
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
import { entryOf } from '$lib/domain/points';
import type { AxleDocument, CornerEntry, FigureKey } from '$lib/schemas/axle';
import type { BuildFacts } from '$lib/schemas/build';
import type { Preferences } from '$lib/schemas/preferences';
import type { DraftEditor } from '$lib/state/draft.svelte';
import type { Selection } from '$lib/state/selection.svelte';
import type { Solution } from '$lib/state/solution.svelte';
import { drawnEntry, drawnState, tyreOf } from '$lib/drawing/corner';
import { curveSpec, type Curved } from '$lib/charts/curves';
import { travelSpec } from '$lib/charts/travel';
import { CURVES, quantityText } from './curves';
import { figureRows, spokenFigure, type FigureRow } from './figures';

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

const CHARTS_HEAD = 58;
const CHARTS_FOOT = 26;
/** Over the curves stands the switch of what is shown there. */
const SWITCH_ROOM = 20;
const LEADER_ROOM = 10;

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
	readonly tyre = $derived.by(() => tyreOf(this.#entered.corner.wheel.loadedRadius, this.#source.build.tyreSize));
	readonly #typed: DrawnCorner = $derived(drawnEntry(this.#entered.corner, this.hand, this.tyre));
	/** True while not one point is typed: the sheet shows its example and one act. */
	readonly empty: boolean = $derived(Object.keys(this.#typed.places).length === 0);

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

	readonly corner: DrawnCorner = $derived(
		this.empty ? this.#exampleCorner : this.state ? drawnState(this.state, this.tyre) : this.#typed
	);

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
		if (solution.error) return solution.lastGood ? [drawnState(solution.lastGood.ride, this.tyre)] : [];
		if (!this.ghosted || !this.#previous) return [];
		const state = tryState(this.#previous.geometry, solution.travel);
		return state ? [drawnState(state, this.tyre)] : [];
	});

	readonly rows: FigureRow[] = $derived.by(() => {
		const { solution, preferences } = this.#source;
		const solved = solution.lastGood;
		if (!solved || this.empty) return [];
		return figureRows(solved, solution.error ? solved.ride : (this.state ?? solved.ride), preferences);
	});

	row(key: FigureKey): FigureRow | null {
		return this.rows.find((row) => row.key === key) ?? null;
	}

	/** Bars, arms and marks at fault. */
	readonly miss: readonly string[] = $derived.by(() => {
		const { error } = this.#source.solution;
		return [error?.at, error?.locks].filter((name) => name !== undefined);
	});

	readonly dimensions: Partial<Record<DimensionKey, DimensionText>> = $derived.by(() => {
		const { state } = this;
		if (!state || this.empty) return {};
		const { editor, preferences, solution } = this.#source;
		const atRide = solution.travel === 0;
		const { wheel } = this.#entered.corner;
		const figure = (key: FigureKey, typed: boolean, label = OUTPUTS[key].short): DimensionText | undefined => {
			const value = OUTPUTS[key].read(state, solution.ride ?? state);
			if (value === null) return undefined;
			const row = this.row(key);
			const angle = OUTPUTS[key].quantity === 'angle' && preferences.angle === 'decimal' ? '°' : '';
			return {
				text: `${label} ${quantityText(value, key, preferences)}${angle}`,
				name: row && atRide ? spokenFigure(row) : `${OUTPUTS[key].label} ${quantityText(value, key, preferences)}`,
				verdict: atRide ? (row?.verdict ?? null) : null,
				editable: typed && atRide && !editor.readOnly
			};
		};
		const length = (value: number | null, name: string, label: string): DimensionText | undefined => {
			if (value === null) return undefined;
			const text = quantityText(value, 'scrubRadius', preferences);
			return { text: `${label}${text}`, name: `${name} ${text}`, verdict: null, editable: !editor.readOnly };
		};
		const toe = figure('toe', true);
		return {
			camber: figure('camber', true),
			kpi: figure('kpi', false),
			scrubRadius: figure('scrubRadius', false),
			rollCentreHeight: figure('rollCentreHeight', false, 'RC'),
			track: length(wheel.track, 'track', 'track '),
			loadedRadius: length(wheel.loadedRadius, 'loaded radius', ''),
			caster: figure('caster', false),
			mechanicalTrail: figure('mechanicalTrail', false),
			toe: toe && { ...toe, note: 'per wheel' }
		};
	});

	readonly travel = $derived.by(() => {
		const { solution, preferences } = this.#source;
		return travelSpec(this.state?.travel ?? 0, solution.range, solution.sweep, preferences);
	});

	readonly #curved: Curved[] = $derived.by(() => {
		const { solution } = this.#source;
		const curved: Curved[] = [];
		if (this.state && solution.ride && solution.sweep) {
			curved.push({ label: this.name, ride: solution.ride, sweep: solution.sweep });
		}
		if (this.ghosted && this.#previous && curved.length) {
			curved.push({ label: this.#previous.letter, ride: this.#previous.ride, sweep: this.#previous.sweep });
		}
		return curved;
	});

	/** The curves beside the front view, laid out, or null where the sheet has no room for them now. */
	readonly charts = $derived.by(() => {
		const { charts: box, wheelY } = this.sheet.layout;
		if (!box) return null;
		const { editor, preferences } = this.#source;
		const left = box.x + LEADER_ROOM + AXIS_ROOM + 12;
		const width = box.x + box.w - left - 4;
		const count = width >= 340 ? 4 : width >= 204 ? 3 : 2;
		const top = box.y + (this.#source.mode === 'narrow' ? SWITCH_ROOM : 0) + CHARTS_HEAD;
		const bottom = box.y + box.h - CHARTS_FOOT;
		const { domain } = this.travel;
		// Ride height stands at the wheel centre's own height on the sheet; the travel's scale is as large as that allows.
		const perUnit = Math.min((wheelY - top) / domain[1], (bottom - wheelY) / -domain[0]);
		const y = linear(domain, [wheelY - domain[0] * perUnit, wheelY - domain[1] * perUnit]);
		const { state } = this;
		const curved = this.#curved;
		const specs = state
			? CURVES.slice(0, count).map((key) => curveSpec(key, curved, state, editor.document.targets, preferences))
			: [];
		return {
			box,
			y,
			specs,
			layouts: layCharts(specs, left, width),
			axisX: box.x + LEADER_ROOM + AXIS_ROOM,
			right: box.x + box.w - 4,
			plateX: box.x + LEADER_ROOM - 2
		};
	});

	/** One figure's chart on its own, for a phone. */
	chart(key: FigureKey): ChartSpec | null {
		const { state } = this;
		const { editor, preferences } = this.#source;
		return state && this.#curved.length
			? curveSpec(key, this.#curved, state, editor.document.targets, preferences)
			: null;
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
