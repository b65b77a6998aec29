import {
	chartDomain,
	linear,
	readableTicks,
	type Band,
	type Domain,
	type DomainRule,
	type Limit,
	type Series
} from './scale';

/** One figure to be charted over travel. Values are in the unit they are shown in; so is the travel. */
export interface ChartSpec {
	key: string;
	/** The name, without its unit. */
	label: string;
	/** The unit, set once after the name. */
	unit: string;
	series: readonly Series[];
	bands: readonly Band[];
	rule: DomainRule;
	/** Writes a value of this figure, with the decimals of its kind unless others are asked for (ticks). */
	format: (value: number | null, decimals?: number) => string;
	/** What stands at the cursor: the figure of the first series there, and of more where wanted. */
	cursorValue: number | null;
	/** Why there is no curve, where there is none. */
	why?: string;
}

/** The travel all charts of a group share, and the last reachable places where the mechanism binds. */
export interface TravelSpec {
	domain: Domain;
	/** Where the slide stands. */
	at: number;
	low: Limit | null;
	high: Limit | null;
	/** Writes a travel with its sign. */
	format: (value: number) => string;
	unit: string;
	/** One press of an arrow key, and of one with Shift or Alt. */
	step: number;
	fine: number;
}

/** One chart laid out in pixels. */
export interface ChartLayout {
	/** Left and right edge of the plot. */
	left: number;
	right: number;
	domain: Domain | null;
	x: (value: number) => number;
	ticks: number[];
}

/** Room taken at the left by travel's ticks and the slide. */
export const AXIS_ROOM = 46;
/** Between two charts of a row. */
export const CHART_GAP = 14;
/** Room over a row's plots for names, figures and end labels, and under them for ticks. */
export const ROW_HEAD = 58;
export const ROW_FOOT = 32;

/** How many charts stand side by side: three at 1440, two at 768, one at 390, by the width they have. */
export function columnsFor(width: number): number {
	if (width >= 900) return 3;
	return width >= 560 ? 2 : 1;
}

/** Lays charts side by side from `left` over `width` px. */
export function layCharts(specs: readonly ChartSpec[], left: number, width: number): ChartLayout[] {
	const each = (width - CHART_GAP * (specs.length - 1)) / Math.max(1, specs.length);
	return specs.map((spec, k) => {
		const start = left + k * (each + CHART_GAP);
		const domain = chartDomain(spec.series, spec.bands, spec.rule);
		return {
			left: start,
			right: start + each,
			domain,
			x: linear(domain ?? [0, 1], [start, start + each]),
			ticks: domain ? readableTicks(domain) : []
		};
	});
}

/** The reachable part of the travel domain: where the slide may stand. */
export function reachable(travel: TravelSpec): Domain {
	return [
		Math.max(travel.domain[0], travel.low?.travel ?? -Infinity),
		Math.min(travel.domain[1], travel.high?.travel ?? Infinity)
	];
}

/** Where a key takes the slide, or null for a key that is not one of its own. */
export function slideKey(key: string, fine: boolean, travel: TravelSpec): number | null {
	const [low, high] = reachable(travel);
	const step = fine ? travel.fine : travel.step;
	const clamp = (value: number) => Math.max(low, Math.min(high, Number(value.toFixed(6))));
	if (key === 'ArrowUp' || key === 'ArrowRight') return clamp(travel.at + step);
	if (key === 'ArrowDown' || key === 'ArrowLeft') return clamp(travel.at - step);
	if (key === 'PageUp') return clamp(travel.at + 10 * step);
	if (key === 'PageDown') return clamp(travel.at - 10 * step);
	if (key === 'Home') return low;
	if (key === 'End') return high;
	return key === '0' ? clamp(0) : null;
}
