import { followAngle, solveAngle } from './angle';
import type { LinkName } from './errors';
import { linkAtExtreme, marginHere, reach, seed } from './path';
import type { Prepared } from './prepared';

/** How far the rack can be moved at one wheel-centre travel. */
export interface RackEnd {
	/** Reached rack movement of a left corner, mm (+ outboard), and the lower-arm angle there, radians. */
	rack: number;
	theta: number;
	/** What locks there; null where the asked movement was reached. */
	locks: LinkName | null;
}

/** Steps of the rack as a part of the steering arm's length: at most, and down to where the end is taken as found. */
const LONGEST_STEP = 0.1;
const SHORTEST_STEP = 1e-12;
const STEP_PER_MARGIN = 0.2;

/** The link nearest to its dead centre in the state in the workspace. */
function nearestLock(p: Prepared): LinkName {
	const m = p.motion;
	if (m.wvz / p.riseAtRide < Math.min(m.upperMargin, m.tieMargin)) return linkAtExtreme(p);
	return m.upperMargin < m.tieMargin ? 'upperArm' : 'tieRod';
}

/**
 * Moves the rack from 0 towards its place with the wheel held at a travel, in steps that shrink near a dead centre; a
 * step that fails is halved until the end is met. Replaces the known stretch.
 * @returns null where that travel is out of reach with the rack at 0
 */
export function rackEnd(p: Prepared, travel: number, rack: number): RackEnd | null {
	if (!seed(p, 0, 0) || !reach(p, travel)) return null;
	let theta = solveAngle(p, travel);
	if (Number.isNaN(theta)) return null;
	let at = 0;
	let allowed = LONGEST_STEP * p.steeringArm;
	let locks = nearestLock(p);
	while (at !== rack) {
		const step = Math.min(allowed, Math.abs(rack - at));
		const next = step === Math.abs(rack - at) ? rack : at + Math.sign(rack) * step;
		const followed = followAngle(p, travel, next, theta);
		if (Number.isNaN(followed)) {
			allowed = step / 2;
			if (allowed < SHORTEST_STEP * p.steeringArm) return { rack: at, theta, locks };
			continue;
		}
		at = next;
		theta = followed;
		locks = nearestLock(p);
		const room = Math.max(STEP_PER_MARGIN * marginHere(p), SHORTEST_STEP);
		allowed = Math.min(2 * step, p.steeringArm * Math.min(LONGEST_STEP, Math.max(room, 1e-4)));
	}
	return { rack: at, theta, locks: null };
}
