import { describe, expect, it } from 'vitest';
import { axleGeometry, rightCorner } from '$lib/domain/axle';
import { evaluate, figureAt } from '$lib/domain/evaluation';
import { exampleAxle, examplePoints } from '$lib/domain/example';
import { OUTPUTS, OUTPUT_LIST, reasonOf } from '$lib/domain/outputs';
import { judge, targetInWords, verdictOf } from '$lib/domain/targets';
import { parseTyreSize, proposedLoadedRadius, readTyreSize } from '$lib/domain/tyres';
import { solveCorner, sweepBump } from '$lib/kinematics';
import { FIGURE_KEYS } from '$lib/schemas/axle';
import type { AxleDocument, Target } from '$lib/schemas/axle';
import { DEFAULT_PREFERENCES } from '$lib/schemas/preferences';

function leftOf(document: AxleDocument) {
	const read = axleGeometry(document);
	if ('missing' in read) throw new Error('The geometry is whole.');
	return read.left;
}
const corner = leftOf(exampleAxle());
const range = { from: -60, to: 60, step: 2 };
const ride = (figure: Target['figure'], low: number | null, high: number | null): Target => ({
	figure,
	at: 'ride',
	low,
	high
});
const travel = (figure: Target['figure'], measure: 'peak' | 'range', to: number, high: number): Target => ({
	figure,
	at: 'travel',
	from: -to,
	to,
	measure,
	low: null,
	high
});

describe('the registry of figures', () => {
	it('has one entry a key, each with its words', () => {
		expect(Object.keys(OUTPUTS)).toEqual([...FIGURE_KEYS]);
		expect(new Set(OUTPUT_LIST.map(({ label }) => label)).size).toBe(FIGURE_KEYS.length);
		for (const output of OUTPUT_LIST) {
			expect(output.sign).toMatch(/^[A-Z].*\.$/);
			expect(output.short.length).toBeLessThanOrEqual(18);
		}
	});

	it('reads every figure of the example, and the kernel’s own value', () => {
		const state = solveCorner(corner, { travel: 12, rack: 0 });
		const still = solveCorner(corner, { travel: 0, rack: 0 });
		for (const { key, read } of OUTPUT_LIST) {
			const value = read(state, still);
			expect(Number.isFinite(value), key).toBe(true);
			if (key !== 'bumpSteer') expect(value).toBe(state[key]);
		}
		expect(OUTPUTS.bumpSteer.read(state, still)).toBe(state.toe - still.toe);
		expect(OUTPUTS.bumpSteer.read(state)).toBeNull();
	});

	it('is null with a reason where something is not entered', () => {
		const state = solveCorner(leftOf(examplePoints()), { travel: 0, rack: 0 });
		for (const { key, needs, read } of OUTPUT_LIST) {
			const value = read(state, state);
			expect(value === null, key).toBe(needs !== null);
			expect(reasonOf(key, state)).toEqual(needs === null ? null : expect.stringMatching(/Not entered/));
		}
	});
});

describe('evaluation', () => {
	it('holds the ride figures, the sweep asked for, and a judgement for each target', () => {
		const targets = [ride('camber', -1, 0), travel('bumpSteer', 'peak', 25, 0.1)];
		const evaluation = evaluate(corner, targets, range);
		expect(evaluation.sweep.states).toHaveLength(61);
		expect(evaluation.figures.camber).toBeCloseTo(-0.5, 9);
		expect(evaluation.figures.bumpSteer).toBe(0);
		expect(evaluation.judgements.map(({ verdict }) => verdict)).toEqual(['pass', 'pass']);
		expect(evaluation.over(-25, 25)).toBe(evaluation.over(-25, 25));
	});

	it('tells a mirrored right side the same figures', () => {
		const right = evaluate(rightCorner(corner), [], range);
		const left = evaluate(corner, [], range);
		for (const key of FIGURE_KEYS) expect(right.figures[key], key).toBeCloseTo(left.figures[key] ?? NaN, 8);
		const last = right.sweep.states.at(-1);
		expect(last && figureAt('bumpSteer', last, right.ride)).toBeCloseTo(last ? last.toe - right.ride.toe : NaN, 12);
	});

	it('solves 41 states for a target over travel, both ends among them', () => {
		const { states } = evaluate(corner, [], range).over(-25, 33);
		expect(states).toHaveLength(41);
		expect([states[0]?.travel, states.at(-1)?.travel]).toEqual([-25, 33]);
	});
});

describe('targets', () => {
	it.each([
		[1.5, 1, 2, 'pass'],
		[1, 1, 2, 'pass'],
		[2, 1, 2, 'pass'],
		[2.2, 1, 2, 'near'],
		[2.21, 1, 2, 'miss'],
		[0.8, 1, 2, 'near'],
		[0.79, 1, 2, 'miss'],
		[0.11, null, 0.1, 'near'],
		[0.13, null, 0.1, 'miss'],
		[-5, null, 0.1, 'pass'],
		[4.1, 5, null, 'near'],
		[3.9, 5, null, 'miss'],
		[0.001, null, 0, 'miss'],
		[5.1, 5, 5, 'near'],
		[null, 1, 2, 'unknown'],
		[NaN, 1, 2, 'unknown']
	] as const)('%d in %d to %d is a %s', (value, low, high, verdict) => {
		expect(verdictOf(value, low, high)).toBe(verdict);
	});

	it('measure over travel what a fine sweep shows', () => {
		const evaluation = evaluate(corner, [], range);
		const still = solveCorner(corner, { travel: 0, rack: 0 });
		const fine = sweepBump(corner, { from: -30, to: 30, step: 0.05 }).states;
		const toes = fine.map(({ toe }) => toe - still.toe);
		const cambers = fine.map(({ camber }) => camber);
		const peak = judge(travel('bumpSteer', 'peak', 30, 0.1), evaluation).value;
		expect(peak).toBeCloseTo(Math.max(...toes.map(Math.abs)), 4);
		const reach = judge(travel('camber', 'range', 30, 5), evaluation).value;
		expect(reach).toBeCloseTo(Math.max(...cambers) - Math.min(...cambers), 9);
		expect(judge(travel('camber', 'peak', 30, 5), evaluation).value).toBeCloseTo(Math.max(...cambers.map(Math.abs)), 9);
	});

	it('is not known where the corner binds within the travel, and says where', () => {
		const judged = judge(travel('bumpSteer', 'peak', 450, 0.1), evaluate(corner, [], range));
		expect(judged).toMatchObject({ value: null, verdict: 'unknown', word: 'not known' });
		expect(judged.reason).toMatch(
			/^The (upper arm|lower arm|tie rod) binds at [+−]\d+\.\d mm, within the travel of this target\.$/
		);
	});

	it('is not known where the figure needs what is not entered, and says what', () => {
		const bare = evaluate(leftOf(examplePoints()), [], range);
		expect(judge(ride('motionRatio', 0.6, 0.8), bare)).toMatchObject({
			verdict: 'unknown',
			reason: expect.stringContaining('coil-over') as string
		});
		expect(judge(travel('antiDive', 'range', 20, 5), bare)).toMatchObject({
			verdict: 'unknown',
			reason: expect.stringContaining('wheelbase') as string
		});
	});

	it('are told in words', () => {
		const mm = DEFAULT_PREFERENCES;
		expect(targetInWords(ride('camber', -1, -0.5), mm)).toBe('Camber −1.00 to −0.50°');
		expect(targetInWords(ride('scrubRadius', null, 50.8), { ...mm, length: 'in' })).toBe(
			'Scrub radius at most 2.000 in'
		);
		expect(targetInWords(ride('caster', 4.5, null), { ...mm, angle: 'minutes' })).toBe('Caster at least 4°30′');
		expect(targetInWords(travel('bumpSteer', 'peak', 25, 0.1), mm)).toBe(
			'Bump steer, peak over −25.0 to +25.0 mm, at most 0.10°'
		);
	});
});

describe('tyre sizes', () => {
	/** Free diameter from the ISO size designation: rim · 25.4 + 2 · width · aspect. */
	it.each([
		['215/65R17', 711.3],
		['225/60R17', 701.8],
		['205/55R16', 631.9]
	])('%s has a free diameter of %d mm', (size, diameter) => {
		expect(parseTyreSize(size)?.freeDiameter).toBeCloseTo(diameter, 1);
	});

	it.each(['205/55 R 16', '205/55r16', 'P205/55R16', '205/55ZR16 91W', '205 / 55 R16', '205/55-16', ' 205/55R16 91V '])(
		'reads %j',
		(size) => {
			expect(parseTyreSize(size)).toMatchObject({ label: '205/55R16', sectionWidth: 205, aspect: 55, rim: 16 });
		}
	);

	it.each(['', '205', '205/55', '205/5R16', '055/55R16', '205/55R99', '205/55R6', 'abc', '205/155R16', '6.70-15'])(
		'refuses %j in words',
		(size) => {
			const read = readTyreSize(size);
			expect(read.ok ? '' : read.message).toMatch(/such as/);
		}
	);

	/** Common practice, no source: 0.94 to 0.97 of the free radius. */
	it('propose a loaded radius within common practice', () => {
		const tyre = { freeDiameter: 631.9 };
		expect(proposedLoadedRadius(tyre)).toBe(302);
		expect(proposedLoadedRadius(tyre) / (tyre.freeDiameter / 2)).toBeGreaterThan(0.94);
		expect(proposedLoadedRadius(tyre) / (tyre.freeDiameter / 2)).toBeLessThan(0.97);
	});
});

describe('the example corner', () => {
	/** Ranges of road cars: the trade-practice table; camber gain and bump steer there are common practice, no source. */
	it('solves over ±90 mm and stands where a road car does', () => {
		const sweep = sweepBump(corner, { from: -90, to: 90, step: 1 });
		expect(sweep.states).toHaveLength(181);
		expect([sweep.lowLimit, sweep.highLimit]).toEqual([undefined, undefined]);
		const { figures, judgements } = evaluate(corner, [travel('bumpSteer', 'peak', 60, 0.05)], range);
		const gainPerInch = (figures.camberRate ?? NaN) * 25.4;
		expect(gainPerInch).toBeLessThan(-0.5);
		expect(gainPerInch).toBeGreaterThan(-1);
		expect(figures.caster).toBeGreaterThan(3);
		expect(figures.caster).toBeLessThan(5);
		expect(figures.rollCentreHeight).toBeGreaterThan(0);
		expect(figures.rollCentreHeight).toBeLessThan(100);
		expect(figures.rideFrequency).toBeGreaterThan(1);
		expect(figures.rideFrequency).toBeLessThan(1.5);
		expect(figures.motionRatio).toBeLessThan(1);
		expect(judgements[0]?.verdict).toBe('pass');
	});

	it('keeps its coil-over within its open and closed lengths over ±60 mm', () => {
		const { openLength, closedLength } = exampleAxle().left.coilover ?? {};
		for (const { coiloverLength } of sweepBump(corner, { from: -60, to: 60, step: 5 }).states) {
			expect(coiloverLength).toBeLessThan(openLength ?? NaN);
			expect(coiloverLength).toBeGreaterThan(closedLength ?? NaN);
		}
	});
});
