import type { CornerState } from '../kinematics';
import type { Target } from '../schemas/axle';
import { MINUS, formatNumber, formatQuantity, formatWithUnit, unitLabel } from '../format';
import type { WritingChoice } from '../format';
import type { Evaluation } from './evaluation';
import { OUTPUTS, reasonOf } from './outputs';
import { LINK_NAMES } from './points';

export type Verdict = 'pass' | 'near' | 'miss' | 'unknown';

/** How a figure stands to its target. `value` in the stored unit; `reason` says why it is absent. */
export interface Judgement {
	readonly target: Target;
	readonly value: number | null;
	readonly verdict: Verdict;
	/** The verdict as it is written. */
	readonly word: string;
	readonly reason: string | null;
}

/** What a judgement reads of an evaluation. */
export type Judged = Pick<Evaluation, 'ride' | 'figures' | 'over'>;

export const VERDICT_WORDS: Readonly<Record<Verdict, string>> = {
	pass: 'pass',
	near: 'near',
	miss: 'miss',
	unknown: 'not known'
};

/** Outside the band by up to this part of its width (of the limit itself, where there is one) is near. */
const NEAR = 0.2;
/** 2.2 less 2 is more than a fifth of 1 in binary. */
const ROUNDING = 1e-9;

type Valued = { value: number; reason: null } | { value: null; reason: string };

/** A value against bounds; either may be open. */
export function verdictOf(value: number | null, low: number | null, high: number | null): Verdict {
	if (value === null || !Number.isFinite(value)) return 'unknown';
	const under = low === null ? 0 : low - value;
	const over = high === null ? 0 : value - high;
	const outside = Math.max(under, over);
	if (outside <= 0) return 'pass';
	const width = low !== null && high !== null ? high - low : 0;
	const margin = NEAR * (width > 0 ? width : Math.abs((under > 0 ? low : high) ?? 0));
	return outside <= margin * (1 + ROUNDING) ? 'near' : 'miss';
}

function bindsIn(sweep: ReturnType<Judged['over']>): string | null {
	const limit = sweep.highLimit ?? sweep.lowLimit;
	if (!limit) return null;
	const sign = limit.value < 0 ? MINUS : '+';
	const where = `${sign}${formatNumber(Math.abs(limit.value), 1, { numbers: 'point' })} mm`;
	return `The ${LINK_NAMES[limit.locks]} binds at ${where}, within the travel of this target.`;
}

/** The figure of every state, or the first reason for which one is absent. */
function valuesOver(states: readonly CornerState[], target: Target, ride: CornerState): number[] | string {
	const values: number[] = [];
	for (const state of states) {
		const value = OUTPUTS[target.figure].read(state, ride);
		if (value === null) return reasonOf(target.figure, state) ?? 'It does not exist in this position.';
		values.push(value);
	}
	return values;
}

function valueOf(target: Target, { ride, figures, over }: Judged): Valued {
	if (target.at === 'ride') {
		const value = figures[target.figure];
		return value === null ? { value, reason: reasonOf(target.figure, ride) ?? '' } : { value, reason: null };
	}
	const sweep = over(target.from, target.to);
	const binds = bindsIn(sweep);
	if (binds !== null) return { value: null, reason: binds };
	const values = valuesOver(sweep.states, target, ride);
	if (typeof values === 'string') return { value: null, reason: values };
	const value =
		target.measure === 'range'
			? Math.max(...values) - Math.min(...values)
			: Math.max(...values.map((one) => Math.abs(one)));
	return { value, reason: null };
}

/**
 * How the figures stand to a target. At ride height: the figure itself. Over travel: its `range` (highest less lowest) or its
 * `peak` (largest size, the sign aside; bump steer counts from ride height). Unknown where the corner binds first.
 */
export function judge(target: Target, evaluation: Judged): Judgement {
	const { value, reason } = valueOf(target, evaluation);
	const verdict = verdictOf(value, target.low, target.high);
	return { target, value, verdict, word: VERDICT_WORDS[verdict], reason };
}

function bandInWords({ figure, low, high }: Target, preferences: WritingChoice): string {
	const { quantity } = OUTPUTS[figure];
	if (low !== null && high !== null) {
		const marks = quantity === 'angle' && preferences.angle === 'minutes' ? '' : unitLabel(quantity, preferences);
		const unit = marks === '' || marks === '°' ? marks : ` ${marks}`;
		return `${formatQuantity(low, quantity, preferences)} to ${formatQuantity(high, quantity, preferences)}${unit}`;
	}
	const [word, bound] = low === null ? ['at most', high] : ['at least', low];
	return `${word} ${formatWithUnit(bound, quantity, preferences)}`;
}

/** A target in words: "Camber −1.00 to −0.50°", "Bump steer, peak over −25.0 to +25.0 mm, at most 0.10°". */
export function targetInWords(target: Target, preferences: WritingChoice): string {
	const { label } = OUTPUTS[target.figure];
	const band = bandInWords(target, preferences);
	if (target.at === 'ride') return `${label} ${band}`;
	const end = (mm: number) => (mm > 0 ? '+' : '') + formatQuantity(mm, 'length', preferences);
	const travel = `${end(target.from)} to ${end(target.to)} ${unitLabel('length', preferences)}`;
	return `${label}, ${target.measure} over ${travel}, ${band}`;
}
