import { describe, expect, it } from 'vitest';
import { solveDocument, stateAt, whyUnsolved } from '$lib/components/travel/solve';
import { nearestRow, pageOf, PAGE_ROWS, reasonsAmong, tableColumns, tableRows } from '$lib/components/travel/table';
import { rightEntry } from '$lib/domain/difference';
import { emptyAxle } from '$lib/domain/axle';
import { exampleAxle, examplePoints } from '$lib/domain/example';
import { formatQuantity } from '$lib/format';
import { DEFAULT_PREFERENCES } from '$lib/schemas/preferences';

const mm = DEFAULT_PREFERENCES;
const far = { from: -400, to: 400, step: 50 };

function solved(document = exampleAxle(), range = far) {
	const outcome = solveDocument(document, 'left', range);
	if (!outcome.solved) throw new Error('The example can be solved.');
	return outcome.solved;
}

describe('a document over travel', () => {
	it('ends its curves where the corner binds, not at the last step before', () => {
		const { sweep, reach, geometry } = solved();
		expect(sweep.lowLimit?.value).toBe(reach.low);
		expect(sweep.states[0]?.travel).toBeCloseTo(reach.low, 9);
		expect(sweep.states.at(-1)?.travel).toBeCloseTo(reach.high, 9);
		expect(stateAt(geometry, reach.high + 0.01)).toBeNull();
		expect(stateAt(geometry, reach.low - 0.01)).toBeNull();
		const travels = sweep.states.map(({ travel }) => travel);
		expect(travels).toEqual([...travels].sort((a, b) => a - b));
		expect(new Set(travels).size).toBe(travels.length);
	});

	it('adds nothing where the range is reached', () => {
		const { sweep, reach } = solved(exampleAxle(), { from: -50, to: 50, step: 10 });
		expect(sweep.states.map(({ travel }) => travel)).toEqual([-50, -40, -30, -20, -10, 0, 10, 20, 30, 40, 50]);
		expect(reach).toEqual({ low: -50, high: 50 });
	});

	it('solves a right side that mirrors the left as its image', () => {
		const right = solveDocument(exampleAxle(), 'right', far).solved;
		expect(right?.ride.contactPoint[1]).toBeLessThan(0);
		expect(right?.ride.camber).toBeCloseTo(solved().ride.camber, 9);
		const own = { ...exampleAxle(), right: rightEntry(exampleAxle()) };
		expect(solveDocument(own, 'right', far).solved?.reach.high).toBeCloseTo(solved().reach.high, 6);
	});

	it('says what is missing, and names no more than three', () => {
		const outcome = solveDocument(emptyAxle(), 'left', far);
		expect(outcome.solved).toBeNull();
		expect(whyUnsolved('The draft', outcome)).toMatch(
			/^The draft is not complete: still to be typed are .+; .+; .+ and \d+ more\.$/
		);
		const one = exampleAxle();
		one.left.wheel.track = null;
		expect(whyUnsolved('Revision C', solveDocument(one, 'left', far))).toBe(
			'Revision C is not complete: still to be typed are track.'
		);
	});

	it('says why the kernel refuses, and nothing where it does not', () => {
		const flat = exampleAxle();
		flat.left.points.upperBall = [...flat.left.points.lowerBall];
		const outcome = solveDocument(flat, 'left', far);
		expect(outcome.error).not.toBeNull();
		expect(whyUnsolved('The draft', outcome)).toMatch(/^The draft cannot be solved: ./);
		expect(whyUnsolved('The draft', solveDocument(exampleAxle(), 'left', far))).toBeNull();
	});
});

describe('the table over travel', () => {
	it('runs from bump to droop, as the charts stand, and marks the binds', () => {
		const { sweep, ride } = solved();
		const rows = tableRows(sweep, ride, ['camber', 'bumpSteer'], mm);
		expect(rows).toHaveLength(sweep.states.length);
		expect(rows[0]?.binds).toMatch(/^(upper arm|lower arm|tie rod) binds$/);
		expect(rows.at(-1)?.binds).toMatch(/binds$/);
		expect(rows.slice(1, -1).every(({ binds }) => binds === null)).toBe(true);
		const atRide = rows.find(({ travel }) => travel === 0);
		expect(atRide?.cells.map(({ text }) => text)).toEqual([formatQuantity(ride.camber, 'angle', mm), '0.00']);
	});

	it('puts a dash with its reason for what does not exist', () => {
		const { sweep, ride } = solved(examplePoints(), { from: -20, to: 20, step: 10 });
		const rows = tableRows(sweep, ride, ['camber', 'motionRatio'], mm);
		expect(rows.every(({ cells }) => cells[1]?.text === '–' && cells[1].reason !== null)).toBe(true);
		expect(rows.every(({ cells }) => cells[0]?.reason === null)).toBe(true);
		expect(reasonsAmong(rows, tableColumns(['camber', 'motionRatio'], mm))).toEqual([
			expect.stringMatching(/^motion ratio: .*coil-over/i)
		]);
	});

	it('comes in pages that hold every row once', () => {
		const rows = 401;
		const { pages } = pageOf(rows, 1);
		const seen = Array.from({ length: pages }, (_, k) => pageOf(rows, k + 1)).flatMap(({ from, to }) =>
			Array.from({ length: to - from }, (_, n) => from + n)
		);
		expect(seen).toEqual(Array.from({ length: rows }, (_, k) => k));
		expect(pageOf(rows, 99)).toMatchObject({ page: pages, to: rows });
		expect(pageOf(31, 1)).toEqual({ page: 1, pages: 1, from: 0, to: 31 });
		expect(PAGE_ROWS).toBeGreaterThanOrEqual(31);
	});

	it('finds the row nearest to the slide', () => {
		const { sweep, ride } = solved(exampleAxle(), { from: -20, to: 20, step: 10 });
		const rows = tableRows(sweep, ride, ['camber'], mm);
		expect(rows[nearestRow(rows, 13)]?.travel).toBe(10);
		expect(rows[nearestRow(rows, -400)]?.travel).toBe(-20);
		expect(nearestRow([], 0)).toBe(-1);
	});
});
