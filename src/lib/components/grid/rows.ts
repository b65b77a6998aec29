import { axisWord, coordinateFromDatum, coordinateToDatum, DATUM_AXES, PLACE_OF } from '$lib/domain/datum';
import type { Datum, DatumAxis, Side } from '$lib/domain/datum';
import { entryOf, LINK_NAMES, POINT_ORDER, POINTS, type LinkKey, type PointKey } from '$lib/domain/points';
import { FAR_MM, type AxleDocument, type CornerEntry } from '$lib/schemas/axle';

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
	/** Said after the unit, where a number could be taken for another: "per wheel". */
	note?: string;
}

export interface GridGroup {
	key: string;
	title: string;
	rows: GridRow[];
}

/** The corner of a side, or null where the right side mirrors the left. */
export function cornerOf(document: AxleDocument, side: Side): CornerEntry | null {
	if (side === 'left') return document.left;
	return document.right === 'mirror' ? null : document.right;
}

function pointCell(point: PointKey, side: Side, datum: Datum, axis: DatumAxis): GridCell {
	const find = (document: AxleDocument) => {
		const corner = cornerOf(document, side);
		return corner && entryOf(corner, point);
	};
	const place = PLACE_OF[axis];
	const ends = [-FAR_MM, FAR_MM].map((end) => coordinateToDatum(axis, end, datum, side) ?? 0);
	return {
		key: `${side}.${point}.${axis}`,
		label: `${POINTS[point].name}, ${axisWord(axis, datum)}`,
		quantity: 'length',
		empties: true,
		low: Math.min(...ends),
		high: Math.max(...ends),
		read: (document) => coordinateToDatum(axis, find(document)?.[place] ?? null, datum, side),
		write(document, value) {
			const entry = find(document);
			if (entry) entry[place] = coordinateFromDatum(axis, value, datum, side);
		}
	};
}

/** Under the link's own name the row needs only its part of the whole name. */
const PART: Record<PointKey, string> = {
	upperFront: 'front pivot',
	upperRear: 'rear pivot',
	upperBall: 'ball joint',
	lowerFront: 'front pivot',
	lowerRear: 'rear pivot',
	lowerBall: 'ball joint',
	tieRodInner: 'rack end',
	tieRodOuter: 'outer joint',
	coiloverTop: 'top',
	coiloverBottom: 'bottom'
};

function pointRow(point: PointKey, side: Side, datum: Datum): GridRow {
	const cells = DATUM_AXES.map((axis) => pointCell(point, side, datum, axis));
	return { key: point, name: PART[point], label: POINTS[point].name, point, cells };
}

type WheelField = 'track' | 'loadedRadius' | 'camber' | 'toe';
type CoiloverField = 'rate' | 'forceAtRide' | 'openLength' | 'closedLength';
/** The limits of src/lib/schemas/axle.ts; tests/component/grid holds the two together. */
type Limits = Pick<GridCell, 'quantity' | 'empties' | 'low' | 'high'>;

const WHEEL: { field: WheelField; name: string; note?: string; limits: Limits }[] = [
	{ field: 'track', name: 'track', limits: { quantity: 'length', empties: true, low: 300, high: 4000 } },
	{ field: 'loadedRadius', name: 'loaded radius', limits: { quantity: 'length', empties: true, low: 50, high: 1000 } },
	{
		field: 'camber',
		name: 'static camber',
		note: 'top in −',
		limits: { quantity: 'angle', empties: false, low: -20, high: 20 }
	},
	{
		field: 'toe',
		name: 'static toe',
		note: 'per wheel, toe-in +',
		limits: { quantity: 'angle', empties: false, low: -20, high: 20 }
	}
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

function wheelRow(side: Side, { field, name, note, limits }: (typeof WHEEL)[number]): GridRow {
	const cell: GridCell = {
		...limits,
		key: `${side}.wheel.${field}`,
		label: field === 'toe' ? `${name}, per wheel` : name,
		read: (document) => cornerOf(document, side)?.wheel[field] ?? null,
		write(document, value) {
			const wheel = cornerOf(document, side)?.wheel;
			if (!wheel) return;
			if (field === 'track' || field === 'loadedRadius') wheel[field] = value;
			else if (value !== null) wheel[field] = value;
		}
	};
	return { key: `wheel.${field}`, name, label: cell.label, point: null, cells: [cell], ...(note && { note }) };
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

/** The table's groups and rows for one side, the coil-over's only where there is one. */
export function gridGroups(side: Side, datum: Datum, hasCoilover: boolean): GridGroup[] {
	const link = (key: LinkKey): GridGroup => ({
		key,
		title: LINK_NAMES[key],
		rows: POINT_ORDER.filter((point) => POINTS[point].link === key).map((point) => pointRow(point, side, datum))
	});
	const wheel: GridGroup = { key: 'wheel', title: 'wheel', rows: WHEEL.map((field) => wheelRow(side, field)) };
	const groups = [link('upperArm'), link('lowerArm'), link('tieRod'), wheel];
	if (!hasCoilover) return groups;
	const coilover = link('coilover');
	return [...groups, { ...coilover, rows: [...coilover.rows, ...COILOVER.map((field) => coiloverRow(side, field))] }];
}
