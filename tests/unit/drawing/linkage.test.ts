import { axisAtHeight, BARS, coilOver, markUnder, placeBars, placeMarks, type PlacedMark } from '$lib/drawing/linkage';
import { freePlace, placePlate, plateSize } from '$lib/drawing/plate';
import { viewFrame } from '$lib/drawing/projection';
import { tyreBreaks } from '$lib/drawing/scene';
import { layTrammel, readTrammel } from '$lib/drawing/trammel';
import type { Vec3 } from '$lib/kinematics';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

const front = viewFrame('front', 'third', 'left');
const at = { x: 100, y: 500, pxPerMm: 0.5 };

describe('bars and marks', () => {
	it('a bar is drawn when both of its marks have a place', () => {
		const bars = placeBars(front, at, {
			lowerBall: [0, 600, 200],
			upperBall: [0, 600, 480],
			upperFront: [90, 340, 450]
		});
		expect(bars.map(({ key }) => key)).toEqual(['upperArmFront', 'upright']);
		expect(bars[1]?.segment).toEqual([400, 400, 400, 260]);
		expect(placeBars(front, at, {})).toEqual([]);
		expect(new Set(BARS.map(({ key }) => key)).size).toBe(BARS.length);
	});

	it('a mark nearer the eye is deeper toward it', () => {
		const [near, far] = placeMarks(front, at, { lowerFront: [150, 230, 200], lowerRear: [-150, 230, 200] });
		expect((near?.depth ?? 0) > (far?.depth ?? 0)).toBe(true);
		expect([near?.x, near?.y]).toEqual([far?.x, far?.y]);
	});
});

describe('the mark meant by a press', () => {
	const marks: PlacedMark[] = [
		{ key: 'lowerFront', x: 100, y: 100, depth: 150 },
		{ key: 'lowerRear', x: 103, y: 101, depth: -150 },
		{ key: 'upperBall', x: 160, y: 100, depth: 0 }
	];

	it('is the nearest within reach, none beyond it', () => {
		expect(markUnder(marks, 158, 104, 16, null)).toBe('upperBall');
		expect(markUnder(marks, 130, 130, 16, null)).toBeNull();
	});

	it('of two that lie on one another is the one held; pressed again, the next behind', () => {
		expect(markUnder(marks, 101, 100, 16, null)).toBe('lowerFront');
		expect(markUnder(marks, 101, 100, 16, 'lowerRear')).toBe('lowerRear');
		expect(markUnder(marks, 101, 100, 16, 'lowerFront', true)).toBe('lowerRear');
		expect(markUnder(marks, 101, 100, 16, 'lowerRear', true)).toBe('lowerFront');
	});
});

it('the steering axis is found at a height, and nowhere when it runs level', () => {
	const foot = axisAtHeight([0, 660, 180], [-20, 620, 480], 0);
	// Straight on: 180 of 300 mm of rise more, so 0.6 of the run below the lower ball joint.
	expect(foot?.[0]).toBeCloseTo(12, 9);
	expect(foot?.[1]).toBeCloseTo(684, 9);
	expect(axisAtHeight([0, 600, 200], [0, 700, 200], 0)).toBeNull();
});

it('a coil-over that is seen end on is not drawn as a coil', () => {
	expect(coilOver([0, 0], [3, 3], 10)).toEqual({ axis: '', coil: '', seats: '' });
	expect(coilOver([0, 0], [0, 200], 10).coil).not.toBe('');
});

describe('the trammel', () => {
	const a: Vec3 = [150, 230, 200];
	const b: Vec3 = [-120, 340, 430];

	it('reads the true length, and equal diagonals on a car that mirrors', () => {
		const reading = readTrammel(a, b, null, 'left');
		expect(reading.length).toBeCloseTo(Math.hypot(270, 110, 230), 9);
		expect(reading.otherLength).toBeCloseTo(reading.length, 12);
		// From y 230 on one side to y −340 on the other: 570 across.
		expect(reading.leftToRight).toBeCloseTo(Math.hypot(270, 570, 230), 9);
		expect(reading.difference).toBe(0);
	});

	it('reads the difference of the diagonals where the sides differ, left to right first', () => {
		const right = [
			[150, -230, 200],
			[-115, -340, 430]
		] as const;
		const there = Math.hypot(265, 570, 230);
		const back = Math.hypot(270, 570, 230);
		expect(readTrammel(a, b, right, 'left').difference).toBeCloseTo(there - back, 9);
		// The same car from the other corner says the same of left and right.
		expect(readTrammel(right[0], right[1], [a, b], 'right').difference).toBeCloseTo(there - back, 9);
	});

	it('is drawn with its legs on the two points and the figure in a break of the beam', () => {
		fc.assert(
			fc.property(
				fc.double({ min: -3.1, max: 3.1, noNaN: true }),
				fc.double({ min: 120, max: 500, noNaN: true }),
				(angle, length) => {
					const from = [300, 300] as const;
					const to = [300 + length * Math.cos(angle), 300 + length * Math.sin(angle)] as const;
					const laid = layTrammel(from, to, 40);
					const tips = [...laid.legs.matchAll(/M[^L]+L(-?[\d.]+) (-?[\d.]+)L/g)].map((match) => [
						Number(match[1]),
						Number(match[2])
					]);
					expect(tips).toHaveLength(2);
					expect(tips[0]?.[0]).toBeCloseTo(from[0], 1);
					expect(tips[1]?.[1]).toBeCloseTo(to[1], 1);
					expect(laid.short).toBe(false);
					// No edge of the beam runs through the figure.
					for (const [x1, y1, x2, y2] of laid.beam) {
						for (const t of [0, 0.25, 0.5, 0.75, 1]) {
							const [x, y] = [x1 + (x2 - x1) * t, y1 + (y2 - y1) * t];
							expect(Math.abs(x - laid.text[0]) < 19.9 && Math.abs(y - laid.text[1]) < 6.9).toBe(false);
						}
					}
				}
			)
		);
	});

	it('keeps the beam whole and the figure outside where the pair is close', () => {
		const laid = layTrammel([100, 100], [112, 100], 40);
		expect(laid.short).toBe(true);
		expect(laid.beam).toHaveLength(2);
		expect(laid.text[1]).toBeLessThan(100 - 20);
	});
});

describe('plates', () => {
	const window = { x: 0, y: 0, w: 500, h: 400 };
	const size = plateSize('upper ball joint', ['618.0 out  474.0 up  22.0 aft']);

	it('are as wide as their longest line', () => {
		expect(size.w).toBe(Math.ceil(29 * 6.6 + 16));
	});

	it('stay inside the window wherever the mark is', () => {
		fc.assert(
			fc.property(
				fc.double({ min: -50, max: 550, noNaN: true }),
				fc.double({ min: -50, max: 450, noNaN: true }),
				(x, y) => {
					const spot = placePlate(window, { x, y }, size, { marks: [] });
					expect(spot.x >= 0 && spot.y >= 0 && spot.x + size.w <= 500 && spot.y + size.h <= 400).toBe(true);
				}
			)
		);
	});

	it('leave marks and figures free where there is another place', () => {
		const mark = { x: 250, y: 200 };
		const usual = placePlate(window, mark, size, { marks: [] });
		const blocked = { x: usual.x + 40, y: usual.y + 20 };
		const other = placePlate(window, mark, size, { marks: [blocked] });
		expect(other).not.toEqual(usual);
		const free = freePlace(window, size, mark, { marks: [mark, blocked] });
		for (const one of [mark, blocked]) {
			expect(one.x > free.x && one.x < free.x + size.w && one.y > free.y && one.y < free.y + size.h).toBe(false);
		}
	});
});

describe('a tyre that its window cuts off', () => {
	const tyre = { edge: '', circles: '', x1: 100, x2: 200, y1: -20, y2: 380 };

	it('is broken where it runs out, with the drawing kept between the breaks', () => {
		const both = tyreBreaks(tyre, { x: 0, y: 0, w: 400, h: 360 });
		expect(both?.path.match(/M/g)).toHaveLength(2);
		expect([both?.top, both?.foot]).toEqual([7, 353]);
		const foot = tyreBreaks({ ...tyre, y1: 10 }, { x: 0, y: 0, w: 400, h: 360 });
		expect(foot?.path.match(/M/g)).toHaveLength(1);
		expect([foot?.top, foot?.foot]).toEqual([0, 353]);
	});

	it('is whole where the window holds it', () => {
		expect(tyreBreaks({ ...tyre, y1: 10, y2: 350 }, { x: 0, y: 0, w: 400, h: 360 })).toBeNull();
	});
});
