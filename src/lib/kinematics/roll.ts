import { inWords, KinematicsError } from './errors';
import { prepareAxle, type PreparedAxle } from './axle';
import type { AxleGeometry, Vec3 } from './geometry';
import * as at from './layout';
import type { Prepared } from './prepared';
import { CornerState, type CornerStateData } from './state';
import { groundAt, RollPath, vectorIn, type Ground, type Pairing } from './rollpath';
import { stepsOf, type Sweep, type SweepLimit, type SweepRange } from './sweep';

const DEGREES = 180 / Math.PI;
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

function rolled(p: Prepared, row: Float64Array, ground: Ground): RolledCornerState {
	const w = vectorIn(row, at.WHEEL_CENTRE);
	const s = vectorIn(row, at.SPIN);
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

function rollState(pair: PreparedAxle, roll: number, { left, right }: Pairing): RollState {
	const ground = groundAt(roll);
	const state = { left: rolled(pair.left, left, ground), right: rolled(pair.right, right, ground) };
	const rollCentre = rollCentreOf(ground, state.left, state.right);
	const reasons = rollCentre
		? {}
		: { rollCentre: 'The two contact-point normals run parallel here, so they do not meet.' };
	return { roll, ...state, rollCentre, reasons };
}

/**
 * The body rolled about +x (degrees, + lifts the left side) at a heave (mm, mean wheel-centre travel, bump +), both
 * wheels on the ground, rack 0. `left` and `right` are states in body axes with camber to the ground beside. The sweep
 * ends where a corner binds, or where a wheel near its bind no longer follows the ground.
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
	const path = new RollPath(prepareAxle(axle), heave);
	const states: RollState[] = [];
	const limits: { lowLimit?: SweepLimit; highLimit?: SweepLimit } = {};
	for (const roll of values) {
		const found = path.at(roll);
		if ('stop' in found) limits[roll > found.last ? 'highLimit' : 'lowLimit'] = { value: found.last, ...found.stop };
		else states.push(rollState(path.pair, roll, found));
	}
	return { states, ...limits };
}
