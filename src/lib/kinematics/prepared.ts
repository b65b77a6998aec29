import type { LinkName } from './errors';
import type { CornerGeometry, Side, Vec3 } from './geometry';
import type { Circle } from './intersect';

/**
 * The corner in one position, of a left corner, while it is being worked out. Fields start as NaN so that each stays a
 * plain double. Names: l lower ball, u upper ball, t outer and r inner tie-rod joint, w wheel centre, s spin axis;
 * k, i, j the upright's frame; a dash (v, Rate) is the derivative by the lower arm's angle.
 */
export class Motion {
	/** Lower arm's angle θ and upper arm's angle ψ, as cosine and sine. */
	cos = NaN;
	sin = NaN;
	upperCos = NaN;
	upperSin = NaN;
	/** Signed square roots of the two meets; zero at a dead centre. */
	upperRoot = NaN;
	tieRoot = NaN;
	/** sin² of the angle to the dead centre of the upper arm and of the tie rod: under 0 they do not reach. */
	upperMargin = NaN;
	tieMargin = NaN;
	lx = NaN;
	ly = NaN;
	lz = NaN;
	ux = NaN;
	uy = NaN;
	uz = NaN;
	tx = NaN;
	ty = NaN;
	tz = NaN;
	/** Rack end's y. */
	ry = NaN;
	wx = NaN;
	wy = NaN;
	wz = NaN;
	sx = NaN;
	sy = NaN;
	sz = NaN;
	kx = NaN;
	ky = NaN;
	kz = NaN;
	ix = NaN;
	iy = NaN;
	iz = NaN;
	jx = NaN;
	jy = NaN;
	jz = NaN;
	/** Velocities of the ball joints, of the wheel centre, and the upright's angular velocity, per radian of the lower arm. */
	lvx = NaN;
	lvy = NaN;
	lvz = NaN;
	uvx = NaN;
	uvy = NaN;
	uvz = NaN;
	wvx = NaN;
	wvy = NaN;
	wvz = NaN;
	turnX = NaN;
	turnY = NaN;
	turnZ = NaN;
	/** dψ/dθ */
	upperRate = NaN;
	/** Second derivatives by θ: lower ball, ψ, wheel centre's height, and the upright's angular acceleration. */
	lax = NaN;
	lay = NaN;
	laz = NaN;
	upperAcceleration = NaN;
	wheelAcceleration = NaN;
	spinUpX = NaN;
	spinUpY = NaN;
	spinUpZ = NaN;
}

/** One end of the stretch of lower-arm angles known to be reachable. */
export interface PathEnd {
	theta: number;
	/** Wheel-centre travel there, mm. */
	travel: number;
	/** How far the nearest dead centre is, 0 to 1. */
	margin: number;
	/** Set once the stretch is known to end here. */
	locks: LinkName | null;
	/** The angle of the end itself, to be placed with `hold`: there the dead centre is met exactly. */
	held: number;
}

/** The stretch for one rack position, grown from a seed as it is asked for; a gap is never jumped. */
export interface Path {
	rack: number;
	/** The angle it was grown from, radians. */
	seed: number;
	low: PathEnd;
	high: PathEnd;
}

/** The last solved state, from which the next is foretold. */
export class Hint {
	rack = NaN;
	travel = NaN;
	theta = NaN;
	/** dθ/dtravel there, and how it changes with travel. */
	slope = NaN;
	bend = NaN;
}

/** The coefficients of one corner, always of a left one, and the workspace of its evaluation. Made by `prepare`. */
export class Prepared {
	// Lower ball: centre + cos·along + sin·across.
	lcx = NaN;
	lcy = NaN;
	lcz = NaN;
	lax = NaN;
	lay = NaN;
	laz = NaN;
	lbx = NaN;
	lby = NaN;
	lbz = NaN;
	// Upper ball: the same.
	ucx = NaN;
	ucy = NaN;
	ucz = NaN;
	uax = NaN;
	uay = NaN;
	uaz = NaN;
	ubx = NaN;
	uby = NaN;
	ubz = NaN;
	// a·cos ψ + b·sin ψ = c, each as constant + cos θ + sin θ.
	a0 = NaN;
	a1 = NaN;
	a2 = NaN;
	b0 = NaN;
	b1 = NaN;
	b2 = NaN;
	c0 = NaN;
	c1 = NaN;
	c2 = NaN;
	/** ±1: the side of each meet that was entered. */
	upperBranch = NaN;
	tieBranch = NaN;
	// The upright: steering axis length, outer tie-rod joint's foot on it and distance from it, wheel centre and spin in k, i, j.
	size = NaN;
	inverseLength = NaN;
	foot = NaN;
	steeringArm = NaN;
	w1 = NaN;
	w2 = NaN;
	w3 = NaN;
	s1 = NaN;
	s2 = NaN;
	s3 = NaN;
	radius = NaN;
	/** Wheel centre's z and contact point's y at ride height. */
	wheelHeight = NaN;
	halfTrack = NaN;
	// Rack end, and foot² + arm² − tie rod².
	rx = NaN;
	ry = NaN;
	rz = NaN;
	tieSquares = NaN;
	/** dz/dθ of the wheel centre at ride height, mm/rad, positive. */
	riseAtRide = NaN;
	// Coil-over: body end; lower end in the frame of what it stands on.
	topX = NaN;
	topY = NaN;
	topZ = NaN;
	q1 = NaN;
	q2 = NaN;
	q3 = NaN;
	qcx = NaN;
	qcy = NaN;
	qcz = NaN;
	qax = NaN;
	qay = NaN;
	qaz = NaN;
	qbx = NaN;
	qby = NaN;
	qbz = NaN;
	coilAtRide = NaN;
	springRate = NaN;
	forceAtRide = NaN;
	mass = NaN;
	tyreRate = NaN;
	/** What the coil-over's lower end stands on: 0 nothing (no coil-over), 1 lower arm, 2 upper arm, 3 upright. */
	coilOn = 0;
	inboardBrakes = false;
	/** 100 · front brake share · wheelbase / cg height. */
	diveFactor = NaN;

	readonly motion = new Motion();
	readonly hint = new Hint();
	path: Path = freshPath(NaN, 0, NaN, NaN);

	constructor(
		/** The side the figures and places are told for. */
		readonly side: Side,
		/** The corner as entered, turned to a left one. */
		readonly geometry: CornerGeometry,
		readonly lower: Circle,
		readonly upper: Circle,
		readonly upperFront: Vec3,
		readonly upperRear: Vec3
	) {}
}

export function freshPath(rack: number, theta: number, travel: number, margin: number): Path {
	return {
		rack,
		seed: theta,
		low: { theta, travel, margin, locks: null, held: theta },
		high: { theta, travel, margin, locks: null, held: theta }
	};
}
