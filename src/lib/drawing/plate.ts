import { textWidth } from './dimension';
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

/**
 * Where a plate stands beside a mark: of the four corners about it the one inside the window that covers the fewest
 * marks and the fewest figures, up and inboard first. Kept inside the window where none fits.
 */
export function placePlate(
	window: Box,
	mark: { x: number; y: number },
	size: { w: number; h: number },
	others: readonly { x: number; y: number }[],
	texts: readonly Box[] = [],
	inboardLeft = true
): { x: number; y: number } {
	const left = mark.x - CLEAR - size.w;
	const right = mark.x + CLEAR;
	const [first, second] = inboardLeft ? [left, right] : [right, left];
	const candidates = [
		{ x: first, y: mark.y - CLEAR - size.h },
		{ x: second, y: mark.y - CLEAR - size.h },
		{ x: first, y: mark.y + CLEAR },
		{ x: second, y: mark.y + CLEAR }
	];
	const covers = ({ x, y }: { x: number; y: number }) =>
		others.filter((one) => one.x > x - 10 && one.x < x + size.w + 10 && one.y > y - 10 && one.y < y + size.h + 10).length;
	const hides = ({ x, y }: { x: number; y: number }) =>
		texts.filter((box) => box.x < x + size.w + 2 && box.x + box.w > x - 2 && box.y < y + size.h + 2 && box.y + box.h > y - 2).length;
	const outside = ({ x, y }: { x: number; y: number }) =>
		Math.max(0, window.x + 4 - x) +
		Math.max(0, x + size.w - (window.x + window.w - 4)) +
		Math.max(0, window.y + 4 - y) +
		Math.max(0, y + size.h - (window.y + window.h - 4));
	const cost = (at: { x: number; y: number }) => outside(at) * 10 + covers(at) * 40 + hides(at) * 60;
	const best = candidates.reduce((kept, one) => (cost(one) < cost(kept) ? one : kept));
	return {
		x: clamp(best.x, window.x + 4, window.x + window.w - size.w - 4),
		y: clamp(best.y, window.y + 4, window.y + window.h - size.h - 4)
	};
}

const clamp = (value: number, low: number, high: number): number => Math.max(low, Math.min(Math.max(low, high), value));
