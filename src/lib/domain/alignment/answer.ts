import { KinematicsError, solveAlignment } from '../../kinematics';
import type { AlignmentMoves, CornerGeometry, Stance } from '../../kinematics';
import type { AdjusterEntry, AlignTarget } from '../../schemas/axle';
import type { Shim } from '../../schemas/shims';
import { foundWheel, type Found, type Measured } from './asFound';
import { effectsOf, type Effects } from './effects';
import { tieRodChange, type TieRodChange } from './flats';
import { perStep, stepsOf, type StepEffect } from './perShim';
import { choose, type Chosen } from './choose';
import type { Aim } from './surface';
import { warningsOf, type Warning } from './warnings';
import { ANGLE_NAMES, changedHoldingToe, reentered, type AngleName, type Angles } from './wheel';

export type SideName = 'left' | 'right';

export interface WheelTask {
	readonly side: SideName;
	readonly geometry: CornerGeometry;
	readonly targets: AlignTarget;
	/** Readings taken before anything was touched, or null to start from the geometry as entered. */
	readonly measured: Measured | null;
}

export interface AxleTask {
	readonly adjusters: AdjusterEntry;
	readonly stance: Stance;
	readonly stock: readonly Shim[];
	readonly wheels: readonly WheelTask[];
}

/** What was done with a figure that has no target. */
export type Freed =
	/** Camber alone was asked: front and rear move equally, caster goes where that takes it. */
	| 'equalMoves'
	/** Caster alone was asked: the rear moves as much as the front, the other way; camber goes where that takes it. */
	| 'oppositeMoves'
	/** Neither camber nor caster was asked: the upper arm stays. */
	| 'armStays'
	/** Toe was not asked: the tie rod stays. */
	| 'tieRodStays';

/** One figure: how it stands, what is asked, and what comes out. Degrees. */
export interface FigureAnswer {
	readonly name: AngleName;
	readonly now: number;
	readonly target: Aim | null;
	readonly freed: Freed | null;
	/** With what is chosen from stock (or whole half turns); null where nothing could be chosen. */
	readonly after: number | null;
	/** after − target; null without a target. */
	readonly remains: number | null;
}

export interface WheelAnswer {
	readonly side: SideName;
	readonly found: Found;
	readonly figures: readonly FigureAnswer[];
	/** Exact movement from now, mm: growth of the packs (or legs), and of the tie rod. Null with the reason in `problem`. */
	readonly exact: AlignmentMoves | null;
	readonly problem: string | null;
	readonly chosen: Chosen | null;
	readonly tieRod: TieRodChange | null;
	readonly before: Effects;
	readonly after: Effects | null;
	readonly steps: readonly StepEffect[];
	readonly warnings: readonly Warning[];
}

export type SideAnswer = WheelAnswer | { readonly side: SideName; readonly failed: string };

/** Room given to a figure without a target while packs are compared, degrees: a maker's largest cross camber and cross caster (2007 table). */
export const ROOM: Readonly<Record<'camber' | 'caster', number>> = { camber: 0.5, caster: 1 };

interface Worked {
	readonly task: WheelTask;
	readonly found: Found;
	readonly exact: AlignmentMoves | null;
	readonly problem: string | null;
	readonly camber: Aim;
	readonly caster: Aim;
}

/**
 * What to change on each wheel to reach its targets from where it stands: the exact movement, the packs (both wheels from
 * one stock), half turns or turns, the tie rod, what remains and what it disturbs. A wheel that cannot be solved is
 * answered with the reason.
 */
export function answerAxle({ adjusters, stance, stock, wheels }: AxleTask): SideAnswer[] {
	const worked = wheels.map((task) => attempt(task.side, () => work(task, adjusters, stance)));
	const solved = worked.filter((one): one is Worked => !('failed' in one));
	const chosen = choose(
		adjusters.upper,
		stock,
		solved.map((one) => ({ ...one, asked: isAsked(one.task.targets), toe: one.task.targets.toe?.value ?? null }))
	);
	return worked.map((one) => {
		if ('failed' in one) return one;
		return attempt(one.task.side, () => finish(one, chosen[solved.indexOf(one)] ?? null, adjusters, stock));
	});
}

function attempt<T>(side: SideName, work: () => T): T | { side: SideName; failed: string } {
	try {
		return work();
	} catch (error) {
		if (error instanceof KinematicsError) return { side, failed: error.message };
		throw error;
	}
}

/** Whether the upper arm has anything to do. */
function isAsked(targets: AlignTarget): boolean {
	return targets.camber !== null || targets.caster !== null;
}

function work(task: WheelTask, adjusters: AdjusterEntry, stance: Stance): Worked {
	const found = foundWheel(task.geometry, adjusters.upper, stance, task.measured);
	const { wheel } = found;
	const { camber, caster, toe } = task.targets;
	let exact: AlignmentMoves | null = null;
	let problem: string | null = null;
	let angles: Angles = wheel.now;
	try {
		const solution = solveAlignment(
			wheel.geometry,
			wheel.adjusters,
			{
				camber: camber && camber.value - wheel.offset.camber,
				caster: caster && caster.value - wheel.offset.caster,
				toe: toe && toe.value
			},
			{ rake: wheel.rake }
		);
		exact = { front: solution.front, rear: solution.rear, tieRod: solution.tieRod };
		angles = changedHoldingToe(wheel, solution.front, solution.rear, toe && toe.value).angles;
	} catch (error) {
		if (!(error instanceof KinematicsError)) throw error;
		problem = error.message;
	}
	return {
		task,
		found,
		exact,
		problem,
		camber: camber ?? { value: angles.camber, tolerance: ROOM.camber },
		caster: caster ?? { value: angles.caster, tolerance: ROOM.caster }
	};
}

function finish(one: Worked, chosen: Chosen | null, adjusters: AdjusterEntry, stock: readonly Shim[]): WheelAnswer {
	const { task, found, exact, problem } = one;
	const { targets } = task;
	const { wheel } = found;
	const done = chosen && changedHoldingToe(wheel, chosen.front.growth, chosen.rear.growth, targets.toe?.value ?? null);
	return {
		side: task.side,
		found,
		figures: ANGLE_NAMES.map((name) => figure(name, wheel.now, targets, done?.angles ?? null)),
		exact,
		problem,
		chosen,
		tieRod: done && tieRodChange(done.moves.tieRod, adjusters.tieRod),
		before: effectsOf(wheel.geometry),
		after: done && effectsOf(reentered(wheel.geometry, done.state)),
		steps: perStep(wheel, stepsOf(adjusters.upper, stock)),
		warnings: warningsOf(adjusters.upper, found, exact, chosen)
	};
}

function figure(name: AngleName, now: Angles, targets: AlignTarget, after: Angles | null): FigureAnswer {
	const target = targets[name];
	return {
		name,
		now: now[name],
		target,
		freed: target ? null : freed(name, targets),
		after: after && after[name],
		remains: target && after ? after[name] - target.value : null
	};
}

function freed(name: AngleName, targets: AlignTarget): Freed {
	if (name === 'toe') return 'tieRodStays';
	if (!isAsked(targets)) return 'armStays';
	return name === 'caster' ? 'equalMoves' : 'oppositeMoves';
}
