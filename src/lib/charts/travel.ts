import { LINK_NAMES } from '$lib/domain/points';
import { formatDelta, formatNumber, unitLabel } from '$lib/format';
import type { CornerState, Sweep, SweepLimit } from '$lib/kinematics';
import type { Preferences } from '$lib/schemas/preferences';
import { MM_PER_INCH, toDisplay } from '$lib/units';
import type { TravelSpec } from './multiples';
import type { Limit } from './scale';

/** One step of a drag or an arrow key, mm: 1 mm or 1/16 in; fine 0.1 mm or 1/64 in. */
export function stepMm(fine: boolean, preferences: Preferences): number {
	if (preferences.length === 'mm') return fine ? 0.1 : 1;
	return MM_PER_INCH / (fine ? 64 : 16);
}

/** The travel slide's figure: signed, tenths of a mm only where there are any. */
export function travelText(mm: number, preferences: Preferences): string {
	if (preferences.length === 'in') return formatDelta(mm, 'length', preferences);
	const tenths = Math.round(mm * 10) / 10;
	const text = formatNumber(tenths, Number.isInteger(tenths) ? 0 : 1, preferences);
	return tenths > 0 ? `+${text}` : text;
}

/** Inches on the slide and its ticks: three decimals at most, fewer where they say as much. */
function inchText(shown: number, preferences: Preferences): string {
	const text = formatNumber(shown, 3, preferences)
		.replace(/([.,]\d*?)0+$/, '$1')
		.replace(/[.,]$/, '');
	return shown > 0 ? `+${text}` : text;
}

/** One writer for one choice of units: charts that compare their travel by identity see no change where there is none. */
const WRITERS = new WeakMap<Preferences, TravelSpec['format']>();

function writer(preferences: Preferences): TravelSpec['format'] {
	const write =
		WRITERS.get(preferences) ??
		((shown: number) => (preferences.length === 'mm' ? travelText(shown, preferences) : inchText(shown, preferences)));
	WRITERS.set(preferences, write);
	return write;
}

/** Where a sweep binds, as the chart shows it; null where it does not. */
export function limitOf(limit: SweepLimit | undefined, preferences: Preferences): Limit | null {
	if (!limit) return null;
	return {
		travel: toDisplay(limit.value, 'length', preferences),
		reason: `${LINK_NAMES[limit.locks]} binds at ${travelText(limit.value, preferences)}`
	};
}

/** The travel all curves share, in the person's units. `at` and `range` are mm. */
export function travelSpec(
	at: number,
	range: { from: number; to: number },
	sweep: Pick<Sweep<CornerState>, 'lowLimit' | 'highLimit'> | null,
	preferences: Preferences
): TravelSpec {
	const perUnit = toDisplay(1, 'length', preferences);
	return {
		domain: [range.from * perUnit, range.to * perUnit],
		at: at * perUnit,
		low: limitOf(sweep?.lowLimit, preferences),
		high: limitOf(sweep?.highLimit, preferences),
		format: writer(preferences),
		unit: unitLabel('length', preferences),
		step: stepMm(false, preferences) * perUnit,
		fine: stepMm(true, preferences) * perUnit
	};
}
