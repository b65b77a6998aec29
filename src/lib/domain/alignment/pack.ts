import type { Shim } from '../../schemas/shims';
import { Allotter, TooLongError } from './allot';
import { packOf, shelfOf, type Pack } from './stock';

/** How far one wheel is off its targets, as a function of its two packs. */
export interface PackSide {
	/** For a front pack in mm: the largest miss relative to tolerance as a function of the rear pack in mm. */
	readonly along: (front: number) => (rear: number) => number;
	/** The miss changes by at most this much per mm of rear pack. */
	readonly steepness: number;
	/** Packs that can be judged at all, mm; any where absent. */
	readonly front?: readonly [number, number];
	readonly rear?: readonly [number, number];
}

export interface PackLimits {
	/** Thickest pack at one pivot, mm. */
	readonly maxPack: number;
	/** Largest difference between front and rear pack, mm. */
	readonly maxDifference: number;
}

export interface SidePacks {
	readonly front: Pack;
	readonly rear: Pack;
	/** Largest miss relative to tolerance: 1 is the edge of the tolerance. */
	readonly miss: number;
}

export interface PackAnswer {
	/** One entry for each side asked for, in its order. */
	readonly sides: readonly SidePacks[];
	/** False where the stock is so scarce that not every case could be looked at in time. */
	readonly proved: boolean;
}

/** Misses are equal when they agree to a billionth of the tolerance. */
const LEVEL = 1e9;
/** Work of looking at a pair, in steps of sharing out. */
const PAIR = 0.05;
/** mm; a difference of packs on its limit is within it. */
const ROUNDING = 1e-7;
/** Misses the first side is let have where the stock is shared in turn. */
const MISSES_TRIED = [0, 0.5, 1, 2, 4, 8];
/** Work allowed for one side then. */
const STEPS_IN_TURN = 20_000;
const HOPELESS = 1e6 * LEVEL;

interface Pair {
	readonly front: number;
	readonly rear: number;
	readonly level: number;
	readonly total: number;
	readonly fewest: number;
}

interface Found {
	readonly pairs: readonly [Pair, Pair];
	readonly worst: number;
	readonly other: number;
	readonly pieces: number;
	readonly total: number;
}

const NOTHING: Pair = { front: 0, rear: 0, level: 0, total: 0, fewest: 0 };

/**
 * The packs of one or two wheels from one stock with the least largest miss relative to tolerance. Order of merit: the
 * worse wheel's miss, then the other wheel's, then fewest pieces, then thinnest. Exact: every pair of sums the shelf can
 * make is judged or excluded by the bound on how fast the miss can change, and every pair within reach of the best is
 * shared out exactly.
 * @param mostSteps work allowed before the answer is given unproved
 * @returns null where no pack of this stock has a finite miss
 */
export function findPacks(
	sides: readonly [PackSide] | readonly [PackSide, PackSide],
	stock: readonly Shim[],
	limits: PackLimits,
	mostSteps = 50_000
): PackAnswer | null {
	const shelf = shelfOf(stock, limits.maxPack);
	const allotter = new Allotter(shelf, mostSteps);
	const best = sides.map((side) => bestLevel(side, allotter, limits));
	for (let reach = Math.max(...best); reach < HOPELESS; reach = reach * 1.7 + 0.05 * LEVEL) {
		try {
			const lists = sides.map((side) => pairsWithin(side, allotter, limits, reach));
			const found = settle(lists[0] ?? [], lists[1] ?? [NOTHING], allotter);
			if (found) return { sides: packsOf(found, sides.length, allotter), proved: true };
		} catch (error) {
			if (!(error instanceof TooLongError)) throw error;
			const packs = inTurn(sides, stock, limits);
			return packs && { sides: packs, proved: false };
		}
	}
	return null;
}

/** A found pair of pairs as packs, in the order of the sides. */
function packsOf(found: Found, sides: number, allotter: Allotter): SidePacks[] {
	const sums = found.pairs.flatMap((pair) => [pair.front, pair.rear]);
	const counts = allotter.allot(sums)?.counts ?? [];
	return found.pairs.slice(0, sides).map((pair, index) => ({
		front: packOf(allotter.shelf, counts[2 * index] ?? []),
		rear: packOf(allotter.shelf, counts[2 * index + 1] ?? []),
		miss: pair.level / LEVEL
	}));
}

/** The least miss one side can have with the whole shelf to itself, as a level. */
function bestLevel(side: PackSide, allotter: Allotter, limits: PackLimits): number {
	let best = Infinity;
	scan(
		side,
		allotter,
		limits,
		() => best,
		(level) => (best = Math.min(best, level))
	);
	return best;
}

/** All pairs of sums of one side whose miss is within reach, least miss first. */
function pairsWithin(side: PackSide, allotter: Allotter, limits: PackLimits, reach: number): Pair[] {
	const pairs: Pair[] = [];
	scan(
		side,
		allotter,
		limits,
		() => reach,
		(level, front, rear) => {
			allotter.spend(PAIR);
			const fewest = allotter.fewest(front) + allotter.fewest(rear);
			pairs.push({ front, rear, level, total: front + rear, fewest });
		}
	);
	return pairs.sort((a, b) => a.level - b.level || a.fewest - b.fewest || a.total - b.total);
}

/** Visits the pairs whose level is at most `reach()`, leaping over rear packs that cannot be. */
function scan(
	side: PackSide,
	{ sums, shelf }: Allotter,
	limits: PackLimits,
	reach: () => number,
	visit: (level: number, front: number, rear: number) => void
): void {
	const [leastFront, mostFront] = side.front ?? [0, Infinity];
	const [leastRear, mostRear] = side.rear ?? [0, Infinity];
	for (const front of sums) {
		const thickness = front * shelf.unit;
		if (thickness < leastFront - ROUNDING || thickness > mostFront + ROUNDING) continue;
		const missAt = side.along(thickness);
		const first = Math.max(leastRear, thickness - limits.maxDifference) - ROUNDING;
		const last = Math.min(mostRear, thickness + limits.maxDifference) + ROUNDING;
		let index = firstFrom(sums, first / shelf.unit);
		for (let rear = sums[index]; rear !== undefined && rear * shelf.unit <= last; rear = sums[index]) {
			const level = Math.round(missAt(rear * shelf.unit) * LEVEL);
			if (level <= reach()) {
				visit(level, front, rear);
				index += 1;
			} else {
				// One level is left over for rounding, so that no pair on the edge is leapt over.
				const leap = (level - reach() - 1) / LEVEL / (side.steepness * shelf.unit);
				index = Math.max(index + 1, firstFrom(sums, rear + leap));
			}
		}
	}
}

/** Index of the first sum that is at least `least`. */
function firstFrom(sums: readonly number[], least: number): number {
	let low = 0;
	let high = sums.length;
	while (low < high) {
		const middle = (low + high) >> 1;
		if ((sums[middle] ?? Infinity) < least) low = middle + 1;
		else high = middle;
	}
	return low;
}

/** The best two pairs, one of each list, that the shelf holds together; null where no two of these lists fit. */
function settle(left: readonly Pair[], right: readonly Pair[], allotter: Allotter): Found | null {
	const lightLeft = lightestSoFar(left);
	const lightRight = lightestSoFar(right);
	let [l, r] = [0, 0];
	while (l < left.length || r < right.length) {
		const level = Math.min(left[l]?.level ?? Infinity, right[r]?.level ?? Infinity);
		let best: Found | null = null;
		for (let worse = left[l]; worse?.level === level; worse = left[++l]) {
			best = withPartner(worse, right, lightRight, allotter, best, (a, b) => [a, b]);
		}
		for (let worse = right[r]; worse?.level === level; worse = right[++r]) {
			best = withPartner(worse, left, lightLeft, allotter, best, (a, b) => [b, a]);
		}
		if (best) return best;
	}
	return null;
}

/** Total thickness of the thinnest pair up to each place of a list. */
function lightestSoFar(list: readonly Pair[]): number[] {
	let least = Infinity;
	return list.map((pair) => (least = Math.min(least, pair.total)));
}

/** The best partner on the other side for a pair that is the worse of the two. */
function withPartner(
	worse: Pair,
	partners: readonly Pair[],
	lightest: readonly number[],
	allotter: Allotter,
	best: Found | null,
	order: (worse: Pair, partner: Pair) => [Pair, Pair]
): Found | null {
	const { kinds } = allotter.shelf;
	const thickness = kinds.reduce((sum, kind) => sum + kind.units * kind.count, 0);
	const pieces = kinds.reduce((sum, kind) => sum + kind.count, 0);
	if (worse.total + (lightest.at(-1) ?? 0) > thickness) return best;
	allotter.spend(PAIR);
	if (allotter.pieces([worse.front, worse.rear]) === null) return best;
	for (const partner of partners) {
		allotter.spend(PAIR);
		if (partner.level > Math.min(worse.level, best?.other ?? Infinity)) break;
		if (worse.total + partner.total > thickness || worse.fewest + partner.fewest > pieces) continue;
		const pairs = order(worse, partner);
		const used = allotter.pieces(pairs.flatMap((pair) => [pair.front, pair.rear]));
		if (used === null) continue;
		const found = { pairs, worst: worse.level, other: partner.level, pieces: used, total: worse.total + partner.total };
		if (!best || merit(found, best) < 0) best = found;
	}
	return best;
}

/** Below 0 where `a` is the better. */
function merit(a: Found, b: Found): number {
	return a.worst - b.worst || a.other - b.other || a.pieces - b.pieces || a.total - b.total;
}

/**
 * The answer where there is not time for every case: one side takes the thinnest packs within a miss, the other its best
 * from what is left; tried from both sides and at several misses, the best of them taken.
 */
function inTurn(sides: readonly PackSide[], stock: readonly Shim[], limits: PackLimits): SidePacks[] | null {
	const orders =
		sides.length === 1
			? [[0]]
			: [
					[0, 1],
					[1, 0]
				];
	const tries = orders.flatMap((order) => MISSES_TRIED.map((miss) => inOrder(sides, order, miss, stock, limits)));
	return tries.filter((packs) => packs !== null).sort((a, b) => worstMiss(a) - worstMiss(b))[0] ?? null;
}

/** Each side in its turn; null where that came to nothing in reasonable time. */
function inOrder(
	sides: readonly PackSide[],
	order: number[],
	miss: number,
	stock: readonly Shim[],
	limits: PackLimits
) {
	const packs: SidePacks[] = [];
	let left: readonly Shim[] = stock;
	try {
		for (const [turn, index] of order.entries()) {
			const side = sides[index];
			const taken = side && alone(side, left, limits, turn < order.length - 1 ? miss : 0);
			if (!taken) return null;
			packs[index] = taken;
			left = without(left, [taken.front, taken.rear]);
		}
	} catch (error) {
		if (error instanceof TooLongError) return null;
		throw error;
	}
	return packs;
}

function worstMiss(packs: readonly SidePacks[]): number {
	return Math.max(...packs.map((pack) => pack.miss));
}

/** One side's packs from this stock: the thinnest within `miss` of its targets, or its best where there is none. */
function alone(side: PackSide, stock: readonly Shim[], limits: PackLimits, miss: number): SidePacks | null {
	const shelf = shelfOf(stock, limits.maxPack);
	const allotter = new Allotter(shelf, STEPS_IN_TURN);
	const first = Math.max(miss * LEVEL, bestLevel(side, allotter, limits));
	for (let reach = first; reach < HOPELESS; reach = reach * 1.7 + 0.05 * LEVEL) {
		const pairs = pairsWithin(side, allotter, limits, reach);
		if (miss > 0) pairs.sort((a, b) => a.total - b.total);
		for (const pair of pairs) {
			const shared = allotter.allot([pair.front, pair.rear]);
			if (!shared) continue;
			const [front, rear] = shared.counts.map((counts) => packOf(shelf, counts));
			if (front && rear) return { front, rear, miss: pair.level / LEVEL };
		}
	}
	return null;
}

/** The stock less what these packs take. */
function without(stock: readonly Shim[], packs: readonly Pack[]): Shim[] {
	const taken = packs.flatMap((pack) => pack.lines.map((line) => ({ ...line })));
	return stock.map((shim) => {
		let count = shim.count;
		for (const line of taken) {
			if (Math.abs(line.thickness - shim.thickness) > 1e-9) continue;
			const used = Math.min(count, line.count);
			count -= used;
			line.count -= used;
		}
		return { ...shim, count };
	});
}
