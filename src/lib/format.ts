import type { Preferences } from './schemas/preferences';
import { MINUTES_PER_DEGREE, toDisplay, unitLabel, type Quantity } from './units';

export { unitLabel, type Quantity } from './units';

export const MINUS = '\u2212';
export const NONE = '\u2013';

/** Fractions of an inch are shown to the nearest of these: finer than a tape, coarser than a caliper. */
const FRACTION_PARTS = 32;

type Choice = Pick<Preferences, 'length' | 'inches' | 'angle' | 'force' | 'numbers'>;

/** Decimals of a quantity in the person's unit: what the work can hold, the same on every screen. */
export function decimalsOf(quantity: Quantity, { length, force }: Pick<Preferences, 'length' | 'force'>): number {
	switch (quantity) {
		case 'length':
			return length === 'mm' ? 1 : 3;
		case 'angle':
			return 2;
		case 'anglePerLength':
			return 3;
		case 'lengthPerLength':
			return 3;
		case 'ratio':
			return 3;
		case 'percent':
			return 1;
		case 'rate':
			return force === 'N' ? 1 : 0;
		case 'force':
		case 'mass':
			return 0;
		case 'frequency':
			return 2;
	}
}

/** A number in digits with a true minus sign and the person's decimal sign; −0 after rounding reads 0. */
export function formatNumber(value: number, decimals: number, numbers: Preferences['numbers'] = 'point'): string {
	const digits = Math.abs(value).toFixed(decimals);
	const negative = value < 0 && Number(digits) !== 0;
	const text = numbers === 'comma' ? digits.replace('.', ',') : digits;
	return negative ? MINUS + text : text;
}

function greatestCommonDivisor(a: number, b: number): number {
	return b === 0 ? a : greatestCommonDivisor(b, a % b);
}

/** Inches as a whole number and a fraction of 32nds reduced: 12 3/8. Nearest, not exact. */
function formatFraction(inches: number): string {
	const parts = Math.round(Math.abs(inches) * FRACTION_PARTS);
	const whole = Math.floor(parts / FRACTION_PARTS);
	const rest = parts % FRACTION_PARTS;
	const divisor = greatestCommonDivisor(rest, FRACTION_PARTS);
	const fraction = rest === 0 ? '' : `${rest / divisor}/${FRACTION_PARTS / divisor}`;
	const text = [whole > 0 || fraction === '' ? String(whole) : '', fraction].filter(Boolean).join(' ');
	return inches < 0 && parts > 0 ? MINUS + text : text;
}

/** Degrees and whole minutes: −1° 30′. */
function formatMinutes(degrees: number): string {
	const total = Math.round(Math.abs(degrees) * MINUTES_PER_DEGREE);
	const text = `${Math.floor(total / MINUTES_PER_DEGREE)}° ${String(total % MINUTES_PER_DEGREE).padStart(2, '0')}′`;
	return degrees < 0 && total > 0 ? MINUS + text : text;
}

/**
 * A stored value as the person reads it, without its unit (degrees and minutes carry theirs): rounded to the decimals
 * of its quantity; an en dash for none.
 */
export function formatQuantity(value: number | null, quantity: Quantity, choice: Choice): string {
	if (value === null || !Number.isFinite(value)) return NONE;
	const shown = toDisplay(value, quantity, choice);
	if (quantity === 'length' && choice.length === 'in' && choice.inches === 'fraction') return formatFraction(shown);
	if (quantity === 'angle' && choice.angle === 'minutes') return formatMinutes(shown);
	return formatNumber(shown, decimalsOf(quantity, choice), choice.numbers);
}

/** As `formatQuantity`, with a plus sign before what is above zero: for differences. */
export function formatSigned(value: number | null, quantity: Quantity, choice: Choice): string {
	const text = formatQuantity(value, quantity, choice);
	return value !== null && value > 0 && /[1-9]/.test(text) ? `+${text}` : text;
}

/** Value and unit together, for sentences: "12.5 mm". */
export function formatWithUnit(value: number | null, quantity: Quantity, choice: Choice): string {
	const text = formatQuantity(value, quantity, choice);
	const unit = unitOf(quantity, choice);
	return text === NONE || unit === '' ? text : unit === '°' ? text + unit : `${text} ${unit}`;
}

/** The unit to print beside `formatQuantity`'s text: none where the text carries it. */
export function unitOf(quantity: Quantity, choice: Choice): string {
	return quantity === 'angle' && choice.angle === 'minutes' ? '' : unitLabel(quantity, choice);
}

/**
 * A length in full for typing and editing: mm to the micrometre, inches to 1/100 000, trailing zeros dropped, so
 * that opening a cell and leaving it changes nothing.
 */
export function formatForEdit(value: number | null, quantity: Quantity, choice: Choice): string {
	if (value === null) return '';
	const shown = toDisplay(value, quantity, choice);
	const text = formatNumber(shown, quantity === 'length' && choice.length === 'mm' ? 3 : 5, choice.numbers);
	return /[.,]/.test(text) ? text.replace(/[.,]?0+$/, '') : text;
}

/** A moment as day, month in letters and year with the time: the same in every locale, in the reader's time zone. */
export function formatDate(moment: string | Date, options: { time?: boolean } = {}): string {
	const date = typeof moment === 'string' ? new Date(moment) : moment;
	const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' }).format(date);
	if (!options.time) return day;
	return `${day}, ${new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' }).format(date)}`;
}
