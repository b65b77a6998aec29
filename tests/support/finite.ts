/** Names of the numbers inside a result that are not finite; objects are read through their own `toJSON` where they have one. */
export function notFinite(value: unknown, path = ''): string[] {
	if (typeof value === 'number') return Number.isFinite(value) ? [] : [`${path} = ${value}`];
	if (value === null || typeof value !== 'object') return [];
	const plain = 'toJSON' in value && typeof value.toJSON === 'function' ? (value.toJSON() as object) : value;
	return Object.entries(plain).flatMap(([key, inner]) => notFinite(inner, `${path}.${key}`));
}
