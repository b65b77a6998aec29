import { applyAlignment, KinematicsError } from '../../kinematics';
import type { Adjusters, AlignmentMoves, CornerGeometry, CornerState, Stance, Vec3 } from '../../kinematics';
import type { AdjusterEntry } from '../../schemas/axle';

export type UpperAdjuster = AdjusterEntry['upper'];

/** What a gauge reads on one wheel, degrees: camber, caster to the road, toe per wheel. */
export interface Angles {
	readonly camber: number;
	readonly caster: number;
	readonly toe: number;
}
export type AngleName = keyof Angles;
export const ANGLE_NAMES: readonly AngleName[] = ['camber', 'caster', 'toe'];

/** One wheel as it stands now: everything that follows is a change from here. */
export interface Wheel {
	/** The corner re-entered where it stands: travel 0 is now, z = 0 is the ground. */
	readonly geometry: CornerGeometry;
	readonly adjusters: Adjusters;
	/** Nose-down, degrees. */
	readonly rake: number;
	/** What the gauge reads more than the model says, degrees. */
	readonly offset: Pick<Angles, 'camber' | 'caster'>;
	readonly now: Angles;
	/** Toe per mm of tie rod, degrees. */
	readonly toePerMm: number;
}

/** A wheel after a change. */
export interface Changed {
	readonly moves: AlignmentMoves;
	readonly angles: Angles;
	readonly state: CornerState;
}

const TOE_MET = 1e-11;
const MOST_STEPS = 40;
/** mm; the slope of toe is taken over this much tie rod. */
const PROBE = 0.05;

/**
 * The adjusters as the kernel takes them. A shim moves the pivots along its direction; that direction is turned so that
 * it points outboard, and reversed where a shim acts inboard: a move is always the growth of the pack. Rod ends: the
 * growth of the leg.
 */
export function kernelAdjusters(upper: UpperAdjuster): Adjusters {
	if (upper.kind === 'rodEnd') return { kind: 'legLength' };
	const [x, y, z] = upper.direction;
	const sign = (y < 0 ? -1 : 1) * (upper.side === 'outboard' ? 1 : -1);
	const direction: Vec3 = [sign * x, sign * y, sign * z];
	return { kind: 'pivotShift', direction };
}

/** The corner re-entered in a state, raised so that the ground of that state is z = 0. A coil-over is left out. */
export function reentered(geometry: CornerGeometry, state: CornerState): CornerGeometry {
	const [x, y, ground] = state.contactPoint;
	const points = Object.fromEntries(
		Object.entries(state.points).map(([name, [px, py, pz]]) => [name, [px, py, pz - ground]])
	) as unknown as CornerGeometry['points'];
	const { loadedRadius } = geometry.wheel;
	const wheel = { track: 2 * Math.abs(y), x, loadedRadius, camber: state.camber, toe: state.toe };
	return { points, wheel, vehicle: geometry.vehicle };
}

/**
 * A wheel as it stands: the corner as entered, changed by `moves` since, in its stance.
 * @throws KinematicsError where the corner cannot stand so
 */
export function standingWheel(
	geometry: CornerGeometry,
	upper: UpperAdjuster,
	stance: Stance,
	moves: AlignmentMoves = { front: 0, rear: 0, tieRod: 0 },
	offset: Wheel['offset'] = { camber: 0, caster: 0 }
): Wheel {
	const adjusters = kernelAdjusters(upper);
	const state = applyAlignment(geometry, adjusters, moves, stance);
	const here = reentered(geometry, state);
	const rake = stance.rake ?? 0;
	const toeAt = (tieRod: number) => applyAlignment(here, adjusters, { front: 0, rear: 0, tieRod }).toe;
	return {
		geometry: here,
		adjusters,
		rake,
		offset,
		now: read(state, rake, offset),
		toePerMm: (toeAt(PROBE) - toeAt(-PROBE)) / (2 * PROBE)
	};
}

function read(state: CornerState, rake: number, offset: Wheel['offset']): Angles {
	return { camber: state.camber + offset.camber, caster: state.caster - rake + offset.caster, toe: state.toe };
}

/** The wheel after moves in mm from how it stands. @throws KinematicsError */
export function changed(wheel: Wheel, moves: AlignmentMoves): Changed {
	const state = applyAlignment(wheel.geometry, wheel.adjusters, moves);
	return { moves, state, angles: read(state, wheel.rake, wheel.offset) };
}

/**
 * The wheel after moves of the upper arm, the tie rod set so that toe is as asked; with toe null the tie rod stays.
 * Secant on the tie rod, started with the slope where the wheel stands.
 * @throws KinematicsError where it cannot be had
 */
export function changedHoldingToe(wheel: Wheel, front: number, rear: number, toe: number | null): Changed {
	let here = changed(wheel, { front, rear, tieRod: 0 });
	if (toe === null) return here;
	let slope = wheel.toePerMm;
	for (let step = 0; step < MOST_STEPS; step++) {
		const gap = toe - here.angles.toe;
		if (Math.abs(gap) < TOE_MET) return here;
		const next = changed(wheel, { front, rear, tieRod: here.moves.tieRod + gap / slope });
		const gained = next.angles.toe - here.angles.toe;
		if (gained === 0) return here;
		slope = gained / (next.moves.tieRod - here.moves.tieRod);
		here = next;
	}
	if (Math.abs(toe - here.angles.toe) < 1e-8) return here;
	throw new KinematicsError('no-solution', 'toe', 'The toe asked for cannot be had with this tie rod. Ask for less.', {
		best: here.angles.toe
	});
}
