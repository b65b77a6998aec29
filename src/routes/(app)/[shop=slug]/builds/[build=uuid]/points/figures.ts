import { OUTPUTS, reasonOf } from '$lib/domain/outputs';
import { judge, type Verdict } from '$lib/domain/targets';
import { formatQuantity, NONE, unitLabel } from '$lib/format';
import type { CornerState } from '$lib/kinematics';
import type { FigureKey, Target } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';
import type { Solved } from '$lib/state/solution.svelte';

/** Figures of the list beside the drawing, in order. */
export const LISTED: readonly FigureKey[] = [
	'camber',
	'toe',
	'caster',
	'kpi',
	'scrubRadius',
	'mechanicalTrail',
	'camberRate',
	'bumpSteer',
	'rollCentreHeight',
	'rollCentreByArms',
	'swingArmFront',
	'antiDive',
	'motionRatio',
	'wheelRate'
];

/** Bump steer without a target of its own is told over this much travel to either side, mm. */
export const BUMP_SPAN = 25;

/** One line of the list: the figure at ride height and at the travel slide, and how it stands to its target. */
export interface FigureRow {
	key: FigureKey;
	label: string;
	short: string;
	/** Over which travel the figure is told, where it is one over travel: "±25". */
	span: string;
	unit: string;
	ride: string;
	/** At the travel slide. */
	now: string;
	/** Why there is none. */
	reason: string | null;
	/** The target in the person's units, or null. */
	target: string | null;
	verdict: Verdict | null;
	/** The verdict in words, for the text beside the mark. */
	word: string;
	/** Its place in the document's list of targets, or null. */
	targetIndex: number | null;
	sign: string;
}

const whole = (mm: number): string => String(Math.round(mm * 10) / 10).replace('-', '−');

/** "±25", or "−30…+40" where the two ends differ. */
function spanText(target: Target, preferences: Preferences): string {
	if (target.at === 'ride') return '';
	const shown = (mm: number) => (preferences.length === 'mm' ? whole(mm) : formatQuantity(mm, 'length', preferences));
	if (target.from === -target.to) return `±${shown(target.to)}`;
	return `${shown(target.from)}…${target.to > 0 ? '+' : ''}${shown(target.to)}`;
}

/** A band in words: "−1.00…−0.50", "at least 3.00", "at most 0.10". */
export function bandText({ low, high, figure }: Target, preferences: Preferences): string {
	const { quantity } = OUTPUTS[figure];
	const shown = (value: number) => formatQuantity(value, quantity, preferences);
	if (low !== null && high !== null) return low === -high ? `±${shown(high)}` : `${shown(low)}…${shown(high)}`;
	return low !== null ? `at least ${shown(low)}` : high !== null ? `at most ${shown(high)}` : NONE;
}

const bumpSteer: Target = {
	figure: 'bumpSteer',
	at: 'travel',
	from: -BUMP_SPAN,
	to: BUMP_SPAN,
	measure: 'peak',
	low: null,
	high: null
};

/** The list's lines. `now` is the state at the travel slide. */
export function figureRows(solved: Solved, now: CornerState, preferences: Preferences): FigureRow[] {
	return LISTED.map((key) => {
		const { label, short, quantity, sign, read } = OUTPUTS[key];
		const index = solved.judgements.findIndex(({ target }) => target.figure === key);
		const judgement = solved.judgements[index] ?? null;
		// Bump steer is nothing at ride height: it is told over travel, its target's or the usual.
		const over = key === 'bumpSteer' ? (judgement ?? judge(bumpSteer, solved)) : null;
		const value = over ? over.value : solved.figures[key];
		return {
			key,
			label,
			short,
			span: over ? spanText(over.target, preferences) : '',
			unit: unitLabel(quantity, preferences),
			ride: formatQuantity(value, quantity, preferences),
			now: formatQuantity(read(now, solved.ride), quantity, preferences),
			reason: value === null ? (over?.reason ?? reasonOf(key, solved.ride)) : null,
			target: judgement ? bandText(judgement.target, preferences) : null,
			verdict: judgement?.verdict ?? null,
			word: judgement?.word ?? '',
			targetIndex: judgement ? index : null,
			sign
		};
	});
}

/** A figure with its unit and its verdict in words: what a screen reader is told of a dimension. */
export function spokenFigure(row: FigureRow): string {
	const figure = `${row.label}${row.span ? ` over ${row.span}` : ''} ${row.ride} ${row.unit}`.trim();
	return row.verdict ? `${figure}, ${row.word}, target ${row.target}` : figure;
}
