import { textWidth, type Segment } from './dimension';
import type { Box } from './layout';

export const PLATE_HEAD = 20;
export const PLATE_LINE = 16;
const PLATE_PAD = 8;
const CLEAR = 22;

/** The size of a plate with a title and lines at 11 px. */
export function plateSize(title: string, lines: readonly string[], least = 0): { w: number; h: number } {
	const widest = Math.max(least, ...[title, ...lines].map((text) => textWidth(text)));
	return { w: Math.ceil(widest + 2 * PLATE_PAD), h: PLATE_HEAD + PLATE_LINE * lines.length + (lines.length ? 4 : 0) };
}

interface Spot2 {
	x: number;
	y: number;
}

/** What a plate should not hide. */
export interface Obstacles {
	marks: readonly Spot2[];
	bars?: readonly { segment: Segment }[];
	texts?: readonly Box[];
}

/** How much a plate at a place would hide: a figure weighs more than a mark, a mark more than a stretch of a bar. */
function hidden(at: Spot2, size: { w: number; h: number }, { marks, bars = [], texts = [] }: Obstacles): number {
	const inside = (px: number, py: number, margin: number) =>
		px > at.x - margin && px < at.x + size.w + margin && py > at.y - margin && py < at.y + size.h + margin;
	let cost = 0;
	for (const { x, y } of marks) if (inside(x, y, 10)) cost += 40;
	for (const { segment } of bars) {
		const [x1, y1, x2, y2] = segment;
		for (const t of ALONG) if (inside(x1 + (x2 - x1) * t, y1 + (y2 - y1) * t, 2)) cost += 12;
	}
	for (const box of texts) {
		const apart =
			box.x > at.x + size.w + 2 || box.x + box.w < at.x - 2 || box.y > at.y + size.h + 2 || box.y + box.h < at.y - 2;
		if (!apart) cost += 60;
	}
	return cost;
}

const ALONG = [0.1, 0.3, 0.5, 0.7, 0.9];
const STEP = 16;

/**
 * Where a plate stands beside a mark: of eight places about it, near ones first, the one inside the window that hides
 * the least; up and inboard before the rest. Kept inside the window where none fits.
 */
export function placePlate(
	window: Box,
	mark: Spot2,
	size: { w: number; h: number },
	clear: Obstacles,
	inboardLeft = true
): Spot2 {
	const left = mark.x - CLEAR - size.w;
	const right = mark.x + CLEAR;
	const sides = inboardLeft ? [left, right] : [right, left];
	const heights = [CLEAR, CLEAR * 2.6].flatMap((off) => [mark.y - off - size.h, mark.y + off]);
	const outside = ({ x, y }: Spot2) =>
		Math.max(0, window.x + 4 - x) +
		Math.max(0, x + size.w - (window.x + window.w - 4)) +
		Math.max(0, window.y + 4 - y) +
		Math.max(0, y + size.h - (window.y + window.h - 4));
	const costs = heights.flatMap((y, row) =>
		sides.map((x) => ({
			at: { x, y },
			cost: outside({ x, y }) * 10 + hidden({ x, y }, size, clear) + (row > 1 ? 8 : 0)
		}))
	);
	const best = costs.reduce((kept, one) => (one.cost < kept.cost ? one : kept));
	return {
		x: clamp(best.at.x, window.x + 4, window.x + window.w - size.w - 4),
		y: clamp(best.at.y, window.y + 4, window.y + window.h - size.h - 4)
	};
}

/** The freest place for a plate in a window, the nearer to `near` the better among equals. */
export function freePlace(window: Box, size: { w: number; h: number }, near: Spot2, clear: Obstacles): Spot2 {
	let best = { x: window.x + 8, y: window.y + 8 };
	let least = Infinity;
	for (let y = window.y + 28; y + size.h < window.y + window.h - 8; y += STEP) {
		for (let x = window.x + 8; x + size.w < window.x + window.w - 8; x += STEP) {
			const cost = hidden({ x, y }, size, clear) + Math.hypot(x + size.w / 2 - near.x, y + size.h / 2 - near.y) / 20;
			if (cost < least) [least, best] = [cost, { x, y }];
		}
	}
	return best;
}

const clamp = (value: number, low: number, high: number): number => Math.max(low, Math.min(Math.max(low, high), value));
