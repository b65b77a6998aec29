import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	decimalsOf,
	formatDate,
	formatDateTime,
	formatDelta,
	formatExact,
	formatInchFraction,
	formatNumber,
	formatQuantity,
	formatWithUnit,
	unitLabel
} from '$lib/format';
import { parseAngle, parseLength, parseNumber, parseQuantity } from '$lib/parse';
import { DEFAULT_PREFERENCES } from '$lib/schemas/preferences';
import type { Preferences } from '$lib/schemas/preferences';
import { N_PER_MM_PER_LB_PER_IN, QUANTITIES, fromDisplay, toDisplay, toeAsLength, toeFromLength } from '$lib/units';

const mm: Preferences = DEFAULT_PREFERENCES;
const inches: Preferences = { ...mm, length: 'in' };
const fractions: Preferences = { ...inches, inches: 'fraction' };
const comma: Preferences = { ...mm, numbers: 'comma' };
const minutes: Preferences = { ...mm, angle: 'minutes' };
const pounds: Preferences = { ...mm, force: 'lbf' };
const every: Preferences[] = [
	mm,
	inches,
	fractions,
	comma,
	minutes,
	pounds,
	{ ...fractions, numbers: 'comma', angle: 'minutes', force: 'lbf' }
];

describe('units', () => {
	it('give every value back', () => {
		for (const quantity of QUANTITIES) {
			for (const person of every) {
				fc.assert(
					fc.property(fc.double({ min: -1e5, max: 1e5, noNaN: true }), (value) => {
						expect(fromDisplay(toDisplay(value, quantity, person), quantity, person)).toBeCloseTo(value, 9);
					}),
					{ numRuns: 40 }
				);
			}
		}
	});

	/** NIST SP 811 (2008), appendix B.8, pound-force per inch: 1.751 268 E+02 N/m (*recalled*). */
	it('have the pound-force per inch of NIST', () => {
		expect(N_PER_MM_PER_LB_PER_IN * 1000).toBeCloseTo(175.1268, 4);
	});

	it('show rates over travel per 10 mm or per inch, in minutes where angles are', () => {
		expect(toDisplay(-0.02, 'anglePerLength', mm)).toBeCloseTo(-0.2, 12);
		expect(toDisplay(-0.02, 'anglePerLength', inches)).toBeCloseTo(-0.508, 12);
		expect(toDisplay(-0.02, 'anglePerLength', minutes)).toBeCloseTo(-12, 12);
		expect([mm, inches, minutes].map((one) => unitLabel('anglePerLength', one))).toEqual([
			'°/10 mm',
			'°/in',
			'′/10 mm'
		]);
	});

	/** Shop how-to's, by two figures each: 0.15° on 24 in is 0.0628 in; 1/16 in on 26 in is 0.138°. */
	it('turn toe from inches to degrees and back', () => {
		expect(toeAsLength(0.15, 24 * 25.4) / 25.4).toBeCloseTo(0.0628, 4);
		expect(toeFromLength(25.4 / 16, 26 * 25.4)).toBeCloseTo(0.138, 3);
		expect(toeFromLength(700, 600)).toBeNull();
	});
});

/** Each expectation is 25.4 mm an inch, by hand. */
const ACCEPTED: [string, number][] = [
	['12.375', 314.325],
	['12 3/8', 314.325],
	['12-3/8', 314.325],
	['12 - 3/8', 314.325],
	['  12   3/8 ', 314.325],
	['12 3/8"', 314.325],
	['12 3/8 in', 314.325],
	['12 3/8 inches', 314.325],
	['12⅜', 314.325],
	['12 3⁄8', 314.325],
	['-12 3/8', -314.325],
	['−12 3/8', -314.325],
	['–12 3/8', -314.325],
	['- 12 3/8', -314.325],
	['+12 3/8', 314.325],
	['≈12 3/8', 314.325],
	['3/8', 9.525],
	['-3/8', -9.525],
	['½', 12.7],
	['9/8', 28.575],
	['3 / 8', 9.525],
	[`1' 2 3/8"`, 365.125],
	[`1'-2 3/8"`, 365.125],
	[`1′ 2 3/8″`, 365.125],
	[`1’ 2 3/8”`, 365.125],
	[`1' 2 3/8''`, 365.125],
	['1 ft 2 3/8 in', 365.125],
	[`1'2`, 355.6],
	[`-1' 2"`, -355.6],
	[`1'`, 304.8],
	[`1.5'`, 457.2],
	[`1' 3/8"`, 314.325],
	['.5', 12.7],
	['5.', 127],
	['0,375', 9.525],
	['1,5', 38.1],
	['0', 0],
	['-0', 0],
	['314.325 mm', 314.325],
	['31.4325cm', 314.325],
	['0.314325 m', 314.325],
	['1e1', 254]
];

const REFUSED: [string, RegExp][] = [
	['', /Write inches such as 12.375, 12 3\/8/],
	['   ', /Write inches/],
	['abc', /Write inches/],
	['in', /Write inches/],
	['-', /Write inches|Not a number/],
	['.', /Write inches/],
	['--5', /Not a number/],
	['5-', /Not a number/],
	['1.2.3', /Not a number/],
	['1,234', /could be 1234/],
	['1,234.5', /thousands/],
	['12 3/0', /cannot be over 0/],
	['12 9/8', /under 1/],
	['12 8/8', /under 1/],
	['12 -3/8', /fraction of an inch/],
	['12.5 3/8', /fraction of an inch/],
	['1/2/3', /fraction of an inch/],
	['/8', /fraction of an inch|Write inches/],
	['3/', /fraction of an inch/],
	['3/-8', /fraction of an inch/],
	[`1' 14"`, /under 12/],
	[`1' 12"`, /under 12/],
	[`1.5' 2"`, /whole number/],
	['12 3/8 mm', /inches only/],
	['12"3', /Write inches/],
	['5 in 3', /Write inches/],
	['12 stone', /Write inches/],
	['Infinity', /Write inches/],
	['NaN', /Write inches/],
	['0x10', /Write inches/],
	['1e400', /too large/],
	['400', /at most 10 m/],
	['-400', /at most 10 m/],
	['1e3', /at most 10 m/],
	['9'.repeat(61), /too long/],
	['٣', /Write inches/],
	['=1+1', /Write inches|Not a number/]
];

describe('reading lengths', () => {
	it.each(ACCEPTED)('reads %j as %d mm', (text, expected) => {
		expect(parseLength(text, inches)).toEqual({ ok: true, mm: expected });
	});

	it.each(REFUSED)('refuses %j and says what would do', (text, words) => {
		const read = parseLength(text, inches);
		expect(read.ok).toBe(false);
		expect(read.ok ? '' : read.message).toMatch(words);
	});

	it('takes a bare number in the person’s unit, and a fraction as inches only', () => {
		expect(parseLength('12.5', mm)).toEqual({ ok: true, mm: 12.5 });
		expect(parseLength('12,5', comma)).toEqual({ ok: true, mm: 12.5 });
		expect(parseLength('1,234', comma)).toEqual({ ok: true, mm: 1.234 });
		expect(parseLength('1.234', comma)).toMatchObject({ ok: false });
		expect(parseLength('3/8 in', mm)).toEqual({ ok: true, mm: 9.525 });
		expect(parseLength('3/8', mm)).toMatchObject({ ok: false, message: expect.stringContaining('inches') as string });
	});

	it('never throws, and answers a finite number or a sentence', () => {
		const parts = fc.constantFrom(
			'1',
			'12',
			'.',
			',',
			'/',
			'-',
			'−',
			'+',
			' ',
			"'",
			'"',
			'°',
			'mm',
			'in',
			'ft',
			'e',
			'3/8',
			'½',
			'0',
			'9',
			'x'
		);
		const texts = fc.oneof(
			fc.array(parts, { maxLength: 12 }).map((some) => some.join('')),
			fc.string()
		);
		fc.assert(
			fc.property(texts, fc.constantFrom(...every), (text, person) => {
				const [length, angle, number] = [
					parseLength(text, person),
					parseAngle(text, person),
					parseNumber(text, person)
				];
				if (length.ok) expect(Math.abs(length.mm)).toBeLessThanOrEqual(10_000);
				if (angle.ok) expect(Math.abs(angle.degrees)).toBeLessThanOrEqual(360);
				if (number.ok) expect(Number.isFinite(number.value)).toBe(true);
				for (const read of [length, angle, number]) if (!read.ok) expect(read.message).toMatch(/\.$/);
			}),
			{ numRuns: 2000 }
		);
	});
});

describe('reading angles', () => {
	it.each([
		['-0.5', -0.5],
		['−0,5', -0.5],
		['0.5°', 0.5],
		['1 deg', 1],
		['-0°30′', -0.5],
		["-0°30'", -0.5],
		['0 30', 0.5],
		['0:30', 0.5],
		["30'", 0.5],
		["-30'", -0.5],
		['1°15\'36"', 1.26],
		['−1° 30.6′', -1.51],
		['0', 0]
	])('reads %j as %d degrees', (text, degrees) => {
		const read = parseAngle(text, mm);
		expect(read.ok && read.degrees).toBeCloseTo(degrees, 12);
	});

	it.each(['', 'abc', '5 rad', '0.5 30', "1°60'", "1°-5'", '361', '1°2\'3"4', '--1'])('refuses %j', (text) => {
		expect(parseAngle(text, mm)).toMatchObject({ ok: false });
	});
});

describe('reading other quantities', () => {
	it('takes the person’s unit, and another where it is named', () => {
		expect(parseQuantity('45', 'rate', mm)).toEqual({ ok: true, value: 45 });
		const rate = parseQuantity('250 lb/in', 'rate', mm);
		expect(rate.ok && rate.value).toBeCloseTo(43.7817, 4);
		const bare = parseQuantity('250', 'rate', pounds);
		expect(bare.ok && bare.value).toBeCloseTo(43.7817, 4);
		expect(parseQuantity('45 N/mm', 'rate', pounds)).toEqual({ ok: true, value: 45 });
		const mass = parseQuantity('700 lb', 'mass', mm);
		expect(mass.ok && mass.value).toBeCloseTo(317.5147, 4);
		expect(parseQuantity('62 %', 'percent', mm)).toEqual({ ok: true, value: 62 });
		const gain = parseQuantity('-0.2', 'anglePerLength', mm);
		expect(gain.ok && gain.value).toBeCloseTo(-0.02, 12);
	});
});

describe('writing', () => {
	it('uses a true minus sign, no sign on zero, a dash for none', () => {
		expect(formatQuantity(-0.5, 'angle', mm)).toBe('−0.50');
		expect(formatQuantity(-0.004, 'angle', mm)).toBe('0.00');
		expect(formatQuantity(-0, 'length', mm)).toBe('0.0');
		expect(formatQuantity(-1234.56, 'length', comma)).toBe('−1234,6');
		for (const absent of [null, Number.NaN, Infinity, -Infinity]) {
			expect(formatQuantity(absent, 'length', mm)).toBe('–');
			expect(formatWithUnit(absent, 'angle', mm)).toBe('–');
		}
	});

	it('writes units', () => {
		expect(formatWithUnit(12.5, 'length', mm)).toBe('12.5 mm');
		expect(formatWithUnit(-0.5, 'angle', mm)).toBe('−0.50°');
		expect(formatWithUnit(-0.5, 'angle', minutes)).toBe('−0°30′');
		expect(formatWithUnit(0.68, 'ratio', mm)).toBe('0.680');
		expect(formatWithUnit(43.7817, 'rate', pounds)).toBe('250 lb/in');
		expect(formatWithUnit(317.5147, 'mass', pounds)).toBe('700.0 lb');
	});

	it('has decimals for every quantity and person, and never NaN', () => {
		for (const quantity of QUANTITIES) {
			for (const person of every) {
				expect(decimalsOf(quantity, person)).toBeGreaterThanOrEqual(0);
				expect(formatQuantity(-12.3456, quantity, person)).toMatch(/^≈?−?\d/);
			}
		}
	});

	it('writes degrees and minutes, rounded together', () => {
		const angles: [number, string][] = [
			[0.999, '1°00′'],
			[-0.999, '−1°00′'],
			[-0.004, '0°00′'],
			[2.51, '2°31′']
		];
		for (const [degrees, text] of angles) expect(formatQuantity(degrees, 'angle', minutes)).toBe(text);
	});

	it('writes inches as fractions: the 64th where it is one, else about the nearest 32nd', () => {
		const lengths: [number, string][] = [
			[314.325, '12 3/8'],
			[-314.325, '−12 3/8'],
			[9.525, '3/8'],
			[-9.525, '−3/8'],
			[0.396875, '1/64'],
			[304.8, '12'],
			[0, '0'],
			[304.7, '≈12'],
			[100.2, '≈3 15/16'],
			[-100.2, '≈−3 15/16'],
			[0.1, '≈0'],
			[-0.1, '≈0'],
			// 3 15/16 in is 100.0125 mm: 0.0125 mm off, which no rule shows.
			[100, '3 15/16']
		];
		for (const [value, text] of lengths) expect(formatInchFraction(value)).toBe(text);
	});

	it('signs every change', () => {
		expect(formatDelta(0.5, 'angle', mm)).toBe('+0.50');
		expect(formatDelta(-0.5, 'angle', mm)).toBe('−0.50');
		expect(formatDelta(0.001, 'angle', mm)).toBe('0.00');
		expect(formatDelta(0, 'length', mm)).toBe('0.0');
		expect(formatDelta(9.525, 'length', fractions)).toBe('+3/8');
		expect(formatDelta(9.7, 'length', fractions)).toBe('≈+3/8');
		expect(formatDelta(null, 'length', mm)).toBe('–');
	});

	it('writes for a field what reads back as the same number', () => {
		fc.assert(
			fc.property(
				fc.double({ min: -300, max: 300, noNaN: true }),
				fc.constantFrom(...every),
				fc.constantFrom(...QUANTITIES),
				(value, person, quantity) => {
					const read = parseQuantity(formatExact(value, quantity, person), quantity, person);
					expect(read.ok && read.value).toBeCloseTo(value, 7);
				}
			)
		);
		expect(formatExact(314.325, 'length', fractions)).toBe('12 3/8');
		expect(formatExact(-9.525, 'length', fractions)).toBe('-3/8');
		expect(formatExact(312.4, 'length', comma)).toBe('312,4');
		expect(formatExact(null, 'length', mm)).toBe('');
		expect(formatExact(1e-8, 'length', mm)).toBe('0.00000001');
	});

	it('reads back every 64th it shows', () => {
		fc.assert(
			fc.property(fc.integer({ min: -20_000, max: 20_000 }), (parts) => {
				const value = (parts * 25.4) / 64;
				const read = parseLength(formatQuantity(value, 'length', fractions), fractions);
				expect(read.ok && read.mm).toBeCloseTo(value, 8);
			})
		);
	});

	it('writes fixed decimals', () => {
		expect(formatNumber(1.005, 1, comma)).toBe('1,0');
		expect(formatNumber(null, 1, mm)).toBe('–');
	});

	it('writes dates in local time, a dash for none', () => {
		expect(formatDate(new Date(2026, 8, 5))).toBe('5 Sep 2026');
		expect(formatDateTime(new Date(2026, 8, 5, 4, 7))).toBe('5 Sep 2026, 04:07');
		expect(formatDate(null)).toBe('–');
		expect(formatDate('nonsense')).toBe('–');
	});
});
