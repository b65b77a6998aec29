import type { Shim } from '../../schemas/shims';

/** One thickness of a pack: mm and how many. */
export interface PackLine {
	readonly thickness: number;
	readonly count: number;
}

/** A pack at one pivot: thickest first, as it is stacked against the bracket. */
export interface Pack {
	readonly lines: readonly PackLine[];
	/** mm */
	readonly thickness: number;
	readonly pieces: number;
}

/** The shelf as the search works on it: whole numbers of one unit of length, thickest first, no empty bins. */
export interface Shelf {
	/** mm */
	readonly unit: number;
	readonly kinds: readonly { readonly thickness: number; readonly units: number; readonly count: number }[];
	/** Longest pack looked at, in units. */
	readonly capacity: number;
}

const PICOMETRES = 1e9;
/** A table of this many sums is still made in a few milliseconds. */
const MOST_UNITS = 200_000;

function greatestDivisor(a: number, b: number): number {
	return b === 0 ? a : greatestDivisor(b, a % b);
}

/**
 * Puts the stock on one scale, so that sums of inch and metric shims compare exactly: the unit is the greatest common
 * divisor in picometres. Only where that would ask for a table of more than 200,000 sums, the unit is that fraction of
 * the longest pack (0.1 µm for 20 mm), which no shim is made to.
 * @param stock thickness in mm, counts
 * @param longest the longest pack looked at, mm
 */
export function shelfOf(stock: readonly Shim[], longest: number): Shelf {
	const counts = new Map<number, number>();
	for (const { thickness, count } of stock) {
		const picometres = Math.round(thickness * PICOMETRES);
		if (count > 0 && picometres > 0) counts.set(picometres, (counts.get(picometres) ?? 0) + count);
	}
	const whole = Math.floor(longest * PICOMETRES + 0.5);
	const fine = [...counts.keys()].reduce(greatestDivisor, 0) || PICOMETRES;
	const unit = Math.max(fine, Math.ceil(whole / MOST_UNITS));
	const kinds = [...counts]
		.map(([picometres, count]) => ({
			thickness: picometres / PICOMETRES,
			units: Math.max(1, Math.round(picometres / unit)),
			count
		}))
		.sort((a, b) => b.thickness - a.thickness);
	return { unit: unit / PICOMETRES, kinds, capacity: Math.floor(whole / unit) };
}

/** The pack that holds these numbers of each kind of the shelf. */
export function packOf(shelf: Shelf, counts: readonly number[]): Pack {
	const lines = shelf.kinds
		.map(({ thickness }, index) => ({ thickness, count: counts[index] ?? 0 }))
		.filter((line) => line.count > 0);
	return {
		lines,
		thickness: lines.reduce((sum, line) => sum + line.thickness * line.count, 0),
		pieces: lines.reduce((sum, line) => sum + line.count, 0)
	};
}
