import type { Coordinate, PointEntry } from '../schemas/axle';

/** Where the builder measures from and which way is positive. */
export interface Datum {
	origin: 'ground' | 'table' | 'rail';
	/** Datum plane above ground at ride height, mm; 0 for ground. */
	height: number;
	/** Which way along the car is positive. */
	foreAft: 'fore' | 'aft';
	/** x of the datum's zero in the axes of the kernel, mm. */
	foreOrigin: number;
}

export type DatumAxis = 'out' | 'up' | 'fore';
export type Side = 'left' | 'right';

/** A point in the builder's datum, mm: out from the centreline, up from the datum, fore (or aft) from its zero. */
export interface DatumPoint {
	out: Coordinate;
	up: Coordinate;
	fore: Coordinate;
}

export const GROUND_DATUM: Datum = { origin: 'ground', height: 0, foreAft: 'fore', foreOrigin: 0 };

export const DATUM_NAMES: Readonly<Record<Datum['origin'], string>> = {
	ground: 'ground',
	table: 'table top',
	rail: 'frame rail'
};

/** Columns of a table of points, in order. */
export const DATUM_AXES: readonly DatumAxis[] = ['out', 'up', 'fore'];

/** Where an axis of the datum lies in a stored point `[x, y, z]`. */
export const PLACE_OF: Readonly<Record<DatumAxis, 0 | 1 | 2>> = { fore: 0, out: 1, up: 2 };

/** The word over a column: out, up, and fore or aft as the builder has it. */
export function axisWord(axis: DatumAxis, datum: Datum): string {
	return axis === 'fore' ? datum.foreAft : axis;
}

/** Stored = sign · shown + offset, mm, on one axis. */
function mapping(axis: DatumAxis, datum: Datum, side: Side): { sign: 1 | -1; offset: number } {
	if (axis === 'out') return { sign: side === 'left' ? 1 : -1, offset: 0 };
	if (axis === 'up') return { sign: 1, offset: datum.height };
	return { sign: datum.foreAft === 'fore' ? 1 : -1, offset: datum.foreOrigin };
}

/** To 1e-9 mm, so that a figure typed in one datum reads back as typed and not as 312.40000000000003; never −0. */
function clean(mm: number): number {
	return Math.round(mm * 1e9) / 1e9 + 0;
}

/** One stored coordinate (mm, kernel axes) in the builder's datum. */
export function coordinateToDatum(axis: DatumAxis, stored: Coordinate, datum: Datum, side: Side): Coordinate {
	if (stored === null) return null;
	const { sign, offset } = mapping(axis, datum, side);
	return clean(sign * (stored - offset));
}

/** One coordinate of the builder's datum as it is stored. Inverse of `coordinateToDatum` to 1e-9 mm. */
export function coordinateFromDatum(axis: DatumAxis, shown: Coordinate, datum: Datum, side: Side): Coordinate {
	if (shown === null) return null;
	const { sign, offset } = mapping(axis, datum, side);
	return clean(sign * shown + offset);
}

/** A stored point in the builder's datum, mm. On the right side, out is positive outboard too. */
export function toDatum(point: Readonly<PointEntry>, datum: Datum, side: Side): DatumPoint {
	const at = (axis: DatumAxis) => coordinateToDatum(axis, point[PLACE_OF[axis]], datum, side);
	return { out: at('out'), up: at('up'), fore: at('fore') };
}

/** A point of the builder's datum as it is stored: `[x, y, z]`, mm. Inverse of `toDatum` to 1e-9 mm. */
export function fromDatum(point: Readonly<DatumPoint>, datum: Datum, side: Side): PointEntry {
	const at = (axis: DatumAxis) => coordinateFromDatum(axis, point[axis], datum, side);
	return [at('fore'), at('out'), at('up')];
}

/** A movement (mm, kernel axes) in the words of the datum: directions only, no origin. */
export function moveToDatum(
	move: readonly [number, number, number],
	datum: Datum,
	side: Side
): Record<DatumAxis, number> {
	const along = (axis: DatumAxis) => clean(mapping(axis, datum, side).sign * move[PLACE_OF[axis]]);
	return { out: along('out'), up: along('up'), fore: along('fore') };
}

/** A movement given in the words of the datum, mm, in kernel axes `[x, y, z]`. */
export function moveFromDatum(
	move: Readonly<Record<DatumAxis, number>>,
	datum: Datum,
	side: Side
): [number, number, number] {
	const along = (axis: DatumAxis) => clean(mapping(axis, datum, side).sign * move[axis]);
	return [along('fore'), along('out'), along('up')];
}
