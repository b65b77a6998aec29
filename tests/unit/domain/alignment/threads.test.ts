import { tieRodChange } from '$lib/domain/alignment/flats';
import {
	engagementAfter,
	perTurn,
	smallestStep,
	THREADS,
	threadOf,
	turningWords,
	turnsFor,
	usualEngagement
} from '$lib/domain/alignment/threads';
import { describe, expect, it } from 'vitest';

const thread = (key: string) => {
	const found = threadOf(key);
	if (!found) throw new Error(`No thread ${key}.`);
	return found;
};

describe('threads of adjusters', () => {
	// ASME B1.1 (UNF) and ISO 261, recalled: diameter in inches and threads per inch; diameter and pitch in mm.
	it.each([
		['3/8-24', 9.525, 25.4 / 24],
		['7/16-20', 11.1125, 1.27],
		['1/2-20', 12.7, 1.27],
		['9/16-18', 14.2875, 25.4 / 18],
		['5/8-18', 15.875, 25.4 / 18],
		['3/4-16', 19.05, 1.5875],
		['M12x1.75', 12, 1.75],
		['M12x1.5', 12, 1.5],
		['M12x1.25', 12, 1.25],
		['M14x2', 14, 2],
		['M14x1.5', 14, 1.5],
		['M16x2', 16, 2],
		['M16x1.5', 16, 1.5],
		['M18x2.5', 18, 2.5],
		['M18x1.5', 18, 1.5]
	])('%s: diameter %f mm, pitch %f mm', (key, diameter, pitch) => {
		expect(thread(key).diameter).toBeCloseTo(diameter, 9);
		expect(thread(key).pitch).toBeCloseTo(pitch, 9);
	});

	it('are those and no others', () => {
		expect(THREADS).toHaveLength(15);
		expect(threadOf('1/2-13')).toBeNull();
	});

	it('give two pitches a turn in a left- and right-hand sleeve: 2.822 mm for 5/8-18 (arithmetic)', () => {
		expect(perTurn(thread('5/8-18'), 'sleeve')).toBeCloseTo(2.8222, 4);
		expect(smallestStep(thread('5/8-18'), 'sleeve')).toBeNull();
	});

	it('go in half turns on a through bolt: half a pitch each (arithmetic)', () => {
		expect(smallestStep(thread('5/8-18'), 'throughBolt')).toBeCloseTo(25.4 / 36, 9);
		expect(turnsFor(25.4 / 36, thread('5/8-18'), 'throughBolt')).toBeCloseTo(0.5, 9);
		expect(smallestStep(thread('M16x1.5'), 'throughBolt')).toBeCloseTo(0.75, 9);
	});

	it('lose engagement as they come out, a sleeve half at each end', () => {
		expect(engagementAfter(20, 3, 'throughBolt')).toBe(17);
		expect(engagementAfter(20, 3, 'sleeve')).toBe(18.5);
		expect(engagementAfter(20, -3, 'throughBolt')).toBe(23);
	});

	// Common practice, no source: at least one thread diameter engaged.
	it('ask one diameter of engagement where the maker gives no figure', () => {
		expect(usualEngagement(thread('5/8-18'))).toBe(15.875);
	});

	it('say which way to turn: a right-hand thread comes out anticlockwise', () => {
		expect(turningWords(0.5, 'throughBolt', 'right')).toBe('out, anticlockwise seen from the eye');
		expect(turningWords(0.5, 'throughBolt', 'left')).toBe('out, clockwise seen from the eye');
		expect(turningWords(-1, 'throughBolt', 'right')).toBe('in, clockwise seen from the eye');
		expect(turningWords(0, 'throughBolt', 'right')).toBe('leave as it is');
		expect(turningWords(-1, 'sleeve', 'right')).toMatch(/^shorter/);
	});

	it('count tie rods in flats of the hexagon', () => {
		const change = tieRodChange(25.4 / 18 / 3, { thread: '5/8-18', fitting: 'rodEnd', flats: 6 });
		expect(change?.turns).toBeCloseTo(1 / 3, 9);
		expect(change?.flats).toBeCloseTo(2, 9);
		expect(tieRodChange(25.4 / 18, { thread: '5/8-18', fitting: 'sleeve', flats: 6 })?.flats).toBeCloseTo(3, 9);
		expect(tieRodChange(1, { thread: 'unknown', fitting: 'sleeve', flats: 6 })).toBeNull();
	});
});
