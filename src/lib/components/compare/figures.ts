import type { Evaluation } from '$lib/domain/evaluation';
import { OUTPUT_LIST, reasonOf } from '$lib/domain/outputs';
import { judge, targetInWords, type Verdict } from '$lib/domain/targets';
import { decimalsOf, formatDelta, formatQuantity, NONE, unitLabel } from '$lib/format';
import type { CornerState } from '$lib/kinematics';
import type { AxleDocument, FigureKey, Target } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';
import { toDisplay } from '$lib/units';

/** One geometry's state at the slide; nulls where it cannot be solved, or does not reach. */
export interface ComparedState {
	key: string;
	ride: CornerState | null;
	now: CornerState | null;
	/** Why there is no state, one sentence. */
	why: string | null;
}

export interface FigureCell {
	text: string;
	/** Against the first chosen, signed; null in its own column. */
	delta: string | null;
	/** Why there is no figure; null where there is one. */
	reason: string | null;
}

export interface FigureRow {
	key: FigureKey;
	label: string;
	unit: string;
	sign: string;
	cells: FigureCell[];
	/** Whether any of them reads otherwise than the first. */
	differs: boolean;
}

/** A difference that would read as nothing at the decimals shown. */
function unseen(delta: number, quantity: FigureQuantity, preferences: Preferences): boolean {
	return Math.abs(toDisplay(delta, quantity, preferences)) < 0.5 * 10 ** -decimalsOf(quantity, preferences);
}
type FigureQuantity = (typeof OUTPUT_LIST)[number]['quantity'];

/** Every figure at one travel, side by side, with differences against the first. Bump steer is nothing at ride height and is left out there. */
export function figureRows(states: readonly ComparedState[], atRide: boolean, preferences: Preferences): FigureRow[] {
	return OUTPUT_LIST.filter(({ curveOnly }) => !(curveOnly && atRide)).map(({ key, label, quantity, sign, read }) => {
		const values = states.map(({ now, ride }) => (now && ride ? read(now, ride) : null));
		const base = values[0] ?? null;
		const delta = (value: number | null) => (value === null || base === null ? null : value - base);
		const cells = states.map(({ now, why }, place): FigureCell => {
			const value = values[place] ?? null;
			return {
				text: formatQuantity(value, quantity, preferences),
				delta: place === 0 ? null : formatDelta(delta(value), quantity, preferences),
				reason: value !== null ? null : now ? reasonOf(key, now) : why
			};
		});
		const differs = values.some((value) => {
			const by = delta(value);
			return by === null ? (value === null) !== (base === null) : !unseen(by, quantity, preferences);
		});
		return { key, label, unit: unitLabel(quantity, preferences), sign, cells, differs };
	});
}

export interface TargetCell {
	/** Without its unit, which stands in the target's words. */
	text: string;
	verdict: Verdict;
	word: string;
	reason: string | null;
	/** Whether it is a target of this geometry, or only of another. */
	own: boolean;
}

export interface TargetRow {
	key: string;
	words: string;
	cells: TargetCell[];
}

/** A target's text in key order: the same wish in two documents is one row. */
const spelled = (target: Target): string => JSON.stringify(Object.entries(target).sort(([a], [b]) => (a < b ? -1 : 1)));

type Judgeable = { document: Pick<AxleDocument, 'targets'>; evaluation: Evaluation | null; why: string | null };

/** Every target of any of the geometries, and how each of them stands to it. */
export function targetRows(entries: readonly Judgeable[], preferences: Preferences): TargetRow[] {
	const all = new Map<string, Target>();
	for (const { document } of entries) for (const target of document.targets) all.set(spelled(target), target);
	const own = entries.map(({ document }) => new Set(document.targets.map(spelled)));
	const quantityOf = (key: FigureKey) => OUTPUT_LIST.find((output) => output.key === key)?.quantity ?? 'ratio';
	return [...all].map(([key, target]) => ({
		key,
		words: targetInWords(target, preferences),
		cells: entries.map(({ evaluation, why }, place): TargetCell => {
			const judged = evaluation && judge(target, evaluation);
			return {
				text: judged ? formatQuantity(judged.value, quantityOf(target.figure), preferences) : NONE,
				verdict: judged?.verdict ?? 'unknown',
				word: judged?.word ?? 'not known',
				reason: judged ? judged.reason : why,
				own: own[place]?.has(key) ?? false
			};
		})
	}));
}
