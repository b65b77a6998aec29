import { prepareAxle, type PreparedAxle } from './axle';
import { KinematicsError } from './errors';
import { evaluateAt } from './evaluate';
import type { AxleGeometry, Side } from './geometry';
import { STATE_LENGTH } from './layout';
import { outOfReach, rackAsTold, reachableTravel } from './locate';
import type { Prepared } from './prepared';
import { rackEnd } from './rackpath';
import { CornerState, type CornerStateData } from './state';
import { stepsOf, within, type Sweep, type SweepLimit, type SweepRange } from './sweep';

const RADIANS = Math.PI / 180;
/** Under this angle from straight ahead, degrees, an Ackermann percentage says nothing. */
const LEAST_TURN = 3;

/** A steered corner: a `CornerState` and its wheel's heading. */
export class SteeredCornerState extends CornerState {
	/** The wheel's actual heading, static toe included, degrees, + to the left. */
	get steerAngle(): number {
		return this.side === 'left' ? -this.toe : this.toe;
	}

	override toJSON(): CornerStateData & { steerAngle: number } {
		return { ...super.toJSON(), steerAngle: this.steerAngle };
	}
}

export interface SteerState {
	/** mm, + to the left */
	readonly rack: number;
	readonly left: SteeredCornerState;
	readonly right: SteeredCornerState;
	/** Ackermann percentage: 100 where both wheels turn about one point on the rear axle's line. */
	readonly ackermann: number | null;
	readonly reasons: { readonly ackermann?: string };
}

function steered(p: Prepared, travel: number, rack: number): SteeredCornerState {
	const row = new Float64Array(STATE_LENGTH);
	evaluateAt(p, travel, rack, row, 0);
	return new SteeredCornerState(p, row, 0);
}

/** What Ackermann is measured against: headings straight ahead, and the steering axes' distance over the wheelbase. */
interface StraightAhead {
	readonly left: number;
	readonly right: number;
	readonly ratio: number | null;
	readonly reason: string;
}

function straightAhead(pair: PreparedAxle, travel: number): StraightAhead {
	const left = steered(pair.left, travel, 0);
	const right = steered(pair.right, travel, 0);
	const wheelbase = pair.left.geometry.vehicle?.wheelbase ?? pair.right.geometry.vehicle?.wheelbase;
	const a = left.steeringAxisGround;
	const b = right.steeringAxisGround;
	const apart = a && b ? Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]) : null;
	const ratio = wheelbase && apart !== null ? apart / wheelbase : null;
	const reason = wheelbase ? 'A steering axis does not meet the ground straight ahead.' : 'Not entered: the wheelbase.';
	return { left: left.steerAngle, right: right.steerAngle, ratio, reason };
}

/**
 * 100 · (inner − outer) / (ideal inner − outer), cot(ideal inner) = cot(outer) − t/L (ISO 8855:2011, 7.1.9), angles
 * turned away from straight ahead.
 */
function ackermannOf(ahead: StraightAhead, leftHeading: number, rightHeading: number): number | string {
	if (ahead.ratio === null) return ahead.reason;
	const left = leftHeading - ahead.left;
	const right = rightHeading - ahead.right;
	if (Math.min(Math.abs(left), Math.abs(right)) < LEAST_TURN) {
		return `A wheel is turned less than ${LEAST_TURN}° from straight ahead, where the percentage says nothing.`;
	}
	if (left * right < 0) return 'The two wheels turn in opposite directions.';
	const [inner, outer] = left > 0 ? [left, right] : [-right, -left];
	const ideal = Math.atan2(1, 1 / Math.tan(outer * RADIANS) - ahead.ratio) / RADIANS;
	return (100 * (inner - outer)) / (ideal - outer);
}

/** How far the rack can be moved towards a place by one corner (mm, + to the left), and what locks it there. */
function rackLimit(p: Prepared, side: Side, travel: number, rack: number): SweepLimit | null {
	const end = rackEnd(p, travel, rackAsTold(p, rack));
	if (end === null) {
		const { low, high } = reachableTravel(p, travel, travel, 0);
		const limit = low ?? high;
		throw outOfReach('travel', travel, limit?.value ?? 0, limit?.locks ?? 'lowerArm', side);
	}
	return end.locks === null ? null : { value: rackAsTold(p, end.rack), locks: end.locks, side };
}

/** The nearer of both sides' limits towards one end of a sweep; none where both reach it. */
function nearerLimit(pair: PreparedAxle, travel: number, rack: number): SweepLimit | null {
	const left = rackLimit(pair.left, 'left', travel, rack);
	const right = rackLimit(pair.right, 'right', travel, rack);
	if (!left || !right) return left ?? right;
	return Math.abs(left.value) <= Math.abs(right.value) ? left : right;
}

/**
 * Both wheels under the same rack movement (mm, + to the left) at one wheel-centre travel (mm, bump +, 0 by default).
 * Whether +rack steers to the left depends on a rack before or behind the axle; nothing is flipped.
 * @throws KinematicsError `not-finite`, `degenerate`, or `out-of-reach` where the travel itself is out of reach
 */
export function sweepSteer(axle: AxleGeometry, range: SweepRange & { readonly travel?: number }): Sweep<SteerState> {
	const values = stepsOf(range, 'mm');
	const travel = range.travel ?? 0;
	if (!Number.isFinite(travel))
		throw new KinematicsError('not-finite', 'travel', 'The travel is not a number: give it in mm.');
	const pair = prepareAxle(axle);
	const low = nearerLimit(pair, travel, Math.min(range.from, range.to, 0));
	const high = nearerLimit(pair, travel, Math.max(range.from, range.to, 0));
	const ahead = straightAhead(pair, travel);
	const states = within(values, low?.value ?? -Infinity, high?.value ?? Infinity).map((rack): SteerState => {
		const left = steered(pair.left, travel, rack);
		const right = steered(pair.right, travel, rack);
		const result = ackermannOf(ahead, left.steerAngle, right.steerAngle);
		const percentage = typeof result === 'number' ? result : null;
		return {
			rack,
			left,
			right,
			ackermann: percentage,
			reasons: typeof result === 'string' ? { ackermann: result } : {}
		};
	});
	return { states, ...(low && { lowLimit: low }), ...(high && { highLimit: high }) };
}
