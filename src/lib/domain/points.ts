import type { PointName } from '../kinematics';
import { AXLE_POINTS } from '../schemas/axle';
import type { CornerEntry, PointEntry } from '../schemas/axle';

/** The eight hardpoints and the two ends of the coil-over: everything that is a row of the table and a mark on the sheet. */
export type PointKey = PointName | 'coiloverTop' | 'coiloverBottom';
/** What is bolted there: a chassis pivot, a ball joint, or a joint at the end of a rod. */
export type PointKind = 'pivot' | 'ball' | 'rod';
export type LinkKey = 'upperArm' | 'lowerArm' | 'tieRod' | 'coilover';

export interface PointInfo {
	readonly key: PointKey;
	/** As a builder names it. */
	readonly name: string;
	/** For a narrow column or a mark's plate. */
	readonly short: string;
	readonly kind: PointKind;
	readonly link: LinkKey;
}

function point(key: PointKey, name: string, short: string, kind: PointKind, link: LinkKey): PointInfo {
	return { key, name, short, kind, link };
}

export const POINTS: Readonly<Record<PointKey, PointInfo>> = {
	upperFront: point('upperFront', 'upper arm, front pivot', 'upper front', 'pivot', 'upperArm'),
	upperRear: point('upperRear', 'upper arm, rear pivot', 'upper rear', 'pivot', 'upperArm'),
	upperBall: point('upperBall', 'upper ball joint', 'upper ball', 'ball', 'upperArm'),
	lowerFront: point('lowerFront', 'lower arm, front pivot', 'lower front', 'pivot', 'lowerArm'),
	lowerRear: point('lowerRear', 'lower arm, rear pivot', 'lower rear', 'pivot', 'lowerArm'),
	lowerBall: point('lowerBall', 'lower ball joint', 'lower ball', 'ball', 'lowerArm'),
	tieRodInner: point('tieRodInner', 'inner tie-rod joint', 'rack end', 'rod', 'tieRod'),
	tieRodOuter: point('tieRodOuter', 'outer tie-rod joint', 'steering arm', 'rod', 'tieRod'),
	coiloverTop: point('coiloverTop', 'coil-over, top', 'coil top', 'rod', 'coilover'),
	coiloverBottom: point('coiloverBottom', 'coil-over, bottom', 'coil bottom', 'rod', 'coilover')
};

/** Order of rows in every table of points. */
export const POINT_ORDER: readonly PointKey[] = [...AXLE_POINTS, 'coiloverTop', 'coiloverBottom'];

export const LINK_NAMES: Readonly<Record<LinkKey, string>> = {
	upperArm: 'upper arm',
	lowerArm: 'lower arm',
	tieRod: 'tie rod',
	coilover: 'coil-over'
};

/** The entry of a point of a corner, or null where the corner has no coil-over. */
export function entryOf(corner: CornerEntry, key: PointKey): PointEntry | null {
	if (key === 'coiloverTop') return corner.coilover?.top ?? null;
	if (key === 'coiloverBottom') return corner.coilover?.bottom ?? null;
	return corner.points[key];
}

/** Where the point stands in the document, as fields are named in messages: `left.points.upperBall`. */
export function pathOf(side: 'left' | 'right', key: PointKey): string {
	if (key === 'coiloverTop') return `${side}.coilover.top`;
	if (key === 'coiloverBottom') return `${side}.coilover.bottom`;
	return `${side}.points.${key}`;
}
