import { SHEET_PX_PER_MM } from '$lib/drawing/scale';

/** What is bolted together, mm along the bolt. Bracket, shaft foot, washer, nut and head are of a usual size, not of this car. */
export const PARTS = { head: 5, bracket: 5, foot: 9, washer: 1.6, nut: 7.5 } as const;
/** Half heights across the bolt, mm. */
export const HALF = { bolt: 4, head: 7, bracket: 13, shim: 10.5, foot: 8.5, washer: 8, nut: 7 } as const;
/** Thread past the nut where it is not known, mm: two and a half threads of 1.75 mm, the least there should be. */
export const USUAL_TAIL = 4.4;
const LONGEST_TAIL = 14;

/** Enlargements a section may have, largest first: n in n:1. */
export const ENLARGEMENTS = [5, 4, 3, 2.5, 2, 1.5, 1] as const;

const SIDE_ROOM = 10;
/** Under this many px a shim is filled, as thin parts in section are; hatching would not show. */
export const SOLID_UNDER = 5;

export interface StackSpec {
	/** Thickness of each shim, mm, from the bracket out. */
	readonly shims: readonly number[];
	/** Thread past the nut with this pack, mm; null where it is not known. */
	readonly tail: number | null;
	/** Whether the pivot shaft sits on the outboard side of its bracket. */
	readonly outboard: boolean;
	readonly width: number;
}

/** A part along the bolt, px, left edge and width on the page. */
export interface Slab {
	readonly x: number;
	readonly w: number;
}

export interface StackLayout {
	readonly enlargement: number;
	readonly pxPerMm: number;
	readonly head: Slab;
	readonly bracket: Slab;
	readonly shims: readonly Slab[];
	/** The whole pack; of no width where it is empty. */
	readonly pack: Slab;
	readonly foot: Slab;
	readonly washer: Slab;
	readonly nut: Slab;
	readonly tail: Slab;
}

function tailOf({ tail }: Pick<StackSpec, 'tail'>): number {
	return Math.min(Math.max(tail ?? USUAL_TAIL, 0), LONGEST_TAIL);
}

function lengthOf(spec: Pick<StackSpec, 'shims' | 'tail'>): number {
	const { head, bracket, foot, washer, nut } = PARTS;
	return head + bracket + spec.shims.reduce((sum, shim) => sum + shim, 0) + foot + washer + nut + tailOf(spec);
}

/** The largest enlargement at which all of these stacks fit their width: the sections of a sheet share one scale. */
export function sharedEnlargement(stacks: readonly StackSpec[]): number {
	const fits = (n: number) => stacks.every((one) => lengthOf(one) * n * SHEET_PX_PER_MM <= one.width - 2 * SIDE_ROOM);
	return ENLARGEMENTS.find(fits) ?? 1;
}

/** Where every part stands on the page; outboard is to the right, so an inboard shaft is laid out from right to left. */
export function layStack(spec: StackSpec, enlargement = sharedEnlargement([spec])): StackLayout {
	const pxPerMm = enlargement * SHEET_PX_PER_MM;
	const start = (spec.width - lengthOf(spec) * pxPerMm) / 2;
	let along = start;
	const next = (mm: number): Slab => {
		const w = mm * pxPerMm;
		const x = spec.outboard ? along : spec.width - along - w;
		along += w;
		return { x, w };
	};
	const head = next(PARTS.head);
	const bracket = next(PARTS.bracket);
	const packStart = along;
	const shims = spec.shims.map(next);
	const packWidth = along - packStart;
	const pack = { x: spec.outboard ? packStart : spec.width - packStart - packWidth, w: packWidth };
	return {
		enlargement,
		pxPerMm,
		head,
		bracket,
		shims,
		pack,
		foot: next(PARTS.foot),
		washer: next(PARTS.washer),
		nut: next(PARTS.nut),
		tail: next(tailOf(spec))
	};
}

/** A figure in the row above the pack: its middle, and whether a knee leads to it from its shim. */
export interface Label {
	readonly x: number;
	readonly width: number;
	readonly from: number;
}

/**
 * Spreads labels along a row so that none overlaps another, each as near its own place as can be and all within
 * [low, high]: neighbours that would overlap move apart together about the middle of their wishes.
 * @param wishes middles and widths, ascending by middle
 */
export function spread(
	wishes: readonly { at: number; width: number }[],
	gap: number,
	low: number,
	high: number
): Label[] {
	interface Group {
		first: number;
		count: number;
		/** Sum of the left edges each member would give the group. */
		sum: number;
		width: number;
	}
	const groups: Group[] = [];
	const leftOf = ({ sum, count, width }: Group) => Math.min(Math.max(sum / count, low), Math.max(low, high - width));
	wishes.forEach(({ at, width }, index) => {
		groups.push({ first: index, count: 1, sum: at - width / 2, width });
		for (
			let last = groups.at(-1), before = groups.at(-2);
			last && before;
			last = groups.at(-1), before = groups.at(-2)
		) {
			if (leftOf(before) + before.width + gap <= leftOf(last)) break;
			const shift = before.width + gap;
			before.sum += last.sum - last.count * shift;
			before.count += last.count;
			before.width += gap + last.width;
			groups.pop();
		}
	});
	return groups.flatMap((group) => {
		let x = leftOf(group);
		return wishes.slice(group.first, group.first + group.count).map(({ at, width }) => {
			const label = { x: x + width / 2, width, from: at };
			x += width + gap;
			return label;
		});
	});
}

/** 45° lines across a rectangle, clipped by arithmetic; `lean` +1 rises to the right. */
export function hatch(x: number, y: number, w: number, h: number, step: number, lean: 1 | -1): string {
	let path = '';
	for (let k = step / 2; k < w + h; k += step) {
		const [x1, y1] = k <= h ? [0, k] : [k - h, h];
		const [x2, y2] = k <= w ? [k, 0] : [w, k - w];
		const at = (px: number, py: number) => `${(x + px).toFixed(2)} ${(y + (lean > 0 ? py : h - py)).toFixed(2)}`;
		path += `M${at(x1, y1)}L${at(x2, y2)}`;
	}
	return path;
}

/** Pitch and depth with which the bolt's thread is drawn, mm. */
const PITCH = 1.75;
const DEPTH = 0.9;

/**
 * The bolt's thread past the nut: its outline, a V profile on both edges with a chamfered end, and the slanted lines of
 * its crests and roots. px; `end` +1 where the bolt ends to the right.
 */
export function threadPaths(
	tail: Slab,
	middle: number,
	pxPerMm: number,
	end: 1 | -1
): { outline: string; slants: string } {
	const turns = Math.max(1, Math.round(tail.w / (PITCH * pxPerMm)));
	const step = (end * tail.w) / turns;
	const start = end > 0 ? tail.x : tail.x + tail.w;
	const crest = HALF.bolt * pxPerMm;
	const root = crest - DEPTH * pxPerMm;
	const at = (x: number, y: number) => `${x.toFixed(2)} ${(middle + y).toFixed(2)}`;
	const upper = [at(start, -root)];
	const lower = [at(start, crest)];
	let slants = '';
	for (let i = 0; i < turns; i++) {
		const x = start + i * step;
		upper.push(at(x + step / 2, -crest), at(x + step, -root));
		lower.push(at(x + step / 2, root), at(x + step, i === turns - 1 ? root : crest));
		slants += `M${at(x + step / 2, -crest)}L${at(x, crest)}`;
		if (i > 0) slants += `M${at(x, -root)}L${at(x - step / 2, root)}`;
	}
	return { outline: `M${upper.join('L')}L${lower.reverse().join('L')}`, slants };
}

/** A hexagon seen from the side, its corners chamfered towards `outer` (+1: its right face), px. */
export function hexagon(slab: Slab, middle: number, half: number, outer: 1 | -1): { outline: string; edges: string } {
	const cut = Math.min(slab.w * 0.22, half * 0.22);
	const [inner, face] = outer > 0 ? [slab.x, slab.x + slab.w] : [slab.x + slab.w, slab.x];
	const shoulder = face - outer * cut;
	const [top, bottom] = [middle - half, middle + half];
	const outline = `M${inner} ${top}H${shoulder}L${face} ${top + cut}V${bottom - cut}L${shoulder} ${bottom}H${inner}Z`;
	const edges = `M${inner} ${middle - half / 2}H${face}M${inner} ${middle + half / 2}H${face}`;
	return { outline, edges };
}
