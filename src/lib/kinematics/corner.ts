import type { Prepared } from './prepared';

/** 0 where the corner can be assembled, else the link that does not reach. */
export type Placed = 0 | 1 | 2;
export const REACHES = 0;
export const UPPER_SHORT = 1;
export const TIE_SHORT = 2;

/**
 * Puts every joint in its place for one lower-arm angle (radians from the entered position, bump +) and rack movement
 * (mm, + outboard of a left corner): the lower ball on its circle; the upper ball where its own circle meets the sphere
 * about the lower one; the outer tie-rod joint where three spheres meet, as a circle about the steering axis meeting a
 * sphere about the rack end. Closed form, exact; the branch is the entered one. One run of scalar lines, so that
 * nothing is allocated and nothing is read twice.
 * @param hold take a meet that just fails as touching: the place of the dead centre itself
 */
export function place(p: Prepared, theta: number, rack: number, hold: boolean): Placed {
	const m = p.motion;
	const cos = Math.cos(theta);
	const sin = Math.sin(theta);
	m.cos = cos;
	m.sin = sin;
	const lx = p.lcx + cos * p.lax + sin * p.lbx;
	const ly = p.lcy + cos * p.lay + sin * p.lby;
	const lz = p.lcz + cos * p.laz + sin * p.lbz;

	// Upper ball: a·cos ψ + b·sin ψ = c (intersect.ts).
	const a = p.a0 + cos * p.a1 + sin * p.a2;
	const b = p.b0 + cos * p.b1 + sin * p.b2;
	const c = p.c0 + cos * p.c1 + sin * p.c2;
	const square = a * a + b * b;
	let rest = square - c * c;
	m.upperMargin = rest / square;
	if (!(rest > 0)) {
		if (!hold) return UPPER_SHORT;
		rest = 0;
	}
	const upperRoot = p.upperBranch * Math.sqrt(rest);
	const upperCos = (a * c - b * upperRoot) / square;
	const upperSin = (b * c + a * upperRoot) / square;
	m.upperRoot = upperRoot;
	m.upperCos = upperCos;
	m.upperSin = upperSin;
	const ux = p.ucx + upperCos * p.uax + upperSin * p.ubx;
	const uy = p.ucy + upperCos * p.uay + upperSin * p.uby;
	const uz = p.ucz + upperCos * p.uaz + upperSin * p.ubz;
	const kx = (ux - lx) * p.inverseLength;
	const ky = (uy - ly) * p.inverseLength;
	const kz = (uz - lz) * p.inverseLength;

	// Outer tie-rod joint: v from the lower ball to the rack end, e its part square to the steering axis.
	const vx = p.rx - lx;
	const ry = p.ry + rack;
	const vy = ry - ly;
	const vz = p.rz - lz;
	const vk = vx * kx + vy * ky + vz * kz;
	const ex = vx - vk * kx;
	const ey = vy - vk * ky;
	const ez = vz - vk * kz;
	const far = ex * ex + ey * ey + ez * ez;
	const reach = (far + vk * (vk - 2 * p.foot) + p.tieSquares) / (2 * p.steeringArm);
	let left = far - reach * reach;
	m.tieMargin = left / far;
	if (!(left > 0)) {
		if (!hold) return TIE_SHORT;
		left = 0;
	}
	const tieRoot = p.tieBranch * Math.sqrt(left);
	m.tieRoot = tieRoot;
	const fx = ky * ez - kz * ey;
	const fy = kz * ex - kx * ez;
	const fz = kx * ey - ky * ex;
	const g = reach / far;
	const h = tieRoot / far;
	const ix = g * ex + h * fx;
	const iy = g * ey + h * fy;
	const iz = g * ez + h * fz;
	const jx = g * fx - h * ex;
	const jy = g * fy - h * ey;
	const jz = g * fz - h * ez;

	m.lx = lx;
	m.ly = ly;
	m.lz = lz;
	m.ux = ux;
	m.uy = uy;
	m.uz = uz;
	m.ry = ry;
	m.kx = kx;
	m.ky = ky;
	m.kz = kz;
	m.ix = ix;
	m.iy = iy;
	m.iz = iz;
	m.jx = jx;
	m.jy = jy;
	m.jz = jz;
	m.tx = lx + p.foot * kx + p.steeringArm * ix;
	m.ty = ly + p.foot * ky + p.steeringArm * iy;
	m.tz = lz + p.foot * kz + p.steeringArm * iz;
	m.wx = lx + p.w1 * kx + p.w2 * ix + p.w3 * jx;
	m.wy = ly + p.w1 * ky + p.w2 * iy + p.w3 * jy;
	m.wz = lz + p.w1 * kz + p.w2 * iz + p.w3 * jz;
	m.sx = p.s1 * kx + p.s2 * ix + p.s3 * jx;
	m.sy = p.s1 * ky + p.s2 * iy + p.s3 * jy;
	m.sz = p.s1 * kz + p.s2 * iz + p.s3 * jz;
	return REACHES;
}
