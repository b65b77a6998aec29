import Fraction from 'fraction.js';
import type { Preferences } from './schemas/preferences';
import { MINUTES_PER_DEGREE, MM_PER_INCH, toDisplay } from './units';
import type { Quantity, UnitChoice } from './units';

export const MINUS = '\u2212';
/** Stands for a figure that does not exist or is not known. */
export const NONE = '\u2013';
const DEGREE = '°';
const PRIME = '\u2032';

/** How a person writes numbers. */
export type WritingChoice = UnitChoice & Pick<Preferences, 'inches' | 'numbers'>;

/** The one registry of decimals: as many as a shop can measure, no more. */
export function decimalsOf(quantity: Quantity, { length, angle, force }: UnitChoice): number {
	switch (quantity) {
		case 'length':
			return length === 'in' ? 3 : 1;
		case 'angle':
			return 2;
		case 'anglePerLength':
			return angle === 'minutes' ? 1 : 3;
		case 'lengthPerLength':
		case 'ratio':
			return 3;
		case 'percent':
		case 'frequency':
			return quantity === 'percent' ? 1 : 2;
		case 'rate':
			return force === 'lbf' ? 0 : 1;
		case 'force':
			return 0;
		case 'mass':
			return 1;
	}
}

/** The unit as it stands in a table's head or after a figure; empty for a ratio. */
export function unitLabel(quantity: Quantity, { length, angle, force }: UnitChoice): string {
	const inches = length === 'in';
	switch (quantity) {
		case 'length':
			return inches ? 'in' : 'mm';
		case 'angle':
			return angle === 'minutes' ? `${DEGREE} ${PRIME}` : DEGREE;
		case 'anglePerLength':
			return `${angle === 'minutes' ? PRIME : DEGREE}/${inches ? 'in' : '10 mm'}`;
		case 'lengthPerLength':
			return inches ? 'in/in' : 'mm/10 mm';
		case 'ratio':
			return '';
		case 'percent':
			return '%';
		case 'rate':
			return force === 'lbf' ? 'lb/in' : 'N/mm';
		case 'frequency':
			return 'Hz';
		case 'force':
			return force === 'lbf' ? 'lbf' : 'N';
		case 'mass':
			return force === 'lbf' ? 'lb' : 'kg';
	}
}

/** True minus sign, no sign on a zero, the person's decimal sign. */
function written(digits: string, numbers: Preferences['numbers']): string {
	const zero = !/[1-9]/.test(digits);
	const signed = digits.startsWith('-') ? (zero ? digits.slice(1) : MINUS + digits.slice(1)) : digits;
	return numbers === 'comma' ? signed.replace('.', ',') : signed;
}

/** A plain number with a fixed count of decimals, no thousands signs. A dash for what is absent. */
export function formatNumber(
	value: number | null,
	decimals: number,
	{ numbers }: Pick<Preferences, 'numbers'>
): string {
	if (value === null || !Number.isFinite(value)) return NONE;
	// Number.toFixed turns to exponents at 1e21; nothing here is that far.
	return written(value.toFixed(decimals), numbers);
}

/** Within this a fraction counts as exact, mm: under what a steel rule shows. */
const FRACTION_EXACT_MM = 0.02;

/**
 * A length as inches and a fraction: the 64th where the length is one (to 0.02 mm), else the nearest 32nd, which a tape
 * shows, after "≈". "12 3/8", "≈12 13/32", "−3/8".
 */
export function formatInchFraction(mm: number): string {
	const inches = Math.abs(mm) / MM_PER_INCH;
	const offBy = (parts: number) => Math.abs(Math.round(inches * parts) / parts - inches) * MM_PER_INCH;
	const exact = offBy(64) <= FRACTION_EXACT_MM;
	const parts = exact ? 64 : 32;
	const fraction = new Fraction(Math.round(inches * parts), parts);
	const sign = mm < 0 && fraction.n > 0n ? MINUS : '';
	return `${exact ? '' : '≈'}${sign}${fraction.toFraction(true)}`;
}

/** Degrees and whole minutes: "−0°30′". */
export function formatMinutes(degrees: number): string {
	const minutes = Math.round(Math.abs(degrees) * MINUTES_PER_DEGREE);
	const sign = degrees < 0 && minutes > 0 ? MINUS : '';
	const whole = Math.floor(minutes / MINUTES_PER_DEGREE);
	const rest = String(minutes % MINUTES_PER_DEGREE).padStart(2, '0');
	return `${sign}${whole}${DEGREE}${rest}${PRIME}`;
}

/**
 * A stored value as the person reads it, without its unit (see `unitLabel`; degrees and minutes carry their own marks).
 * An en dash for what is absent, never NaN.
 */
export function formatQuantity(value: number | null, quantity: Quantity, preferences: WritingChoice): string {
	if (value === null || !Number.isFinite(value)) return NONE;
	if (quantity === 'length' && preferences.length === 'in' && preferences.inches === 'fraction') {
		return formatInchFraction(value);
	}
	if (quantity === 'angle' && preferences.angle === 'minutes') return formatMinutes(value);
	return formatNumber(toDisplay(value, quantity, preferences), decimalsOf(quantity, preferences), preferences);
}

/** The same with its unit: "12.5 mm", "−0.50°", "−0°30′". */
export function formatWithUnit(value: number | null, quantity: Quantity, preferences: WritingChoice): string {
	const text = formatQuantity(value, quantity, preferences);
	if (text === NONE) return text;
	const unit = unitLabel(quantity, preferences);
	if (quantity === 'angle') return preferences.angle === 'minutes' ? text : text + DEGREE;
	return unit === '' ? text : `${text} ${unit}`;
}

/** A change, always signed: "+0.50", "−0.50", "0.00" for none. */
export function formatDelta(value: number | null, quantity: Quantity, preferences: WritingChoice): string {
	const text = formatQuantity(value, quantity, preferences);
	const bare = text.startsWith('≈') ? text.slice(1) : text;
	if (value === null || value <= 0 || !/[1-9]/.test(bare)) return text;
	return text.startsWith('≈') ? `≈+${bare}` : `+${bare}`;
}

/**
 * A stored value written so that reading it gives it back (to 1e-9 of a unit), in the person's unit: for a field that is
 * opened to be changed and for copying. Angles as decimal degrees, inches as decimals unless the length is a 64th exactly.
 */
export function formatExact(value: number | null, quantity: Quantity, preferences: WritingChoice): string {
	if (value === null || !Number.isFinite(value)) return '';
	if (quantity === 'length' && preferences.length === 'in' && preferences.inches === 'fraction') {
		const parts = (value / MM_PER_INCH) * 64;
		if (Math.abs(Math.round(parts) - parts) < 1e-9) return formatInchFraction(value).replace(MINUS, '-');
	}
	const shown = Math.round(toDisplay(value, quantity, preferences) * 1e9) / 1e9;
	const digits = String(shown + 0).includes('e') ? shown.toFixed(9).replace(/\.?0+$/, '') : String(shown + 0);
	return preferences.numbers === 'comma' ? digits.replace('.', ',') : digits;
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** A day in local time: "1 Dec 2026". An en dash for none. */
export function formatDate(date: Date | string | number | null): string {
	const day = date === null ? null : new Date(date);
	if (day === null || Number.isNaN(day.getTime())) return NONE;
	return `${day.getDate()} ${MONTHS[day.getMonth()]} ${day.getFullYear()}`;
}

/** A day and a time in local time: "1 Dec 2026, 14:05". */
export function formatDateTime(date: Date | string | number | null): string {
	const text = formatDate(date);
	if (date === null || text === NONE) return text;
	const time = new Date(date);
	return `${text}, ${String(time.getHours()).padStart(2, '0')}:${String(time.getMinutes()).padStart(2, '0')}`;
}
