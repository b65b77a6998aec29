import { fromDatum, toDatum, type Datum } from '$lib/domain/datum';
import { AXLE_POINTS, type AxleDocument, type CornerEntry, type PointEntry } from '$lib/schemas/axle';
import type { PointKey, Side } from '$lib/state/selection.svelte';

/** One number of the document as the table shows it: in the builder's datum, still in mm, degrees, N, N/mm. */
export interface GridCell {
	key: string;
	/** Names the cell in messages, undo and to a screen reader: "upper ball joint, out". */
	label: string;
	quantity: 'length' | 'angle' | 'force' | 'rate';
	/** Whether the cell may stand empty: not typed yet. */
	empties: boolean;
	/** What is accepted, both ends included, in the stored unit. */
	low: number;
	high: number;
	read(document: AxleDocument): number | null;
	write(document: AxleDocument, value: number | null): void;
}

export interface GridRow {
	key: string;
	/** What stands at the head of the row, under the group's name. */
	name: string;
	/** The whole name, for a screen reader. */
	label: string;
	/** The point of the drawing this row is, or null. */
	point: PointKey | null;
	cells: GridCell[];
}

export interface GridGroup {
	key: string;
	title: string;
	rows: GridRow[];
}

export type Axis = 'out' | 'up' | 'fore';
export const AXES: readonly Axis[] = ['out', 'up', 'fore'];

/** Where an axis of the datum lies in a stored point [fore, out, up]. */
const PLACE: Record<Axis, 0 | 1 | 2> = { fore: 0, out: 1, up: 2 };
/** Limits of src/lib/schemas/axle.ts; tests/component/grid holds the two together. */
const FAR_MM = 10_000;

/** The word over a column: the builder's own fore or aft. */
export function axisWord(axis: Axis, datum: Datum): string {
	return axis === 'fore' ? datum.foreAft : axis;
}

/** The corner of a side, or null where the right side mirrors the left. */
export function cornerOf(document: AxleDocument, side: Side): CornerEntry | null {
	if (side === 'left') return document.left;
	return document.right === 'mirror' ? null : document.right;
}

type PointOf = (corner: CornerEntry) => PointEntry | null;

function pointCell(key: string, label: string, side: Side, datum: Datum, axis: Axis, pointOf: PointOf): GridCell {
	const entryOf = (document: AxleDocument) => {
		const corner = cornerOf(document, side);
		return corner && pointOf(corner);
	};
	return {
		key: `${side}.${key}.${axis}`,
		label: `${label}, ${axisWord(axis, datum)}`,
		quantity: 'length',
		empties: true,
		low: -FAR_MM,
		high: FAR_MM,
		read(document) {
			const entry = entryOf(document);
			return entry && toDatum(entry, datum, side)[axis];
		},
		write(document, value) {
			const entry = entryOf(document);
			if (!entry) return;
			const moved = fromDatum({ ...toDatum(entry, datum, side), [axis]: value }, datum, side);
			// Only the typed coordinate: the others keep their last digit.
			entry[PLACE[axis]] = moved[PLACE[axis]];
		}
	};
}

function pointRow(point: PointKey, name: string, label: string, side: Side, datum: Datum, pointOf: PointOf): GridRow {
	return {
		key: point,
		name,
		label,
		point,
		cells: AXES.map((axis) => pointCell(point, label, side, datum, axis, pointOf))
	};
}

type WheelField = 'track' | 'loadedRadius' | 'camber' | 'toe';
type CoiloverField = 'rate' | 'forceAtRide' | 'openLength' | 'closedLength';
type Limits = Pick<GridCell, 'quantity' | 'empties' | 'low' | 'high'>;

const WHEEL: { field: WheelField; name: string; limits: Limits }[] = [
	{ field: 'track', name: 'track', limits: { quantity: 'length', empties: true, low: 300, high: 4000 } },
	{ field: 'loadedRadius', name: 'loaded radius', limits: { quantity: 'length', empties: true, low: 50, high: 1000 } },
	{ field: 'camber', name: 'static camber', limits: { quantity: 'angle', empties: false, low: -20, high: 20 } },
	{ field: 'toe', name: 'static toe, per wheel', limits: { quantity: 'angle', empties: false, low: -20, high: 20 } }
];

const COILOVER: { field: CoiloverField; name: string; limits: Limits }[] = [
	{ field: 'rate', name: 'spring rate', limits: { quantity: 'rate', empties: true, low: 0, high: 10_000 } },
	{
		field: 'forceAtRide',
		name: 'force at ride',
		limits: { quantity: 'force', empties: true, low: -100_000, high: 1_000_000 }
	},
	{ field: 'openLength', name: 'open length', limits: { quantity: 'length', empties: true, low: 0, high: 5000 } },
	{ field: 'closedLength', name: 'closed length', limits: { quantity: 'length', empties: true, low: 0, high: 5000 } }
];

function wheelRow(side: Side, { field, name, limits }: (typeof WHEEL)[number]): GridRow {
	const cell: GridCell = {
		...limits,
		key: `${side}.wheel.${field}`,
		label: name,
		read: (document) => cornerOf(document, side)?.wheel[field] ?? null,
		write(document, value) {
			const wheel = cornerOf(document, side)?.wheel;
			if (!wheel) return;
			if (field === 'track' || field === 'loadedRadius') wheel[field] = value;
			else if (value !== null) wheel[field] = value;
		}
	};
	return { key: `wheel.${field}`, name, label: name, point: null, cells: [cell] };
}

function coiloverRow(side: Side, { field, name, limits }: (typeof COILOVER)[number]): GridRow {
	const cell: GridCell = {
		...limits,
		key: `${side}.coilover.${field}`,
		label: `coil-over, ${name}`,
		read: (document) => cornerOf(document, side)?.coilover?.[field] ?? null,
		write(document, value) {
			const coilover = cornerOf(document, side)?.coilover;
			if (coilover) coilover[field] = value;
		}
	};
	return { key: `coilover.${field}`, name, label: cell.label, point: null, cells: [cell] };
}

/** Row heads of the points: the link's part, and the whole name. */
const POINT_ROWS: Record<(typeof AXLE_POINTS)[number], { name: string; group: 'upper' | 'lower' | 'tieRod' }> = {
	upperFront: { name: 'front pivot', group: 'upper' },
	upperRear: { name: 'rear pivot', group: 'upper' },
	upperBall: { name: 'ball joint', group: 'upper' },
	lowerFront: { name: 'front pivot', group: 'lower' },
	lowerRear: { name: 'rear pivot', group: 'lower' },
	lowerBall: { name: 'ball joint', group: 'lower' },
	tieRodInner: { name: 'inner, at the rack', group: 'tieRod' },
	tieRodOuter: { name: 'outer, at the arm', group: 'tieRod' }
};
const LINKS = { upper: 'Upper arm', lower: 'Lower arm', tieRod: 'Tie rod' } as const;

/** The table's groups and rows for one side; a mirrored right side shows none. `hasCoilover` adds its points and figures. */
export function gridGroups(side: Side, datum: Datum, hasCoilover: boolean): GridGroup[] {
	const links = (['upper', 'lower', 'tieRod'] as const).map((group) => ({
		key: group,
		title: LINKS[group],
		rows: AXLE_POINTS.filter((point) => POINT_ROWS[point].group === group).map((point) =>
			pointRow(point, POINT_ROWS[point].name, pointLabel(point), side, datum, (corner) => corner.points[point])
		)
	}));
	const end = (which: 'top' | 'bottom', key: PointKey) =>
		pointRow(key, which, `coil-over, ${which}`, side, datum, (corner) => corner.coilover?.[which] ?? null);
	const coilover = {
		key: 'coilover',
		title: 'Coil-over',
		rows: [end('top', 'coiloverTop'), end('bottom', 'coiloverBottom')]
	};
	coilover.rows.push(...COILOVER.map((field) => coiloverRow(side, field)));
	const wheel = { key: 'wheel', title: 'Wheel', rows: WHEEL.map((field) => wheelRow(side, field)) };
	return [...links, wheel, ...(hasCoilover ? [coilover] : [])];
}
