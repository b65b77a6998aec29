import * as at from './layout';
import type { Prepared } from './prepared';

const DEGREES = 180 / Math.PI;
/** Under this the steering axis lies level: it meets no ground. */
const LEAST_RISE = 1e-9;

/**
 * Camber, toe, steering axis and what it has at the ground and at the hub, with their rates; ISO 8855:2011 section 7 for
 * the terms, signs by README.md. Exact for a thin disc. `rise` must have been called. Writes into `out` from `o`.
 * @param per 1 / (dz/dθ), radians of the lower arm per mm of travel
 */
export function writeAttitude(p: Prepared, per: number, out: Float64Array, o: number): void {
	const m = p.motion;
	const { sx, sy, sz, kx, ky, kz, turnX, turnY, turnZ } = m;
	const levelSquare = sx * sx + sy * sy;
	const level = Math.sqrt(levelSquare);
	const r = p.radius;
	// Lowest point of the disc: down the wheel plane from the centre.
	const cx = m.wx + (r * sz * sx) / level;
	const cy = m.wy + (r * sz * sy) / level;
	const cz = m.wz - r * level;
	out[o + at.CONTACT] = cx;
	out[o + at.CONTACT + 1] = cy;
	out[o + at.CONTACT + 2] = cz;

	const camber = -Math.atan2(sz, level) * DEGREES;
	const kpi = Math.atan2(-ky, kz) * DEGREES;
	out[o + at.CAMBER] = camber;
	out[o + at.TOE] = Math.atan2(sx, sy) * DEGREES;
	out[o + at.CASTER] = Math.atan2(-kx, kz) * DEGREES;
	out[o + at.KPI] = kpi;
	out[o + at.INCLUDED_ANGLE] = kpi + camber;

	// Square to the wheel plane (outboard) and along it (ahead), both level.
	const ox = sx / level;
	const oy = sy / level;
	const steep = Math.abs(kz) > LEAST_RISE;
	const toGround = steep ? (cz - m.lz) / kz : NaN;
	const gx = m.lx + toGround * kx;
	const gy = m.ly + toGround * ky;
	out[o + at.AXIS_GROUND] = gx;
	out[o + at.AXIS_GROUND + 1] = gy;
	out[o + at.AXIS_GROUND + 2] = steep ? cz : NaN;
	out[o + at.SCRUB_RADIUS] = (cx - gx) * ox + (cy - gy) * oy;
	out[o + at.MECHANICAL_TRAIL] = (gx - cx) * oy - (gy - cy) * ox;
	const toHub = steep ? (m.wz - m.lz) / kz : NaN;
	const hx = m.lx + toHub * kx - m.wx;
	const hy = m.ly + toHub * ky - m.wy;
	out[o + at.KINGPIN_OFFSET_AT_HUB] = -hx * ox - hy * oy;
	out[o + at.TRAIL_AT_HUB] = hx * oy - hy * ox;

	// Rates: s' = ω × s, k' = ω × k, per mm of travel.
	const svx = (turnY * sz - turnZ * sy) * per;
	const svy = (turnZ * sx - turnX * sz) * per;
	const svz = (turnX * sy - turnY * sx) * per;
	out[o + at.CAMBER_RATE] = (-svz / level) * DEGREES;
	out[o + at.TOE_RATE] = ((svx * sy - svy * sx) / levelSquare) * DEGREES;
	const kvx = (turnY * kz - turnZ * ky) * per;
	const kvz = (turnX * ky - turnY * kx) * per;
	out[o + at.CASTER_RATE] = ((kx * kvz - kvx * kz) / (kx * kx + kz * kz)) * DEGREES;
	// The lowest point moves with the centre and as the wheel plane tilts: d(sz·sy/level).
	const tilt = (svz * sy + sz * svy) / level + (sz * sy * sz * svz) / (levelSquare * level);
	out[o + at.HALF_TRACK] = cy - p.halfTrack;
	out[o + at.HALF_TRACK_RATE] = m.wvy * per + r * tilt;
}
