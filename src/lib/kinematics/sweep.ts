import { inWords, KinematicsError, type LinkName } from './errors';
import { evaluateAt } from './evaluate';
import type { CornerGeometry, Side } from './geometry';
import { STATE_LENGTH } from './layout';
import { reachableTravel } from './locate';
import { prepare } from './prepare';
import type { Prepared } from './prepared';
import { CornerState } from './state';

/** From and to are both included; the step is positive, the last one may be shorter. mm (bump, steer) or degrees (roll). */
export interface SweepRange {
	readonly from: number;
	readonly to: number;
	readonly step: number;
}

/** Where a sweep ends before it was asked to: the last reachable value and the link that locks there. */
export interface SweepLimit {
	readonly value: number;
	readonly locks: LinkName;
	/** The side that locks, where a sweep covers both. */
	readonly side?: Side;
}

export interface Sweep<State> {
	readonly states: State[];
	readonly lowLimit?: SweepLimit;
	readonly highLimit?: SweepLimit;
}

/** More states than this are taken for a slip in the step. */
const MOST_STATES = 100_001;
/** A rest under this part of a step is rounding, not a last shorter step. */
const ROUNDING = 1e-9;

/** The values of a sweep, from `from` to `to` in either direction. @throws KinematicsError `not-finite` or `degenerate` */
export function stepsOf({ from, to, step }: SweepRange, unit: string): number[] {
	for (const [name, value] of Object.entries({ from, to, step })) {
		if (!Number.isFinite(value))
			throw new KinematicsError('not-finite', name, `\`${name}\` is not a number: give it in ${unit}.`);
	}
	if (!(step > 0)) {
		throw new KinematicsError('degenerate', 'step', `The step is ${inWords(step)}: it must be more than 0 ${unit}.`);
	}
	const count = Math.abs(to - from) / step;
	if (count > MOST_STATES - 1) {
		throw new KinematicsError(
			'degenerate',
			'step',
			`The step is too small for this range: a sweep holds at most ${MOST_STATES} states.`
		);
	}
	const direction = Math.sign(to - from);
	const whole = Math.floor(count + ROUNDING);
	const values = Array.from({ length: whole + 1 }, (_, i) => from + direction * i * step);
	if (count - whole > ROUNDING) values.push(to);
	else values[values.length - 1] = to;
	return values;
}

/** The part of the values between the limits. */
export function within(values: number[], low: number, high: number): number[] {
	return values.filter((value) => value >= low && value <= high);
}

/** The states of a prepared corner at these travels, in one row of rows. */
export function statesAt(p: Prepared, travels: number[], rack: number): CornerState[] {
	const rows = new Float64Array(travels.length * STATE_LENGTH);
	return travels.map((travel, i) => {
		const offset = i * STATE_LENGTH;
		evaluateAt(p, travel, rack, rows, offset);
		return new CornerState(p, rows, offset);
	});
}

/**
 * A sweep through wheel-centre travel (mm, bump +) at one rack movement (mm, + to the left). Where the corner binds the
 * sweep holds every step up to there, and a limit tells the last reachable travel and what locks.
 * @throws KinematicsError `out-of-reach` where the rack movement itself is out of reach
 */
export function sweepBump(
	geometry: CornerGeometry,
	range: SweepRange & { readonly rack?: number }
): Sweep<CornerState> {
	const values = stepsOf(range, 'mm');
	const rack = range.rack ?? 0;
	if (!Number.isFinite(rack))
		throw new KinematicsError(
			'not-finite',
			'rack',
			'The rack movement is not a number: give it in mm, positive to the left.'
		);
	const p = prepare(geometry);
	const { low, high } = reachableTravel(p, Math.min(range.from, range.to), Math.max(range.from, range.to), rack);
	const states = statesAt(p, within(values, low?.value ?? -Infinity, high?.value ?? Infinity), rack);
	return { states, ...(low && { lowLimit: low }), ...(high && { highLimit: high }) };
}
