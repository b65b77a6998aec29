import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { MOST_STATES, rangeErrors, rangeTexts, readRange, statesIn, usualRange } from '$lib/components/travel/range';
import { exampleAxle } from '$lib/domain/example';
import { axleGeometry } from '$lib/domain/axle';
import { sweepBump } from '$lib/kinematics';
import { DEFAULT_PREFERENCES, type Preferences } from '$lib/schemas/preferences';

const mm = DEFAULT_PREFERENCES;
const inch = { ...mm, length: 'in' } as const;

describe('the range of travel', () => {
	it.each([
		[mm, 31],
		[inch, 25]
	])('opens with round steps in the person’s unit', (preferences, count) => {
		const range = usualRange(preferences);
		expect(rangeErrors(range, preferences)).toEqual({});
		expect(statesIn(range)).toBe(count);
	});

	it('counts states as the kernel makes them', () => {
		const read = axleGeometry(exampleAxle());
		if ('missing' in read) throw new Error('The example is whole.');
		for (const range of [
			{ from: -60, to: 60, step: 7 },
			{ from: -30, to: 45, step: 0.3 },
			{ from: 0, to: 10, step: 2.5 },
			{ from: -12.7, to: 12.7, step: 3.175 }
		])
			expect(statesIn(range)).toBe(sweepBump(read.left, range).states.length);
	});

	it.each([
		[
			{ from: '-80', to: '60', step: '5' },
			{ from: -80, to: 60, step: 5 }
		],
		[
			{ from: '80', to: '60', step: '5' },
			{ from: -80, to: 60, step: 5 }
		],
		[
			{ from: '−80', to: '2 in', step: '0.5' },
			{ from: -80, to: 50.8, step: 0.5 }
		]
	])('reads %j, a droop without its sign too', (texts, range) => {
		expect(readRange(texts, mm)).toEqual({ ok: true, range });
	});

	it('reads inches and fractions where the person does', () => {
		expect(readRange({ from: '-3', to: '2 1/2', step: '1/4' }, inch)).toEqual({
			ok: true,
			range: { from: -76.2, to: 63.5, step: 6.35 }
		});
	});

	it.each([
		[{ from: 'low', to: '75', step: '5' }, 'from', /mm/],
		[{ from: '-75', to: '-5', step: '5' }, 'to', /^Bump: from 0 to 400\.0 mm/],
		[{ from: '-401', to: '75', step: '5' }, 'from', /^Droop: from 0 to 400\.0 mm/],
		[{ from: '-75', to: '75', step: '0' }, 'step', /0\.1 mm or more/],
		[{ from: '-75', to: '75', step: '-5' }, 'step', /0\.1 mm or more/],
		[{ from: '-75', to: '75', step: '200' }, 'step', /at most the whole travel, 150\.0 mm/],
		[{ from: '0', to: '0', step: '1' }, 'to', /at least 1\.0 mm/]
	] as const)('refuses %j at its field, and says what is accepted', (texts, field, message) => {
		const read = readRange(texts, mm);
		expect(read.ok).toBe(false);
		if (!read.ok) expect(read.errors[field]).toMatch(message);
	});

	it('keeps to 401 states, and the step it names is accepted', () => {
		fc.assert(
			fc.property(
				fc.integer({ min: -400_000, max: 0 }).map((micrometres) => micrometres / 1000),
				fc.integer({ min: 0, max: 400_000 }).map((micrometres) => micrometres / 1000),
				fc.double({ min: 0.1, max: 1, noNaN: true }),
				fc.constantFrom<Preferences>(mm, inch, { ...inch, inches: 'fraction' }),
				(from, to, step, preferences) => {
					fc.pre(to - from >= 1.1);
					const { step: told } = rangeErrors({ from, to, step }, preferences);
					if (statesIn({ from, to, step }) <= MOST_STATES) {
						expect(told).toBeUndefined();
						return;
					}
					const named = /a step of (.+) (?:mm|in) or more/.exec(told ?? '')?.[1] ?? '';
					const typed = readRange(
						{ from: `${from.toFixed(9)} mm`, to: `${to.toFixed(9)} mm`, step: named },
						preferences
					);
					expect(typed.ok).toBe(true);
				}
			),
			{ numRuns: 2000 }
		);
	});

	it('writes a range so that reading it gives it back', () => {
		for (const preferences of [
			mm,
			inch,
			{ ...inch, inches: 'fraction' } as const,
			{ ...mm, numbers: 'comma' } as const
		]) {
			const range = { from: -63.5, to: 50.8, step: 3.175 };
			expect(readRange(rangeTexts(range, preferences), preferences)).toEqual({ ok: true, range });
		}
	});
});
