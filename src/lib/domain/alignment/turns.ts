import type { Aim } from './surface';
import { changedHoldingToe, type Wheel } from './wheel';

export interface TurnsTask {
	readonly wheel: Wheel;
	/** mm of leg per step: half a turn on a through bolt. */
	readonly step: number;
	readonly camber: Aim;
	readonly caster: Aim;
	readonly toe: number | null;
	/** Where the exact answer lies, mm. */
	readonly front: number;
	readonly rear: number;
}

/** Whole steps at each leg. */
export interface Steps {
	readonly front: number;
	readonly rear: number;
	readonly miss: number;
}

/** Steps looked at each way from the best so far; the search moves on while the best lies on the edge. */
const AROUND = 3;
const MOST_MOVES = 40;

/** The half turns with the least largest miss relative to tolerance (ties: fewest turns), each case judged by the kernel. */
export function bestSteps(task: TurnsTask): Steps {
	const judged = new Map<string, Steps>();
	const judge = (front: number, rear: number): Steps => {
		const key = `${front} ${rear}`;
		const known = judged.get(key) ?? { front, rear, miss: missAt(task, front, rear) };
		judged.set(key, known);
		return known;
	};
	let best = judge(Math.round(task.front / task.step), Math.round(task.rear / task.step));
	for (let move = 0; move < MOST_MOVES; move++) {
		const { front, rear } = best;
		for (let f = front - AROUND; f <= front + AROUND; f++) {
			for (let r = rear - AROUND; r <= rear + AROUND; r++) {
				const one = judge(f, r);
				if (one.miss < best.miss - 1e-9 || (one.miss < best.miss + 1e-9 && turns(one) < turns(best))) best = one;
			}
		}
		if (Math.max(Math.abs(best.front - front), Math.abs(best.rear - rear)) < AROUND) return best;
	}
	return best;
}

function turns({ front, rear }: Steps): number {
	return Math.abs(front) + Math.abs(rear);
}

function missAt({ wheel, step, camber, caster, toe }: TurnsTask, front: number, rear: number): number {
	const { angles } = changedHoldingToe(wheel, front * step, rear * step, toe);
	return Math.max(
		Math.abs(angles.camber - camber.value) / camber.tolerance,
		Math.abs(angles.caster - caster.value) / caster.tolerance
	);
}
