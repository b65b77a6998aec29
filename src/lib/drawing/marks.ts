import type { MarkKind } from './linkage';

const ring = (r: number): string => `M${-r} 0a${r} ${r} 0 1 0 ${2 * r} 0a${r} ${r} 0 1 0 ${-2 * r} 0`;

/** Radius of a mark's outermost ring, px. */
export const MARK_OUTER: Readonly<Record<MarkKind, number>> = { pivot: 4, ball: 7, rod: 4 };

/** Path data of the rings about a mark's place: pivot one, ball joint two, rod joint one with a flat under it. */
export const MARK_RINGS: Readonly<Record<MarkKind, string>> = {
	pivot: ring(4),
	ball: ring(4) + ring(7),
	rod: `${ring(4)}M-4 4.6H4M-4 4.6V2M4 4.6V2`
};

/** Two ticks of 6 px at 45° that start just outside the rings. */
export const MARK_TICKS: Readonly<Record<MarkKind, string>> = {
	pivot: ticks(MARK_OUTER.pivot),
	ball: ticks(MARK_OUTER.ball),
	rod: ticks(MARK_OUTER.rod)
};

function ticks(outer: number): string {
	const [near, far] = [outer + 1.5, outer + 7.5].map((r) => (r * Math.SQRT1_2).toFixed(2));
	return `M${near} ${near}L${far} ${far}M-${near} -${near}L-${far} -${far}`;
}
