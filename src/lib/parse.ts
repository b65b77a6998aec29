import type { Preferences } from './schemas/preferences';
import { fromDisplay, INCHES_PER_FOOT, MINUTES_PER_DEGREE, MM_PER_INCH, unitLabel, type Quantity } from './units';

/** What was typed, in stored units, or a sentence that says what would be accepted. */
export type Parsed = { ok: true; value: number } | { ok: false; message: string };

type Choice = Pick<Preferences, 'length' | 'force' | 'numbers'>;

const refuse = (message: string): Parsed => ({ ok: false, message });
const accept = (value: number): Parsed =>
	Number.isFinite(value) ? { ok: true, value: value + 0 } : refuse('That number is too large.');

/** Signs and spaces as keyboards and spreadsheets write them, made plain. */
function plain(text: string): string {
	return text
		.replace(/[\u2212\u2013\u2014]/g, '-')
		.replace(/[\u00a0\u202f\u2009]/g, ' ')
		.replace(/[\u2032\u2019]/g, "'")
		.replace(/[\u2033\u201d]/g, '"')
		.replace(/\u2044/g, '/')
		.trim();
}

const VULGAR: Record<string, string> = {
	'½': '1/2',
	'¼': '1/4',
	'¾': '3/4',
	'⅛': '1/8',
	'⅜': '3/8',
	'⅝': '5/8',
	'⅞': '7/8'
};
const withoutVulgar = (text: string) => text.replace(/[½¼¾⅛⅜⅝⅞]/g, (sign) => ` ${VULGAR[sign] ?? ''}`);

/** A decimal number; the comma counts as the decimal sign where the person writes it so, and where it cannot be anything else. */
function readDecimal(text: string, numbers: Preferences['numbers']): number | null {
	const commas = text.split(',').length - 1;
	const asPoint = commas === 1 && !text.includes('.') && (numbers === 'comma' || !/,\d{3}$/.test(text));
	const digits = asPoint ? text.replace(',', '.') : text;
	return /^[+-]?(\d+\.?\d*|\.\d+)$/.test(digits) ? Number(digits) : null;
}

/** Inches without a sign: 12.375, 3/8, 12 3/8 or 12-3/8. */
function readInches(text: string, numbers: Preferences['numbers']): number | null {
	const mixed = /^(?:(\d+)(?:\s+|\s*-\s*))?(\d+)\s*\/\s*(\d+)$/.exec(text);
	if (!mixed) return /^[+-]/.test(text) ? null : readDecimal(text, numbers);
	const [, whole = '0', top, bottom] = mixed;
	return Number(bottom) === 0 ? null : Number(whole) + Number(top) / Number(bottom);
}

/** Feet and inches without a sign: 1' 2 3/8", 1', 14 3/8. */
function readFeetInches(text: string, numbers: Preferences['numbers']): number | null {
	const [feetText, rest] = text.includes("'") ? text.split("'", 2) : [null, text];
	const inchText = (rest ?? '').replace(/^\s*-\s*/, '').trim();
	const inches = inchText === '' && feetText !== null ? 0 : readInches(inchText, numbers);
	if (inches === null || feetText === null) return inches;
	const feet = readDecimal(feetText.trim(), numbers);
	return feet === null ? null : feet * INCHES_PER_FOOT + inches;
}

const LENGTH_ACCEPTED = {
	mm: 'Enter millimetres such as 312.5, or inches with their mark: 12 3/8".',
	in: 'Enter inches such as 12.375, 12 3/8, 12-3/8 or 1\' 3/8", or millimetres with their unit: 314.3 mm.'
};

/**
 * A length as typed, in mm. Bare numbers are in the person's unit; mm, cm, in, ft, " and ' say otherwise.
 * A sign before a mixed fraction holds for all of it.
 */
export function parseLength(typed: string, choice: Pick<Choice, 'length' | 'numbers'>): Parsed {
	const text = withoutVulgar(plain(typed)).trim();
	const read = /^([+-]?)\s*(.*?)\s*(mm|cm|in|inch|inches|ft|")?$/i.exec(text);
	if (!read || text === '') return refuse(LENGTH_ACCEPTED[choice.length]);
	const [, sign, body = '', unitText] = read;
	const unit = unitText?.toLowerCase() ?? (body.includes("'") ? 'in' : choice.length);
	const inInches = unit !== 'mm' && unit !== 'cm';
	const isFraction = body.includes('/');
	if (!inInches && (isFraction || body.includes("'")))
		return refuse(`${typed.trim()} looks like inches. ${LENGTH_ACCEPTED[choice.length]}`);
	const size = inInches
		? readFeetInches(body.trim(), choice.numbers)
		: /^[+-]/.test(body)
			? null
			: readDecimal(body, choice.numbers);
	if (size === null) return refuse(`“${typed.trim()}” is not a length. ${LENGTH_ACCEPTED[choice.length]}`);
	const scale = unit === 'mm' ? 1 : unit === 'cm' ? 10 : unit === 'ft' ? MM_PER_INCH * INCHES_PER_FOOT : MM_PER_INCH;
	return accept((sign === '-' ? -1 : 1) * size * scale);
}

/** An angle as typed, in degrees: −0.75, −0.75°, −0° 45′ or 45′. A sign holds for all of it. */
export function parseAngle(typed: string, choice: Pick<Choice, 'numbers'>): Parsed {
	const text = plain(typed).replace(/\s+/g, ' ');
	const read = /^([+-]?) ?(?:([\d.,]+) ?(?:°|deg)? ?)?(?:([\d.,]+) ?['m](?:in)?)?$/i.exec(text);
	const message = `“${typed.trim()}” is not an angle. Enter degrees such as −0.75, or degrees and minutes: −0° 45′.`;
	if (!read || (read[2] === undefined && read[3] === undefined)) return refuse(message);
	const [, sign, degreeText = '0', minuteText = '0'] = read;
	const degrees = readDecimal(degreeText, choice.numbers);
	const minutes = readDecimal(minuteText, choice.numbers);
	if (degrees === null || minutes === null) return refuse(message);
	return accept((sign === '-' ? -1 : 1) * (degrees + minutes / MINUTES_PER_DEGREE));
}

/** A bare number as typed. */
export function parseNumber(typed: string, choice: Pick<Choice, 'numbers'>): Parsed {
	const value = readDecimal(plain(typed), choice.numbers);
	return value === null ? refuse(`“${typed.trim()}” is not a number. Enter one such as 1.5.`) : accept(value);
}

/** Any quantity as typed in the person's unit, in stored units; the unit may stand behind the number. */
export function parseQuantity(typed: string, quantity: Quantity, choice: Choice): Parsed {
	if (quantity === 'length') return parseLength(typed, choice);
	if (quantity === 'angle') return parseAngle(typed, choice);
	const unit = unitLabel(quantity, choice);
	const text = plain(typed);
	const bare = unit !== '' && text.endsWith(unit) ? text.slice(0, -unit.length).trim() : text;
	const read = parseNumber(bare, choice);
	return read.ok ? accept(fromDisplay(read.value, quantity, choice)) : read;
}
