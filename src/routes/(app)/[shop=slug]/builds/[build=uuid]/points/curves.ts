import { AXIS_ROOM } from '$lib/charts/multiples';
import { linear, type Domain } from '$lib/charts/scale';
import type { Box } from '$lib/drawing/layout';
import type { FigureKey } from '$lib/schemas/axle';

/** The curves beside the front view, most wanted first; as many as there is room for. */
export const CURVES: readonly FigureKey[] = ['camber', 'bumpSteer', 'rollCentreHeight', 'caster'];

const HEAD = 58;
const FOOT = 26;
/** Between the drawing and the slide the leader runs up or down to it. */
const LEADER = 10;
const RIGHT = 4;

/** Where the curves stand in their part of the sheet, px. */
export interface Plot {
	/** The sheet's part they stand in. */
	box: Box;
	left: number;
	width: number;
	count: number;
	axisX: number;
	plateX: number;
	right: number;
	/** Page y of a travel, in the travel's shown unit. */
	y: (travel: number) => number;
}

/**
 * Ride height stands at the wheel centre's own height on the sheet (`wheelY`), and the travel's scale is as large as
 * the room over and under it allows. `headroom` is kept free above the curves' names.
 */
export function plotCurves(box: Box, wheelY: number, domain: Domain, headroom = 0): Plot {
	const left = box.x + LEADER + AXIS_ROOM + 12;
	const width = box.x + box.w - left - RIGHT;
	const [top, bottom] = [box.y + headroom + HEAD, box.y + box.h - FOOT];
	const perUnit = Math.min((wheelY - top) / domain[1], (bottom - wheelY) / -domain[0]);
	return {
		box,
		left,
		width,
		count: width >= 340 ? 4 : width >= 204 ? 3 : 2,
		axisX: box.x + LEADER + AXIS_ROOM,
		plateX: box.x + LEADER - 2,
		right: box.x + box.w - RIGHT,
		y: linear(domain, [wheelY - domain[0] * perUnit, wheelY - domain[1] * perUnit])
	};
}
