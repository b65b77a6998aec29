import type { FigureAnswer, Freed, SideName, WheelAnswer } from '$lib/domain/alignment/answer';
import type { TieRodChange } from '$lib/domain/alignment/flats';
import { engagementAfter, threadOf, turningWords } from '$lib/domain/alignment/threads';
import { threadPastNut, type End, type Warning } from '$lib/domain/alignment/warnings';
import { formatGrowth, formatThickness, formatTurns } from '$lib/components/shims/words';
import type { EndDrawing } from '$lib/components/shims/drawings';
import { formatNumber, formatQuantity, unitLabel, type WritingChoice } from '$lib/format';
import type { AdjusterEntry } from '$lib/schemas/axle';

export const FIGURE_WORDS = { camber: 'Camber', caster: 'Caster', toe: 'Toe per wheel' } as const;

/** What was done with a figure that has no target, a whole sentence. */
export function freedWords(freed: Freed, kind: 'shim' | 'rodEnd'): string {
	const moves = kind === 'shim' ? 'packs' : 'legs';
	switch (freed) {
		case 'equalMoves':
			return `No caster target: front and rear ${moves} change equally, caster goes where that takes it.`;
		case 'oppositeMoves':
			return `No camber target: the rear changes as much as the front, the other way; camber goes where that takes it.`;
		case 'armStays':
			return 'No target for camber or caster: the upper arm stays as it is.';
		case 'tieRodStays':
			return 'No toe target: the tie rod stays, toe goes where the rest takes it.';
	}
}

/** A limit met, a whole sentence. */
export function warningWords(warning: Warning, preferences: WritingChoice): string {
	const mm = (value: number) => `${formatThickness(value, preferences)} ${unitLabel('length', preferences)}`;
	switch (warning.code) {
		case 'packBelowNothing':
			return `The exact answer takes more out of the ${warning.end} pack than is in it (${mm(warning.wanted)}): the targets ask for more than shims can give here.`;
		case 'packOverLimit':
			return `The exact answer needs ${mm(warning.wanted)} at the ${warning.end}; packs are kept to ${mm(warning.limit)}.`;
		case 'difference':
			return `The exact answer needs ${mm(warning.wanted)} between front and rear; packs are kept within ${mm(warning.limit)}.`;
		case 'bolt':
			return `At the ${warning.end} ${mm(Math.max(warning.left, 0))} of thread stay past the nut: fewer than 2 to 2½ threads. Fit a longer bolt.`;
		case 'boltUnknown':
			return 'Packs grow: see that at least 2 to 2½ threads stay past the nut. Enter the thread past the nut to have it checked.';
		case 'engagement':
			return `At the ${warning.end} ${mm(Math.max(warning.left, 0))} of thread stay engaged, under ${mm(warning.least)}${warning.usual ? ' (one thread diameter, common practice; the maker’s figure wins)' : ''}.`;
		case 'engagementUnknown':
			return 'Enter the thread engaged now to have engagement checked: never past the witness hole, and the maker’s figure wins.';
		case 'threadUnknown':
			return `The thread ${warning.thread} is not in the table: choose one under Adjusters.`;
		case 'stockEmpty':
			return 'Nothing on the shelf brings the targets nearer: see Stock.';
		case 'unproved':
			return 'So few shims are left that not every share between the wheels was looked at: a better one may exist.';
	}
}

/** A tie rod's change as it is set: "1.8 flats", "shorter", and what that is in length and turns. */
export function tieRodWords(
	change: TieRodChange,
	preferences: WritingChoice
): { flats: string; way: string; detail: string } {
	const flats = formatNumber(Math.abs(change.flats), 1, preferences);
	if (flats === formatNumber(0, 1, preferences)) return { flats: 'as it is', way: '', detail: '' };
	const growth = `${formatGrowth(change.length, preferences)} ${unitLabel('length', preferences)}`;
	return {
		flats: `${flats} flats`,
		way: change.length > 0 ? 'longer' : 'shorter',
		detail: `${growth}, ${formatNumber(Math.abs(change.turns), 2, preferences)} turns`
	};
}

/** Flats with their sign, + longer. */
export function flatsText(change: TieRodChange, preferences: WritingChoice): string {
	const text = formatNumber(change.flats, 1, preferences);
	return change.flats > 0 && /[1-9]/.test(text) ? `+${text}` : text;
}

/** How far a figure is inside or outside its tolerance. */
export function figureVerdict({ remains, target }: FigureAnswer): 'pass' | 'near' | 'miss' | null {
	if (remains === null || !target) return null;
	const part = Math.abs(remains) / target.tolerance;
	// A gauge does not tell a ten-millionth of the tolerance.
	if (part <= 1 + 1e-7) return 'pass';
	return part <= 1.2 ? 'near' : 'miss';
}

/** A target as it stands in a table: "−0.75" and "0.25", or "free". */
export function targetWords(
	{ target }: FigureAnswer,
	preferences: WritingChoice
): { value: string; tolerance: string | null } {
	if (!target) return { value: 'free', tolerance: null };
	const angle = (degrees: number) => formatQuantity(degrees, 'angle', preferences);
	return { value: angle(target.value), tolerance: angle(target.tolerance) };
}

/** What to set at one end, for a table: the figure that is done and the change behind it. */
export function endWords(
	answer: WheelAnswer,
	end: End,
	adjusters: AdjusterEntry,
	preferences: WritingChoice
): { do: string; detail: string } {
	const unit = unitLabel('length', preferences);
	const setting = answer.chosen?.[end];
	if (!setting) return { do: '–', detail: 'nothing can be chosen' };
	const change = `${formatGrowth(setting.growth, preferences)} ${unit}`;
	if (setting.pack) return { do: `${formatThickness(setting.pack.thickness, preferences)} ${unit}`, detail: change };
	if (setting.turns !== null && adjusters.upper.kind === 'rodEnd') {
		const { fitting, handedness } = adjusters.upper;
		const way = turningWords(setting.turns, fitting, handedness);
		if (setting.turns === 0) return { do: way, detail: '' };
		return { do: `${formatTurns(Math.abs(setting.turns), preferences)} turns ${way.split(',')[0]}`, detail: change };
	}
	return { do: 'as it is', detail: '' };
}

/** The drawings of one side's two ends. */
export function drawingsOf(answer: WheelAnswer, adjusters: AdjusterEntry, preferences: WritingChoice): EndDrawing[] {
	return (['front', 'rear'] as const).flatMap((end): EndDrawing[] => {
		const setting = answer.chosen?.[end];
		const { upper } = adjusters;
		const name = `${answer.side} ${end}`;
		const note = setting ? endNote(setting.growth, preferences) : 'nothing can be chosen';
		if (upper.kind === 'shim') {
			const now = end === 'front' ? answer.found.frontNow : answer.found.rearNow;
			const pack = setting?.pack ?? null;
			const shims = pack
				? pack.lines.flatMap(({ thickness, count }) => Array<number>(count).fill(thickness))
				: now > 0
					? [now]
					: [];
			const tail = threadPastNut(upper, end, pack?.thickness ?? now);
			return [{ kind: 'pack', name, note, shims, unknown: !pack, tail, outboard: upper.side === 'outboard' }];
		}
		const thread = threadOf(upper.thread);
		if (!thread) return [];
		const engaged =
			upper.engagementNow === null ? null : engagementAfter(upper.engagementNow, setting?.growth ?? 0, upper.fitting);
		const way = turningWords(setting?.turns ?? 0, upper.fitting, upper.handedness);
		return [{ kind: 'rod', name, note, thread, turns: setting?.turns ?? null, engaged, way }];
	});
}

function endNote(growth: number, preferences: WritingChoice): string {
	const text = formatGrowth(growth, preferences);
	return /[1-9]/.test(text) ? `${text} ${unitLabel('length', preferences)} from now` : 'as it is';
}

export function sideWords(side: SideName): string {
	return side === 'left' ? 'Left' : 'Right';
}

/** product.md's cautions, short, for the screen and every printed sheet. */
export const CAUTIONS: readonly string[] = [
	'Figures are geometry, not strength: parts, welds and threads need a qualified person’s judgement.',
	'Support the car on stands; never work under a jack. Compressed springs store energy.',
	'Keep the thread engagement its maker asks for; torque to the fastener maker’s figure.',
	'Check for binding and for brake hose and wheel clearance through full travel and lock before driving.',
	'Local law and inspection decide whether the car may use the road.'
];
