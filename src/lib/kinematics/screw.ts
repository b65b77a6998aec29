import type { Prepared } from './prepared';

/**
 * The upright's instant motion at fixed rack for one radian of the lower arm a second: the motion reciprocal to its five
 * links (no link is stretched; K. H. Hunt, Kinematic Geometry of Mechanisms, 1978, ch. 2: *recalled*). The lower ball
 * moves square to its arm; the upper ball's speed follows from the rigid line between them; what is left, a turning about
 * that line, follows from the tie rod. `place` must have been called.
 * @returns dz/dθ of the wheel centre, mm/rad
 */
export function rise(p: Prepared): number {
	const m = p.motion;
	const { cos, sin, upperCos, upperSin, kx, ky, kz } = m;
	const lvx = cos * p.lbx - sin * p.lax;
	const lvy = cos * p.lby - sin * p.lay;
	const lvz = cos * p.lbz - sin * p.laz;
	// (u − l)·(du − dl) = 0; the divisor (u − l)·(direction of the upper ball) is the root of its meet.
	const upperRate = (p.size * (kx * lvx + ky * lvy + kz * lvz)) / m.upperRoot;
	const uvx = upperRate * (upperCos * p.ubx - upperSin * p.uax);
	const uvy = upperRate * (upperCos * p.uby - upperSin * p.uay);
	const uvz = upperRate * (upperCos * p.ubz - upperSin * p.uaz);
	// Turning square to the steering axis: k × (du − dl) / length.
	const dx = (uvx - lvx) * p.inverseLength;
	const dy = (uvy - lvy) * p.inverseLength;
	const dz = (uvz - lvz) * p.inverseLength;
	const ox = ky * dz - kz * dy;
	const oy = kz * dx - kx * dz;
	const oz = kx * dy - ky * dx;
	// Turning about it, from n·(velocity of the outer joint) = 0 with n along the tie rod.
	const tx = m.tx - m.lx;
	const ty = m.ty - m.ly;
	const tz = m.tz - m.lz;
	const nx = m.tx - p.rx;
	const ny = m.ty - m.ry;
	const nz = m.tz - p.rz;
	const slip = nx * (lvx + oy * tz - oz * ty) + ny * (lvy + oz * tx - ox * tz) + nz * (lvz + ox * ty - oy * tx);
	const about = -slip / (p.steeringArm * m.tieRoot);
	const turnX = ox + about * kx;
	const turnY = oy + about * ky;
	const turnZ = oz + about * kz;
	const gx = m.wx - m.lx;
	const gy = m.wy - m.ly;
	const gz = m.wz - m.lz;
	m.upperRate = upperRate;
	m.lvx = lvx;
	m.lvy = lvy;
	m.lvz = lvz;
	m.uvx = uvx;
	m.uvy = uvy;
	m.uvz = uvz;
	m.turnX = turnX;
	m.turnY = turnY;
	m.turnZ = turnZ;
	m.wvx = lvx + turnY * gz - turnZ * gy;
	m.wvy = lvy + turnZ * gx - turnX * gz;
	m.wvz = lvz + turnX * gy - turnY * gx;
	return m.wvz;
}

/**
 * Second derivatives by the lower arm's angle, from the same three conditions differentiated once more. `rise` must have
 * been called. Writes the lower ball's, the upper arm's, the upright's and the wheel centre's.
 */
export function accelerate(p: Prepared): void {
	const m = p.motion;
	const { kx, ky, kz, turnX, turnY, turnZ } = m;
	const lax = -(m.cos * p.lax + m.sin * p.lbx);
	const lay = -(m.cos * p.lay + m.sin * p.lby);
	const laz = -(m.cos * p.laz + m.sin * p.lbz);
	const qx = m.ux - p.ucx;
	const qy = m.uy - p.ucy;
	const qz = m.uz - p.ucz;
	const dx = m.uvx - m.lvx;
	const dy = m.uvy - m.lvy;
	const dz = m.uvz - m.lvz;
	// (u − l)·(u'' − l'') + |u' − l'|² = 0, u'' = ψ''·(direction) − ψ'²·(arm).
	const square = m.upperRate * m.upperRate;
	const along = p.size * (kx * (lax + square * qx) + ky * (lay + square * qy) + kz * (laz + square * qz));
	const upper = (along - (dx * dx + dy * dy + dz * dz)) / m.upperRoot;
	const uax = upper * (m.upperCos * p.ubx - m.upperSin * p.uax) - square * qx;
	const uay = upper * (m.upperCos * p.uby - m.upperSin * p.uay) - square * qy;
	const uaz = upper * (m.upperCos * p.ubz - m.upperSin * p.uaz) - square * qz;
	// ω' × (u − l) = u'' − l'' − ω × (u' − l').
	const ex = (uax - lax - (turnY * dz - turnZ * dy)) * p.inverseLength;
	const ey = (uay - lay - (turnZ * dx - turnX * dz)) * p.inverseLength;
	const ez = (uaz - laz - (turnX * dy - turnY * dx)) * p.inverseLength;
	const ox = ky * ez - kz * ey;
	const oy = kz * ex - kx * ez;
	const oz = kx * ey - ky * ex;
	// n·(acceleration of the outer joint) + |its velocity|² = 0.
	const tx = m.tx - m.lx;
	const ty = m.ty - m.ly;
	const tz = m.tz - m.lz;
	const cx = turnY * tz - turnZ * ty;
	const cy = turnZ * tx - turnX * tz;
	const cz = turnX * ty - turnY * tx;
	const vx = m.lvx + cx;
	const vy = m.lvy + cy;
	const vz = m.lvz + cz;
	const slip =
		(m.tx - p.rx) * (lax + oy * tz - oz * ty + turnY * cz - turnZ * cy) +
		(m.ty - m.ry) * (lay + oz * tx - ox * tz + turnZ * cx - turnX * cz) +
		(m.tz - p.rz) * (laz + ox * ty - oy * tx + turnX * cy - turnY * cx);
	const about = -(slip + vx * vx + vy * vy + vz * vz) / (p.steeringArm * m.tieRoot);
	m.spinUpX = ox + about * kx;
	m.spinUpY = oy + about * ky;
	m.spinUpZ = oz + about * kz;
	m.upperAcceleration = upper;
	m.lax = lax;
	m.lay = lay;
	m.laz = laz;
	// z of l'' + ω' × g + ω × (ω × g), g from the lower ball to the wheel centre.
	const gx = m.wx - m.lx;
	const gy = m.wy - m.ly;
	m.wheelAcceleration = laz + m.spinUpX * gy - m.spinUpY * gx + turnX * (m.wvy - m.lvy) - turnY * (m.wvx - m.lvx);
}
