import { axisWord, DATUM_AXES, GROUND_DATUM, toDatum, type Datum, type Side } from '$lib/domain/datum';
import { OUTPUTS } from '$lib/domain/outputs';
import { POINTS, type PointKey } from '$lib/domain/points';
import { formatNumber, formatQuantity, formatWithUnit, NONE } from '$lib/format';
import type { PointEntry, Target } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';
import type { Quantity } from '$lib/units';

/** Fields of the document in words, for a person who is to choose between two values. */

type Path = readonly string[];

const FIELDS: Record<string, { name: string; quantity: Quantity | null }> = {
	'wheel.track': { name: 'track', quantity: 'length' },
	'wheel.x': { name: 'wheel, fore', quantity: 'length' },
	'wheel.loadedRadius': { name: 'loaded radius', quantity: 'length' },
	'wheel.camber': { name: 'static camber', quantity: 'angle' },
	'wheel.toe': { name: 'static toe, per wheel', quantity: 'angle' },
	coilover: { name: 'coil-over', quantity: null },
	'coilover.on': { name: 'coil-over, bolted to', quantity: null },
	'coilover.rate': { name: 'spring rate', quantity: 'rate' },
	'coilover.forceAtRide': { name: 'spring force at ride', quantity: 'force' },
	'coilover.openLength': { name: 'coil-over, open length', quantity: 'length' },
	'coilover.closedLength': { name: 'coil-over, closed length', quantity: 'length' },
	'vehicle.wheelbase': { name: 'wheelbase', quantity: 'length' },
	'vehicle.cgHeight': { name: 'height of the centre of gravity', quantity: 'length' },
	'vehicle.frontBrakeShare': { name: 'front brake share', quantity: null },
	'vehicle.frontBrakes': { name: 'front brakes', quantity: null },
	'vehicle.sprungCornerMass': { name: 'sprung corner mass', quantity: 'mass' },
	'vehicle.tyreRate': { name: 'tyre rate', quantity: 'rate' },
	'adjusters.upper': { name: 'adjusters of the upper arm', quantity: null },
	'adjusters.upper.side': { name: 'shims, which way they move the pivot', quantity: null },
	'adjusters.upper.direction': { name: 'shims, direction', quantity: null },
	'adjusters.upper.frontNow': { name: 'front pack now', quantity: 'length' },
	'adjusters.upper.rearNow': { name: 'rear pack now', quantity: 'length' },
	'adjusters.upper.boltReserve': { name: 'thread past the nut', quantity: 'length' },
	'adjusters.upper.maxPack': { name: 'thickest pack', quantity: 'length' },
	'adjusters.upper.maxDifference': { name: 'largest difference front to rear', quantity: 'length' },
	'adjusters.upper.thread': { name: 'rod ends, thread', quantity: null },
	'adjusters.upper.fitting': { name: 'rod ends, fitting', quantity: null },
	'adjusters.upper.handedness': { name: 'rod ends, handedness', quantity: null },
	'adjusters.upper.engagementNow': { name: 'rod ends, thread engaged', quantity: 'length' },
	'adjusters.upper.minEngagement': { name: 'rod ends, least thread engaged', quantity: 'length' },
	'adjusters.tieRod.thread': { name: 'tie rod, thread', quantity: null },
	'adjusters.tieRod.fitting': { name: 'tie rod, fitting', quantity: null },
	targets: { name: 'targets of the figures', quantity: null },
	right: { name: 'right side', quantity: null }
};

const MEANT: Record<string, string> = {
	mirror: 'mirrors the left',
	lowerArm: 'lower arm',
	upperArm: 'upper arm',
	throughBolt: 'through bolt',
	rodEnd: 'rod end',
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

function fieldAt(path: Path) {
	const inSide = path[0] === 'left' || (path[0] === 'right' && path.length > 1);
	return FIELDS[(inSide ? path.slice(1) : path).join('.')] ?? null;
}

function alignmentName([, side, figure, part]: Path): string {
	return `alignment ${side}, ${figure}${part === 'tolerance' ? ' tolerance' : ''}`;
}

/** What a point or field is called: "left, upper ball joint", "track". Right-hand entries say so. */
export function fieldName(path: Path): string {
	const side = path[0] === 'right' && path.length > 1 ? 'right, ' : '';
	const point = pointAt(path);
	if (point) return side + POINTS[point.key].name;
	if (path[0] === 'alignment') return alignmentName(path);
	return side + (fieldAt(path)?.name ?? path.join(' '));
}

function pointText(entry: PointEntry, preferences: Preferences, datum: Datum, side: Side): string {
	const shown = toDatum(entry, datum, side);
	return DATUM_AXES.map(
		(axis) => `${formatQuantity(shown[axis], 'length', preferences)} ${axisWord(axis, datum)}`
	).join('  ');
}

function targetText(target: Target, preferences: Preferences): string {
	const { short, quantity } = OUTPUTS[target.figure];
	const where =
		target.at === 'ride'
			? ''
			: ` over ${formatQuantity(target.from, 'length', preferences)} to ${formatWithUnit(target.to, 'length', preferences)}`;
	const bounds = [target.low, target.high].map((bound) =>
		bound === null ? 'any' : formatQuantity(bound, quantity, preferences)
	);
	return `${short} ${bounds.join(' to ')}${where}`;
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
			: (value as Target[]).map((target) => targetText(target, preferences)).join('; ');
	}
	const quantity = path[0] === 'alignment' ? 'angle' : fieldAt(path)?.quantity;
	if (typeof value === 'number') {
		return quantity ? formatWithUnit(value, quantity, preferences) : formatNumber(value, 3, preferences);
	}
	if (Array.isArray(value)) return value.join(', ');
	if (typeof value === 'object')
		return 'kind' in value ? (MEANT[String(value.kind)] ?? String(value.kind)) : 'entered on its own';
	return MEANT[String(value)] ?? String(value);
}
