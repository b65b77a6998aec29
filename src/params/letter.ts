/** A revision letter: drawing practice leaves out I, O, Q, S, X and Z. */
export function match(value: string): boolean {
	return /^[ABCDEFGHJKLMNPRTUVWY]{1,4}$/.test(value);
}
