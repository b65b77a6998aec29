import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { axisWord, fromDatum, moveFromDatum, moveToDatum, toDatum } from '$lib/domain/datum';
import type { Datum, Side } from '$lib/domain/datum';

const mm = fc.double({ min: -10_000, max: 10_000, noNaN: true });
const datums: fc.Arbitrary<Datum> = fc.record({
	origin: fc.constantFrom('ground', 'table', 'rail'),
	height: fc.double({ min: -2000, max: 2000, noNaN: true }),
	foreAft: fc.constantFrom('fore', 'aft'),
	foreOrigin: mm
});
const sides = fc.constantFrom<Side>('left', 'right');

describe('the datum', () => {
	const table: Datum = { origin: 'table', height: 155.3, foreAft: 'aft', foreOrigin: 200 };

	it('measures out from the centreline, up from the table, aft from its zero', () => {
		expect(toDatum([95, 404, 491], table, 'left')).toEqual({ out: 404, up: 335.7, fore: 105 });
		expect(toDatum([95, -404, 491], table, 'right')).toEqual({ out: 404, up: 335.7, fore: 105 });
		expect(axisWord('fore', table)).toBe('aft');
	});

	it('leaves what is not typed yet as it is', () => {
		expect(toDatum([null, 404, null], table, 'left')).toEqual({ out: 404, up: null, fore: null });
		expect(fromDatum({ out: null, up: 1, fore: null }, table, 'right')).toEqual([null, null, 156.3]);
	});

	it('gives every stored point back to 1e-9 mm, and never minus zero', () => {
		fc.assert(
			fc.property(mm, mm, mm, datums, sides, (x, y, z, datum, side) => {
				const back = fromDatum(toDatum([x, y, z], datum, side), datum, side);
				const given = [x, y, z];
				return back.every((value, i) => Math.abs((value ?? NaN) - (given[i] ?? NaN)) <= 2e-9 && !Object.is(value, -0));
			})
		);
	});

	it('shows a figure exactly as it was typed, to a ten-thousandth of a mm', () => {
		const typed = fc.integer({ min: -50_000_000, max: 50_000_000 }).map((n) => n / 10_000);
		const heights = fc.integer({ min: -20_000, max: 20_000 }).map((n) => n / 10);
		fc.assert(
			fc.property(
				typed,
				typed,
				typed,
				heights,
				heights,
				fc.constantFrom('fore' as const, 'aft' as const),
				sides,
				(out, up, fore, height, foreOrigin, foreAft, side) => {
					const datum: Datum = { origin: 'table', height, foreAft, foreOrigin };
					expect(toDatum(fromDatum({ out, up, fore }, datum, side), datum, side)).toEqual({
						out: out + 0,
						up: up + 0,
						fore: fore + 0
					});
				}
			)
		);
	});

	it('turns a movement without moving its origin', () => {
		expect(moveToDatum([3, -2, 1], table, 'right')).toEqual({ out: 2, up: 1, fore: -3 });
		expect(moveFromDatum({ out: 2, up: 1, fore: -3 }, table, 'right')).toEqual([3, -2, 1]);
	});
});
