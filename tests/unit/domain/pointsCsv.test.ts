import { describe, expect, it } from 'vitest';
import type { Datum } from '$lib/domain/datum';
import { exampleAxle } from '$lib/domain/example';
import { decimalOf, plainDecimal } from '$lib/domain/decimalSign';
import { readPointName } from '$lib/domain/pointNames';
import { mergedPoint, pointsToCsv, readPaste } from '$lib/domain/pointsCsv';
import type { PasteOptions } from '$lib/domain/pointsCsv';
import { POINTS, POINT_ORDER } from '$lib/domain/points';

const ground: Datum = { origin: 'ground', height: 0, foreAft: 'fore', foreOrigin: 0 };
const options: PasteOptions = { datum: ground, side: 'left', preferences: { length: 'mm', numbers: 'point' } };
const read = (text: string, more: Partial<PasteOptions> = {}) => readPaste(text, { ...options, ...more });
/** What would be applied, in short: key → stored point. */
const points = (text: string, more: Partial<PasteOptions> = {}) =>
	Object.fromEntries(
		read(text, more).points.map(({ side, key, point }) => [side === 'left' ? key : `right ${key}`, point])
	);

describe('names of points', () => {
	const NAMES: Record<string, string[]> = {
		upperFront: [
			'UF',
			'U.F.',
			'ucaf',
			'UCA front',
			'Upper arm, front pivot',
			'upper_front',
			'UpperFrontPivot',
			'upper wishbone front bolt',
			'front upper',
			'Top arm - fwd mount'
		],
		upperRear: ['UR', 'uca r', 'Upper arm rear', 'upper control arm, rear bush', 'rear upper pivot'],
		upperBall: ['UBJ', 'upper ball joint', 'top balljoint', 'Upper outer', 'upper BJ', 'UCA ball joint'],
		lowerFront: ['LF', 'LCA front', 'lower front inner', 'lower arm, front pivot', 'bottom front pickup'],
		lowerRear: ['LR', 'LCA rear bolt', 'lower rear', 'lower arm back pivot'],
		lowerBall: ['LBJ', 'Lower ball joint', 'lower outer ball joint', 'bottom ball'],
		tieRodInner: [
			'rack end',
			'Rack',
			'inner tie rod',
			'Tie-rod (inner)',
			'steering rack joint',
			'tie rod inboard',
			'ITR'
		],
		tieRodOuter: [
			'outer tie rod',
			'outer tie rod end',
			'tie rod end',
			'steering arm',
			'Tie rod outer',
			'track rod outer',
			'TRO'
		],
		coiloverTop: ['shock top', 'Coil-over upper mount', 'damper top', 'spring upper'],
		coiloverBottom: ['shock bottom', 'coilover lower', 'Damper lower', 'coil-over bottom']
	};
	it.each(Object.entries(NAMES).flatMap(([key, names]) => names.map((name) => [name, key])))(
		'%j is %s',
		(name, key) => {
			expect(readPointName(name)?.key).toBe(key);
		}
	);

	it('knows its own names and keys', () => {
		for (const key of POINT_ORDER) {
			expect(readPointName(POINTS[key].name)?.key).toBe(key);
			expect(readPointName(POINTS[key].short)?.key).toBe(key);
			expect(readPointName(key)?.key).toBe(key);
		}
	});

	it('takes the side where the name says it', () => {
		expect(readPointName('left lower ball joint')).toEqual({ key: 'lowerBall', side: 'left' });
		expect(readPointName('RH UBJ')).toEqual({ key: 'upperBall', side: 'right' });
		expect(readPointName('LBJ')?.side).toBeNull();
	});

	it.each([
		'',
		'ball joint',
		'upper arm',
		'front',
		'wheel centre',
		'contact patch',
		'tie rod',
		'shock',
		'upper lower ball',
		'constructor',
		'__proto__',
		'12'
	])('does not guess at %j', (name) => {
		expect(readPointName(name)).toBeNull();
	});
});

describe('the decimal sign', () => {
	it.each([
		[['12.5', '3'], 'comma', 'point'],
		[['12,5', '3'], 'point', 'comma'],
		[['12', '3'], 'comma', 'comma'],
		[['12.375'], 'point', 'point'],
		[['12,375'], 'comma', 'comma'],
		[['12,375'], 'point', null],
		[['12.375'], 'comma', null],
		[['0,375'], 'point', 'comma'],
		[['12,375', '4.5'], 'point', 'point'],
		[['12,375', '4,5'], 'point', 'comma'],
		[['4.5', '4,5'], 'point', null],
		[['1,234.5'], 'comma', 'point'],
		[['1.234,5'], 'point', 'comma'],
		[['1,234,567'], 'comma', 'point'],
		[['', 'abc'], 'point', 'point']
	] as const)('of %j for one who writes a %s is %s', (cells, preferred, decimal) => {
		expect(decimalOf(cells, preferred)).toBe(decimal);
	});

	it('takes thousands signs away once it is known', () => {
		expect(plainDecimal('1,234.5 mm', 'point')).toBe('1234.5 mm');
		expect(plainDecimal('-1.234,5', 'comma')).toBe('-1234,5');
		expect(plainDecimal('12,375', 'comma')).toBe('12,375');
		expect(plainDecimal('12,37', 'point')).toBe('12,37');
	});
});

describe('reading a pasted list', () => {
	it('takes columns by their heads in any order, with a unit in the head', () => {
		expect(points('Point,up (in),out (in),fore (in)\nUBJ,20,24.5,-0.5\nrack end,10,"13 3/4",5')).toEqual({
			upperBall: [-12.7, 622.3, 508],
			tieRodInner: [127, 349.25, 254]
		});
	});

	it('takes units from a line under the heads, or a sentence above', () => {
		expect(points('name;out;up;fore\n;cm;cm;cm\nLBJ;66,8;20,5;1')).toEqual({ lowerBall: [10, 668, 205] });
		const above = read('All dimensions in inches\npoint\tout\tup\tfore\nLBJ\t10\t5\t1');
		expect(above).toMatchObject({ unit: 'in', unitFrom: 'head', points: [{ point: [25.4, 254, 127] }] });
	});

	it('lets a unit in a cell stand above the head’s', () => {
		expect(points('name\tout mm\tup mm\tfore mm\nLBJ\t26 in\t205\t1 cm')).toEqual({ lowerBall: [10, 660.4, 205] });
	});

	it('takes out, up, fore in the order of the table without heads', () => {
		expect(points('UBJ\t622\t507\t-16\nLBJ\t668\t205\t10')).toEqual({
			upperBall: [-16, 622, 507],
			lowerBall: [10, 668, 205]
		});
		expect(points('404 491 95\n412 482 -125')).toEqual({ upperFront: [95, 404, 491], upperRear: [-125, 412, 482] });
		expect(points('404 491 95', { first: 'lowerBall' })).toEqual({ lowerBall: [95, 404, 491] });
	});

	it('takes a list parted by spaces, decimal commas and all', () => {
		expect(points('upper ball joint 622,5 507,0 -16,0\nLBJ 668,0 205,5 10')).toEqual({
			upperBall: [-16, 622.5, 507],
			lowerBall: [10, 668, 205.5]
		});
		expect(points('UBJ   622.5   507   −16')).toEqual({ upperBall: [-16, 622.5, 507] });
	});

	it('takes x y z as forward, left, up from the ground, whatever the datum', () => {
		const datum: Datum = { origin: 'table', height: 150, foreAft: 'aft', foreOrigin: 100 };
		const pasted = read('name,x,y,z\nUBJ,-16,622,507\nRH UBJ,-16,-622,507\nRH LBJ,10,668,205', { datum });
		expect(pasted.axes).toBe('vehicle');
		expect(pasted.rows[0]?.cells).toMatchObject({ out: { mm: 622 }, up: { mm: 357 }, fore: { mm: 116 } });
		expect(pasted.points.map(({ side, point }) => [side, ...point])).toEqual([
			['left', -16, 622, 507],
			['right', -16, -622, 507],
			['right', 10, -668, 205]
		]);
		expect(read('name,x,y,z\nUBJ,-16,622,507', { datum, axes: 'datum' }).points[0]?.point).toEqual([116, 622, 657]);
	});

	it('turns aft to fore, and measures from the builder’s datum', () => {
		expect(points('name,out,up,aft\nUBJ,622,507,16')).toEqual({ upperBall: [-16, 622, 507] });
		const datum: Datum = { origin: 'rail', height: 200, foreAft: 'aft', foreOrigin: 50 };
		expect(points('name,out,up,aft\nUBJ,622,307,66', { datum })).toEqual({ upperBall: [-16, 622, 507] });
		expect(points('name,out,up,fore\nUBJ,622,307,-66', { datum })).toEqual({ upperBall: [-16, 622, 507] });
	});

	it('names wrong cells by row and column, and keeps the others', () => {
		const pasted = read('point\tout\tup\tfore\nUF\t404\t491\t95\nUBJ\t622\tabc\t-16\n\nfoo\t1\t2\t3\nUF\t1\t2\t3');
		expect(pasted.errors).toEqual([
			'row 3, up: "abc" is not a length. Write mm such as 314.5, or a unit: 12 3/8 in.',
			'row 5: "foo" is not one of the points',
			'row 6: the upper arm, front pivot stands in row 2 already'
		]);
		expect(pasted.points.map(({ key }) => key)).toEqual(['upperFront']);
		expect(pasted.rows).toHaveLength(4);
		expect(pasted.rows[1]?.cells.up).toMatchObject({ text: 'abc', mm: null });
	});

	it('asks for the decimal sign where it cannot be told, and reads nothing before', () => {
		const text = 'UBJ\t622,375\t507,125\t-1,500';
		const asked = read(text);
		expect(asked).toMatchObject({ ambiguous: true, points: [], errors: [], questions: [{ about: 'decimal' }] });
		expect(points(text, { decimal: 'comma' })).toEqual({ upperBall: [-1.5, 622.375, 507.125] });
		expect(read(text, { decimal: 'point' }).errors[0]).toMatch(
			/row 1, out: "622,375" is not a length\. A length is at most 10 m/
		);
		expect(read('UBJ\t622.5\t507,5\t1').ambiguous).toBe(true);
		expect(points('UBJ\t1,375.5\t507\t-1,500')).toEqual({ upperBall: [-1500, 1375.5, 507] });
	});

	it('asks for the unit where the size of the numbers fits the other', () => {
		expect(read('UBJ\t24.5\t20\t-0.6').questions).toMatchObject([{ about: 'unit' }]);
		expect(read('UBJ\t622\t507\t-16', { preferences: { length: 'in', numbers: 'point' } }).questions).toMatchObject([
			{ about: 'unit' }
		]);
		expect(read('UBJ\t24.5\t20\t-0.6', { unit: 'in' })).toMatchObject({
			questions: [],
			unitFrom: 'person',
			points: [{ point: [-15.24, 622.3, 508] }]
		});
		expect(read('name\tout in\tup in\tfore in\nUBJ\t24.5\t20\t-0.6').questions).toEqual([]);
	});

	it('leaves empty cells open: the old coordinate stays', () => {
		const pasted = read('UBJ\t622\t\t-16\nLBJ\t1\t2\t3').points;
		expect(pasted[0]?.point).toEqual([-16, 622, null]);
		expect(mergedPoint([1, 2, 3], pasted[0]?.point ?? [null, null, null])).toEqual([-16, 622, 3]);
	});

	it.each(['', '\n\n', 'hello', 'a,b,c\nd,e,f', 'out,up,fore', '1 2', 'x'.repeat(100_001), 'UBJ,1,2,3\n'.repeat(500)])(
		'answers a list of nothing in words',
		(text) => {
			const pasted = read(text);
			expect(pasted.points).toEqual([]);
			expect(pasted.errors.length + pasted.rows.length === 0 || pasted.errors.length > 0).toBe(true);
		}
	);

	it('takes a file with a mark, CRLF and quotes', () => {
		expect(points('\ufeff"point","out","up","fore"\r\n"UBJ","622","507","-16"\r\n')).toEqual({
			upperBall: [-16, 622, 507]
		});
	});

	it.each([
		['mm', 'point', ground],
		['in', 'point', ground],
		['in', 'comma', { origin: 'table', height: 155.3, foreAft: 'aft', foreOrigin: 210 }],
		['mm', 'comma', { origin: 'rail', height: 320, foreAft: 'fore', foreOrigin: -40 }]
	] as const)('takes back what it writes, in %s with a %s', (length, numbers, datum) => {
		const axle = exampleAxle();
		const preferences = { length, numbers };
		const back = read(pointsToCsv(axle, datum, preferences), { datum, preferences });
		expect(back.errors).toEqual([]);
		expect(back.points.map(({ key }) => key)).toEqual(POINT_ORDER);
		for (const { key, point } of back.points) {
			const given =
				key === 'coiloverTop'
					? axle.left.coilover?.top
					: key === 'coiloverBottom'
						? axle.left.coilover?.bottom
						: axle.left.points[key];
			point.forEach((value, i) => expect(value).toBeCloseTo(given?.[i] ?? NaN, 6));
		}
	});
});
