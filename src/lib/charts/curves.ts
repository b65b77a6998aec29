import { OUTPUTS, reasonOf } from '$lib/domain/outputs';
import { decimalsOf, formatMinutes, formatNumber, NONE, unitLabel } from '$lib/format';
import type { CornerState, Sweep } from '$lib/kinematics';
import type { FigureKey, Target } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';
import { toDisplay, type Quantity } from '$lib/units';
import type { ChartSpec } from './multiples';
import type { Band, CurvePoint, Series } from './scale';
import { limitOf } from './travel';

/** A corner's curves with the name that stands at their ends. */
export interface Curved {
	label: string;
	ride: CornerState;
	sweep: Sweep<CornerState>;
	/** Which colour and dash of the series list; by its place where it is not said. */
	seriesIndex?: number;
}

/** Least spread of a curve's scale, stored units: finer than this is noise at the bench. */
const LEAST: Partial<Record<FigureKey, number>> = {
	camber: 1,
	toe: 0.2,
	bumpSteer: 0.2,
	rollCentreHeight: 20,
	rollCentreByArms: 20,
	swingArmFront: 200,
	halfTrack: 5
};
const LEAST_OF: Partial<Record<Quantity, number>> = {
	angle: 0.5,
	length: 10,
	anglePerLength: 0.01,
	lengthPerLength: 0.02,
	ratio: 0.05,
	percent: 5,
	rate: 5,
	frequency: 0.1
};
const FROM_ZERO: ReadonlySet<FigureKey> = new Set(['bumpSteer', 'camber', 'toe', 'halfTrack']);

/** A target at ride height is hooked over this much travel to either side, mm. */
const RIDE_HOOK = 6;
/** Near a bind the rates of a corner run away, mm. */
const RUNS_AWAY = 1;
/** A swing arm longer than this is drawn as a gap, mm: nearly parallel arms, and a scale nobody reads. */
const LONGEST_ARM = 20_000;

const RUNNING: ReadonlySet<Quantity> = new Set(['anglePerLength', 'lengthPerLength', 'percent', 'rate']);

/** Whether a value belongs on the chart: all do but those that would flatten the rest of the curve to a line. */
function drawable(key: FigureKey, value: number, travel: number, { lowLimit, highLimit }: Sweep<CornerState>): boolean {
	if (key === 'swingArmFront') return Math.abs(value) <= LONGEST_ARM;
	if (!RUNNING.has(OUTPUTS[key].quantity)) return true;
	return [lowLimit, highLimit].every((limit) => !limit || Math.abs(limit.value - travel) > RUNS_AWAY);
}

/** Points already read off a sweep, in one choice of units: what lies under a drawing does not change while it is worked on. */
const READ = new WeakMap<Sweep<CornerState>, WeakMap<Preferences, Map<FigureKey, CurvePoint[]>>>();

function pointsOf(key: FigureKey, curved: Curved, preferences: Preferences): CurvePoint[] {
	const byChoice = READ.get(curved.sweep) ?? new WeakMap<Preferences, Map<FigureKey, CurvePoint[]>>();
	const byKey = byChoice.get(preferences) ?? new Map<FigureKey, CurvePoint[]>();
	READ.set(curved.sweep, byChoice.set(preferences, byKey));
	const points = byKey.get(key) ?? readPoints(key, curved, preferences);
	byKey.set(key, points);
	return points;
}

function readPoints(key: FigureKey, { ride, sweep }: Curved, preferences: Preferences): CurvePoint[] {
	const { quantity, read } = OUTPUTS[key];
	return sweep.states.map((state) => {
		const value = read(state, ride);
		const shown = value !== null && drawable(key, value, state.travel, sweep);
		return {
			travel: toDisplay(state.travel, 'length', preferences),
			value: shown ? toDisplay(value, quantity, preferences) : null
		};
	});
}

/** The largest and smallest of a figure over a stretch of travel, or null where it is not all there. */
function spreadOf(
	key: FigureKey,
	{ ride, sweep }: Curved,
	from: number,
	to: number
): [low: number, high: number] | null {
	const values = sweep.states
		.filter(({ travel }) => travel >= from && travel <= to)
		.map((state) => OUTPUTS[key].read(state, ride));
	if (values.length === 0 || values.some((value) => value === null)) return null;
	return [Math.min(...(values as number[])), Math.max(...(values as number[]))];
}

/** The band of one target, in stored units: a peak holds to both sides of none, a range counts from the curve's own lowest. */
function bandOf(target: Target, first: Curved | undefined): Band | null {
	if (target.at === 'ride') return { from: -RIDE_HOOK, to: RIDE_HOOK, low: target.low, high: target.high };
	const { from, to, high } = target;
	if (high === null) return null;
	if (target.measure === 'peak') return { from, to, low: -high, high };
	const spread = first && spreadOf(target.figure, first, from, to);
	return spread ? { from, to, low: spread[0], high: spread[0] + high } : null;
}

function bandsOf(
	key: FigureKey,
	first: Curved | undefined,
	targets: readonly Target[],
	preferences: Preferences
): Band[] {
	const { quantity } = OUTPUTS[key];
	const shown = (value: number | null) => (value === null ? null : toDisplay(value, quantity, preferences));
	const travel = (mm: number) => toDisplay(mm, 'length', preferences);
	return targets
		.filter((target) => target.figure === key)
		.map((target) => bandOf(target, first))
		.filter((band) => band !== null)
		.map(({ from, to, low, high }) => ({ from: travel(from), to: travel(to), low: shown(low), high: shown(high) }));
}

/** The shown value of a figure in a state, for the cursor; null where it does not exist. */
export function shownValue(
	key: FigureKey,
	state: CornerState | null,
	ride: CornerState | null,
	preferences: Preferences
): number | null {
	const value = state && ride ? OUTPUTS[key].read(state, ride) : null;
	return value === null ? null : toDisplay(value, OUTPUTS[key].quantity, preferences);
}

const WRITERS = new WeakMap<Preferences, Map<Quantity, ChartSpec['format']>>();

/** Writes values of a quantity as a person reads them; one writer for one choice, so that equal specs are equal. */
function writerOf(quantity: Quantity, preferences: Preferences): ChartSpec['format'] {
	const byQuantity = WRITERS.get(preferences) ?? new Map<Quantity, ChartSpec['format']>();
	WRITERS.set(preferences, byQuantity);
	const minutes = quantity === 'angle' && preferences.angle === 'minutes';
	const write =
		byQuantity.get(quantity) ??
		((shown: number | null, decimals?: number) => {
			if (shown === null) return NONE;
			return minutes && decimals === undefined
				? formatMinutes(shown)
				: formatNumber(shown, decimals ?? decimalsOf(quantity, preferences), preferences);
		});
	byQuantity.set(quantity, write);
	return write;
}

/** One figure's chart: the corner in hand first, others under it. `now` is the state at the slide, null where the cursor is told apart. */
export function curveSpec(
	key: FigureKey,
	curved: readonly Curved[],
	now: CornerState | null,
	targets: readonly Target[],
	preferences: Preferences
): ChartSpec {
	const { quantity, short } = OUTPUTS[key];
	const series: Series[] = curved.map((one, place) => ({
		key: one.label,
		label: one.label,
		seriesIndex: one.seriesIndex ?? place,
		points: pointsOf(key, one, preferences),
		limits: { low: limitOf(one.sweep.lowLimit, preferences), high: limitOf(one.sweep.highLimit, preferences) }
	}));
	const first = curved[0];
	return {
		key,
		label: short,
		unit: unitLabel(quantity, preferences),
		series,
		bands: bandsOf(key, first, targets, preferences),
		rule: {
			least: toDisplay(LEAST[key] ?? LEAST_OF[quantity] ?? 1, quantity, preferences),
			include: FROM_ZERO.has(key) ? [0] : []
		},
		format: writerOf(quantity, preferences),
		cursorValue: shownValue(key, now, first?.ride ?? null, preferences),
		...(first && series.every(({ points }) => points.every(({ value }) => value === null))
			? { why: reasonOf(key, first.ride) ?? 'Nothing to draw over this travel.' }
			: {})
	};
}
