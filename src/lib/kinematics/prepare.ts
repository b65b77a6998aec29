import { vec3 } from 'gl-matrix';
import { place } from './corner';
import { KinematicsError } from './errors';
import { mirror, POINT_NAMES, sideOf, type CornerGeometry, type PointName, type Side, type Vec3 } from './geometry';
import { circleOfSpheres, type Circle } from './intersect';
import { Prepared } from './prepared';
import { rise } from './screw';
import { setSpring } from './springs';
import { checkGeometry } from './validate';

/** A corner's upper pivots, and by how much its upper legs and its tie rod have grown, mm: what alignment changes. */
export interface Setting {
	readonly upperFront: Vec3;
	readonly upperRear: Vec3;
	readonly frontLeg: number;
	readonly rearLeg: number;
	readonly tieRod: number;
}

/** sin² of the angle to a dead centre under which a corner is refused as entered. */
const DEAD_CENTRE = 1e-10;
/** Least rise of the wheel centre per mm of the lower ball joint's path as entered. */
const LEAST_RISE = 1e-4;

function between(a: Vec3, b: Vec3): vec3 {
	return vec3.subtract([0, 0, 0], b, a);
}

/** The entered corner turned to a left one. */
function asLeft(geometry: CornerGeometry): CornerGeometry {
	if (sideOf(geometry) === 'left') return geometry;
	const points = {} as Record<PointName, Vec3>;
	for (const name of POINT_NAMES) points[name] = mirror(geometry.points[name]);
	const { coilover } = geometry;
	if (!coilover) return { ...geometry, points };
	return { ...geometry, points, coilover: { ...coilover, top: mirror(coilover.top), bottom: mirror(coilover.bottom) } };
}

/** The adjustment in which a corner was entered. */
export function asEntered(points: CornerGeometry['points']): Setting {
	return { upperFront: points.upperFront, upperRear: points.upperRear, frontLeg: 0, rearLeg: 0, tieRod: 0 };
}

function lowerCircle(points: CornerGeometry['points']): Circle | null {
	const { lowerFront, lowerRear, lowerBall } = points;
	return circleOfSpheres(
		lowerRear,
		vec3.distance(lowerRear, lowerBall),
		lowerFront,
		vec3.distance(lowerFront, lowerBall),
		lowerBall
	);
}

/** The upper ball joint's circle: both legs keep their length as the pivots move, unless they are what is adjusted. */
function upperCircle(points: CornerGeometry['points'], setting: Setting): Circle | null {
	const { upperFront, upperRear, upperBall } = points;
	const rearLeg = vec3.distance(upperRear, upperBall) + setting.rearLeg;
	const frontLeg = vec3.distance(upperFront, upperBall) + setting.frontLeg;
	if (!(rearLeg > 0) || !(frontLeg > 0)) return null;
	return circleOfSpheres(setting.upperRear, rearLeg, setting.upperFront, frontLeg, upperBall);
}

/** The wheel at ride height: its centre, up the wheel plane from the contact point, and its outboard spin axis. */
function wheelAtRide(wheel: CornerGeometry['wheel']): { centre: Vec3; spin: Vec3 } {
	const camber = (wheel.camber * Math.PI) / 180;
	const toe = (wheel.toe * Math.PI) / 180;
	const level = Math.cos(camber);
	const tilt = -Math.sin(camber);
	const spin: Vec3 = [level * Math.sin(toe), level * Math.cos(toe), tilt];
	const r = wheel.loadedRadius;
	// Up the wheel plane: the vertical less its part along the spin axis, made a unit vector.
	const centre: Vec3 = [wheel.x - r * tilt * Math.sin(toe), wheel.track / 2 - r * tilt * Math.cos(toe), r * level];
	return { centre, spin };
}

function setLower(p: Prepared): void {
	[p.lcx, p.lcy, p.lcz] = p.lower.centre;
	[p.lax, p.lay, p.laz] = p.lower.along;
	[p.lbx, p.lby, p.lbz] = p.lower.across;
}

/** The upper circle, and a, b and c of `intersect.ts`, each linear in the cosine and sine of the lower arm's angle. */
function setUpper(p: Prepared): void {
	const { lower, upper } = p;
	[p.ucx, p.ucy, p.ucz] = upper.centre;
	[p.uax, p.uay, p.uaz] = upper.along;
	[p.ubx, p.uby, p.ubz] = upper.across;
	const offset = between(upper.centre, lower.centre);
	p.a0 = vec3.dot(offset, upper.along);
	p.a1 = vec3.dot(lower.along, upper.along);
	p.a2 = vec3.dot(lower.across, upper.along);
	p.b0 = vec3.dot(offset, upper.across);
	p.b1 = vec3.dot(lower.along, upper.across);
	p.b2 = vec3.dot(lower.across, upper.across);
	p.c0 = (upper.radius ** 2 + vec3.squaredLength(offset) + lower.radius ** 2 - p.size ** 2) / 2;
	p.c1 = vec3.dot(offset, lower.along);
	p.c2 = vec3.dot(offset, lower.across);
}

/** The upright in its own frame: k up the steering axis, i towards the outer tie-rod joint, j = k × i. */
function setUpright(p: Prepared): void {
	const { points, wheel, coilover } = p.geometry;
	const { centre, spin } = wheelAtRide(wheel);
	const axis = between(points.lowerBall, points.upperBall);
	p.size = vec3.length(axis);
	p.inverseLength = 1 / p.size;
	const k = vec3.scale([0, 0, 0], axis, p.inverseLength);
	const arm = between(points.lowerBall, points.tieRodOuter);
	p.foot = vec3.dot(arm, k);
	const i = vec3.scaleAndAdd([0, 0, 0], arm, k, -p.foot);
	p.steeringArm = vec3.length(i);
	vec3.scale(i, i, 1 / p.steeringArm);
	const j = vec3.cross([0, 0, 0], k, i);
	const inFrame = (v: vec3 | Vec3): Vec3 => [vec3.dot(v, k), vec3.dot(v, i), vec3.dot(v, j)];
	[p.w1, p.w2, p.w3] = inFrame(between(points.lowerBall, centre));
	[p.s1, p.s2, p.s3] = inFrame(spin);
	if (coilover?.on === 'upright') [p.q1, p.q2, p.q3] = inFrame(between(points.lowerBall, coilover.bottom));
	p.radius = wheel.loadedRadius;
	p.wheelHeight = centre[2];
	p.halfTrack = wheel.track / 2;
}

function setTieRod(p: Prepared, grown: number): void {
	const { tieRodInner, tieRodOuter } = p.geometry.points;
	const length = vec3.distance(tieRodInner, tieRodOuter) + grown;
	[p.rx, p.ry, p.rz] = tieRodInner;
	p.tieSquares = p.foot ** 2 + p.steeringArm ** 2 - length ** 2;
}

/** Which of the two assemblies of each meet was entered, by the sign of its triple product; it is kept for ever. */
function setBranches(p: Prepared): void {
	const { lowerBall, upperBall, tieRodInner, tieRodOuter } = p.geometry.points;
	const upright = between(lowerBall, upperBall);
	const swing = vec3.dot(upright, p.upper.across);
	const arm = between(lowerBall, tieRodOuter);
	const steer = vec3.dot(arm, vec3.cross([0, 0, 0], upright, between(lowerBall, tieRodInner)));
	p.upperBranch = swing < 0 ? -1 : 1;
	p.tieBranch = steer < 0 ? -1 : 1;
}

function setVehicle(p: Prepared): void {
	const vehicle = p.geometry.vehicle ?? {};
	p.mass = vehicle.sprungCornerMass ?? NaN;
	p.tyreRate = vehicle.tyreRate ?? NaN;
	p.inboardBrakes = vehicle.frontBrakes === 'inboard';
	const { frontBrakeShare, wheelbase, cgHeight } = vehicle;
	p.diveFactor = (100 * (frontBrakeShare ?? NaN) * (wheelbase ?? NaN)) / (cgHeight ?? NaN);
}

function build(
	left: CornerGeometry,
	side: Side,
	lower: Circle,
	entered: Circle,
	upper: Circle,
	setting: Setting
): Prepared {
	const p = new Prepared(side, left, lower, upper, setting.upperFront, setting.upperRear);
	setUpright(p);
	setLower(p);
	setUpper(p);
	setTieRod(p, setting.tieRod);
	setSpring(p, entered);
	setVehicle(p);
	return p;
}

function deadCentre(link: 'lowerArm' | 'upperArm' | 'tieRod', message: string): KinematicsError {
	return new KinematicsError('degenerate', link, message, { locks: link });
}

/** Refuses a corner that cannot move from where it was entered. @returns dz/dθ of the wheel centre, mm/rad */
function checkAssembly(p: Prepared): number {
	place(p, 0, 0, true);
	if (p.motion.upperMargin < DEAD_CENTRE) {
		throw deadCentre(
			'upperArm',
			'The upper arm stands at a dead centre: the line through the two ball joints lies in its plane, so it cannot hold the upright. Move the upper ball joint or an upper pivot.'
		);
	}
	if (p.motion.tieMargin < DEAD_CENTRE) {
		throw deadCentre(
			'tieRod',
			'The tie rod stands at a dead centre: it points at the steering axis, so it cannot hold the steering. Move its outer or inner joint.'
		);
	}
	const lift = rise(p);
	if (!(Math.abs(lift) > LEAST_RISE * p.lower.radius)) {
		throw deadCentre(
			'lowerArm',
			'The lower arm does not lift the wheel as entered: its pivots must lie fore and aft of each other and its ball joint outboard of them.'
		);
	}
	return lift;
}

/** The checked corner, turned to a left one, and the side it is told for. */
export function normalise(geometry: CornerGeometry, side?: Side): { left: CornerGeometry; side: Side } {
	checkGeometry(geometry);
	return { left: asLeft(geometry), side: side ?? sideOf(geometry) };
}

function reversed(circle: Circle): Circle {
	const negative = (v: Vec3): Vec3 => [-v[0], -v[1], -v[2]];
	return { ...circle, axis: negative(circle.axis), across: negative(circle.across) };
}

/** Coefficients of a checked left corner as entered. @throws KinematicsError `degenerate` where it cannot move */
export function prepareLeft(left: CornerGeometry, side: Side): Prepared {
	const setting = asEntered(left.points);
	const lower = lowerCircle(left.points);
	const upper = upperCircle(left.points, setting);
	if (!lower)
		throw new KinematicsError(
			'degenerate',
			'lowerBall',
			'The lower arm has no length: move its ball joint off its pivots.'
		);
	if (!upper)
		throw new KinematicsError(
			'degenerate',
			'upperBall',
			'The upper arm has no length: move its ball joint off its pivots.'
		);
	const p = build(left, side, lower, upper, upper, setting);
	setBranches(p);
	const lift = checkAssembly(p);
	if (lift > 0) {
		p.riseAtRide = lift;
		return p;
	}
	// Turn the lower arm's angle about, so that bump is positive.
	const turned = build(left, side, reversed(lower), upper, upper, setting);
	setBranches(turned);
	turned.riseAtRide = -lift;
	return turned;
}

/** The same corner in another adjustment; upright, branches and the ride height it is measured from stay as entered. */
export function adjust(entered: Prepared, setting: Setting): Prepared {
	const upper = upperCircle(entered.geometry.points, setting);
	if (!upper) {
		throw new KinematicsError(
			'out-of-reach',
			'upperArm',
			'With these adjustments the legs of the upper arm no longer meet at its ball joint: ask for less.',
			{ locks: 'upperArm' }
		);
	}
	const p = build(entered.geometry, entered.side, entered.lower, entered.upper, upper, setting);
	p.upperBranch = entered.upperBranch;
	p.tieBranch = entered.tieBranch;
	p.riseAtRide = entered.riseAtRide;
	return p;
}

/**
 * Turns a corner into coefficients, once, for `evaluateInto`. A right corner may be given with y negative (true vehicle
 * coordinates) or, with `side` said, with +y outboard.
 * @throws KinematicsError `not-finite` or `degenerate`, naming the point or field
 */
export function prepare(geometry: CornerGeometry, side?: Side): Prepared {
	const normal = normalise(geometry, side);
	return prepareLeft(normal.left, normal.side);
}
