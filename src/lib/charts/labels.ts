/** A label that wants to stand centred at `at` and is `size` px long. */
export interface Wanted {
	at: number;
	size: number;
}

/**
 * Places for labels in one row, in the order given, moved apart as little as is needed (least squares of the moves)
 * and kept between `low` and `high` as far as they fit. Order along the row is kept by wanted place.
 */
export function spreadLabels(wanted: readonly Wanted[], gap: number, low: number, high: number): number[] {
	const order = wanted
		.map((label, index) => ({ label, index }))
		.sort((a, b) => a.label.at - b.label.at || a.index - b.index);
	// Pool adjacent violators: labels that touch become one block standing at the mean of what its members want.
	interface Block {
		members: typeof order;
		offsets: number[];
		length: number;
		centre: number;
	}
	const blocks: Block[] = [];
	for (const item of order) {
		let block: Block = {
			members: [item],
			offsets: [item.label.size / 2],
			length: item.label.size,
			centre: item.label.at
		};
		block.centre = clampCentre(block.centre, block.length, low, high);
		for (
			let last = blocks.at(-1);
			last && last.centre + last.length / 2 + gap > block.centre - block.length / 2;
			last = blocks.at(-1)
		) {
			blocks.pop();
			block = join(last, block);
		}
		blocks.push(block);
	}
	const places: number[] = new Array<number>(wanted.length).fill(0);
	for (const block of blocks) {
		const start = block.centre - block.length / 2;
		block.members.forEach((member, k) => (places[member.index] = start + (block.offsets[k] ?? 0)));
	}
	return places;

	function join(a: Block, b: Block): Block {
		const shift = a.length + gap;
		const members = [...a.members, ...b.members];
		const offsets = [...a.offsets, ...b.offsets.map((offset) => offset + shift)];
		const length = a.length + gap + b.length;
		const start = members.reduce((sum, member, k) => sum + member.label.at - (offsets[k] ?? 0), 0) / members.length;
		return { members, offsets, length, centre: clampCentre(start + length / 2, length, low, high) };
	}
}

function clampCentre(centre: number, length: number, low: number, high: number): number {
	if (length >= high - low) return (low + high) / 2;
	return Math.max(low + length / 2, Math.min(high - length / 2, centre));
}
