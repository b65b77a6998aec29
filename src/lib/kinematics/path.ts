import { place, REACHES, TIE_SHORT, UPPER_SHORT } from './corner';
import type { LinkName } from './errors';
import { freshPath, type PathEnd, type Prepared } from './prepared';
import { rise } from './screw';

/** The lower arm steps this far at most, and this much less near a dead centre, so that no gap is stepped over; radians. */
const LONGEST_STEP = 0.02;
const SHORTEST_STEP = 5e-4;
const STEP_PER_MARGIN = 0.2;

/** The wheel is no longer lifted: the end of the travel itself. */
const NO_LIFT = 3;
type Probe = 0 | 1 | 2 | 3;

/** Whether the corner works at this lower-arm angle; leaves position and velocity in the workspace where it does. */
function probe(p: Prepared, theta: number, rack: number): Probe {
	const placed = place(p, theta, rack, false);
	if (placed !== REACHES) return placed;
	return rise(p) > 0 ? REACHES : NO_LIFT;
}

/** 0 at a dead centre or where the wheel is lifted no more, up to 1 far from either. */
export function marginHere(p: Prepared): number {
	const m = p.motion;
	return Math.min(m.upperMargin, m.tieMargin, m.wvz / p.riseAtRide);
}

/** The link to name where the wheel centre's height is at its extreme: the arm nearer to lying in line with the upright. */
function linkAtExtreme(p: Prepared): LinkName {
	const m = p.motion;
	const upper = Math.abs(m.upperRoot) / p.upper.radius;
	const lower = Math.abs(m.upperRoot * m.upperRate) / p.lower.radius;
	return upper < lower ? 'upperArm' : 'lowerArm';
}

/** The link nearest to its dead centre in the state in the workspace. */
export function nearestLock(p: Prepared): LinkName {
	const m = p.motion;
	if (m.wvz / p.riseAtRide < Math.min(m.upperMargin, m.tieMargin)) return linkAtExtreme(p);
	return m.upperMargin < m.tieMargin ? 'upperArm' : 'tieRod';
}

/** Halves the gap between a good and a bad angle down to neighbouring numbers and sets the end there. */
function closeEnd(p: Prepared, end: PathEnd, rack: number, goodAt: number, badAt: number): void {
	let good = goodAt;
	let bad = badAt;
	for (;;) {
		const middle = (good + bad) / 2;
		if (middle === good || middle === bad) break;
		if (probe(p, middle, rack) === REACHES) good = middle;
		else bad = middle;
	}
	const cause = probe(p, bad, rack);
	end.theta = good;
	end.margin = 0;
	if (cause === UPPER_SHORT || cause === TIE_SHORT) {
		// At the dead centre itself the place is smooth in θ, while just before it the square root has lost half its digits.
		place(p, bad, rack, true);
		end.held = bad;
		end.locks = cause === UPPER_SHORT ? 'upperArm' : 'tieRod';
	} else {
		probe(p, good, rack);
		end.held = good;
		end.locks = linkAtExtreme(p);
	}
	end.travel = p.motion.wz - p.wheelHeight;
}

/** Grows the known stretch by one step up or down. */
function grow(p: Prepared, end: PathEnd, rack: number, direction: 1 | -1): void {
	const step = Math.min(LONGEST_STEP, Math.max(SHORTEST_STEP, STEP_PER_MARGIN * end.margin));
	const theta = end.theta + direction * step;
	if (probe(p, theta, rack) === REACHES) {
		end.theta = theta;
		end.travel = p.motion.wz - p.wheelHeight;
		end.margin = marginHere(p);
	} else {
		closeEnd(p, end, rack, end.theta, theta);
	}
}

/** Grows the stretch of the present rack position until it holds the travel or is known to end short of it. */
export function reach(p: Prepared, travel: number): boolean {
	const { low, high, rack } = p.path;
	while (travel > high.travel && high.locks === null) grow(p, high, rack, 1);
	while (travel < low.travel && low.locks === null) grow(p, low, rack, -1);
	return travel <= high.travel && travel >= low.travel;
}

/** Ends the stretch at a gap the steps had missed, between the seed side and a bad angle. */
export function shorten(p: Prepared, goodAt: number, badAt: number): void {
	const { path } = p;
	closeEnd(p, badAt > goodAt ? path.high : path.low, path.rack, goodAt, badAt);
}

/** Starts a stretch at one angle. @returns false where the corner does not work there */
export function seed(p: Prepared, theta: number, rack: number): boolean {
	if (probe(p, theta, rack) !== REACHES) return false;
	p.path = freshPath(rack, theta, p.motion.wz - p.wheelHeight, marginHere(p));
	p.hint.rack = NaN;
	return true;
}

/**
 * Whether the rack can be moved from 0 to its place while the lower arm stands as entered. The steps shrink near a dead
 * centre of the tie rod, so none is stepped over.
 */
export function rackReachesAtRide(p: Prepared, rack: number): boolean {
	const direction = Math.sign(rack);
	let at = 0;
	for (;;) {
		if (place(p, 0, at, false) !== REACHES) return false;
		if (at === rack) return true;
		const step = p.steeringArm * Math.min(0.1, Math.max(SHORTEST_STEP, STEP_PER_MARGIN * p.motion.tieMargin));
		at = Math.abs(rack - at) <= step ? rack : at + direction * step;
	}
}
