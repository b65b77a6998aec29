import type { AlignmentMoves } from '../../kinematics';
import type { Found } from './asFound';
import type { Chosen, EndSetting } from './choose';
import { engagementAfter, threadOf, usualEngagement } from './threads';
import type { UpperAdjuster } from './wheel';

export type End = 'front' | 'rear';

/** A limit met or passed. Values in mm; words are the screen's. */
export type Warning =
	| { readonly code: 'packBelowNothing'; readonly end: End; readonly wanted: number }
	| { readonly code: 'packOverLimit'; readonly end: End; readonly wanted: number; readonly limit: number }
	| { readonly code: 'difference'; readonly wanted: number; readonly limit: number }
	| { readonly code: 'bolt'; readonly end: End; readonly left: number; readonly least: number }
	| { readonly code: 'boltUnknown' }
	| {
			readonly code: 'engagement';
			readonly end: End;
			readonly left: number;
			readonly least: number;
			readonly usual: boolean;
	  }
	| { readonly code: 'engagementUnknown' }
	| { readonly code: 'threadUnknown'; readonly thread: string }
	| { readonly code: 'stockEmpty' }
	| { readonly code: 'unproved' };

/** Two and a half threads of 1.75 mm pitch, mm: two service manuals ask two to two and a half threads past the nut. */
export const LEAST_PAST_NUT = 2.5 * 1.75;

/** Thread past the nut with a pack of that thickness, mm: what was there with the pack as entered, less the growth. */
export function threadPastNut(upper: Extract<UpperAdjuster, { kind: 'shim' }>, end: End, pack: number): number | null {
	const entered = end === 'front' ? upper.frontNow : upper.rearNow;
	return upper.boltReserve === null ? null : upper.boltReserve - (pack - entered);
}

const ENDS: readonly End[] = ['front', 'rear'];
const ROUNDING = 1e-6;

/** Limits of packs, bolts and threads that the exact answer or what is chosen meets. */
export function warningsOf(
	upper: UpperAdjuster,
	found: Found,
	exact: AlignmentMoves | null,
	chosen: Chosen | null
): Warning[] {
	const told = upper.kind === 'shim' ? ofPacks(upper, found, exact, chosen) : ofThreads(upper, chosen);
	return chosen && !chosen.proved ? [...told, { code: 'unproved' }] : told;
}

function ofPacks(
	upper: Extract<UpperAdjuster, { kind: 'shim' }>,
	found: Found,
	exact: AlignmentMoves | null,
	chosen: Chosen | null
): Warning[] {
	const warnings: Warning[] = [];
	const wanted = exact && { front: found.frontNow + exact.front, rear: found.rearNow + exact.rear };
	for (const end of ENDS) {
		const pack = wanted?.[end] ?? 0;
		if (pack < -ROUNDING) warnings.push({ code: 'packBelowNothing', end, wanted: pack });
		if (pack > upper.maxPack + ROUNDING)
			warnings.push({ code: 'packOverLimit', end, wanted: pack, limit: upper.maxPack });
	}
	const difference = wanted ? Math.abs(wanted.front - wanted.rear) : 0;
	if (difference > upper.maxDifference + ROUNDING) {
		warnings.push({ code: 'difference', wanted: difference, limit: upper.maxDifference });
	}
	const ends = ENDS.map((end) => [end, chosen?.[end]] as const).filter((one): one is [End, EndSetting] => !!one[1]);
	for (const [end, { pack }] of ends) {
		const left = pack && threadPastNut(upper, end, pack.thickness);
		if (left !== null && left < LEAST_PAST_NUT - ROUNDING) {
			warnings.push({ code: 'bolt', end, left, least: LEAST_PAST_NUT });
		}
	}
	if (upper.boltReserve === null && ends.some(([, { growth }]) => growth > ROUNDING)) {
		warnings.push({ code: 'boltUnknown' });
	}
	if (chosen && ends.every(([, { pack }]) => pack?.pieces === 0) && (exact?.front || exact?.rear)) {
		warnings.push({ code: 'stockEmpty' });
	}
	return warnings;
}

function ofThreads(upper: Extract<UpperAdjuster, { kind: 'rodEnd' }>, chosen: Chosen | null): Warning[] {
	const thread = threadOf(upper.thread);
	if (!thread) return [{ code: 'threadUnknown', thread: upper.thread }];
	const { engagementNow, minEngagement, fitting } = upper;
	if (engagementNow === null) return [{ code: 'engagementUnknown' }];
	const least = minEngagement ?? usualEngagement(thread);
	return ENDS.flatMap((end): Warning[] => {
		const left = engagementAfter(engagementNow, chosen?.[end].growth ?? 0, fitting);
		return left < least - ROUNDING ? [{ code: 'engagement', end, left, least, usual: minEngagement === null }] : [];
	});
}
