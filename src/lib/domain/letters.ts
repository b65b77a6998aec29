/** Letters of drawing practice, ASME Y14.35 (through a secondary source): I, O, Q, S, X and Z are left out. */
const LETTERS = 'ABCDEFGHJKLMNPRTUVWY';

/**
 * The letter of the n-th revision, n from 1: A … Y, then AA, AB … (after Y *recalled*).
 * @throws RangeError for anything but a whole number from 1
 */
export function revisionLetter(n: number): string {
	if (!Number.isSafeInteger(n) || n < 1) throw new RangeError('A revision number is a whole number from 1.');
	let letter = '';
	for (let rest = n; rest > 0; rest = Math.floor((rest - 1) / LETTERS.length)) {
		letter = (LETTERS[(rest - 1) % LETTERS.length] ?? '') + letter;
	}
	return letter;
}

/** The number of a revision letter, or null where it is not one. Inverse of `revisionLetter`. */
export function revisionNumber(letter: string): number | null {
	if (letter === '') return null;
	let number = 0;
	for (const character of letter) {
		const place = LETTERS.indexOf(character);
		if (place < 0) return null;
		number = number * LETTERS.length + place + 1;
	}
	return Number.isSafeInteger(number) ? number : null;
}
