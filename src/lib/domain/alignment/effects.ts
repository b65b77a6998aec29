import { solveCorner, sweepBump } from '../../kinematics';
import type { CornerGeometry } from '../../kinematics';

/** Travel each way over which bump steer is told, mm. */
export const BUMP_STEER_TRAVEL = 25;

/** What an alignment disturbs beside its targets, where the car stands. */
export interface Effects {
	/** Largest change of toe per wheel over ±25 mm, degrees; null where the linkage binds before. */
	readonly bumpSteer: number | null;
	/** mm above ground; null where there is none. */
	readonly rollCentre: number | null;
	/** degrees */
	readonly kpi: number;
}

/** @throws KinematicsError where the corner cannot be solved */
export function effectsOf(geometry: CornerGeometry): Effects {
	const here = solveCorner(geometry, { travel: 0, rack: 0 });
	const range = { from: -BUMP_STEER_TRAVEL, to: BUMP_STEER_TRAVEL, step: BUMP_STEER_TRAVEL / 20 };
	const { states, lowLimit, highLimit } = sweepBump(geometry, range);
	const binds = lowLimit !== undefined || highLimit !== undefined;
	const bumpSteer = binds ? null : Math.max(...states.map((state) => Math.abs(state.toe - here.toe)));
	return { bumpSteer, rollCentre: here.rollCentreHeight, kpi: here.kpi };
}
