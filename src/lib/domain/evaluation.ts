import { solveCorner, sweepBump } from '../kinematics';
import type { CornerGeometry, CornerState, Sweep, SweepRange } from '../kinematics';
import type { FigureKey, Target } from '../schemas/axle';
import { OUTPUTS } from './outputs';
import { judge } from './targets';
import type { Judgement } from './targets';

/** One corner's figures at ride height, its sweep, and how they stand to the targets. */
export interface Evaluation {
	readonly geometry: CornerGeometry;
	/** Travel 0, rack 0. */
	readonly ride: CornerState;
	/** Over the range asked for. */
	readonly sweep: Sweep<CornerState>;
	/** Every figure at ride height, in stored units. */
	readonly figures: Readonly<Record<FigureKey, number | null>>;
	/** One for each target, in their order. */
	readonly judgements: readonly Judgement[];
	/** The sweep over another stretch of travel (mm), fine enough for a peak; made once. */
	over(from: number, to: number): Sweep<CornerState>;
}

/** States in a sweep for a target: a peak between two of 41 states is missed by under a thousandth of the curve's height. */
const TARGET_STEPS = 40;

/** A figure of a state; `ride` is the same corner at ride height. */
export function figureAt(key: FigureKey, state: CornerState, ride: CornerState): number | null {
	return OUTPUTS[key].read(state, ride);
}

function figuresOf(ride: CornerState): Record<FigureKey, number | null> {
	return Object.fromEntries(Object.values(OUTPUTS).map((output) => [output.key, output.read(ride, ride)])) as Record<
		FigureKey,
		number | null
	>;
}

/**
 * Solves a corner at ride height and over a range of travel, and judges its targets. Pure.
 * @throws KinematicsError where the corner cannot be solved at ride height
 */
export function evaluate(geometry: CornerGeometry, targets: readonly Target[], range: SweepRange): Evaluation {
	const made = new Map<string, Sweep<CornerState>>();
	const ride = solveCorner(geometry, { travel: 0, rack: 0 });
	const evaluation = {
		geometry,
		ride,
		sweep: sweepBump(geometry, range),
		figures: figuresOf(ride),
		over(from: number, to: number) {
			const key = `${from} ${to}`;
			const sweep = made.get(key) ?? sweepBump(geometry, { from, to, step: Math.abs(to - from) / TARGET_STEPS || 1 });
			made.set(key, sweep);
			return sweep;
		}
	};
	return { ...evaluation, judgements: targets.map((target) => judge(target, evaluation)) };
}
