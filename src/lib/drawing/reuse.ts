/**
 * `after`, with every part that equals its counterpart in `before` replaced by it, down to `before` itself where
 * nothing changed. What is drawn from a part that kept its identity is not looked at again: on a drag most of a
 * sheet stays. Plain objects and arrays are compared by their parts, everything else by identity.
 */
export function reuse<T>(before: T | undefined, after: T): T {
	if (Object.is(before, after) || before === undefined || before === null) return after;
	if (Array.isArray(before) && Array.isArray(after)) return reuseArray(before, after) as T;
	if (isPlain(before) && isPlain(after)) return reuseObject(before, after) as T;
	return after;
}

function reuseArray(before: readonly unknown[], after: readonly unknown[]): readonly unknown[] {
	let same = before.length === after.length;
	const parts = after.map((part, k) => {
		const kept = reuse(before[k], part);
		if (!Object.is(kept, before[k])) same = false;
		return kept;
	});
	return same ? before : parts;
}

function reuseObject(before: Record<string, unknown>, after: Record<string, unknown>): Record<string, unknown> {
	const keys = Object.keys(after);
	let same = keys.length === Object.keys(before).length;
	const parts: Record<string, unknown> = {};
	for (const key of keys) {
		parts[key] = reuse(before[key], after[key]);
		if (!(key in before) || !Object.is(parts[key], before[key])) same = false;
	}
	return same ? before : parts;
}

function isPlain(value: unknown): value is Record<string, unknown> {
	return typeof value === 'object' && value !== null && Object.getPrototypeOf(value) === Object.prototype;
}
