import { inWords, KinematicsError, type LinkName } from './errors';
import { prepareAxle, wholeTravel, type PreparedAxle } from './axle';
import { evaluateAt } from './evaluate';
import type { AxleGeometry, Side, Vec3 } from './geometry';
import * as at from './layout';
import type { Prepared } from './prepared';
import { CornerState, type CornerStateData } from './state';
import { outOfReach } from './locate';
import { stepsOf, type Sweep, type SweepLimit, type SweepRange } from './sweep';

const DEGREES = 180 / Math.PI;
/** The two contact points are level when their heights differ by less, as a part of the corner's size. */
const LEVEL = 1e-12;
/** The last reachable roll is found to this, degrees. */
const FINEST_ROLL = 1e-10;
/** Largest roll a sweep may ask for, degrees. */
const STEEPEST = 60;
/** Normals nearer to parallel than this meet nowhere. */
const PARALLEL = 1e-9;

/** A corner under a rolled body: a `CornerState` in body axes, and what the road sees of it. */
export class RolledCornerState extends CornerState {
	constructor(
		corner: Prepared,
		row: Float64Array,
		/** Camber to the ground, degrees, negative: top leans towards the vehicle. */
		readonly camberToGround: number,
		/** The tyre's lowest point seen from the ground, in body axes, mm. */
		readonly groundContact: Vec3
	) {
		super(corner, row, 0);
	}

	override toJSON(): CornerStateData & { camberToGround: number; groundContact: Vec3 } {
		return { ...super.toJSON(), camberToGround: this.camberToGround, groundContact: this.groundContact };
	}
}

/** Where the two contact-point normals meet: above the ground, and along it from the contact points' middle, left +; mm. */
export interface RollCentre {
	readonly height: number;
	readonly lateral: number;
}

export interface RollState {
	/** Body roll about +x, degrees, + lifts the left side. */
	readonly roll: number;
	readonly left: RolledCornerState;
	readonly right: RolledCornerState;
	readonly rollCentre: RollCentre | null;
	readonly reasons: { readonly rollCentre?: string };
}

/** The ground's upward normal in body axes, (0, sin, cos) of the roll. */
interface Ground {
	readonly up: number;
	readonly across: number;
}

/** A wheel seen from the ground: height of its lowest point, that height's rate with travel, and that point. */
interface Footing {
	height: number;
	rate: number;
	row: Float64Array;
}

function vector(row: Float64Array, slot: number): Vec3 {
	return [row[slot] as number, row[slot + 1] as number, row[slot + 2] as number];
}

/** The disc's lowest point lies at n·w − r·√(1 − (n·s)²), n the ground's normal. */
function footing(p: Prepared, travel: number, ground: Ground): Footing {
	const row = new Float64Array(at.STATE_LENGTH);
	evaluateAt(p, travel, 0, row, 0);
	const w = vector(row, at.WHEEL_CENTRE);
	const s = vector(row, at.SPIN);
	const t = vector(row, at.TURN);
	const c = vector(row, at.CONTACT);
	const v = vector(row, at.CONTACT_MOVE);
	const lean = ground.across * s[1] + ground.up * s[2];
	const level = Math.sqrt(1 - lean * lean);
	const hubY = v[1] + t[2] * (w[0] - c[0]) - t[0] * (w[2] - c[2]);
	const leanRate = ground.across * (t[2] * s[0] - t[0] * s[2]) + ground.up * (t[0] * s[1] - t[1] * s[0]);
	return {
		height: ground.across * w[1] + ground.up * w[2] - p.radius * level,
		rate: ground.across * hubY + ground.up + (p.radius * lean * leanRate) / level,
		row
	};
}

/** How far the left wheel may have travelled more than the heave, and the right one less, mm, and what ends it. */
interface ShiftRange {
	readonly low: number;
	readonly high: number;
	readonly lowEnd: Stop;
	readonly highEnd: Stop;
}

interface Stop {
	readonly locks: LinkName;
	readonly side: Side;
}

function shiftRange(pair: PreparedAxle, heave: number): ShiftRange {
	const left = wholeTravel(pair, 'left');
	const right = wholeTravel(pair, 'right');
	for (const [side, { low, high }] of Object.entries({ left, right }) as [Side, typeof left][]) {
		const end = heave > high.value ? high : heave < low.value ? low : null;
		if (end) throw outOfReach('travel', heave, end.value, end.locks, side);
	}
	const drop = left.low.value - heave > heave - right.high.value;
	const lift = left.high.value - heave < heave - right.low.value;
	return {
		low: Math.max(left.low.value - heave, heave - right.high.value),
		high: Math.min(left.high.value - heave, heave - right.low.value),
		lowEnd: drop ? { locks: left.low.locks, side: 'left' } : { locks: right.high.locks, side: 'right' },
		highEnd: lift ? { locks: left.high.locks, side: 'left' } : { locks: right.low.locks, side: 'right' }
	};
}

interface Balance {
	readonly shift: number;
	readonly left: Footing;
	readonly right: Footing;
}

/**
 * The body at one roll angle and heave. With travels heave + shift and heave − shift their mean is the heave, and one
 * unknown is left: the shift for which both lowest points are level. Newton with the exact derivative in a bracket.
 * @returns what locks, where no shift in the range does it
 */
function balance(pair: PreparedAxle, ground: Ground, heave: number, range: ShiftRange, start: number): Balance | Stop {
	const enough = LEVEL * (pair.left.size + pair.left.wheelHeight + pair.left.halfTrack);
	let { low, high } = range;
	let lowTried = false;
	let highTried = false;
	let shift = start;
	for (;;) {
		const left = footing(pair.left, heave + shift, ground);
		const right = footing(pair.right, heave - shift, ground);
		const gap = left.height - right.height;
		if (Math.abs(gap) <= enough) return { shift, left, right };
		if (gap < 0) {
			if (shift >= range.high) return range.highEnd;
			low = shift;
			lowTried = true;
		} else {
			if (shift <= range.low) return range.lowEnd;
			high = shift;
			highTried = true;
		}
		const newton = shift - gap / (left.rate + right.rate);
		const middle = (low + high) / 2;
		if (newton > low && newton < high) shift = newton;
		else if (gap < 0 && !highTried) shift = high;
		else if (gap > 0 && !lowTried) shift = low;
		else if (middle > low && middle < high) shift = middle;
		else return { shift, left, right };
	}
}

/** Where the normals to the contact points' movement against the body meet in the front view (Kennedy's theorem). */
function rollCentreOf(ground: Ground, left: RolledCornerState, right: RolledCornerState): RollCentre | null {
	const line = (state: RolledCornerState): Vec3 => {
		const [cx, cy, cz] = state.contactPoint;
		const [, vy, vz] = state.contactVelocity;
		const [tx, ty, tz] = state.turning;
		const [x, y, z] = state.groundContact;
		// The material point at the ground contact, from the one at the lowest point in the body's axes.
		const moveY = vy + tz * (x - cx) - tx * (z - cz);
		const moveZ = vz + tx * (y - cy) - ty * (x - cx);
		const size = Math.hypot(moveY, moveZ);
		return [moveY / size, moveZ / size, (moveY * y + moveZ * z) / size];
	};
	const [ly, lz, l] = line(left);
	const [ry, rz, r] = line(right);
	const determinant = ly * rz - lz * ry;
	if (!(Math.abs(determinant) > PARALLEL)) return null;
	const y = (l * rz - r * lz) / determinant;
	const z = (r * ly - l * ry) / determinant;
	const a = left.groundContact;
	const b = right.groundContact;
	const fromY = y - (a[1] + b[1]) / 2;
	const fromZ = z - (a[2] + b[2]) / 2;
	return { height: ground.across * fromY + ground.up * fromZ, lateral: ground.up * fromY - ground.across * fromZ };
}

function rolled(p: Prepared, { row }: Footing, ground: Ground): RolledCornerState {
	const w = vector(row, at.WHEEL_CENTRE);
	const s = vector(row, at.SPIN);
	const lean = ground.across * s[1] + ground.up * s[2];
	const level = Math.sqrt(1 - lean * lean);
	const down = p.radius / level;
	const contact: Vec3 = [
		w[0] + down * lean * s[0],
		w[1] + down * (lean * s[1] - ground.across),
		w[2] + down * (lean * s[2] - ground.up)
	];
	return new RolledCornerState(p, row, -Math.atan2(lean, level) * DEGREES, contact);
}

function groundAt(roll: number): Ground {
	return { across: Math.sin(roll / DEGREES), up: Math.cos(roll / DEGREES) };
}

function rollState(pair: PreparedAxle, roll: number, { left, right }: Balance): RollState {
	const ground = groundAt(roll);
	const state = { left: rolled(pair.left, left, ground), right: rolled(pair.right, right, ground) };
	const rollCentre = rollCentreOf(ground, state.left, state.right);
	const reasons = rollCentre
		? {}
		: { rollCentre: 'The two contact-point normals run parallel here, so they do not meet.' };
	return { roll, ...state, rollCentre, reasons };
}

/** One way of the sweep, from a level body outwards: the states, and where it ends. */
function rollOneWay(
	pair: PreparedAxle,
	heave: number,
	range: ShiftRange,
	rolls: number[]
): { states: RollState[]; limit?: SweepLimit } {
	const states: RollState[] = [];
	let reached = 0;
	let shift = 0;
	for (const roll of rolls) {
		const found = balance(pair, groundAt(roll), heave, range, shift);
		if ('locks' in found) return { states, limit: rollLimit(pair, heave, range, reached, roll, shift) };
		states.push(rollState(pair, roll, found));
		reached = roll;
		shift = found.shift;
	}
	return { states };
}

/** Halves the gap between a reached and an unreached roll. */
function rollLimit(
	pair: PreparedAxle,
	heave: number,
	range: ShiftRange,
	reached: number,
	missed: number,
	start: number
): SweepLimit {
	let good = reached;
	let bad = missed;
	let shift = start;
	let end = range.highEnd;
	while (Math.abs(bad - good) > FINEST_ROLL) {
		const middle = (good + bad) / 2;
		const found = balance(pair, groundAt(middle), heave, range, shift);
		if ('locks' in found) {
			end = found;
			bad = middle;
		} else {
			good = middle;
			shift = found.shift;
		}
	}
	return { value: good, ...end };
}

/**
 * The body rolled about +x (degrees, + lifts the left side) at a heave (mm, mean wheel-centre travel, bump +), both
 * wheels on the ground, rack 0. `left` and `right` are states in body axes with camber to the ground beside.
 * @throws KinematicsError `not-finite`, `degenerate`, or `out-of-reach` where the heave itself is out of reach
 */
export function sweepRoll(axle: AxleGeometry, range: SweepRange & { readonly heave?: number }): Sweep<RollState> {
	const values = stepsOf(range, 'degrees');
	const heave = range.heave ?? 0;
	if (!Number.isFinite(heave))
		throw new KinematicsError('not-finite', 'heave', 'The heave is not a number: give it in mm.');
	const steepest = values.find((roll) => Math.abs(roll) > STEEPEST);
	if (steepest !== undefined) {
		throw new KinematicsError('degenerate', 'roll', `${inWords(steepest)}° of roll: it must lie within ±${STEEPEST}°.`);
	}
	const pair = prepareAxle(axle);
	const shifts = shiftRange(pair, heave);
	const ascending = [...values].sort((a, b) => a - b);
	const down = rollOneWay(pair, heave, shifts, ascending.filter((roll) => roll < 0).reverse());
	const up = rollOneWay(
		pair,
		heave,
		shifts,
		ascending.filter((roll) => roll >= 0)
	);
	const states = [...down.states.reverse(), ...up.states];
	if (range.to < range.from) states.reverse();
	return { states, ...(down.limit && { lowLimit: down.limit }), ...(up.limit && { highLimit: up.limit }) };
}
