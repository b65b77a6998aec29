import { writeAttitude } from './attitude';
import { writeCentres } from './centres';
import { KinematicsError } from './errors';
import type { CornerGeometry } from './geometry';
import * as at from './layout';
import { locate } from './locate';
import { prepare } from './prepare';
import type { Prepared } from './prepared';
import { writeSpring } from './springs';
import { CornerState } from './state';

/** sin² of the angle to a dead centre below which there are no rates: some 0.0002 mm of travel before it. */
const DEAD_CENTRE = 1e-12;

/** Components along y of places and directions, and along x and z of the turning: what a mirror in the centre plane turns about. */
const TURNED_BY_MIRROR = [
	at.UPPER_BALL + 1,
	at.LOWER_BALL + 1,
	at.TIE_OUTER + 1,
	at.TIE_INNER + 1,
	at.WHEEL_CENTRE + 1,
	at.CONTACT + 1,
	at.SPIN + 1,
	at.AXIS_GROUND + 1,
	at.COIL_BOTTOM + 1,
	at.CONTACT_MOVE + 1,
	at.TURN,
	at.TURN + 2,
	at.CENTRE_FRONT,
	at.CENTRE_ARMS
];

function writePlaces(p: Prepared, out: Float64Array, o: number): void {
	const m = p.motion;
	out[o + at.UPPER_BALL] = m.ux;
	out[o + at.UPPER_BALL + 1] = m.uy;
	out[o + at.UPPER_BALL + 2] = m.uz;
	out[o + at.LOWER_BALL] = m.lx;
	out[o + at.LOWER_BALL + 1] = m.ly;
	out[o + at.LOWER_BALL + 2] = m.lz;
	out[o + at.TIE_OUTER] = m.tx;
	out[o + at.TIE_OUTER + 1] = m.ty;
	out[o + at.TIE_OUTER + 2] = m.tz;
	out[o + at.TIE_INNER] = p.rx;
	out[o + at.TIE_INNER + 1] = m.ry;
	out[o + at.TIE_INNER + 2] = p.rz;
	out[o + at.WHEEL_CENTRE] = m.wx;
	out[o + at.WHEEL_CENTRE + 1] = m.wy;
	out[o + at.WHEEL_CENTRE + 2] = m.wz;
	out[o + at.SPIN] = m.sx;
	out[o + at.SPIN + 1] = m.sy;
	out[o + at.SPIN + 2] = m.sz;
}

/** One state into `out` from `offset`. @throws KinematicsError */
export function evaluateAt(p: Prepared, travel: number, rack: number, out: Float64Array, offset: number): void {
	if (!Number.isFinite(travel))
		throw new KinematicsError('not-finite', 'travel', 'The travel is not a number: give it in mm, bump positive.');
	if (!Number.isFinite(rack))
		throw new KinematicsError(
			'not-finite',
			'rack',
			'The rack movement is not a number: give it in mm, positive to the left.'
		);
	const right = p.side === 'right';
	const theta = locate(p, travel, right ? 0 - rack : rack);
	const { upperMargin, tieMargin, wvz } = p.motion;
	// At a dead centre rates do not exist; this near one their digits are lost.
	const per = Math.min(upperMargin, tieMargin, wvz / p.riseAtRide) > DEAD_CENTRE ? 1 / wvz : NaN;
	out[offset + at.TRAVEL] = travel;
	out[offset + at.RACK] = rack;
	out[offset + at.ARM_ANGLE] = theta;
	writePlaces(p, out, offset);
	writeAttitude(p, per, out, offset);
	writeCentres(p, per, out, offset);
	writeSpring(p, per, out, offset);
	if (right) for (const slot of TURNED_BY_MIRROR) out[offset + slot] = 0 - (out[offset + slot] as number);
}

/**
 * One state as a row of numbers, for hot loops; nothing is allocated. Order and units of the row: `STATE_INDEX`.
 * NaN in the row stands for a figure that does not exist there or whose input is missing.
 * @param travel wheel centre against the body, mm, bump +
 * @param rack mm, + to the left
 * @param out at least `STATE_LENGTH` numbers
 * @throws KinematicsError `not-finite`, or `out-of-reach` with the last reachable value and what locks
 */
export function evaluateInto(prepared: Prepared, travel: number, rack: number, out: Float64Array): void {
	if (out.length < at.STATE_LENGTH) {
		throw new KinematicsError('degenerate', 'out', `The row is too short: it must hold ${at.STATE_LENGTH} numbers.`);
	}
	evaluateAt(prepared, travel, rack, out, 0);
}

/**
 * One corner at one wheel-centre travel (mm, bump +) and rack movement (mm, + to the left), with every output of
 * README.md. A right corner (y negative) gives places in true vehicle coordinates and figures in its own meaning.
 * @throws KinematicsError `not-finite`, `degenerate` or `out-of-reach`
 */
export function solveCorner(geometry: CornerGeometry, input: { travel?: number; rack?: number } = {}): CornerState {
	return stateOf(prepare(geometry), input.travel ?? 0, input.rack ?? 0);
}

/** One state of a prepared corner in a row of its own. */
export function stateOf(p: Prepared, travel: number, rack: number): CornerState {
	const row = new Float64Array(at.STATE_LENGTH);
	evaluateAt(p, travel, rack, row, 0);
	return new CornerState(p, row, 0);
}
