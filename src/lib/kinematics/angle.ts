import { place, REACHES } from './corner';
import { shorten } from './path';
import type { PathEnd, Prepared } from './prepared';
import { rise } from './screw';

/** A height is met when it is this near, as a part of the corner's size: some ten units in the last place. */
const NEAR_ENOUGH = 1e-13;
/** The next state is foretold from the last one no farther than this part of the distance between the ball joints. */
const HINT_RANGE = 0.1;
const MOST_STEPS = 200;
/** Following a fixed height, the lower arm may turn this much in one step, radians. */
const LONGEST_FOLLOW = 0.05;
const MOST_FOLLOWING = 30;
/** How many times farther off than `NEAR_ENOUGH` rounding may leave it there. */
const ROUNDED = 1e4;
/** How many times farther off a missed gap leaves it. */
const GAP = 1e6;

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

/** The end of the stretch itself: placed as touching, which is exact, where an angle beside it has lost half its digits. */
function atEnd(p: Prepared, end: PathEnd): number {
	place(p, end.held, p.path.rack, true);
	rise(p);
	return end.held;
}

/**
 * The lower-arm angle for a travel inside the known stretch: Newton with the screw's exact derivative, kept inside a
 * bracket that shrinks with every step, so it leaves neither the branch nor the stretch. Position and screw of the
 * answer stay in the workspace.
 * @returns NaN at a gap the stretch had missed; the stretch then ends before it
 */
export function solveAngle(p: Prepared, travel: number): number {
	const { rack, seed, low, high } = p.path;
	if (travel === high.travel && high.locks !== null) return atEnd(p, high);
	if (travel === low.travel && low.locks !== null) return atEnd(p, low);
	const target = p.wheelHeight + travel;
	const enough = nearEnough(p);
	let below = low.theta;
	let above = high.theta;
	let theta = guess(p, travel);
	let gapAt = NaN;
	let last = Infinity;
	for (let step = 0; step < MOST_STEPS; step++) {
		let next = NaN;
		if (place(p, theta, rack, false) === REACHES) {
			const slope = rise(p);
			const miss = p.motion.wz - target;
			const size = Math.abs(miss);
			if (size <= enough) return theta;
			if (miss < 0) below = theta;
			else above = theta;
			// A Newton step that no longer halves the miss gives way to halving the bracket.
			if (size < last / 2) next = theta - miss / slope;
			last = size;
		} else {
			// Rounding at the very end of the stretch, or a gap the steps had missed: keep to the seed's side of it.
			gapAt = theta;
			if (theta > seed) above = theta;
			else below = theta;
		}
		if (!(next > below && next < above)) next = (below + above) / 2;
		// Near a dead centre the bracket comes down to neighbouring numbers first: there is no nearer state then.
		if (next <= below || next >= above) break;
		theta = next;
	}
	if (place(p, theta, rack, false) !== REACHES) theta = Math.abs(below - seed) < Math.abs(above - seed) ? below : above;
	place(p, theta, rack, true);
	rise(p);
	if (gapAt === gapAt && Math.abs(p.motion.wz - target) > GAP * enough) {
		shorten(p, seed, gapAt);
		return NaN;
	}
	return theta;
}

/** Keeps the state just solved, with its slope and how that changes, to foretell the next. */
export function remember(p: Prepared, travel: number, theta: number): void {
	const { hint } = p;
	const slope = 1 / p.motion.wvz;
	const apart = travel - hint.travel;
	const follows = hint.rack === p.path.rack && apart !== 0 && Math.abs(apart) < HINT_RANGE * p.size;
	// At a dead centre there is no slope to foretell from.
	if (!Number.isFinite(slope)) {
		hint.rack = NaN;
		return;
	}
	hint.bend = follows ? (slope - hint.slope) / apart : 0;
	hint.rack = p.path.rack;
	hint.travel = travel;
	hint.theta = theta;
	hint.slope = slope;
}

/**
 * The angle that keeps the wheel at a height after a small movement of the rack, near the angle it had. Leaves the
 * state in the workspace. Near a dead centre rounding keeps the height from being met exactly; then the nearest counts.
 * @returns NaN where there is none near by
 */
export function followAngle(p: Prepared, travel: number, rack: number, from: number): number {
	const target = p.wheelHeight + travel;
	const enough = nearEnough(p);
	let theta = from;
	let last = Infinity;
	for (let step = 0; step < MOST_FOLLOWING; step++) {
		if (place(p, theta, rack, false) !== REACHES) return NaN;
		const slope = rise(p);
		if (!(slope > 0)) return NaN;
		const miss = p.motion.wz - target;
		const size = Math.abs(miss);
		if (size <= enough || (size >= last && size <= ROUNDED * enough)) return theta;
		last = size;
		theta -= miss / slope;
		if (Math.abs(theta - from) > LONGEST_FOLLOW) return NaN;
	}
	return NaN;
}
