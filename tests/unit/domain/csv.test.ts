import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { axleGeometry } from '$lib/domain/axle';
import { fileName, neutralised, toCsv } from '$lib/domain/csv';
import { exampleAxle } from '$lib/domain/example';
import { travelCsv, travelTable } from '$lib/domain/export';
import { solveCorner, sweepBump } from '$lib/kinematics';
import { DEFAULT_PREFERENCES } from '$lib/schemas/preferences';

const mm = DEFAULT_PREFERENCES;
const parsed = (csv: string, delimiter = ',') => Papa.parse<string[]>(csv.replace(/^\ufeff/, ''), { delimiter }).data;

describe('CSV', () => {
	it.each(['=1+1', '+1', '-1', '@SUM(A1)', '\t=1', '\r=1', '\n=1', '＝1', '=HYPERLINK("x")'])(
		'neutralises %j',
		(text) => {
			expect(neutralised(text)).toBe(`'${text}`);
			expect(parsed(toCsv([[text, 'b']], mm))[0]).toEqual([`'${text}`, 'b']);
		}
	);

	it('leaves harmless text and numbers as they are', () => {
		expect(toCsv([['a', -1.5, 2, null, 1e-7, -0]], mm)).toBe('\ufeffa,-1.5,2,,1e-7,0');
		expect(toCsv([['a "b", c', Number.NaN, Infinity]], mm)).toBe('\ufeff"a ""b"", c",,');
	});

	it('parts by semicolons where the decimal sign is a comma', () => {
		expect(
			toCsv(
				[
					['a', -1.5],
					['b;c', 2]
				],
				{ numbers: 'comma' }
			)
		).toBe('\ufeffa;-1,5\r\n"b;c";2');
	});

	it('gives every text back, none of which begins a formula', () => {
		fc.assert(
			fc.property(
				fc.array(fc.array(fc.string(), { minLength: 2, maxLength: 4 }), { minLength: 1, maxLength: 4 }),
				(rows) => {
					const filled = rows.map((row) => row.map((cell) => `x${cell}`));
					expect(parsed(toCsv(filled, mm))).toEqual(filled);
					for (const row of parsed(toCsv(rows, mm))) for (const cell of row) expect(cell).not.toMatch(/^[=+\-@\t\r]/);
				}
			)
		);
	});

	it('names files in plain letters', () => {
		expect(fileName(['Copper coupé', 'rev C', 'travel'], 'csv')).toBe('copper-coupe-rev-c-travel.csv');
		expect(fileName(['../../etc', '\u0000'], 'svg')).toBe('etc.svg');
		expect(fileName(['"'], 'csv')).toBe('export.csv');
	});
});

describe('the travel table', () => {
	const read = axleGeometry(exampleAxle());
	if ('missing' in read) throw new Error('The example is whole.');
	const corner = read.left;
	const ride = solveCorner(corner, { travel: 0, rack: 0 });

	it('has a row for every state, in the person’s units', () => {
		const person = { ...mm, length: 'in', angle: 'minutes' } as const;
		const table = travelTable(
			sweepBump(corner, { from: -50.8, to: 50.8, step: 25.4 }),
			ride,
			['camber', 'bumpSteer', 'rollCentreHeight', 'motionRatio'],
			person
		);
		expect(table.head.map(({ label, unit }) => `${label} ${unit}`)).toEqual([
			'Travel in',
			'Camber °',
			'Bump steer °',
			'Roll centre height in',
			'Motion ratio '
		]);
		expect(table.rows.map(([travel]) => Math.round((travel ?? NaN) * 1e9) / 1e9)).toEqual([-2, -1, 0, 1, 2]);
		expect(table.rows[2]?.[1]).toBeCloseTo(-0.5, 9);
		expect(table.rows[2]?.[2]).toBe(0);
		expect(table.rows[2]?.[3]).toBeCloseTo((ride.rollCentreHeight ?? NaN) / 25.4, 9);
		expect(table.limits).toEqual([]);
	});

	it('writes numbers that read back, and tells where the corner binds', () => {
		const sweep = sweepBump(corner, { from: -400, to: 400, step: 50 });
		const table = travelTable(sweep, ride, ['camber', 'antiDive'], mm);
		expect(table.limits).toHaveLength(2);
		const rows = parsed(travelCsv(table, mm));
		expect(rows[0]).toEqual(['Travel, mm', 'Camber, °', 'Anti-dive, %']);
		expect(rows).toHaveLength(1 + sweep.states.length + 2);
		sweep.states.forEach((state, i) => expect(Number(rows[i + 1]?.[1])).toBeCloseTo(state.camber, 5));
		expect(rows.at(-1)?.[0]).toMatch(/^bump ends at \d+\.\d mm: the (upper arm|lower arm|tie rod) binds$/);
		expect(rows.at(-2)?.[0]).toMatch(/^droop ends at −\d+\.\d mm/);
	});

	it('leaves a cell empty where a figure does not exist', () => {
		const bare = exampleAxle();
		bare.left.coilover = null;
		const without = axleGeometry(bare);
		if ('missing' in without) throw new Error('The example is whole.');
		const table = travelTable(sweepBump(without.left, { from: 0, to: 0, step: 1 }), ride, ['motionRatio'], mm);
		expect(table.rows).toEqual([[0, null]]);
		expect(parsed(travelCsv(table, mm))[1]).toEqual(['0', '']);
	});
});
