import { formatQuantity, formatWithUnit, unitLabel } from '../format';
import type { WritingChoice } from '../format';
import type { Vec3 } from '../kinematics';
import type { AxleDocument, CornerEntry, PointEntry, Target } from '../schemas/axle';
import type { Quantity } from '../units';
import type { Side } from './datum';
import { fieldOf } from './fields';
import { POINT_ORDER, entryOf } from './points';
import type { PointKey } from './points';

/** A point that stands elsewhere. mm, kernel axes; `displacement` is null while either place is not whole. */
export interface MovedPoint {
	readonly side: Side;
	readonly key: PointKey;
	readonly before: PointEntry;
	readonly after: PointEntry;
	readonly displacement: Vec3 | null;
	readonly distance: number | null;
}

/** A field that is not a point. Numbers in stored units; `quantity` is null for words and plain counts. */
export interface ChangedField {
	readonly path: string;
	readonly label: string;
	readonly quantity: Quantity | null;
	readonly before: number | string | null;
	readonly after: number | string | null;
}

export interface AxleDifference {
	readonly points: MovedPoint[];
	readonly fields: ChangedField[];
	readonly targets: { readonly added: Target[]; readonly removed: Target[] };
	/** Whether the two are the same geometry with the same wishes. */
	readonly same: boolean;
}

const mirrored = ([x, y, z]: Readonly<PointEntry>): PointEntry => [x, y === null ? null : 0 - y, z];

/** The right corner as entered, or the mirror image of the left, which shares nothing with it and may be changed. */
export function rightEntry({ left, right }: AxleDocument): CornerEntry {
	if (right !== 'mirror') return right;
	const points = Object.fromEntries(Object.entries(left.points).map(([key, entry]) => [key, mirrored(entry)]));
	const coilover = left.coilover && {
		...left.coilover,
		top: mirrored(left.coilover.top),
		bottom: mirrored(left.coilover.bottom)
	};
	return { points: points as CornerEntry['points'], wheel: { ...left.wheel }, coilover };
}

function movement(before: Readonly<PointEntry>, after: Readonly<PointEntry>): Vec3 | null {
	const [x, y, z] = before.map((from, axis) => {
		const to = after[axis] ?? null;
		return from === null || to === null ? null : to - from;
	});
	return typeof x === 'number' && typeof y === 'number' && typeof z === 'number' ? [x, y, z] : null;
}

function movedPoints(side: Side, a: CornerEntry, b: CornerEntry): MovedPoint[] {
	return POINT_ORDER.flatMap((key) => {
		const [before, after] = [entryOf(a, key), entryOf(b, key)];
		if (!before || !after || before.every((value, axis) => value === after[axis])) return [];
		const displacement = movement(before, after);
		return [{ side, key, before, after, displacement, distance: displacement && Math.hypot(...displacement) }];
	});
}

type Leaf = number | string | null;

/** Every leaf of a document that is no point and no target, by its path. */
function leavesOf(value: unknown, path: string, into: Map<string, Leaf>): Map<string, Leaf> {
	if (typeof value !== 'object' || value === null) return into.set(path, value as Leaf);
	for (const [key, inner] of Object.entries(value)) {
		if (key === 'points' || key === 'top' || key === 'bottom' || key === 'targets') continue;
		leavesOf(inner, path === '' ? key : `${path}.${key}`, into);
	}
	return into;
}

/** The same with whether there is a coil-over and an own right side told in words; a right side that both mirror is left out. */
function fieldsOf(document: AxleDocument, bothMirror: boolean): Map<string, Leaf> {
	const corners = bothMirror ? { left: document.left } : { left: document.left, right: rightEntry(document) };
	const fields = leavesOf({ ...document, right: {}, ...corners }, '', new Map<string, Leaf>());
	for (const [side, corner] of Object.entries(corners))
		fields.set(`${side}.coilover`, corner.coilover ? 'fitted' : 'none');
	return fields.set('right', document.right === 'mirror' ? 'mirrors the left' : 'entered on its own');
}

function changedFields(a: AxleDocument, b: AxleDocument, bothMirror: boolean): ChangedField[] {
	const [before, after] = [fieldsOf(a, bothMirror), fieldsOf(b, bothMirror)];
	return [...new Set([...before.keys(), ...after.keys()])].flatMap((path) => {
		const [from, to] = [before.get(path) ?? null, after.get(path) ?? null];
		const field = fieldOf(path);
		return from === to || field === null ? [] : [{ path, ...field, before: from, after: to }];
	});
}

function missingFrom(all: readonly Target[], others: readonly Target[]): Target[] {
	const keys = new Set(others.map((target) => JSON.stringify(sorted(target))));
	return all.filter((target) => !keys.has(JSON.stringify(sorted(target))));
}

function sorted(target: Target): [string, unknown][] {
	return Object.entries(target).sort(([a], [b]) => (a < b ? -1 : 1));
}

/** What differs from one document to another: points with their displacement, fields, targets. The right side is told apart only where one of them has its own. */
export function diffAxles(a: AxleDocument, b: AxleDocument): AxleDifference {
	const bothMirror = a.right === 'mirror' && b.right === 'mirror';
	const points = [
		...movedPoints('left', a.left, b.left),
		...(bothMirror ? [] : movedPoints('right', rightEntry(a), rightEntry(b)))
	];
	const fields = changedFields(a, b, bothMirror);
	const targets = { added: missingFrom(b.targets, a.targets), removed: missingFrom(a.targets, b.targets) };
	const same = points.length + fields.length + targets.added.length + targets.removed.length === 0;
	return { points, fields, targets, same };
}

/** One changed field in words: "Track: 1480.0 → 1500.0 mm", "Shim moves the pivot: outboard → inboard". */
export function changeInWords({ label, quantity, before, after }: ChangedField, preferences: WritingChoice): string {
	if (quantity === null) return `${label}: ${before ?? 'none'} → ${after ?? 'none'}`;
	const number = (value: number | string | null) => (typeof value === 'number' ? value : null);
	const [from, to] = [number(before), number(after)];
	if (from === null || to === null) {
		const text = (value: number | null) => (value === null ? 'none' : formatWithUnit(value, quantity, preferences));
		return `${label}: ${text(from)} → ${text(to)}`;
	}
	const marks = quantity === 'angle' && preferences.angle === 'minutes' ? '' : unitLabel(quantity, preferences);
	const unit = marks === '' || marks === '°' ? marks : ` ${marks}`;
	return `${label}: ${formatQuantity(from, quantity, preferences)} → ${formatQuantity(to, quantity, preferences)}${unit}`;
}
