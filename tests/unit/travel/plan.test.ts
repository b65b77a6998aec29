import { describe, expect, it } from 'vitest';
import { ROW_FOOT, ROW_HEAD } from '$lib/charts/multiples';
import { planSheet, roomOf, type PlanSpec } from '$lib/components/travel/plan';
import { planViews } from '$lib/components/compare/plan';
import { exampleAxle } from '$lib/domain/example';
import { drawnEntry, tyreOf } from '$lib/drawing/corner';
import { extentsOf, type Box } from '$lib/drawing/layout';

const corner = drawnEntry(exampleAxle().left, 'left', tyreOf(310, '205/60R16'));
const room = roomOf(corner, -75, 75);
const spec = (width: number, charts: number, more: Partial<PlanSpec> = {}): PlanSpec => ({
	width,
	height: 760,
	charts,
	hand: 'left',
	room,
	...more
});
const apart = (a: Box, b: Box) =>
	a.x + a.w <= b.x + 0.5 || b.x + b.w <= a.x + 0.5 || a.y + a.h <= b.y + 0.5 || b.y + b.h <= a.y + 0.5;

describe('the travel sheet’s plan', () => {
	const widths = [1200, 1168, 1000, 784, 720, 640, 358];
	it.each(widths.flatMap((width) => [1, 4, 9, 22].map((charts) => [width, charts] as const)))(
		'at %i px with %i charts puts nothing on anything else, nor off the sheet',
		(width, count) => {
			const plan = planSheet(spec(width, count));
			const rows = Math.ceil(count / plan.charts.across);
			const charts = {
				x: plan.charts.x,
				y: plan.charts.y,
				w: plan.charts.w,
				h: rows * (ROW_HEAD + plan.charts.plot + ROW_FOOT)
			};
			const boxes = [plan.view, charts, plan.title, plan.notes, ...(plan.figures ? [plan.figures] : [])];
			for (const [k, box] of boxes.entries()) {
				expect(box.x).toBeGreaterThanOrEqual(0);
				expect(box.x + box.w).toBeLessThanOrEqual(width + 0.5);
				expect(box.y + box.h).toBeLessThanOrEqual(plan.height + 0.5);
				for (const other of boxes.slice(k + 1)) expect(apart(box, other)).toBe(true);
			}
			expect(plan.charts.plot).toBeGreaterThanOrEqual(100);
		}
	);

	it('puts three charts across at 1440, two at 768, one at 390', () => {
		expect([1200, 720, 358].map((width) => planSheet(spec(width, 9)).charts.across)).toEqual([3, 2, 1]);
	});

	it.each(widths)('keeps the corner inside its window at %i px, for either hand, over the whole travel', (width) => {
		for (const hand of ['left', 'right'] as const) {
			const { view, at } = planSheet(spec(width, 9, { hand }));
			const out = at.x + (hand === 'left' ? 1 : -1) * room.outboard * at.pxPerMm;
			for (const x of [at.x, out]) {
				expect(x).toBeGreaterThan(view.x);
				expect(x).toBeLessThan(view.x + view.w);
			}
			expect(at.y + room.drop * at.pxPerMm).toBeLessThan(view.y + view.h);
			expect(at.y - room.rise * at.pxPerMm).toBeGreaterThan(view.y);
		}
	});

	it('gives the list’s room to the view where the figures are not listed', () => {
		const [listed, bare] = [planSheet(spec(1168, 9)), planSheet(spec(1168, 9, { listed: false }))];
		expect(bare.figures).toBeNull();
		expect(bare.view.h).toBeGreaterThan(listed.view.h);
		expect(bare.at.pxPerMm).toBeGreaterThanOrEqual(listed.at.pxPerMm);
	});
});

describe('the plan of three views', () => {
	const extents = extentsOf(
		corner.places,
		corner.wheel ?? { centre: [0, 0, 0], tyre: { radius: 300, width: 190, shoulder: 30 } }
	);

	it.each([1200, 720, 640])('at %i px aligns them by projection in third angle', (width) => {
		for (const hand of ['left', 'right'] as const) {
			const plan = planViews({ width, hand, extents, drop: room.drop, rise: room.rise });
			const of = (view: string) => plan.views.find((one) => one.view === view);
			const [front, top, side] = [of('front'), of('top'), of('side')];
			expect(top?.at.x).toBe(front?.at.x);
			expect(side?.at.y).toBe(front?.at.y);
			expect((top?.box.y ?? 0) < (front?.box.y ?? 0)).toBe(true);
			expect((side?.box.x ?? 0) < (front?.box.x ?? 0)).toBe(hand === 'left');
			for (const { box } of plan.views) {
				expect(box.x).toBeGreaterThanOrEqual(0);
				expect(box.x + box.w).toBeLessThanOrEqual(width + 0.5);
			}
		}
	});

	it('stacks them on a phone, all at one scale', () => {
		const plan = planViews({ width: 358, hand: 'left', extents, drop: room.drop, rise: room.rise });
		const boxes = plan.views.map(({ box }) => box);
		expect(boxes.every(({ x, w }) => x === 0 && w === 358)).toBe(true);
		expect(new Set(plan.views.map(({ at }) => at.pxPerMm)).size).toBe(1);
		expect(plan.title.y + plan.title.h).toBeLessThanOrEqual(plan.height);
	});
});
