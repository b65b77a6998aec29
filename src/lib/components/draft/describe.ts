import { axisWord, DATUM_AXES, GROUND_DATUM, toDatum, type Datum, type Side } from '$lib/domain/datum';
import { fieldOf } from '$lib/domain/fields';
import { POINTS, type PointKey } from '$lib/domain/points';
import { targetInWords } from '$lib/domain/targets';
import { formatNumber, formatQuantity, formatWithUnit, NONE } from '$lib/format';
import type { PointEntry, Target } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';

/** Fields of the document in words, for a person who is to choose between two values. */

type Path = readonly string[];

/** What the registry of fields does not name: whole groups that are one choice. */
const GROUPS: Record<string, string> = { targets: 'Targets', 'adjusters.upper': 'Adjusters of the upper arm' };

const MEANT: Record<string, string> = {
	mirror: 'mirrors the left',
	lowerArm: 'lower arm',
	upperArm: 'upper arm',
	throughBolt: 'through bolt',
	rodEnd: 'rod ends',
	shim: 'shims'
};

/** The point a path leads to, with its side; null where it leads to no point. */
function pointAt([side, group, last]: Path): { key: PointKey; side: Side } | null {
	if (side !== 'left' && side !== 'right') return null;
	if (group === 'points' && last !== undefined && last in POINTS) return { key: last as PointKey, side };
	if (group === 'coilover' && last === 'top') return { key: 'coiloverTop', side };
	if (group === 'coilover' && last === 'bottom') return { key: 'coiloverBottom', side };
	return null;
}

/** What a point or field is called: "Upper ball joint", "Right side, lower ball joint", "Track". */
export function fieldName(path: Path): string {
	const point = pointAt(path);
	const place = path.join('.');
	if (!point) return fieldOf(place)?.label ?? GROUPS[place] ?? path.join(' ');
	const { name } = POINTS[point.key];
	return point.side === 'right' ? `Right side, ${name}` : name.charAt(0).toUpperCase() + name.slice(1);
}

function pointText(entry: PointEntry, preferences: Preferences, datum: Datum, side: Side): string {
	const shown = toDatum(entry, datum, side);
	return DATUM_AXES.map(
		(axis) => `${formatQuantity(shown[axis], 'length', preferences)} ${axisWord(axis, datum)}`
	).join('  ');
}

/** A value of the document as the person reads it: points in the builder's datum, numbers in their units. */
export function describeValue(
	path: Path,
	value: unknown,
	preferences: Preferences,
	datum: Datum = GROUND_DATUM
): string {
	if (value === null || value === undefined) return NONE;
	const point = pointAt(path);
	if (point && Array.isArray(value)) return pointText(value as PointEntry, preferences, datum, point.side);
	if (path[0] === 'targets' && Array.isArray(value)) {
		return value.length === 0
			? 'none'
			: (value as Target[]).map((target) => targetInWords(target, preferences)).join('; ');
	}
	const quantity = fieldOf(path.join('.'))?.quantity;
	if (typeof value === 'number') {
		return quantity ? formatWithUnit(value, quantity, preferences) : formatNumber(value, 3, preferences);
	}
	if (Array.isArray(value)) return value.join(', ');
	if (typeof value === 'object')
		return 'kind' in value ? (MEANT[String(value.kind)] ?? String(value.kind)) : 'entered on its own';
	return MEANT[String(value)] ?? String(value);
}
