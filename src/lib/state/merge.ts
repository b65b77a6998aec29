/** Three-way comparison of axle documents, a point or a field at a time. Pure. */

export type Path = readonly string[];

/** One point or field that two people changed to different values. */
export interface Conflict {
	path: Path;
	base: unknown;
	mine: unknown;
	theirs: unknown;
}

export interface Merge<T> {
	/** Their changes and mine together; where both changed one thing, mine stands. */
	merged: T;
	conflicts: Conflict[];
	/** What only the other changed, and is now in `merged`. */
	taken: Path[];
}

const isObject = (value: unknown): value is Record<string, unknown> =>
	typeof value === 'object' && value !== null && !Array.isArray(value);

/** Equal as JSON: key order does not matter, −0 is 0. */
export function same(a: unknown, b: unknown): boolean {
	if (a === b) return true;
	if (Array.isArray(a) && Array.isArray(b))
		return a.length === b.length && a.every((value, index) => same(value, b[index]));
	if (!isObject(a) || !isObject(b)) return false;
	const keys = Object.keys(a);
	return keys.length === Object.keys(b).length && keys.every((key) => key in b && same(a[key], b[key]));
}

/** Objects of one kind are compared inside; a list, or a change of kind (shim to rod end, mirror to own), is one thing. */
function divisible(values: unknown[]): values is Record<string, unknown>[] {
	return values.every(isObject) && new Set(values.map((value) => value.kind)).size === 1;
}

/**
 * Mine with what I had not typed yet, and the other has, filled in: an empty coordinate is nothing to disagree about.
 * Only lists (points) have such places.
 */
function filled(base: unknown, mine: unknown, theirs: unknown): unknown {
	if (!Array.isArray(base) || !Array.isArray(mine) || !Array.isArray(theirs) || base.length !== mine.length)
		return mine;
	const untyped = (place: number) => mine[place] === null && base[place] === null;
	return mine.some((_, place) => untyped(place))
		? mine.map((value: unknown, place) => (untyped(place) ? theirs[place] : value))
		: mine;
}

interface Found {
	conflicts: Conflict[];
	taken: Path[];
}

function mergeAt(base: unknown, mine: unknown, theirs: unknown, path: Path, found: Found): unknown {
	if (same(mine, theirs) || same(base, theirs)) return mine;
	const parts: unknown[] = [base, mine, theirs];
	if (divisible(parts)) {
		const merged: Record<string, unknown> = {};
		for (const key of new Set(parts.flatMap((part) => Object.keys(part)))) {
			const [b, m, t] = parts.map((part) => part[key]);
			const value = mergeAt(b, m, t, [...path, key], found);
			if (value !== undefined) merged[key] = value;
		}
		return merged;
	}
	if (same(base, mine)) {
		found.taken.push(path);
		return theirs;
	}
	const [ours, others] = [filled(base, mine, theirs), filled(base, theirs, mine)];
	if (same(ours, others)) found.taken.push(path);
	else found.conflicts.push({ path, base, mine: ours, theirs: others });
	return ours;
}

/**
 * Joins two edits of one document. A point's three coordinates are one thing: half of a point from each
 * person would be a point that neither meant.
 */
export function mergeThreeWay<T extends object>(base: T, mine: T, theirs: T): Merge<T> {
	const found: Found = { conflicts: [], taken: [] };
	const merged = mergeAt(base, mine, theirs, [], found) as T;
	return { merged, ...found };
}

/** Every point and field in which two documents differ, by its path; a changed kind or list is one entry. */
export function differences(before: unknown, after: unknown, path: Path = []): Path[] {
	if (same(before, after)) return [];
	const pair: unknown[] = [before, after];
	if (!divisible(pair)) return [path];
	return [...new Set(pair.flatMap((part) => Object.keys(part)))].flatMap((key) => {
		const [b, a] = pair.map((part) => part[key]);
		return differences(b, a, [...path, key]);
	});
}

/** The value at a path, undefined where the path leads nowhere. */
export function valueAt(document: unknown, path: Path): unknown {
	return path.reduce<unknown>((value, key) => (isObject(value) ? value[key] : undefined), document);
}

/** Writes a value at a path of a mutable draft; a path that leads nowhere changes nothing. */
export function writeAt(draft: object, path: Path, value: unknown): void {
	const parent = valueAt(draft, path.slice(0, -1));
	const key = path.at(-1);
	if (isObject(parent) && key !== undefined) parent[key] = value;
}
