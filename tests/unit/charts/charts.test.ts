import { spreadLabels } from '$lib/charts/labels';
import { columnsFor, layCharts, reachable, slideKey, type ChartSpec, type TravelSpec } from '$lib/charts/multiples';
import { bandPath, curveEnd, uprightPath } from '$lib/charts/path';
import {
	chartDomain,
	inverse,
	linear,
	readableTicks,
	roundOutward,
	seriesLook,
	SERIES_LOOK,
	tickDecimals,
	valueAt,
	type Series
} from '$lib/charts/scale';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

const series = (values: (number | null)[]): Series => ({
	key: 'a',
	label: 'draft',
	seriesIndex: 0,
	points: values.map((value, k) => ({ travel: -50 + k * 25, value }))
});

describe('scales', () => {
	it('have five to seven ticks on any domain that a chart is given', () => {
		fc.assert(
			fc.property(
				fc.double({ min: -1e4, max: 1e4, noNaN: true }),
				fc.double({ min: 1e-3, max: 1e4, noNaN: true }),
				(low, span) => {
					const domain = roundOutward([low, low + span]);
					expect(domain[0]).toBeLessThanOrEqual(low + span * 1e-6);
					expect(domain[1]).toBeGreaterThanOrEqual(low + span * (1 - 1e-6));
					const ticks = readableTicks(domain);
					expect(ticks.length).toBeGreaterThanOrEqual(4);
					expect(ticks.length).toBeLessThanOrEqual(7);
					for (const tick of ticks)
						expect(tick >= domain[0] - span * 1e-6 && tick <= domain[1] + span * 1e-6).toBe(true);
				}
			)
		);
	});

	it('put travel’s ticks on its ends', () => {
		expect(readableTicks([-75, 75])).toEqual([-75, -50, -25, 0, 25, 50, 75]);
	});

	it('show as many decimals as the step has', () => {
		expect(tickDecimals([-0.5, 0, 0.5])).toBe(1);
		expect(tickDecimals([0, 50, 100])).toBe(0);
		expect(tickDecimals([0, 0.25])).toBe(2);
	});

	it('cover curves, bands and what must be inside, and never less than the least spread', () => {
		const domain = chartDomain([series([-1, -0.8, -0.5])], [{ from: -25, to: 25, low: -2, high: null }], {
			least: 1,
			include: [0]
		});
		expect(domain?.[0]).toBeLessThanOrEqual(-2);
		expect(domain?.[1]).toBeGreaterThanOrEqual(0);
		const flat = chartDomain([series([3, 3, 3])], [], { least: 0.5 });
		expect((flat?.[1] ?? 0) - (flat?.[0] ?? 0)).toBeGreaterThanOrEqual(0.5);
		expect(chartDomain([series([null, null])], [], { least: 1, include: [0] })).toBeNull();
	});

	it('go there and back', () => {
		const x = linear([-2, 6], [100, 20]);
		expect(x(-2)).toBe(100);
		expect(x(6)).toBe(20);
		expect(inverse([-2, 6], [100, 20])(x(1.25))).toBeCloseTo(1.25, 12);
	});
});

describe('curves', () => {
	const x = linear([0, 10], [0, 100]);
	const y = linear([-50, 50], [200, 0]);

	it('run up the page with travel, and break where a value is missing', () => {
		const path = uprightPath(series([1, 2, null, 4, 5]).points, x, y);
		expect(path.match(/M/g)).toHaveLength(2);
		expect(path.startsWith('M10,200')).toBe(true);
		expect(path).not.toContain('NaN');
	});

	it('a missing value is never drawn as nothing', () => {
		expect(uprightPath(series([null, null]).points, x, y)).toBe('');
	});

	it('end at the last point that has a value', () => {
		const { points } = series([null, 2, 3, null, null]);
		expect(curveEnd(points, 'bump')).toEqual({ travel: 0, value: 3 });
		expect(curveEnd(points, 'droop')).toEqual({ travel: -25, value: 2 });
		expect(curveEnd(series([null]).points, 'bump')).toBeNull();
	});

	it('are read between their points, not across a gap or beyond their ends', () => {
		const { points } = series([0, 10, null, 20]);
		expect(valueAt(points, -37.5)).toBe(5);
		expect(valueAt(points, -10)).toBeNull();
		expect(valueAt(points, 99)).toBeNull();
	});

	it('a band’s hooks point inward, whichever way the scale runs', () => {
		const band = { from: -25, to: 25, low: 2, high: 4 };
		expect(bandPath(band, 'low', x, y)).toBe('M25 150H20V50H25');
		expect(bandPath(band, 'high', x, y)).toBe('M35 150H40V50H35');
		expect(bandPath({ ...band, low: null }, 'low', x, y)).toBe('');
	});
});

describe('end labels', () => {
	const label = fc.record({
		at: fc.double({ min: 0, max: 300, noNaN: true }),
		size: fc.double({ min: 5, max: 45, noNaN: true })
	});

	it('never overlap, keep their order, and stay in the row where they fit', () => {
		fc.assert(
			fc.property(fc.array(label, { minLength: 1, maxLength: 5 }), (wanted) => {
				const places = spreadLabels(wanted, 4, 0, 320);
				const order = wanted.map((one, k) => ({ ...one, place: places[k] ?? 0 })).sort((a, b) => a.place - b.place);
				order.slice(1).forEach((one, k) => {
					const before = order[k];
					if (!before) return;
					expect(one.place - one.size / 2).toBeGreaterThanOrEqual(before.place + before.size / 2 + 4 - 1e-6);
					expect(one.at).toBeGreaterThanOrEqual(before.at - 1e-9);
				});
				for (const one of order)
					expect(one.place - one.size / 2 >= -1e-6 && one.place + one.size / 2 <= 320 + 1e-6).toBe(true);
			})
		);
	});

	it('stay where they want to be when they are apart', () => {
		expect(
			spreadLabels(
				[
					{ at: 200, size: 20 },
					{ at: 50, size: 20 }
				],
				4,
				0,
				300
			)
		).toEqual([200, 50]);
	});

	it('move apart evenly about what they want', () => {
		expect(
			spreadLabels(
				[
					{ at: 100, size: 20 },
					{ at: 100, size: 20 }
				],
				4,
				0,
				300
			)
		).toEqual([88, 112]);
	});
});

describe('the travel slide', () => {
	const travel: TravelSpec = {
		domain: [-75, 75],
		at: 10,
		low: null,
		high: { travel: 62.5, reason: 'upper arm binds' },
		format: String,
		unit: 'mm',
		step: 1,
		fine: 0.1
	};

	it('stays where the mechanism reaches', () => {
		expect(reachable(travel)).toEqual([-75, 62.5]);
		expect(slideKey('End', false, travel)).toBe(62.5);
		expect(slideKey('Home', false, travel)).toBe(-75);
		expect(slideKey('ArrowUp', false, { ...travel, at: 62.5 })).toBe(62.5);
	});

	it('goes by a step, a fine step, ten steps, and home to ride height', () => {
		expect(slideKey('ArrowUp', false, travel)).toBe(11);
		expect(slideKey('ArrowDown', true, travel)).toBe(9.9);
		expect(slideKey('PageDown', false, travel)).toBe(0);
		expect(slideKey('0', false, travel)).toBe(0);
		expect(slideKey('q', false, travel)).toBeNull();
	});
});

it('small multiples stand three, two or one across, each as wide as the others', () => {
	expect([1168, 720, 358].map(columnsFor)).toEqual([3, 2, 1]);
	const spec: ChartSpec = {
		key: 'k',
		label: 'camber',
		unit: '°',
		series: [series([1, 2])],
		bands: [],
		rule: { least: 1 },
		format: String,
		cursorValue: 1
	};
	const laid = layCharts([spec, { ...spec, key: 'l' }, { ...spec, key: 'm' }], 60, 600);
	const widths = laid.map(({ left, right }) => right - left);
	expect(new Set(widths.map((width) => width.toFixed(6))).size).toBe(1);
	expect(laid[2]?.right).toBeCloseTo(660, 9);
});

it('every series has its own colour, and every one but the first a dash of its own', () => {
	expect(new Set(SERIES_LOOK.map(({ colour }) => colour)).size).toBe(6);
	expect(new Set(SERIES_LOOK.map(({ dash }) => dash)).size).toBe(6);
	expect(seriesLook(7)).toBe(SERIES_LOOK[1]);
});
