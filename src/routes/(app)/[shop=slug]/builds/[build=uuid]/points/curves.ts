import type { ChartSpec, TravelSpec } from '$lib/charts/multiples';
import type { Band, CurvePoint, Limit, Series } from '$lib/charts/scale';
import { OUTPUTS } from '$lib/domain/outputs';
import { decimalsOf, formatMinutes, formatNumber, formatQuantity, NONE, unitLabel } from '$lib/format';
import type { CornerState, Sweep, SweepLimit } from '$lib/kinematics';
import type { FigureKey, Target } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';
import { toDisplay } from '$lib/units';
import { stepMm, travelText } from './words';

/** A corner's curves with the name that stands at their ends. */
export interface Curved {
	label: string;
	ride: CornerState;
	sweep: Sweep<CornerState>;
}

/** The curves beside the front view, most wanted first; as many as there is room for. */
export const CURVES: readonly FigureKey[] = ['camber', 'bumpSteer', 'rollCentreHeight', 'caster'];

/** Least spread of a curve's scale, stored units: finer than this is noise at the bench. */
const LEAST: Partial<Record<FigureKey, number>> = { camber: 1, bumpSteer: 0.2, caster: 0.5, rollCentreHeight: 20 };
const FROM_ZERO: ReadonlySet<FigureKey> = new Set(['bumpSteer', 'camber']);
/** A target at ride height is hooked over this much travel to either side, mm. */
const RIDE_HOOK = 6;

const shownTravel = (mm: number, preferences: Preferences) => toDisplay(mm, 'length', preferences);

function pointsOf(key: FigureKey, { ride, sweep }: Curved, preferences: Preferences): CurvePoint[] {
	const { quantity, read } = OUTPUTS[key];
	return sweep.states.map((state) => {
		const value = read(state, ride);
		return {
			travel: shownTravel(state.travel, preferences),
			value: value === null ? null : toDisplay(value, quantity, preferences)
		};
	});
}

function bandsOf(key: FigureKey, targets: readonly Target[], preferences: Preferences): Band[] {
	const { quantity } = OUTPUTS[key];
	const shown = (value: number | null) => (value === null ? null : toDisplay(value, quantity, preferences));
	return targets
		.filter((target) => target.figure === key && (target.at === 'ride' || target.measure === 'peak'))
		.map((target) => ({
			from: shownTravel(target.at === 'ride' ? -RIDE_HOOK : target.from, preferences),
			to: shownTravel(target.at === 'ride' ? RIDE_HOOK : target.to, preferences),
			// A peak is a size: its upper bound holds to both sides of none.
			low: shown(target.at === 'travel' ? (target.high === null ? null : -target.high) : target.low),
			high: shown(target.high)
		}));
}

/** One figure's chart: the corner in hand first, others under it. */
export function curveSpec(
	key: FigureKey,
	curved: readonly Curved[],
	now: CornerState,
	targets: readonly Target[],
	preferences: Preferences
): ChartSpec {
	const { quantity, short, read } = OUTPUTS[key];
	const series: Series[] = curved.map((one, seriesIndex) => ({
		key: one.label,
		label: one.label,
		seriesIndex,
		points: pointsOf(key, one, preferences)
	}));
	const first = curved[0];
	const value = first ? read(now, first.ride) : null;
	const minutes = quantity === 'angle' && preferences.angle === 'minutes';
	return {
		key,
		label: short,
		unit: unitLabel(quantity, preferences),
		series,
		bands: bandsOf(key, targets, preferences),
		rule: { least: toDisplay(LEAST[key] ?? 1, quantity, preferences), include: FROM_ZERO.has(key) ? [0] : [] },
		format: (shown, decimals) => {
			if (shown === null) return NONE;
			return minutes && decimals === undefined
				? formatMinutes(shown)
				: formatNumber(shown, decimals ?? decimalsOf(quantity, preferences), preferences);
		},
		cursorValue: value === null ? null : toDisplay(value, quantity, preferences)
	};
}

const LOCKS: Record<SweepLimit['locks'], string> = { upperArm: 'upper arm', lowerArm: 'lower arm', tieRod: 'tie rod' };

function limitOf(limit: SweepLimit | undefined, preferences: Preferences): Limit | null {
	if (!limit) return null;
	return {
		travel: shownTravel(limit.value, preferences),
		reason: `${LOCKS[limit.locks]} binds at ${travelText(limit.value, preferences)}`
	};
}

/** The travel all curves share, in the person's units. */
export function travelSpec(
	at: number,
	range: { from: number; to: number },
	sweep: Sweep<CornerState> | null,
	preferences: Preferences
): TravelSpec {
	const perUnit = shownTravel(1, preferences);
	return {
		domain: [range.from * perUnit, range.to * perUnit],
		at: at * perUnit,
		low: limitOf(sweep?.lowLimit, preferences),
		high: limitOf(sweep?.highLimit, preferences),
		format: (shown) => (preferences.length === 'mm' ? travelText(shown, preferences) : inchText(shown, preferences)),
		unit: unitLabel('length', preferences),
		step: stepMm(false, preferences) * perUnit,
		fine: stepMm(true, preferences) * perUnit
	};
}

/** Inches on the slide and its ticks: three decimals at most, fewer where they say as much. */
function inchText(shown: number, preferences: Preferences): string {
	const text = formatNumber(shown, 3, preferences)
		.replace(/([.,]\d*?)0+$/, '$1')
		.replace(/[.,]$/, '');
	return shown > 0 ? `+${text}` : text;
}

export const quantityText = (value: number | null, key: FigureKey, preferences: Preferences): string =>
	formatQuantity(value, OUTPUTS[key].quantity, preferences);
