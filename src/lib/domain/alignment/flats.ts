import { KinematicsError, solveCorner } from '../../kinematics';
import type { CornerGeometry, Vec3 } from '../../kinematics';
import type { AdjusterEntry } from '../../schemas/axle';
import { perTurn, threadOf } from './threads';

/** A change of tie-rod length as it is set: + longer. */
export interface TieRodChange {
	/** mm */
	readonly length: number;
	readonly turns: number;
	/** Flats of the hexagon, not rounded. */
	readonly flats: number;
}

/** A length change of the tie rod in turns and flats; null where its thread is not in the table. */
export function tieRodChange(length: number, tieRod: AdjusterEntry['tieRod']): TieRodChange | null {
	const thread = threadOf(tieRod.thread);
	if (!thread) return null;
	const turns = length / perTurn(thread, tieRod.fitting);
	return { length, turns, flats: turns * tieRod.flats };
}

/** A steering wheel that stands crooked while the car runs straight. */
export interface CrookedWheel {
	/** Degrees, + turned to the left. */
	readonly handwheel: number;
	/** Rack travel of one turn of the steering wheel, mm. */
	readonly rackPerTurn: number;
}

const PROBE = 1;

/**
 * Growth of each tie rod, mm, that straightens the steering wheel and leaves both road wheels where they point: the rack
 * goes back to its centre and each rod makes up for it. Exact for where the joints stand.
 * @param left the left corner with the road wheels straight and the rack taken as centred
 * @throws KinematicsError where the rack does not steer
 */
export function straighten(
	left: CornerGeometry,
	right: CornerGeometry,
	{ handwheel, rackPerTurn }: CrookedWheel
): { left: number; right: number } {
	const turned = (rack: number) => -solveCorner(left, { travel: 0, rack }).toe;
	const toLeft = Math.sign(turned(PROBE) - turned(-PROBE));
	if (toLeft === 0) {
		throw new KinematicsError('degenerate', 'tieRodOuter', 'The rack does not steer this corner: check the tie rod.');
	}
	// The rack stands at `shift` while the wheels are straight; centred, its inner joints come back by as much.
	const shift = ((toLeft * handwheel) / 360) * rackPerTurn;
	return { left: growth(left, shift), right: growth(right, shift) };
}

function growth({ points }: CornerGeometry, shift: number): number {
	const { tieRodInner, tieRodOuter } = points;
	const shifted: Vec3 = [tieRodInner[0], tieRodInner[1] + shift, tieRodInner[2]];
	return distance(tieRodOuter, tieRodInner) - distance(tieRodOuter, shifted);
}

function distance(a: Vec3, b: Vec3): number {
	return Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
}
