import type { Shim } from '../../schemas/shims';
import type { AlignmentMoves } from '../../kinematics';
import type { Found } from './asFound';
import { findPacks, type SidePacks } from './pack';
import type { Pack } from './stock';
import { packSide, type Aim } from './surface';
import { perTurn, smallestStep, threadOf, type Thread } from './threads';
import { bestSteps } from './turns';
import type { UpperAdjuster } from './wheel';

/** What is set at one end of the upper arm. `growth` in mm from now. */
export interface EndSetting {
	readonly growth: number;
	/** The pack to put in; null where it stays, and for rod ends. */
	readonly pack: Pack | null;
	/** Turns from now, + longer; null for shims. */
	readonly turns: number | null;
}

export interface Chosen {
	readonly front: EndSetting;
	readonly rear: EndSetting;
	/** Largest miss relative to tolerance; null where the upper arm stays. */
	readonly miss: number | null;
	/** False where the stock is so scarce that not every pack could be looked at. */
	readonly proved: boolean;
}

export interface Choice {
	readonly found: Found;
	readonly exact: AlignmentMoves | null;
	readonly camber: Aim;
	readonly caster: Aim;
	/** Whether camber or caster has a target. */
	readonly asked: boolean;
	readonly toe: number | null;
}

type ShimAdjuster = Extract<UpperAdjuster, { kind: 'shim' }>;
type RodEndAdjuster = Extract<UpperAdjuster, { kind: 'rodEnd' }>;

const stays: EndSetting = { growth: 0, pack: null, turns: null };
const asItIs: Chosen = { front: stays, rear: stays, miss: null, proved: true };

/** What is set at the upper arms of the wheels, in their order: packs from one stock, half turns or turns; null where there is none. */
export function choose(upper: UpperAdjuster, stock: readonly Shim[], choices: readonly Choice[]): (Chosen | null)[] {
	if (upper.kind === 'shim') return choosePacks(upper, stock, choices);
	return choices.map((choice) => (choice.asked ? chooseTurns(upper, choice) : asItIs));
}

function choosePacks(upper: ShimAdjuster, stock: readonly Shim[], choices: readonly Choice[]): (Chosen | null)[] {
	const asked = choices.filter((choice) => choice.asked);
	const sides = asked.map((choice) => packSide({ ...choice.found, ...choice, maxPack: upper.maxPack }));
	const able = sides.filter((side) => side !== null);
	const [first, second] = able;
	const packs = first && findPacks(second ? [first, second] : [first], stock, upper);
	return choices.map((choice) => {
		if (!choice.asked) return asItIs;
		const side = sides[asked.indexOf(choice)];
		const taken = side && packs?.sides[able.indexOf(side)];
		return taken && packs ? fromPacks(taken, choice.found, packs.proved) : null;
	});
}

function fromPacks({ front, rear, miss }: SidePacks, found: Found, proved: boolean): Chosen {
	const end = (pack: Pack, now: number): EndSetting => ({ growth: pack.thickness - now, pack, turns: null });
	return { front: end(front, found.frontNow), rear: end(rear, found.rearNow), miss, proved };
}

function chooseTurns(upper: RodEndAdjuster, choice: Choice): Chosen | null {
	const thread = threadOf(upper.thread);
	if (!thread || !choice.exact) return null;
	const step = smallestStep(thread, upper.fitting);
	if (step === null) {
		const { front, rear } = choice.exact;
		return { front: turned(front, thread, upper), rear: turned(rear, thread, upper), miss: 0, proved: true };
	}
	const { front, rear } = choice.exact;
	const best = bestSteps({ ...choice, wheel: choice.found.wheel, step, front, rear });
	return {
		front: turned(best.front * step, thread, upper),
		rear: turned(best.rear * step, thread, upper),
		miss: best.miss,
		proved: true
	};
}

function turned(growth: number, thread: Thread, { fitting }: RodEndAdjuster): EndSetting {
	return { growth, pack: null, turns: growth / perTurn(thread, fitting) };
}
