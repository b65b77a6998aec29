import { place, REACHES } from './corner';
import { shorten } from './path';
import type { Prepared } from './prepared';
import { rise } from './screw';

/** A height is met when it is this near, as a part of the corner's size: some ten units in the last place. */
const NEAR_ENOUGH = 1e-13;
/** The next state is foretold from the last one no farther than this part of the distance between the ball joints. */
const HINT_RANGE = 0.1;
const MOST_STEPS = 200;
/** Following a fixed height, the lower arm may turn this much in one step, radians. */
const LONGEST_FOLLOW = 0.05;

function nearEnough(p: Prepared): number {
	return NEAR_ENOUGH * (p.size + Math.abs(p.wheelHeight));
}

/** A first guess of the lower-arm angle inside the known stretch: foretold from the last state, or on the chord. */
function guess(p: Prepared, travel: number): number {
	const { hint } = p;
	const { low, high, rack } = p.path;
	if (hint.rack === rack) {
		const step = travel - hint.travel;
		if (Math.abs(step) < HINT_RANGE * p.size) {
			const theta = hint.theta + step * (hint.slope + 0.5 * step * hint.bend);
			if (theta >= low.theta && theta <= high.theta) return theta;
		}
	}
	const span = high.travel - low.travel;
	return span > 0 ? low.theta + ((travel - low.travel) / span) * (high.theta - low.theta) : low.theta;
}

/**
 * The lower-arm angle for a travel inside the known stretch: Newton with the screw's exact derivative, kept inside a
 * bracket that shrinks with every step, so it leaves neither the branch nor the stretch. Position and screw of the
 * answer stay in the workspace.
 * @returns NaN at a gap the stretch had missed; the stretch then ends before it
 */
export function solveAngle(p: Prepared, travel: number): number {
	const { rack, seed, low, high } = p.path;
	const target = p.wheelHeight + travel;
	const enough = nearEnough(p);
	let below = low.theta;
	let above = high.theta;
	let theta = guess(p, travel);
	for (let step = 0; step < MOST_STEPS; step++) {
		if (place(p, theta, rack, false) !== REACHES) {
			shorten(p, seed, theta);
			return NaN;
		}
		const slope = rise(p);
		const miss = p.motion.wz - target;
		if (Math.abs(miss) <= enough) return theta;
		if (miss < 0) below = theta;
		else above = theta;
		const newton = theta - miss / slope;
		const next = newton > below && newton < above ? newton : (below + above) / 2;
		// Near a dead centre the bracket comes down to neighbouring numbers first: there is no nearer state then.
		if (next <= below || next >= above) return theta;
		theta = next;
	}
	return theta;
}

/** Keeps the state just solved, with its slope and how that changes, to foretell the next. */
export function remember(p: Prepared, travel: number, theta: number): void {
	const { hint } = p;
	const slope = 1 / p.motion.wvz;
	const apart = travel - hint.travel;
	const follows = hint.rack === p.path.rack && apart !== 0 && Math.abs(apart) < HINT_RANGE * p.size;
	hint.bend = follows ? (slope - hint.slope) / apart : 0;
	hint.rack = p.path.rack;
	hint.travel = travel;
	hint.theta = theta;
	hint.slope = slope;
}

/**
 * The angle that keeps the wheel at a height after a small movement of the rack, near the angle it had. Leaves the
 * state in the workspace.
 * @returns NaN where there is none near by
 */
export function followAngle(p: Prepared, travel: number, rack: number, from: number): number {
	const target = p.wheelHeight + travel;
	const enough = nearEnough(p);
	let theta = from;
	for (let step = 0; step < 20; step++) {
		if (place(p, theta, rack, false) !== REACHES) return NaN;
		const slope = rise(p);
		if (!(slope > 0)) return NaN;
		const change = (p.motion.wz - target) / slope;
		if (Math.abs(p.motion.wz - target) <= enough) return theta;
		theta -= change;
		if (Math.abs(theta - from) > LONGEST_FOLLOW) return NaN;
	}
	return NaN;
}
