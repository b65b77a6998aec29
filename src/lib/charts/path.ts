import { line } from 'd3';
import type { Band, CurvePoint } from './scale';

/** Path data of an upright curve: value across, travel up the page. A null value breaks the line. */
export function uprightPath(
	points: readonly CurvePoint[],
	x: (value: number) => number,
	y: (travel: number) => number
): string {
	const draw = line<CurvePoint>()
		.defined((point) => point.value !== null)
		.x((point) => x(point.value ?? 0))
		.y((point) => y(point.travel))
		.digits(2);
	return draw(points) ?? '';
}

/** The first or last point of a curve that has a value: where its end label goes. */
export function curveEnd(
	points: readonly CurvePoint[],
	end: 'bump' | 'droop'
): { travel: number; value: number } | null {
	let found: { travel: number; value: number } | null = null;
	for (const { travel, value } of points) {
		if (value === null) continue;
		if (found === null || (end === 'bump' ? travel > found.travel : travel < found.travel)) found = { travel, value };
	}
	return found;
}

/** Path data of one limit of a target band: an upright hair line with hooks of `hook` px inward at both ends. */
export function bandPath(
	band: Band,
	limit: 'low' | 'high',
	x: (value: number) => number,
	y: (travel: number) => number,
	hook = 5
): string {
	const value = band[limit];
	if (value === null) return '';
	const at = x(value);
	// Inward is toward the other limit; the scale may run either way.
	const inward = (limit === 'low') === x(1) > x(0) ? hook : -hook;
	return `M${at + inward} ${y(band.from)}H${at}V${y(band.to)}H${at + inward}`;
}
