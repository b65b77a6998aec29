import { vec3 } from 'gl-matrix';
import { KinematicsError, inWords } from './errors';
import { POINT_NAMES, POINT_WORDS, type CornerGeometry, type PointName, type Vec3 } from './geometry';

/** Farther from the origin than this a coordinate is taken for a slip, mm. */
const LARGEST = 100_000;
/** Two joints nearer than this are in one place, mm: far under what a shop can measure. */
const NEAREST = 0.01;
/** A ball joint nearer to its arm's axis than this part of the pivots' distance gives no arm to swing. */
const LEAST_ARM = 1e-5;
const AXES = ['x', 'y', 'z'] as const;

function degenerate(at: string, message: string): KinematicsError {
	return new KinematicsError('degenerate', at, message);
}

function checkNumber(value: unknown, at: string, words: string, unit: string): asserts value is number {
	if (typeof value !== 'number' || !Number.isFinite(value)) {
		throw new KinematicsError('not-finite', at, `${words} is not a number: give it in ${unit}.`);
	}
}

function checkPoint(point: unknown, at: string, words: string): asserts point is Vec3 {
	if (!Array.isArray(point) || point.length < 3) {
		throw new KinematicsError('not-finite', at, `The ${words} is missing: give its x, y and z in mm.`);
	}
	AXES.forEach((axis, i) => {
		const value: unknown = point[i];
		checkNumber(value, at, `${axis} of the ${words}`, 'mm');
		if (Math.abs(value) > LARGEST) {
			throw degenerate(at, `${axis} of the ${words} is ${inWords(value)} mm: it must lie within ±${LARGEST} mm.`);
		}
	});
}

function checkApart(points: CornerGeometry['points']): void {
	POINT_NAMES.forEach((first, i) => {
		for (const second of POINT_NAMES.slice(i + 1)) {
			if (vec3.distance(points[first], points[second]) < NEAREST) {
				throw degenerate(
					second,
					`The ${POINT_WORDS[second]} and the ${POINT_WORDS[first]} are in one place: they must be at least ${NEAREST} mm apart.`
				);
			}
		}
	});
}

/** Distance of a place from the line through two others. */
function distanceFromLine(place: Vec3, from: Vec3, to: Vec3): number {
	const line = vec3.subtract([0, 0, 0], to, from);
	const offset = vec3.subtract([0, 0, 0], place, from);
	return vec3.length(vec3.cross([0, 0, 0], line, offset)) / vec3.length(line);
}

function checkArm(points: CornerGeometry['points'], front: PointName, rear: PointName, ball: PointName): void {
	const base = vec3.distance(points[front], points[rear]);
	const arm = distanceFromLine(points[ball], points[front], points[rear]);
	if (arm < Math.max(NEAREST, LEAST_ARM * base)) {
		throw degenerate(
			ball,
			`The ${POINT_WORDS[ball]} lies on the line through its arm's two pivots: it must stand off that line for the arm to swing it.`
		);
	}
}

function checkUpright(points: CornerGeometry['points']): void {
	const { upperBall, lowerBall, tieRodOuter } = points;
	if (!(upperBall[2] > lowerBall[2])) {
		throw degenerate('upperBall', 'The upper ball joint must be above the lower ball joint: check z of both.');
	}
	if (distanceFromLine(tieRodOuter, lowerBall, upperBall) < NEAREST) {
		throw degenerate(
			'tieRodOuter',
			'The outer tie-rod joint lies on the steering axis: it must stand off the line through the two ball joints for the tie rod to steer.'
		);
	}
	if (steeringArm(points) < NEAREST) {
		throw degenerate(
			'tieRodInner',
			'The tie rod points at the steering axis: move the inner or the outer tie-rod joint out of the plane through the two ball joints and the other end for the rod to steer.'
		);
	}
}

/** Shortest distance between the steering axis and the tie rod's line, times the sine between them: the rod's arm about the axis, mm. */
function steeringArm({ upperBall, lowerBall, tieRodInner, tieRodOuter }: CornerGeometry['points']): number {
	const axis = vec3.normalize([0, 0, 0], vec3.subtract([0, 0, 0], upperBall, lowerBall));
	const rod = vec3.normalize([0, 0, 0], vec3.subtract([0, 0, 0], tieRodInner, tieRodOuter));
	const arm = vec3.subtract([0, 0, 0], tieRodOuter, lowerBall);
	return Math.abs(vec3.dot(vec3.cross([0, 0, 0], arm, rod), axis));
}

function checkWheel(wheel: unknown): void {
	if (typeof wheel !== 'object' || wheel === null) {
		throw new KinematicsError(
			'not-finite',
			'wheel',
			'The wheel is missing: give track, x, loaded radius, camber and toe.'
		);
	}
	const { track, x, loadedRadius, camber, toe } = wheel as Record<string, unknown>;
	checkNumber(track, 'wheel.track', 'The track', 'mm');
	checkNumber(x, 'wheel.x', "The contact point's x", 'mm');
	checkNumber(loadedRadius, 'wheel.loadedRadius', 'The loaded radius', 'mm');
	checkNumber(camber, 'wheel.camber', 'Static camber', 'degrees');
	checkNumber(toe, 'wheel.toe', 'Static toe', 'degrees');
	for (const [at, words, value] of [
		['wheel.track', 'track', track],
		['wheel.loadedRadius', 'loaded radius', loadedRadius]
	] as const) {
		if (!(value > 0 && value <= LARGEST)) {
			throw degenerate(at, `The ${words} is ${inWords(value)} mm: it must lie between 0 and ${LARGEST} mm.`);
		}
	}
	if (Math.abs(x) > LARGEST) throw degenerate('wheel.x', `The contact point's x must lie within ±${LARGEST} mm.`);
	for (const [at, words, value] of [
		['wheel.camber', 'camber', camber],
		['wheel.toe', 'toe', toe]
	] as const) {
		if (Math.abs(value) > 45) throw degenerate(at, `Static ${words} is ${inWords(value)}°: it must lie within ±45°.`);
	}
}

function checkOptional(value: unknown, at: string, words: string, unit: string, low: number, high: number): void {
	if (value === undefined || value === null) return;
	checkNumber(value, at, words, unit);
	if (value < low || value > high) {
		throw degenerate(at, `${words} is ${inWords(value)}: it must lie between ${low} and ${high} ${unit}.`);
	}
}

function checkCoilover(coilover: NonNullable<CornerGeometry['coilover']>): void {
	checkPoint(coilover.top, 'coilover.top', 'upper end of the coil-over');
	checkPoint(coilover.bottom, 'coilover.bottom', 'lower end of the coil-over');
	if (vec3.distance(coilover.top, coilover.bottom) < NEAREST) {
		throw degenerate('coilover.bottom', 'The two ends of the coil-over are in one place: give each its own.');
	}
	if (!['lowerArm', 'upperArm', 'upright'].includes(coilover.on)) {
		throw degenerate('coilover.on', 'The coil-over must stand on lowerArm, upperArm or upright.');
	}
	checkOptional(coilover.rate, 'coilover.rate', 'The spring rate', 'N/mm', 0, 1e6);
	checkOptional(coilover.forceAtRide, 'coilover.forceAtRide', 'The spring force at ride height', 'N', -1e9, 1e9);
	checkOptional(coilover.openLength, 'coilover.openLength', 'The open length', 'mm', 0, LARGEST);
	checkOptional(coilover.closedLength, 'coilover.closedLength', 'The closed length', 'mm', 0, LARGEST);
}

function checkVehicle(vehicle: NonNullable<CornerGeometry['vehicle']>): void {
	checkOptional(vehicle.wheelbase, 'vehicle.wheelbase', 'The wheelbase', 'mm', NEAREST, LARGEST);
	checkOptional(vehicle.cgHeight, 'vehicle.cgHeight', "The centre of gravity's height", 'mm', NEAREST, LARGEST);
	checkOptional(vehicle.frontBrakeShare, 'vehicle.frontBrakeShare', 'The front brake share', '(a share of 1)', 0, 1);
	checkOptional(vehicle.sprungCornerMass, 'vehicle.sprungCornerMass', 'The sprung corner mass', 'kg', 1e-3, 1e6);
	checkOptional(vehicle.tyreRate, 'vehicle.tyreRate', 'The tyre rate', 'N/mm', 1e-3, 1e6);
	const brakes: unknown = vehicle.frontBrakes ?? 'upright';
	if (brakes !== 'upright' && brakes !== 'inboard') {
		throw degenerate('vehicle.frontBrakes', 'The front brakes must be upright or inboard.');
	}
}

/**
 * Refuses a corner that cannot be computed, naming the point or field and what would do.
 * @throws KinematicsError `not-finite` or `degenerate`
 */
export function checkGeometry(geometry: CornerGeometry): void {
	if (typeof geometry !== 'object' || geometry === null) {
		throw new KinematicsError('not-finite', 'geometry', 'The corner is missing: give its points and its wheel.');
	}
	const { points, wheel, coilover, vehicle } = geometry;
	if (typeof points !== 'object' || points === null) {
		throw new KinematicsError(
			'not-finite',
			'points',
			'The points are missing: give all eight, each as x, y and z in mm.'
		);
	}
	for (const name of POINT_NAMES) checkPoint(points[name], name, POINT_WORDS[name]);
	checkApart(points);
	checkArm(points, 'upperFront', 'upperRear', 'upperBall');
	checkArm(points, 'lowerFront', 'lowerRear', 'lowerBall');
	checkUpright(points);
	if (Math.abs(points.lowerBall[1]) < NEAREST) {
		throw degenerate(
			'lowerBall',
			'The lower ball joint is on the centreline: y must be positive (left) or negative (right).'
		);
	}
	checkWheel(wheel);
	if (coilover) checkCoilover(coilover);
	if (vehicle) checkVehicle(vehicle);
}
