/** The kernel's whole public surface. Axes, signs and definitions: README.md beside this file. */
export { KinematicsError, type KinematicsErrorCode, type LinkName } from './errors';
export {
	POINT_NAMES,
	type AxleGeometry,
	type CoiloverGeometry,
	type CoiloverMount,
	type CornerGeometry,
	type PointName,
	type Side,
	type Vec2,
	type Vec3,
	type VehicleData,
	type WheelGeometry
} from './geometry';
export { threeSpheres } from './intersect';
export { FIGURE_NAMES, STATE_LENGTH, type FigureName } from './layout';
export { prepare } from './prepare';
export type { Prepared } from './prepared';
export { evaluateInto, solveCorner } from './evaluate';
export type { AbsentName } from './reasons';
export type { CornerState, CornerStateData, CoiloverState } from './state';
export { sweepBump, type Sweep, type SweepLimit, type SweepRange } from './sweep';

export { sweepRoll, type RolledCornerState, type RollCentre, type RollState } from './roll';
export { sweepSteer, type SteeredCornerState, type SteerState } from './steering';
export { applyAlignment, type Adjusters, type AlignmentMoves, type Stance } from './alignment';
export { solveAlignment, type AlignmentSolution, type AlignmentTargets } from './targets';

/** Rises whenever a figure may come out differently; kept beside released figures. */
export const KERNEL_VERSION = '1.0.0';
