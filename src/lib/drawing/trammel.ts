import type { Vec3 } from '$lib/kinematics';
import type { Segment, Spot } from './dimension';

/** What a trammel set on two points reads, mm. */
export interface TrammelReading {
	/** Between the two points on the corner in hand. */
	length: number;
	/** The same pair on the other corner. */
	otherLength: number;
	/** From the first point at left to the second at right, and from the first at right to the second at left. */
	leftToRight: number;
	rightToLeft: number;
	/** leftToRight − rightToLeft: nothing on a square car. */
	difference: number;
}

const distance = (a: Vec3, b: Vec3): number => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
const mirrored = (point: Vec3): Vec3 => [point[0], -point[1], point[2]];

/**
 * Reads a trammel on a pair of points. `first` and `second` are the pair on the corner in hand; `other` the same pair
 * on the other corner in true vehicle axes, or null where that corner is the mirror image.
 */
export function readTrammel(
	first: Vec3,
	second: Vec3,
	other: readonly [Vec3, Vec3] | null,
	hand: 'left' | 'right'
): TrammelReading {
	const [otherFirst, otherSecond] = other ?? [mirrored(first), mirrored(second)];
	const there = distance(first, otherSecond);
	const back = distance(otherFirst, second);
	const [leftToRight, rightToLeft] = hand === 'left' ? [there, back] : [back, there];
	return {
		length: distance(first, second),
		otherLength: distance(otherFirst, otherSecond),
		leftToRight,
		rightToLeft,
		difference: leftToRight - rightToLeft
	};
}

/** A trammel drawn between two places: a beam held off the pair, a head over each end with a slim leg down to the point. */
export interface TrammelLayout {
	/** The two edges of the beam, broken in the middle for the figure. */
	beam: Segment[];
	/** Path data of the beam's ends, the heads, and the legs. */
	ends: string;
	heads: string;
	legs: string;
	text: Spot;
	/** True where the pair lies too close in this view for a beam to be told apart. */
	short: boolean;
}

const OFFSET = 20;
const HALF_BEAM = 2;
const OVERHANG = 16;
const HEAD = 5;
const LEG = 2.2;

/**
 * Lays the trammel out in sheet pixels. The beam lies above the pair on the page; the figure stands upright in a
 * break of it, which is as wide as the text's shadow along the beam.
 */
export function layTrammel(a: Spot, b: Spot, textWidth: number, textHeight = 14): TrammelLayout {
	const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
	const [dx, dy] = length < 1e-6 ? [1, 0] : [(b[0] - a[0]) / length, (b[1] - a[1]) / length];
	// The side of the pair that is up the page (to the right for an upright pair).
	const [nx, ny] = dx < -1e-9 || (Math.abs(dx) <= 1e-9 && dy > 0) ? [-dy, dx] : [dy, -dx];
	const at = (along: number, out: number): Spot => [a[0] + dx * along + nx * out, a[1] + dy * along + ny * out];
	const go = (spots: Spot[], close = false) =>
		`M${spots.map(([x, y]) => `${x.toFixed(2)} ${y.toFixed(2)}`).join('L')}${close ? 'Z' : ''}`;
	const breakHalf = Math.min(
		textWidth / 2 + 5,
		Math.abs(dx) < 1e-6 ? Infinity : (textWidth / 2 + 5) / Math.abs(dx),
		Math.abs(dy) < 1e-6 ? Infinity : (textHeight / 2 + 3) / Math.abs(dy)
	);
	const short = length < 2 * (breakHalf + HEAD + 6);
	const middle = length / 2;
	const edge = (out: number): Segment[] => {
		const runs: [number, number][] = short
			? [[-OVERHANG, length + OVERHANG]]
			: [
					[-OVERHANG, middle - breakHalf],
					[middle + breakHalf, length + OVERHANG]
				];
		return runs.map(([from, to]) => [...at(from, out), ...at(to, out)]);
	};
	const cap = (along: number) => go([at(along, OFFSET - HALF_BEAM), at(along, OFFSET + HALF_BEAM)]);
	const head = (along: number) =>
		go(
			[
				at(along - HEAD, OFFSET - HEAD),
				at(along + HEAD, OFFSET - HEAD),
				at(along + HEAD, OFFSET + HEAD),
				at(along - HEAD, OFFSET + HEAD)
			],
			true
		);
	const leg = (along: number) =>
		go([at(along - LEG, OFFSET - HEAD), at(along, 0), at(along + LEG, OFFSET - HEAD)], true);
	const caps = [-OVERHANG, length + OVERHANG, ...(short ? [] : [middle - breakHalf, middle + breakHalf])];
	return {
		beam: [...edge(OFFSET - HALF_BEAM), ...edge(OFFSET + HALF_BEAM)],
		ends: caps.map(cap).join(''),
		heads: head(0) + head(length),
		legs: leg(0) + leg(length),
		text: short ? at(middle, OFFSET + HEAD + 6 + textHeight / 2) : at(middle, OFFSET),
		short
	};
}
