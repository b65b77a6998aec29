import { followAngle, solveAngle } from './angle';
import type { LinkName } from './errors';
import { marginHere, nearestLock, reach, seed } from './path';
import type { Prepared } from './prepared';

/** How far the rack can be moved at one wheel-centre travel. */
export interface RackEnd {
	/** Reached rack movement of a left corner, mm (+ outboard), and the lower-arm angle there, radians. */
	rack: number;
	theta: number;
	/** What locks there; null where the asked movement was reached. */
	locks: LinkName | null;
}

/** Steps of the rack as a part of the steering arm's length; near a dead centre, where a failed one is halved, they shrink. */
const LONGEST_STEP = 0.1;
const STEP_PER_MARGIN = 0.2;
const LEAST_ROOM = 1e-4;
const SHORTEST_STEP = 1e-7;
/** The end lies within this of where the steps stopped, and is then halved down to the last. */
const NEAR_END = 1e-3;
const FINEST = 1e-12;
/** The end told lies this far before the end found, so that it can be come to again. */
const BACK_OFF = 1e-9;

/** Whether a travel is reachable at a rack movement, on the stretch that holds an angle. */
function reaches(p: Prepared, travel: number, rack: number, theta: number): boolean {
	return seed(p, theta, rack) && reach(p, travel);
}

/** An angle well inside the stretch about the present one, whose ends move with the rack. */
function insideStretch(p: Prepared, rack: number, theta: number): number {
	if (!seed(p, theta, rack)) return theta;
	reach(p, Infinity);
	reach(p, -Infinity);
	return (p.path.low.theta + p.path.high.theta) / 2;
}

/**
 * The end itself, from a rack movement close before it: where the end of the reachable travel passes the asked one. That
 * end is known exactly, while states beside a dead centre have lost half their digits.
 */
function closeEnd(p: Prepared, travel: number, asked: number, from: RackEnd): RackEnd {
	const direction = Math.sign(asked);
	const arm = p.steeringArm;
	const inside = insideStretch(p, from.rack, from.theta);
	const room = Math.min(NEAR_END * arm, Math.abs(asked - from.rack));
	const farthest = room < NEAR_END * arm ? asked : from.rack + direction * room;
	if (reaches(p, travel, farthest, inside)) {
		return { rack: farthest, theta: solveAngle(p, travel), locks: farthest === asked ? null : from.locks };
	}
	let { locks } = from;
	let good = 0;
	let bad = room;
	while (bad - good > FINEST * arm) {
		const middle = (good + bad) / 2;
		if (reaches(p, travel, from.rack + direction * middle, inside)) {
			good = middle;
		} else {
			bad = middle;
			locks = (travel > p.path.high.travel ? p.path.high.locks : p.path.low.locks) ?? locks;
		}
	}
	const rack = from.rack + direction * Math.max(0, good - BACK_OFF * arm);
	if (!reaches(p, travel, rack, inside)) return from;
	return { rack, theta: solveAngle(p, travel), locks };
}

/**
 * Moves the rack from 0 towards its place with the wheel held at a travel, in steps that shrink near a dead centre; a
 * step that fails is halved until the end is near. Replaces the known stretch.
 * @returns null where that travel is out of reach with the rack at 0
 */
export function rackEnd(p: Prepared, travel: number, rack: number): RackEnd | null {
	if (!seed(p, 0, 0) || !reach(p, travel)) return null;
	let theta = solveAngle(p, travel);
	if (Number.isNaN(theta)) return null;
	const arm = p.steeringArm;
	let at = 0;
	let allowed = LONGEST_STEP * arm;
	let locks = nearestLock(p);
	while (at !== rack) {
		const left = Math.abs(rack - at);
		const step = Math.min(allowed, left);
		const next = step === left ? rack : at + Math.sign(rack) * step;
		const followed = followAngle(p, travel, next, theta);
		if (Number.isNaN(followed)) {
			allowed = step / 2;
			if (allowed < SHORTEST_STEP * arm) return closeEnd(p, travel, rack, { rack: at, theta, locks });
			continue;
		}
		at = next;
		theta = followed;
		locks = nearestLock(p);
		const room = Math.max(LEAST_ROOM, STEP_PER_MARGIN * marginHere(p));
		allowed = Math.min(2 * step, arm * Math.min(LONGEST_STEP, room));
	}
	return { rack: at, theta, locks: null };
}
