import { formatInchFraction, formatNumber, formatQuantity, NONE, type WritingChoice } from '$lib/format';
import { MM_PER_INCH } from '$lib/units';

/** Whether a length is a 64th of an inch, as inch shims are. */
function isSixtyFourth(mm: number): boolean {
	const parts = (mm / MM_PER_INCH) * 64;
	return Math.abs(parts - Math.round(parts)) < 1e-6;
}

/**
 * A shim or pack as it is read off a micrometer: two decimals of a mm, three of an inch, a fraction where it is one and
 * fractions are wanted. The registry's one decimal of a mm would call 1/32 in and 0.8 mm the same.
 */
export function formatThickness(mm: number | null, preferences: WritingChoice): string {
	if (mm === null || !Number.isFinite(mm)) return NONE;
	if (preferences.length === 'mm') return formatNumber(mm, 2, preferences);
	if (preferences.inches === 'fraction' && isSixtyFourth(mm)) return formatInchFraction(mm);
	return formatNumber(mm / MM_PER_INCH, 3, preferences);
}

/** A change of pack or leg, signed. */
export function formatGrowth(mm: number | null, preferences: WritingChoice): string {
	const text = formatThickness(mm, preferences);
	return mm !== null && mm > 0 && /[1-9]/.test(text) ? `+${text}` : text;
}

/** "mm" or "in". */
export function lengthUnit(preferences: WritingChoice): string {
	return preferences.length;
}

/** Turns with their half or hundredth: "1½", "−0.35"; a sleeve is set to any part of a turn. */
export function formatTurns(turns: number, preferences: WritingChoice): string {
	const halves = turns * 2;
	if (Math.abs(halves - Math.round(halves)) > 1e-6) return formatNumber(turns, 2, preferences);
	const whole = Math.floor(Math.abs(Math.round(halves)) / 2);
	const half = Math.abs(Math.round(halves)) % 2 === 1;
	if (whole === 0 && !half) return '0';
	return `${turns < 0 ? '\u2212' : ''}${whole > 0 ? whole : ''}${half ? '½' : ''}`;
}

/** An angle as it is read off a gauge. */
export function formatAngle(degrees: number | null, preferences: WritingChoice): string {
	return formatQuantity(degrees, 'angle', preferences);
}
