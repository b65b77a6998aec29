import { angularDimension, arrowPath, ARROW_LENGTH, linearDimension, textBox, textWidth } from '$lib/drawing/dimension';
import { describe, expect, it } from 'vitest';

// Expected places follow from the drawing brief: extension lines leave 3 px and run 4 past, the figure stands in a
// break of the line, and arrows flip outside when the distance is short.

describe('a level dimension', () => {
	const wide = linearDimension({ from: [300, 100], to: [100, 100], run: 'level', at: 160, textWidth: 50 });

	it('leaves a gap at the object and runs past the line', () => {
		expect(wide.extension).toEqual([
			[100, 103, 100, 164],
			[300, 103, 300, 164]
		]);
	});

	it('is broken about its figure, arrows at both ends pointing out', () => {
		expect(wide.outside).toBe(false);
		expect(wide.line).toEqual([
			[100, 160, 171, 160],
			[229, 160, 300, 160]
		]);
		expect(wide.arrows.map(({ x, angle }) => [x, Math.round(Math.cos(angle))])).toEqual([
			[100, -1],
			[300, 1]
		]);
		expect(wide.text).toEqual({ x: 200, y: 160, anchor: 'middle' });
	});

	it('flips outside when short: arrows point in, the figure stands beyond the named end', () => {
		const short = linearDimension({ from: [100, 100], to: [120, 100], run: 'level', at: 160, textWidth: 50, side: -1 });
		expect(short.outside).toBe(true);
		expect(short.arrows.map(({ x, angle }) => [x, Math.round(Math.cos(angle))])).toEqual([
			[100, 1],
			[120, -1]
		]);
		expect(short.text.anchor).toBe('end');
		expect(short.text.x).toBeLessThan(100 - ARROW_LENGTH);
		const other = linearDimension({ from: [100, 100], to: [120, 100], run: 'level', at: 160, textWidth: 50 });
		expect(other.text.anchor).toBe('start');
		expect(other.text.x).toBeGreaterThan(120 + ARROW_LENGTH);
	});

	it('has no extension line where the object lies on the dimension line', () => {
		expect(linearDimension({ from: [0, 10], to: [200, 10], run: 'level', at: 10, textWidth: 20 }).extension).toEqual(
			[]
		);
	});

	it('changes sides exactly where figure, arrows and a stub of line no longer fit', () => {
		const span = (length: number) =>
			linearDimension({ from: [0, 0], to: [length, 0], run: 'level', at: 20, textWidth: 40 }).outside;
		expect(span(76)).toBe(false);
		expect(span(75.9)).toBe(true);
	});
});

it('an upright dimension keeps its figure level and needs only its height', () => {
	const tall = linearDimension({ from: [10, 200], to: [30, 140], run: 'upright', at: 50, textWidth: 90 });
	expect(tall.outside).toBe(false);
	expect(tall.text).toEqual({ x: 50, y: 170, anchor: 'middle' });
	expect(tall.extension).toEqual([
		[33, 140, 54, 140],
		[13, 200, 54, 200]
	]);
});

describe('an angle', () => {
	it('is an arc broken about its figure where it is long enough', () => {
		const wide = angularDimension({
			centre: [0, 0],
			radius: 200,
			from: -Math.PI / 2 - 0.6,
			to: -Math.PI / 2,
			textWidth: 40
		});
		expect(wide.outside).toBe(false);
		expect(wide.arcs).toHaveLength(2);
		expect(Math.hypot(wide.text.x, wide.text.y)).toBeCloseTo(200, 9);
		expect(Math.atan2(wide.text.y, wide.text.x)).toBeCloseTo(-Math.PI / 2 - 0.3, 9);
	});

	it('has its arrow tips on the two rays, whichever is given first', () => {
		for (const [from, to] of [
			[-1.7, -1.5],
			[-1.5, -1.7]
		] as const) {
			const { arrows } = angularDimension({ centre: [5, 5], radius: 100, from, to, textWidth: 60 });
			const angles = arrows.map(({ x, y }) => Math.atan2(y - 5, x - 5)).sort((a, b) => a - b);
			expect(angles[0]).toBeCloseTo(-1.7, 9);
			expect(angles[1]).toBeCloseTo(-1.5, 9);
		}
	});

	it('stands its figure beyond the named ray when short', () => {
		const lean = { centre: [0, 0] as const, radius: 100, from: -Math.PI / 2 - 0.1, to: -Math.PI / 2, textWidth: 60 };
		expect(angularDimension({ ...lean, side: 'from' }).text).toMatchObject({ anchor: 'end' });
		expect(angularDimension({ ...lean, side: 'to' }).text).toMatchObject({ anchor: 'start' });
	});
});

it('an arrow head is a slim triangle with its tip where it points', () => {
	const numbers = (arrowPath({ x: 10, y: 20, angle: 0 }).match(/-?[\d.]+/g) ?? []).map(Number);
	expect(numbers).toEqual([10, 20, 1, 21.6, 1, 18.4]);
});

it('a fixed-pitch text is as wide as its glyphs: 0.6 em each in JetBrains Mono', () => {
	expect(textWidth('−0.75°')).toBeCloseTo(6 * 6.6, 9);
	expect(textWidth('≈12 3/8', 13)).toBeCloseTo(7 * 7.8, 9);
});

it('the room of a figure follows its anchor', () => {
	const layout = { extension: [], line: [], arcs: [], arrows: [], outside: false };
	expect(textBox({ ...layout, text: { x: 50, y: 10, anchor: 'end' } }, 20)).toEqual({ x: 30, y: 2, w: 20, h: 16 });
	expect(textBox({ ...layout, text: { x: 50, y: 10, anchor: 'middle' } }, 20)).toEqual({ x: 40, y: 2, w: 20, h: 16 });
});
