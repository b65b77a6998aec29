import Fraction from 'fraction.js';
import { FAR_MM } from './schemas/axle';
import type { Preferences } from './schemas/preferences';
import {
	KG_PER_LB,
	MINUTES_PER_DEGREE,
	MM_PER_CM,
	MM_PER_FOOT,
	MM_PER_INCH,
	MM_PER_M,
	N_PER_LBF,
	N_PER_MM_PER_LB_PER_IN,
	fromDisplay
} from './units';
import type { Quantity, UnitChoice } from './units';

/** A refusal says what would be accepted. */
export interface Refused {
	ok: false;
	message: string;
}
export type ReadLength = { ok: true; mm: number } | Refused;
export type ReadAngle = { ok: true; degrees: number } | Refused;
export type ReadNumber = { ok: true; value: number } | Refused;

export type ReadingChoice = Pick<Preferences, 'length' | 'numbers'>;

const refused = (message: string): Refused => ({ ok: false, message });

const LONGEST_TEXT = 60;

/** The many dashes, quotes, spaces and slashes of keyboards and word processors, as the plain ones; ½ as 1/2. */
function plain(text: string): string {
	return text
		.replace(/[\u00bc-\u00be\u2150-\u215e]/g, (sign) => ` ${sign.normalize('NFKC')}`)
		.replace(/[\u2212\u2010-\u2015\ufe63\uff0d]/g, '-')
		.replace(/[\u2044\u2215]/g, '/')
		.replace(/[\u2032\u2018\u2019\u02bc\u00b4]/g, "'")
		.replace(/[\u2033\u201c\u201d]|''/g, '"')
		.replace(/[\u00a0\u2000-\u200a\u202f\u205f\u3000\t]/g, ' ')
		.replace(/ +/g, ' ')
		.trim()
		.toLowerCase();
}

function example({ numbers }: Pick<Preferences, 'numbers'>, decimal: string): string {
	return numbers === 'comma' ? decimal.replace('.', ',') : decimal;
}

/**
 * A plain decimal, without sign or unit: digits with one decimal sign, either sign where it cannot be taken for a thousands
 * sign ("1,234" with a decimal point preferred could be either, and is refused).
 */
function readDecimal(text: string, numbers: Preferences['numbers']): ReadNumber {
	const other = numbers === 'comma' ? '.' : ',';
	const match = /^(\d*)(?:([.,])(\d*))?(e[-+]?\d{1,3})?$/.exec(text);
	if (!match || (match[1] === '' && (match[3] ?? '') === '')) {
		const grouped = /^\d{1,3}([.,' ])\d{3}(\D|$)/.test(text);
		return refused(
			grouped
				? `Leave out thousands signs: write ${example({ numbers }, '1234.5')}.`
				: `Not a number: write digits such as ${example({ numbers }, '12.5')}.`
		);
	}
	const [, whole = '', sign, decimals = '', exponent = ''] = match;
	if (sign === other && decimals.length === 3 && /^[1-9]\d{0,2}$/.test(whole)) {
		const wanted = numbers === 'comma' ? 'comma' : 'point';
		return refused(
			`"${text}" could be ${whole}${decimals} or ${whole} and a bit: use a decimal ${wanted}, no thousands signs.`
		);
	}
	const value = Number(`${whole || '0'}.${decimals || '0'}${exponent}`);
	return Number.isFinite(value) ? { ok: true, value } : refused('That number is too large.');
}

/** A sign in front, and what it stands before; "--5" and "- -5" are refused by what follows. */
function splitSign(text: string): { sign: 1 | -1; rest: string } {
	const match = /^([-+]) ?(?=[^-+ ])/.exec(text);
	return match ? { sign: match[1] === '-' ? -1 : 1, rest: text.slice(match[0].length) } : { sign: 1, rest: text };
}

/** A plain number in the person's way of writing; accepts −, – and -. */
export function parseNumber(text: string, preferences: Pick<Preferences, 'numbers'>): ReadNumber {
	if (text.length > LONGEST_TEXT) return refused('That is too long for a number.');
	const { sign, rest } = splitSign(plain(text));
	if (rest === '') return refused(`Enter a number such as ${example(preferences, '12.5')}.`);
	const read = readDecimal(rest, preferences.numbers);
	return read.ok ? { ok: true, value: sign * read.value + 0 } : read;
}

const UNITS: Readonly<Record<string, number>> = {
	mm: 1,
	cm: MM_PER_CM,
	m: MM_PER_M,
	'"': MM_PER_INCH,
	in: MM_PER_INCH,
	'in.': MM_PER_INCH,
	inch: MM_PER_INCH,
	inches: MM_PER_INCH,
	"'": MM_PER_FOOT,
	ft: MM_PER_FOOT,
	'ft.': MM_PER_FOOT,
	foot: MM_PER_FOOT,
	feet: MM_PER_FOOT
};
const UNIT = /\s*(mm|cm|m|"|in\.?|inch|inches|'|ft\.?|foot|feet)$/;
const FEET_AND_INCHES = /^(.+?)\s*(?:'|ft\.?|foot|feet)\s*-?\s*([\d.,].*?)\s*(?:"|in\.?|inch|inches)?$/;
const MIXED = /^(\d{1,6})(?: |-| - )(\d{1,6}) ?\/ ?(\d{1,6})$/;
const FRACTION = /^(\d{1,6}) ?\/ ?(\d{1,6})$/;

function howToWrite({ length, numbers }: ReadingChoice): string {
	return length === 'in'
		? `Write inches such as ${example({ numbers }, '12.375')}, 12 3/8 or 1' 2 3/8", or a unit: 314 mm.`
		: `Write mm such as ${example({ numbers }, '314.5')}, or a unit: 12 3/8 in.`;
}

/** Inches without sign or unit: a decimal, a fraction, or a whole number and a fraction. */
function readInches(text: string, numbers: Preferences['numbers']): ReadNumber {
	const mixed = MIXED.exec(text);
	const fraction = mixed ? null : FRACTION.exec(text);
	if (!mixed && !fraction) {
		if (!text.includes('/')) return readDecimal(text, numbers);
		return refused('Write a fraction of an inch such as 3/8, 12 3/8 or 12-3/8.');
	}
	const [whole, over, under] = mixed ? mixed.slice(1) : ['0', ...(fraction ?? []).slice(1)];
	if (Number(under) === 0) return refused('A fraction cannot be over 0: write it such as 3/8.');
	if (mixed && Number(over) >= Number(under)) {
		return refused(`After a whole number the fraction is under 1: ${over}/${under} is not.`);
	}
	return { ok: true, value: new Fraction(`${over}/${under}`).add(whole ?? '0').valueOf() };
}

function readFeetAndInches(feet: string, inches: string, numbers: Preferences['numbers']): ReadNumber {
	if (!/^\d{1,3}$/.test(feet)) return refused('Beside inches, feet are a whole number: 1\' 2 3/8".');
	const read = readInches(inches, numbers);
	if (!read.ok) return read;
	if (read.value >= 12) return refused('Beside feet, inches are under 12: 1\' 2 3/8".');
	return { ok: true, value: Number(feet) * 12 + read.value };
}

/** A length in mm without its sign. */
function readUnsigned(text: string, preferences: ReadingChoice): ReadNumber {
	const both = FEET_AND_INCHES.exec(text);
	if (both) {
		const read = readFeetAndInches(both[1] ?? '', both[2] ?? '', preferences.numbers);
		return read.ok ? { ok: true, value: read.value * MM_PER_INCH } : read;
	}
	const suffix = UNIT.exec(text);
	const unit = suffix?.[1] ?? (preferences.length === 'in' ? 'in' : 'mm');
	const size = UNITS[unit] ?? 1;
	const bare = suffix ? text.slice(0, suffix.index) : text;
	if (bare.includes('/') && size !== MM_PER_INCH) {
		return refused(
			suffix ? 'A fraction goes with inches only.' : 'A fraction is in inches: write 3/8 in, or mm as a decimal.'
		);
	}
	if (!/\d/.test(bare) || /[a-z"']/.test(bare.replace(/e[-+]?\d+$/, ''))) return refused(howToWrite(preferences));
	const read = size === MM_PER_INCH ? readInches(bare, preferences.numbers) : readDecimal(bare, preferences.numbers);
	return read.ok ? { ok: true, value: read.value * size } : read;
}

/**
 * A length in mm. Without a unit it is in the person's own; mm, cm, m, in, ", ft and ' override it. Inches may be decimals
 * (12.375), fractions (3/8, 12 3/8, 12-3/8, 12⅜) or feet and inches (1' 2 3/8"). A sign in front applies to all of it.
 * Our own "≈" in front is taken as said.
 */
export function parseLength(text: string, preferences: ReadingChoice): ReadLength {
	if (text.length > LONGEST_TEXT) return refused('That is too long for a length.');
	const { sign, rest } = splitSign(plain(text).replace(/^≈ ?/, ''));
	if (rest === '') return refused(howToWrite(preferences));
	const read = readUnsigned(rest, preferences);
	if (!read.ok) return read;
	if (read.value > FAR_MM) return refused('A length is at most 10 m (10,000 mm, 393.7 in).');
	// To 1e-9 mm: 3/8 in is 9.525, not 9.524999999999999.
	return { ok: true, mm: (sign * Math.round(read.value * 1e9)) / 1e9 + 0 };
}

const DEGREES = /^([\d.,]+) ?(?:°|deg|degrees?|d)?$/;
const DEGREES_MINUTES =
	/^(\d{1,3})(?: ?(?:°|deg|degrees?|d|:) ?| )([\d.,]+) ?(?:'|min|m)?(?: ?([\d.,]+) ?(?:"|sec|s))?$/;
const MINUTES = /^([\d.,]+) ?(?:'|min)$/;
const HOW_TO_WRITE_ANGLE = (numbers: Preferences['numbers']) =>
	`Write degrees such as ${example({ numbers }, '-0.5')}, or degrees and minutes: -0°30'.`;

/** Degrees from degrees, minutes and seconds, each as text. */
function readParts(parts: readonly string[], numbers: Preferences['numbers']): ReadNumber {
	let value = 0;
	for (const [place, part] of parts.entries()) {
		const read = readDecimal(part, numbers);
		if (!read.ok) return read;
		if (place > 0 && read.value >= MINUTES_PER_DEGREE)
			return refused('Beside degrees, minutes and seconds are under 60.');
		value += read.value / MINUTES_PER_DEGREE ** place;
	}
	return { ok: true, value };
}

/**
 * An angle in degrees: decimal degrees (a bare number always is), degrees and minutes (−0°30′, 0 30, 0:30), with seconds,
 * or minutes alone with their mark (30′). A sign in front applies to all of it.
 */
export function parseAngle(text: string, preferences: Pick<Preferences, 'numbers'>): ReadAngle {
	if (text.length > LONGEST_TEXT) return refused('That is too long for an angle.');
	const { numbers } = preferences;
	const { sign, rest } = splitSign(plain(text));
	const alone = DEGREES.exec(rest);
	const both = DEGREES_MINUTES.exec(rest);
	const minutes = MINUTES.exec(rest);
	const parts = alone ?? both;
	let read: ReadNumber = refused(HOW_TO_WRITE_ANGLE(numbers));
	if (parts)
		read = readParts(
			parts.slice(1).filter((part) => part !== undefined),
			numbers
		);
	else if (minutes) read = readDecimal(minutes[1] ?? '', numbers);
	if (!read.ok) return read;
	const degrees = sign * (minutes && !parts ? read.value / MINUTES_PER_DEGREE : read.value) + 0;
	return Math.abs(degrees) <= 360 ? { ok: true, degrees } : refused('An angle is at most 360°.');
}

/** Units that override the person's own, by quantity, with the size of one in the stored unit. */
const SUFFIXES: Readonly<Partial<Record<Quantity, readonly (readonly [RegExp, number])[]>>> = {
	rate: [
		[/\s*n\/mm$/, 1],
		[/\s*(?:lbf?|lbs)(?:\/| per )in(?:ch)?$/, N_PER_MM_PER_LB_PER_IN]
	],
	force: [
		[/\s*kn$/, 1000],
		[/\s*n$/, 1],
		[/\s*(?:lbf?|lbs)$/, N_PER_LBF]
	],
	mass: [
		[/\s*kg$/, 1],
		[/\s*lbs?$/, KG_PER_LB]
	],
	percent: [[/\s*%$/, 1]],
	frequency: [[/\s*hz$/, 1]]
};

/** Any quantity, in its stored unit. Without a unit the text is in the person's own (rates per 10 mm or per inch). */
export function parseQuantity(
	text: string,
	quantity: Quantity,
	preferences: UnitChoice & Pick<Preferences, 'numbers'>
): ReadNumber {
	if (quantity === 'length') {
		const read = parseLength(text, preferences);
		return read.ok ? { ok: true, value: read.mm } : read;
	}
	if (quantity === 'angle') {
		const read = parseAngle(text, preferences);
		return read.ok ? { ok: true, value: read.degrees } : read;
	}
	const lower = plain(text);
	for (const [suffix, size] of SUFFIXES[quantity] ?? []) {
		if (!suffix.test(lower)) continue;
		const read = parseNumber(lower.replace(suffix, ''), preferences);
		return read.ok ? { ok: true, value: read.value * size } : read;
	}
	const read = parseNumber(text, preferences);
	return read.ok ? { ok: true, value: fromDisplay(read.value, quantity, preferences) } : read;
}
