import { extent, ticks } from 'd3';

/** A curve of one figure over travel; a missing value breaks the line. */
export interface Series {
	key: string;
	/** Set at the line's end: a revision letter, "draft". */
	label: string;
	points: readonly CurvePoint[];
	/** Which colour and dash of the series list, from 0. */
	seriesIndex: number;
	/** A dash of its own, where the list's does not serve. */
	dash?: string;
	/** Where this one binds, where it is another place than the group's. */
	limits?: { low: Limit | null; high: Limit | null };
}

export interface CurvePoint {
	travel: number;
	value: number | null;
}

/** A target band over a part of the travel; either limit may be open. */
export interface Band {
	from: number;
	to: number;
	low: number | null;
	high: number | null;
}

/** Where the mechanism binds: the last reachable travel and what locks there. */
export interface Limit {
	travel: number;
	reason: string;
}

export type Domain = readonly [low: number, high: number];

/** Colour and dash of the series on dye, in order. */
export const SERIES_LOOK: readonly { colour: string; dash: string | null; width: number }[] = [
	{ colour: 'var(--series-1)', dash: null, width: 2 },
	{ colour: 'var(--series-2)', dash: '8 3', width: 1.25 },
	{ colour: 'var(--series-3)', dash: '2 3', width: 1.25 },
	{ colour: 'var(--series-4)', dash: '10 3 2 3', width: 1.25 },
	{ colour: 'var(--series-5)', dash: '5 5', width: 1.25 },
	{ colour: 'var(--series-6)', dash: '14 4', width: 1.25 }
];

/** The look of the n-th series; they repeat past the sixth. */
export const seriesLook = (index: number) =>
	SERIES_LOOK[index % SERIES_LOOK.length] ?? { colour: 'var(--series-1)', dash: null, width: 2 };

/** Least spread of a chart, so that a flat curve is not blown up into noise; in the figure's stored unit. */
export interface DomainRule {
	least: number;
	/** Values that must lie inside, such as zero. */
	include?: readonly number[];
}

/**
 * The domain of a chart over every series and band: padded by 6 %, at least `least` wide, and rounded outward to
 * steps a person reads. Null where there is nothing to show.
 */
export function chartDomain(series: readonly Series[], bands: readonly Band[], rule: DomainRule): Domain | null {
	const values = series.flatMap((one) => one.points.map((point) => point.value)).filter((value) => value !== null);
	const limits = bands.flatMap((band) => [band.low, band.high]).filter((value) => value !== null);
	const [low, high] = extent([...values, ...(values.length ? [...limits, ...(rule.include ?? [])] : [])]);
	if (low === undefined || high === undefined) return null;
	const spread = Math.max((high - low) * 1.12, rule.least);
	const middle = (low + high) / 2;
	return roundOutward([middle - spread / 2, middle + spread / 2]);
}

const TICK_FACTORS = [1, 2, 2.5, 5];

/** A domain widened outward to the finest step of 1, 2, 2.5 or 5 · 10ⁿ that cuts it into at most six. */
export function roundOutward([low, high]: Domain): Domain {
	const power = Math.floor(Math.log10((high - low) / 6));
	for (const p of [power, power + 1]) {
		for (const factor of TICK_FACTORS) {
			const step = factor * 10 ** p;
			const [first, last] = [Math.floor(low / step + 1e-9), Math.ceil(high / step - 1e-9)];
			if (last - first <= 6) return [tidy(first * step), tidy(last * step)];
		}
	}
	return [low, high];
}

const tidy = (value: number): number => Number(value.toPrecision(12)) + 0;

/**
 * Ticks a person reads: five to seven where a step of 1, 2, 2.5 or 5 · 10ⁿ gives that many, a step that lands on both
 * ends first, then the one that lands on zero or gives six.
 */
export function readableTicks([low, high]: Domain): number[] {
	const span = high - low;
	if (!(span > 0)) return [low];
	const power = Math.floor(Math.log10(span / 6));
	const candidates = [power - 1, power, power + 1]
		.flatMap((p) => TICK_FACTORS.map((factor) => factor * 10 ** p))
		.map((step) => {
			const [first, last] = [Math.ceil(low / step - 1e-9), Math.floor(high / step + 1e-9)];
			const ends =
				Number(Math.abs(first * step - low) < step * 1e-6) + Number(Math.abs(last * step - high) < step * 1e-6);
			return { step, first, count: last - first + 1, ends };
		});
	const good = candidates.filter(({ count }) => count >= 5 && count <= 7);
	const pool = good.length ? good : candidates.filter(({ count }) => count >= 3 && count <= 9);
	const best = pool.reduce<(typeof candidates)[number] | null>((kept, one) => {
		if (!kept || one.ends > kept.ends) return one;
		return one.ends === kept.ends && Math.abs(one.count - 6) < Math.abs(kept.count - 6) ? one : kept;
	}, null);
	if (!best) return ticks(low, high, 5).map(tidy);
	return Array.from({ length: best.count }, (_, k) => tidy((best.first + k) * best.step));
}

/** Decimals that tell these ticks apart: those of their step. */
export function tickDecimals(values: readonly number[]): number {
	const text = (value: number) => (String(tidy(value)).split('.')[1] ?? '').length;
	return Math.max(0, ...values.map(text));
}

/** A straight scale: value → pixel. */
export function linear([low, high]: Domain, [start, end]: Domain): (value: number) => number {
	const span = high - low || 1;
	return (value) => start + ((value - low) / span) * (end - start);
}

/** The inverse of `linear`. */
export function inverse([low, high]: Domain, [start, end]: Domain): (pixel: number) => number {
	const span = end - start || 1;
	return (pixel) => low + ((pixel - start) / span) * (high - low);
}

/** The value of a curve at a travel, straight between its points; null in a gap or beyond its ends. */
export function valueAt(points: readonly CurvePoint[], travel: number): number | null {
	for (let k = 1; k < points.length; k += 1) {
		const [a, b] = [points[k - 1], points[k]];
		if (!a || !b || travel < Math.min(a.travel, b.travel) || travel > Math.max(a.travel, b.travel)) continue;
		if (a.value === null || b.value === null)
			return travel === a.travel ? a.value : travel === b.travel ? b.value : null;
		const share = b.travel === a.travel ? 0 : (travel - a.travel) / (b.travel - a.travel);
		return a.value + (b.value - a.value) * share;
	}
	const only = points[0];
	return points.length === 1 && only && only.travel === travel ? only.value : null;
}
