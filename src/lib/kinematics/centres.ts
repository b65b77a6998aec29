import * as at from './layout';
import type { Prepared } from './prepared';

/** A centre farther off than this many distances between the ball joints is taken for parallel lines. */
const FARTHEST = 1e7;

/**
 * Instant centre and roll centre, both ways, swing arm and anti-dive. `writeAttitude` must have been called.
 * From velocity: in the plane x = contact point the upright turns about the place where both y and z stand still.
 * By arms: the arm planes are square to the ball joints' velocities; cut by that plane, their lines meet.
 */
export function writeCentres(p: Prepared, per: number, out: Float64Array, o: number): void {
	const m = p.motion;
	const cx = out[o + at.CONTACT] as number;
	const cy = out[o + at.CONTACT + 1] as number;
	const cz = out[o + at.CONTACT + 2] as number;
	const turnX = m.turnX * per;
	const turnY = m.turnY * per;
	const turnZ = m.turnZ * per;
	const gx = cx - m.lx;
	const gy = cy - m.ly;
	const gz = cz - m.lz;
	// Velocity of the upright's material point at the contact point.
	const vx = m.lvx * per + turnY * gz - turnZ * gy;
	const vy = m.lvy * per + turnZ * gx - turnX * gz;
	const vz = m.lvz * per + turnX * gy - turnY * gx;
	out[o + at.TURN] = turnX;
	out[o + at.TURN + 1] = turnY;
	out[o + at.TURN + 2] = turnZ;
	out[o + at.CONTACT_MOVE] = vx;
	out[o + at.CONTACT_MOVE + 1] = vy;
	out[o + at.CONTACT_MOVE + 2] = vz;

	const speed = Math.abs(vy) + Math.abs(vz);
	const turns = Math.abs(turnX) * p.size * FARTHEST > speed;
	out[o + at.CENTRE_FRONT] = turns ? cy - vz / turnX : NaN;
	out[o + at.CENTRE_FRONT + 1] = turns ? cz + vy / turnX : NaN;
	out[o + at.SWING_ARM_FRONT] = turns ? vz / turnX : NaN;
	// Virtual work: the body's centre of roll lies where the contact point's normal crosses the centreline.
	const lifts = Math.abs(vz) * FARTHEST > speed;
	out[o + at.ROLL_CENTRE_HEIGHT] = lifts ? (cy * vy) / vz : NaN;
	writeArms(p, cx, cy, cz, out, o);
	// tan φ = dx/dz of the braked part (README.md): the material point, or the hub where the brake is inboard.
	out[o + at.ANTI_DIVE] = p.diveFactor * (p.inboardBrakes ? m.wvx * per : vx / vz);
}

function writeArms(p: Prepared, cx: number, cy: number, cz: number, out: Float64Array, o: number): void {
	const m = p.motion;
	// Unit normals of the arm planes and how far the planes pass from the contact point.
	const ln = 1 / Math.sqrt(m.lvx * m.lvx + m.lvy * m.lvy + m.lvz * m.lvz);
	const ly = m.lvy * ln;
	const lz = m.lvz * ln;
	const lr = (m.lvx * (m.lx - cx) + m.lvy * (m.ly - cy) + m.lvz * (m.lz - cz)) * ln;
	const ux = m.upperCos * p.ubx - m.upperSin * p.uax;
	const uy = m.upperCos * p.uby - m.upperSin * p.uay;
	const uz = m.upperCos * p.ubz - m.upperSin * p.uaz;
	const un = 1 / p.upper.radius;
	const ur = (ux * (m.ux - cx) + uy * (m.uy - cy) + uz * (m.uz - cz)) * un;
	const determinant = (ly * uz - lz * uy) * un;
	const acrossBy = lr * uz * un - ur * lz;
	const upBy = ly * ur - uy * un * lr;
	const meets = Math.abs(determinant) * p.size * FARTHEST > Math.abs(acrossBy) + Math.abs(upBy);
	out[o + at.CENTRE_ARMS] = meets ? cy + acrossBy / determinant : NaN;
	out[o + at.CENTRE_ARMS + 1] = meets ? cz + upBy / determinant : NaN;
	// The line from the contact point through the meet, at the centreline; parallel arms give a parallel line.
	const sloped = Math.abs(acrossBy) * FARTHEST > Math.abs(upBy);
	out[o + at.ROLL_CENTRE_BY_ARMS] = sloped ? (-cy * upBy) / acrossBy : NaN;
}
