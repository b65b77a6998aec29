import { remember, solveAngle } from './angle';
import { inWords, KinematicsError, LINK_WORDS, type LinkName } from './errors';
import { rackReachesAtRide, reach, seed } from './path';
import type { Prepared } from './prepared';
import { rackEnd } from './rackpath';

const QUANTITIES = {
	travel: { words: 'travel', unit: ' mm' },
	rack: { words: 'rack movement', unit: ' mm' },
	roll: { words: 'roll', unit: '°' }
};

/** The error for what cannot be reached: what was asked, the last reachable value, what locks there, what would do. */
export function outOfReach(
	quantity: keyof typeof QUANTITIES,
	asked: number,
	last: number,
	locks: LinkName,
	side?: 'left' | 'right'
): KinematicsError {
	const { words, unit } = QUANTITIES[quantity];
	const link = `${side ? `${side} ` : ''}${LINK_WORDS[locks]}`;
	return new KinematicsError(
		'out-of-reach',
		locks,
		`${inWords(asked)}${unit} of ${words} is out of reach: the ${link} locks at ${inWords(last)}${unit}. Ask for less, or move that link's points.`,
		side ? { lastReachable: last, locks, side } : { lastReachable: last, locks }
	);
}

/** A rack movement as told (+ to the left) from one of a left corner (+ outboard), or the other way about. */
export function rackAsTold(p: Prepared, rack: number): number {
	return p.side === 'right' ? 0 - rack : rack;
}

function travelBlocked(p: Prepared, travel: number): KinematicsError {
	const end = travel > p.path.high.travel ? p.path.high : p.path.low;
	return outOfReach('travel', travel, end.travel, end.locks ?? 'lowerArm');
}

/** The other way to a state: the wheel moved first, the rack then. Starts the stretch there, or tells why not. */
function startFromTravel(p: Prepared, travel: number, rack: number): KinematicsError | null {
	const end = rackEnd(p, travel, rack);
	if (end === null) return travelBlocked(p, travel);
	if (end.locks !== null) return outOfReach('rack', rackAsTold(p, rack), rackAsTold(p, end.rack), end.locks);
	seed(p, end.theta, rack);
	return null;
}

/** Starts the stretch of reachable angles of a rack position, the rack moved first, at ride height. */
function startFromRack(p: Prepared, rack: number): boolean {
	return (rack === 0 || rackReachesAtRide(p, rack)) && seed(p, 0, rack);
}

/**
 * Brings the corner to a travel and a rack movement (of a left corner, + outboard); position and screw stay in the
 * workspace. A state counts as reachable if it can be come to without a gap from ride height by moving the rack first
 * and the wheel then, or the wheel first and the rack then.
 * @returns the lower-arm angle, radians
 * @throws KinematicsError `out-of-reach` with the last reachable value and what locks
 */
export function locate(p: Prepared, travel: number, rack: number): number {
	if (p.path.rack !== rack && !startFromRack(p, rack)) {
		if (rack === 0) throw doesNotClose();
		const error = startFromTravel(p, travel, rack);
		if (error) throw forget(p, error);
	}
	for (;;) {
		if (!reach(p, travel)) {
			const error = travelBlocked(p, travel);
			if (rack === 0 || p.path.seed !== 0 || startFromTravel(p, travel, rack)) throw forget(p, error);
			continue;
		}
		const theta = solveAngle(p, travel);
		if (Number.isNaN(theta)) continue;
		remember(p, travel, theta);
		return theta;
	}
}

/** After a failure the stretch in the workspace may be another rack's, or one that started elsewhere. */
function forget(p: Prepared, error: KinematicsError): KinematicsError {
	if (p.path.rack !== 0 || p.path.seed !== 0) p.path.rack = NaN;
	return error;
}

/** A travel at which the stretch ends, and what locks there. */
interface TravelLimit {
	value: number;
	locks: LinkName;
}

/**
 * The ends of the reachable travel that lie between `from` and `to` (mm) at a rack movement (mm, + to the left).
 * @throws KinematicsError `out-of-reach` where the rack movement itself is out of reach
 */
export function reachableTravel(
	p: Prepared,
	from: number,
	to: number,
	rackTold: number
): { low?: TravelLimit; high?: TravelLimit } {
	const rack = rackAsTold(p, rackTold);
	const nearest = Math.max(from, Math.min(to, 0));
	if (p.path.rack !== rack && !startFromRack(p, rack)) {
		if (rack === 0) throw doesNotClose();
		const error = startFromTravel(p, nearest, rack);
		if (error) throw forget(p, error);
	}
	reach(p, from);
	reach(p, to);
	const { low, high } = p.path;
	const limits: { low?: TravelLimit; high?: TravelLimit } = {};
	if (low.locks && from < low.travel) limits.low = { value: low.travel, locks: low.locks };
	if (high.locks && to > high.travel) limits.high = { value: high.travel, locks: high.locks };
	return limits;
}

function doesNotClose(): KinematicsError {
	return new KinematicsError(
		'out-of-reach',
		'upperArm',
		'With these adjustments the linkage does not close at ride height: ask for less.',
		{ locks: 'upperArm' }
	);
}
