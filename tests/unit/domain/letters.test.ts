import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { revisionLetter, revisionNumber } from '$lib/domain/letters';

describe('revision letters', () => {
	/** ASME Y14.35 (through a secondary source): I, O, Q, S, X, Z left out. AA after Y is *recalled*. */
	it('are the twenty of drawing practice, then pairs', () => {
		const first = Array.from({ length: 22 }, (_, i) => revisionLetter(i + 1));
		expect(first.join(' ')).toBe('A B C D E F G H J K L M N P R T U V W Y AA AB');
		expect(revisionLetter(40)).toBe('AY');
		expect(revisionLetter(41)).toBe('BA');
		expect(revisionLetter(20 + 400)).toBe('YY');
		expect(revisionLetter(421)).toBe('AAA');
	});

	it('read back as their number', () => {
		fc.assert(fc.property(fc.integer({ min: 1, max: 1e9 }), (n) => revisionNumber(revisionLetter(n)) === n));
	});

	it.each(['', 'I', 'a', 'A1', 'AO', ' A'])('refuses %j', (text) => expect(revisionNumber(text)).toBeNull());

	it.each([0, -1, 1.5, NaN, Infinity])('has none for %d', (n) => expect(() => revisionLetter(n)).toThrow(RangeError));
});
