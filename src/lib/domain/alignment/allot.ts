import type { Shelf } from './stock';

/** What several packs of given sums take from one shelf: `counts[pack][kind]`. */
export interface Allotment {
	readonly pieces: number;
	readonly counts: readonly (readonly number[])[];
}

const NONE = 0xffff;

/** The search took more steps than it was given. */
export class TooLongError extends Error {}

/**
 * Shares one shelf between packs whose sums are given. Exact: a depth-first search over the kinds, thickest first,
 * that leaves a branch only where the fewest pieces each pack would need by itself already exceed what is allowed.
 */
export class Allotter {
	/** Sums a pack can have at all, in units, ascending. */
	readonly sums: readonly number[];
	/** `fewest[kind][sum]`: fewest pieces of this kind and the thinner ones that make the sum. */
	readonly #fewest: readonly Uint16Array[];
	readonly #memo = new Map<string, { found: number | null; refused: number }>();
	#steps = 0;

	constructor(
		readonly shelf: Shelf,
		readonly mostSteps: number
	) {
		this.#fewest = fewestPieces(shelf);
		const sums: number[] = [];
		this.#fewest[0]?.forEach((pieces, sum) => pieces !== NONE && sums.push(sum));
		this.sums = sums;
	}

	/** Fewest pieces of one pack of that sum by itself, the shelf full; Infinity where it cannot be made. */
	fewest(sum: number): number {
		return this.#bound(0, [sum]);
	}

	/** Fewest pieces that make all the sums together; null where the shelf does not hold them. */
	pieces(sums: readonly number[]): number | null {
		const found = this.#search(0, sums, NONE);
		return Number.isFinite(found) ? found : null;
	}

	/** The packs themselves, or null where the shelf does not hold them. */
	allot(sums: readonly number[]): Allotment | null {
		const pieces = this.pieces(sums);
		if (pieces === null) return null;
		const counts = sums.map((): number[] => []);
		let rest = [...sums];
		let allowed = pieces;
		for (let kind = 0; kind < this.shelf.kinds.length; kind++) {
			const taken = this.#optionsOf(kind, rest, allowed).find(
				(option) => option.used + this.#search(kind + 1, option.rest, allowed - option.used) <= allowed
			);
			if (!taken) throw new Error('An allotment that was found could not be traced back.');
			taken.taken.forEach((count, pack) => counts[pack]?.push(count));
			rest = taken.rest;
			allowed -= taken.used;
		}
		return { pieces, counts };
	}

	/** Counts work done, here or by who searches with it; throws a TooLongError when it is more than was given. */
	spend(steps: number): void {
		this.#steps += steps;
		if (this.#steps > this.mostSteps) throw new TooLongError();
	}

	#bound(kind: number, rest: readonly number[]): number {
		const table = this.#fewest[kind];
		let bound = 0;
		for (const sum of rest) {
			const pieces = table?.[sum] ?? NONE;
			if (pieces === NONE) return Infinity;
			bound += pieces;
		}
		return bound;
	}

	/** Fewest pieces from `kind` on that make `rest`, if at most `allowed`; else Infinity. */
	#search(kind: number, rest: readonly number[], allowed: number): number {
		const bound = this.#bound(kind, rest);
		if (bound > allowed) return Infinity;
		if (kind === this.shelf.kinds.length) return 0;
		const key = `${kind}:${[...rest].sort((a, b) => a - b).join()}`;
		const known = this.#memo.get(key);
		if (known && known.found !== null) return known.found <= allowed ? known.found : Infinity;
		if (known && allowed <= known.refused) return Infinity;
		this.spend(1);
		let best = Infinity;
		for (const option of this.#optionsOf(kind, rest, allowed)) {
			const limit = Math.min(allowed, best - 1) - option.used;
			best = Math.min(best, option.used + this.#search(kind + 1, option.rest, limit));
			if (best === bound) break;
		}
		this.#memo.set(key, Number.isFinite(best) ? { found: best, refused: -1 } : { found: null, refused: allowed });
		return best;
	}

	/** Every way to give the packs pieces of one kind that may still end within `allowed`, most promising first. */
	#optionsOf(kind: number, rest: readonly number[], allowed: number): Option[] {
		const { units, count } = this.shelf.kinds[kind] ?? { units: 1, count: 0 };
		let options: Option[] = [{ taken: [], rest: [], used: 0, bound: 0 }];
		rest.forEach((sum, pack) => {
			const longer: Option[] = [];
			for (const option of options) {
				// Two packs of the same sum are one case; the fuller one goes first.
				const most = sum === rest[pack - 1] ? (option.taken[pack - 1] ?? 0) : Infinity;
				for (let take = 0; take <= Math.min(most, count - option.used) && take * units <= sum; take++) {
					const left = sum - take * units;
					const bound = option.bound + take + this.#bound(kind + 1, [left]);
					if (bound > allowed) continue;
					longer.push({
						taken: [...option.taken, take],
						rest: [...option.rest, left],
						used: option.used + take,
						bound
					});
				}
			}
			options = longer;
		});
		return options.sort((a, b) => a.bound - b.bound);
	}
}

interface Option {
	readonly taken: number[];
	readonly rest: number[];
	readonly used: number;
	/** Fewest pieces in all if this is taken. */
	readonly bound: number;
}

/** Bounded coin change, thinnest kind first; the last table is the empty shelf. */
function fewestPieces({ kinds, capacity }: Shelf): Uint16Array[] {
	let below = new Uint16Array(capacity + 1).fill(NONE);
	below[0] = 0;
	const tables = [below];
	let reached = [0];
	for (const { units, count } of [...kinds].reverse()) {
		const table = Uint16Array.from(below);
		const added: number[] = [];
		for (const start of reached) {
			const pieces = below[start] ?? NONE;
			for (let take = 1, sum = start + units; take <= count && sum <= capacity; take++, sum += units) {
				const known = table[sum] ?? NONE;
				if (known === NONE) added.push(sum);
				if (pieces + take < known) table[sum] = pieces + take;
			}
		}
		reached = [...reached, ...added];
		below = table;
		tables.unshift(table);
	}
	return tables;
}
