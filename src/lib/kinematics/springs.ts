import { vec3 } from 'gl-matrix';
import type { Vec3 } from './geometry';
import type { Circle } from './intersect';
import * as at from './layout';
import type { Prepared } from './prepared';
import { accelerate } from './screw';

const NO_COILOVER = 0;
const ON_LOWER_ARM = 1;
const ON_UPPER_ARM = 2;
const ON_UPRIGHT = 3;

/** A place carried by an arm as `centre + cos·along + sin·across`, where it is in the arm's own frame. */
function carryOnArm(p: Prepared, entered: Circle, now: Circle, place: Vec3): void {
	const v = vec3.subtract([0, 0, 0], place, entered.centre);
	const axial = vec3.dot(v, entered.axis);
	const along = vec3.scale([0, 0, 0], now.along, vec3.dot(v, entered.along) / (entered.radius * now.radius));
	vec3.scaleAndAdd(along, along, now.across, vec3.dot(v, entered.across) / (entered.radius * now.radius));
	const centre = vec3.scaleAndAdd([0, 0, 0], now.centre, now.axis, axial);
	const across = vec3.cross([0, 0, 0], now.axis, along);
	[p.qcx, p.qcy, p.qcz] = [centre[0], centre[1], centre[2]];
	[p.qax, p.qay, p.qaz] = [along[0], along[1], along[2]];
	[p.qbx, p.qby, p.qbz] = [across[0], across[1], across[2]];
}

/** Coefficients of the coil-over; `entered` is the upper arm's circle as entered (the upright's place is set with the upright). */
export function setSpring(p: Prepared, entered: Circle): void {
	const { coilover } = p.geometry;
	if (!coilover) return;
	[p.topX, p.topY, p.topZ] = coilover.top;
	p.coilAtRide = vec3.distance(coilover.top, coilover.bottom);
	p.springRate = coilover.rate ?? NaN;
	p.forceAtRide = coilover.forceAtRide ?? NaN;
	if (coilover.on === 'upright') p.coilOn = ON_UPRIGHT;
	if (coilover.on === 'upperArm') {
		p.coilOn = ON_UPPER_ARM;
		carryOnArm(p, entered, p.upper, coilover.bottom);
	}
	if (coilover.on === 'lowerArm') {
		p.coilOn = ON_LOWER_ARM;
		carryOnArm(p, p.lower, p.lower, coilover.bottom);
	}
}

/**
 * Coil-over length, motion ratio, wheel rate and ride frequency. Wheel rate at the wheel centre is the second derivative
 * of the spring's stored energy over wheel travel: rate · MR² + F · dMR/dtravel, MR = −d(length)/d(travel). `rise` must
 * have been called. Neglects friction, bushings and the spring leaving its seat.
 */
export function writeSpring(p: Prepared, per: number, out: Float64Array, o: number): void {
	const m = p.motion;
	if (p.coilOn === NO_COILOVER) {
		out.fill(NaN, o + at.COIL_BOTTOM, o + at.COIL_BOTTOM + 3);
		out.fill(NaN, o + at.MOTION_RATIO, o + at.RIDE_FREQUENCY_ON_TYRE + 1);
		return;
	}
	accelerate(p);
	// Lower end, its velocity and acceleration per radian of the lower arm.
	let x, y, z, vx, vy, vz, ax, ay, az: number;
	if (p.coilOn === ON_UPRIGHT) {
		const gx = p.q1 * m.kx + p.q2 * m.ix + p.q3 * m.jx;
		const gy = p.q1 * m.ky + p.q2 * m.iy + p.q3 * m.jy;
		const gz = p.q1 * m.kz + p.q2 * m.iz + p.q3 * m.jz;
		const cx = m.turnY * gz - m.turnZ * gy;
		const cy = m.turnZ * gx - m.turnX * gz;
		const cz = m.turnX * gy - m.turnY * gx;
		x = m.lx + gx;
		y = m.ly + gy;
		z = m.lz + gz;
		vx = m.lvx + cx;
		vy = m.lvy + cy;
		vz = m.lvz + cz;
		ax = m.lax + m.spinUpY * gz - m.spinUpZ * gy + m.turnY * cz - m.turnZ * cy;
		ay = m.lay + m.spinUpZ * gx - m.spinUpX * gz + m.turnZ * cx - m.turnX * cz;
		az = m.laz + m.spinUpX * gy - m.spinUpY * gx + m.turnX * cy - m.turnY * cx;
	} else {
		const lower = p.coilOn === ON_LOWER_ARM;
		const cos = lower ? m.cos : m.upperCos;
		const sin = lower ? m.sin : m.upperSin;
		const rate = lower ? 1 : m.upperRate;
		const acceleration = lower ? 0 : m.upperAcceleration;
		const outX = cos * p.qax + sin * p.qbx;
		const outY = cos * p.qay + sin * p.qby;
		const outZ = cos * p.qaz + sin * p.qbz;
		const upX = cos * p.qbx - sin * p.qax;
		const upY = cos * p.qby - sin * p.qay;
		const upZ = cos * p.qbz - sin * p.qaz;
		x = p.qcx + outX;
		y = p.qcy + outY;
		z = p.qcz + outZ;
		vx = rate * upX;
		vy = rate * upY;
		vz = rate * upZ;
		ax = acceleration * upX - rate * rate * outX;
		ay = acceleration * upY - rate * rate * outY;
		az = acceleration * upZ - rate * rate * outZ;
	}
	out[o + at.COIL_BOTTOM] = x;
	out[o + at.COIL_BOTTOM + 1] = y;
	out[o + at.COIL_BOTTOM + 2] = z;
	const dx = x - p.topX;
	const dy = y - p.topY;
	const dz = z - p.topZ;
	const length = Math.sqrt(dx * dx + dy * dy + dz * dz);
	const shorter = (dx * vx + dy * vy + dz * vz) / length;
	const second = (vx * vx + vy * vy + vz * vz + dx * ax + dy * ay + dz * az - shorter * shorter) / length;
	const ratio = -shorter * per;
	const ratioRate = -(second - shorter * m.wheelAcceleration * per) * per * per;
	out[o + at.COILOVER_LENGTH] = length;
	out[o + at.MOTION_RATIO] = ratio;
	out[o + at.MOTION_RATIO_RATE] = ratioRate;
	const force = p.forceAtRide + p.springRate * (p.coilAtRide - length);
	const fromForce = force * ratioRate;
	const wheelRate = p.springRate * ratio * ratio + fromForce;
	out[o + at.SPRING_FORCE] = force;
	out[o + at.WHEEL_RATE_FROM_FORCE] = fromForce;
	out[o + at.WHEEL_RATE] = wheelRate;
	// f = (1/2π)·√(K/m), K in N/m. A wheel rate under zero has no frequency: the root is NaN.
	out[o + at.RIDE_FREQUENCY] = Math.sqrt((1000 * wheelRate) / p.mass) / (2 * Math.PI);
	const inSeries = (wheelRate * p.tyreRate) / (wheelRate + p.tyreRate);
	out[o + at.RIDE_FREQUENCY_ON_TYRE] = Math.sqrt((1000 * inSeries) / p.mass) / (2 * Math.PI);
}
