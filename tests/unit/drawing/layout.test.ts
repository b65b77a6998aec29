import { extentsOf, layoutSheet, orbitCentre, type Box, type SheetSpec } from '$lib/drawing/layout';
import { pxPerMm, scaleText, SCALES, SHEET_PX_PER_MM } from '$lib/drawing/scale';
import { describe, expect, it } from 'vitest';

const places = {
	upperFront: [72, 338, 446] as const,
	upperRear: [-118, 330, 432] as const,
	upperBall: [-22, 610, 474] as const,
	lowerFront: [150, 226, 206] as const,
	lowerRear: [-150, 232, 198] as const,
	lowerBall: [3, 652, 178] as const,
	tieRodInner: [-104, 268, 232] as const,
	tieRodOuter: [-128, 632, 222] as const
};
const extents = extentsOf(places, { centre: [0, 710, 290], tyre: { radius: 290, width: 185, shoulder: 30 } });
const at1440: SheetSpec = {
	width: 1224,
	height: 852,
	mode: 'full',
	angle: 'third',
	hand: 'left',
	extents,
	cell: 'curves'
};

const inside = (box: Box, { width, height }: SheetSpec) =>
	box.x >= -1e-9 && box.y >= -1e-9 && box.x + box.w <= width + 1e-9 && box.y + box.h <= height + 1e-9;
const apart = (a: Box, b: Box) =>
	a.x + a.w <= b.x + 1e-6 || b.x + b.w <= a.x + 1e-6 || a.y + a.h <= b.y + 1e-6 || b.y + b.h <= a.y + 1e-6;

describe('a sheet of several views', () => {
	const specs: SheetSpec[] = (['third', 'first'] as const).flatMap((angle) =>
		(['left', 'right'] as const).flatMap((hand) => [
			{ ...at1440, angle, hand },
			{ ...at1440, angle, hand, width: 1704, height: 1032 },
			{ ...at1440, angle, hand, width: 864, mode: 'narrow' as const },
			{ ...at1440, angle, hand, width: 864, mode: 'narrow' as const, cell: 'side' as const }
		])
	);

	it.each(specs)('lies wholly on the sheet, nothing over another ($angle, $hand, $width, $cell)', (spec) => {
		const layout = layoutSheet(spec);
		const boxes = [...Object.values(layout.views).map((view) => view.box), layout.title];
		if (layout.charts) boxes.push(layout.charts);
		if (layout.figures) boxes.push(layout.figures);
		for (const box of boxes) expect(inside(box, spec)).toBe(true);
		boxes.forEach((a, k) => boxes.slice(k + 1).forEach((b) => expect(apart(a, b)).toBe(true)));
	});

	it.each(specs)('has its views aligned by projection at one scale ($angle, $hand, $width, $cell)', (spec) => {
		const { views, scale, groundY } = layoutSheet(spec);
		const s = pxPerMm(scale);
		expect(views.front?.at.x).toBe(views.top?.at.x);
		expect(views.front?.at.y).toBe(groundY);
		if (views.side) expect(views.side.at.y).toBe(groundY);
		for (const key of ['front', 'top', 'side'] as const) if (views[key]) expect(views[key].at.pxPerMm).toBe(s);
	});

	it('puts the top view over the front view in third angle and under it in first', () => {
		const third = layoutSheet(at1440).views;
		const first = layoutSheet({ ...at1440, angle: 'first' }).views;
		expect((third.top?.box.y ?? 0) < (third.front?.box.y ?? 0)).toBe(true);
		expect((first.top?.box.y ?? 0) > (first.front?.box.y ?? 0)).toBe(true);
	});

	it('shows the side view from the centreline in third angle, from outside in first, for either corner', () => {
		for (const hand of ['left', 'right'] as const) {
			const outboard = hand === 'left' ? 1 : -1;
			expect((layoutSheet({ ...at1440, hand }).views.side?.frame.toward[1] ?? 0) * outboard).toBe(-1);
			expect((layoutSheet({ ...at1440, hand, angle: 'first' }).views.side?.frame.toward[1] ?? 0) * outboard).toBe(1);
		}
	});

	it('draws a road car at 1:5 on the sheet of a 1440 screen, and larger where there is room', () => {
		expect(layoutSheet(at1440).scale).toBe(5);
		expect(layoutSheet({ ...at1440, width: 1704, height: 1032 }).scale).toBe(4);
		expect(layoutSheet({ ...at1440, height: 620 }).scale).toBeGreaterThan(5);
	});

	it('keeps every mark inside its window', () => {
		const { views } = layoutSheet(at1440);
		for (const key of ['front', 'top', 'side'] as const) {
			const view = views[key];
			if (!view) throw new Error(key);
			for (const point of Object.values(places)) {
				const u = view.frame.right.reduce((sum, value, k) => sum + value * (point[k] ?? 0), 0);
				const v = view.frame.up.reduce((sum, value, k) => sum + value * (point[k] ?? 0), 0);
				const [x, y] = [view.at.x + u * view.at.pxPerMm, view.at.y - v * view.at.pxPerMm];
				expect(x > view.box.x && x < view.box.x + view.box.w && y > view.box.y && y < view.box.y + view.box.h).toBe(
					true
				);
			}
		}
	});
});

it.each(['front', 'top', 'side', 'orbit', 'curves'] as const)(
	'one thing at a time fills a narrow sheet: %s',
	(cell) => {
		for (const width of [390, 768]) {
			const spec: SheetSpec = { ...at1440, mode: 'single', width, height: width < 560 ? 380 : 520, cell };
			const layout = layoutSheet(spec);
			expect(Object.keys(layout.views)).toEqual(cell === 'curves' ? [] : [cell]);
			expect(layout.charts === null).toBe(cell !== 'curves');
			expect(inside(layout.title, spec)).toBe(true);
		}
	}
);

it('the room a corner takes moves in steps of 20 mm, so that small edits leave the sheet still', () => {
	const wheel = { centre: [0, 710, 290] as const, tyre: { radius: 290, width: 185, shoulder: 30 } };
	const nudged = extentsOf({ ...places, upperBall: [-21, 611, 475] }, wheel);
	expect(nudged).toEqual(extents);
	expect(extents.outboard % 20).toBe(0);
});

it('the orbit view turns about the middle of the corner, on its own side of the car', () => {
	expect(orbitCentre(extents, 'left')[1]).toBeGreaterThan(0);
	expect(orbitCentre(extents, 'right')[1]).toBe(-orbitCentre(extents, 'left')[1]);
});

describe('scale', () => {
	it('is true on paper: a printer’s point a pixel', () => {
		expect(SHEET_PX_PER_MM * 25.4).toBeCloseTo(72, 12);
		expect(pxPerMm(5) * 500).toBeCloseTo((100 / 25.4) * 72, 9);
	});

	it('is said with the zoom where a view is zoomed', () => {
		expect(scaleText(5)).toBe('1:5');
		expect(scaleText(2.5, 2)).toBe('1:2.5 × 2.0');
		expect([...SCALES]).toEqual([...SCALES].sort((a, b) => a - b));
	});
});
