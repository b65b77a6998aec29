import type { PointName, Vec3 } from '$lib/kinematics';
import type { Segment } from './dimension';
import { dot, project, toSheet, type Frame, type Placement } from './projection';

/** A key of a mark on the sheet: one of the eight points or an end of the coil-over. */
export type MarkKey = PointName | 'coiloverTop' | 'coiloverBottom';
/** How a punch mark is drawn: chassis pivot, ball joint, or rod joint. */
export type MarkKind = 'pivot' | 'ball' | 'rod';
export type Places = Partial<Record<MarkKey, Vec3>>;

/** A bar of the linkage between two marks; its key is also what an error may name. */
export interface Bar {
	key: string;
	from: MarkKey;
	to: MarkKey;
	/** Hinge lines are drawn as centre lines, the steering arm as a hidden line. */
	look: 'bar' | 'hinge' | 'hidden';
	/** The rigid part it belongs to. */
	part: 'upperArm' | 'lowerArm' | 'upright' | 'tieRod';
}

export const BARS: readonly Bar[] = [
	{ key: 'lowerHinge', from: 'lowerFront', to: 'lowerRear', look: 'hinge', part: 'lowerArm' },
	{ key: 'lowerArmFront', from: 'lowerFront', to: 'lowerBall', look: 'bar', part: 'lowerArm' },
	{ key: 'lowerArmRear', from: 'lowerRear', to: 'lowerBall', look: 'bar', part: 'lowerArm' },
	{ key: 'upperHinge', from: 'upperFront', to: 'upperRear', look: 'hinge', part: 'upperArm' },
	{ key: 'upperArmFront', from: 'upperFront', to: 'upperBall', look: 'bar', part: 'upperArm' },
	{ key: 'upperArmRear', from: 'upperRear', to: 'upperBall', look: 'bar', part: 'upperArm' },
	{ key: 'steeringArm', from: 'lowerBall', to: 'tieRodOuter', look: 'hidden', part: 'upright' },
	{ key: 'tieRod', from: 'tieRodInner', to: 'tieRodOuter', look: 'bar', part: 'tieRod' },
	{ key: 'upright', from: 'lowerBall', to: 'upperBall', look: 'bar', part: 'upright' }
];

/** A bar laid on the sheet. */
export interface PlacedBar extends Bar {
	segment: Segment;
}

/** Every bar whose two marks have a place, in drawing order, in sheet pixels. */
export function placeBars(frame: Frame, at: Placement, places: Places): PlacedBar[] {
	const placed: PlacedBar[] = [];
	for (const bar of BARS) {
		const [from, to] = [places[bar.from], places[bar.to]];
		if (!from || !to) continue;
		placed.push({ ...bar, segment: [...toSheet(at, project(frame, from)), ...toSheet(at, project(frame, to))] });
	}
	return placed;
}

/** Marks in sheet pixels with their depth toward the eye (mm), for finding what lies under a pointer. */
export interface PlacedMark {
	key: MarkKey;
	x: number;
	y: number;
	depth: number;
}

export function placeMarks(frame: Frame, at: Placement, places: Places): PlacedMark[] {
	const marks: PlacedMark[] = [];
	for (const key of Object.keys(places) as MarkKey[]) {
		const point = places[key];
		if (!point) continue;
		const [x, y] = toSheet(at, project(frame, point));
		marks.push({ key, x, y, depth: dot(frame.toward, point) });
	}
	return marks;
}

/**
 * The mark meant by a press at (x, y): within `reach` px; of marks lying on one another (within 6 px of the
 * nearest) the one held already, or on a repeated press the next behind it.
 */
export function markUnder(
	marks: readonly PlacedMark[],
	x: number,
	y: number,
	reach: number,
	held: MarkKey | null,
	next = false
): MarkKey | null {
	const near = marks
		.map((mark) => ({ mark, far: Math.hypot(mark.x - x, mark.y - y) }))
		.filter(({ far }) => far <= reach)
		.sort((a, b) => a.far - b.far);
	const nearest = near[0];
	if (!nearest) return null;
	const pile = near
		.filter(({ mark }) => Math.hypot(mark.x - nearest.mark.x, mark.y - nearest.mark.y) <= 6)
		.sort((a, b) => b.mark.depth - a.mark.depth)
		.map(({ mark }) => mark.key);
	const index = held === null ? -1 : pile.indexOf(held);
	if (index < 0) return pile.length > 1 && held === null ? (pile[0] ?? null) : nearest.mark.key;
	return (next ? pile[(index + 1) % pile.length] : held) ?? null;
}

const sub = (a: Vec3, b: Vec3): Vec3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];

/** Where the line through two points meets the level plane z, or null where it runs level. */
export function axisAtHeight(lower: Vec3, upper: Vec3, z: number): Vec3 | null {
	const d = sub(upper, lower);
	if (Math.abs(d[2]) < 1e-6) return null;
	const t = (z - lower[2]) / d[2];
	return [lower[0] + d[0] * t, lower[1] + d[1] * t, z];
}

/** Polyline data for path's d from sheet pixels. */
export function polyline(spots: readonly (readonly [number, number])[], closed = false): string {
	if (spots.length === 0) return '';
	return `M${spots.map(([x, y]) => `${x.toFixed(2)} ${y.toFixed(2)}`).join('L')}${closed ? 'Z' : ''}`;
}

/**
 * A coil-over in outline between two sheet points, body end first: the damper's rod and tube, two seats, and the near
 * side of the coil as slanted strokes between the seats. A coil is never wider than a third of its length.
 */
export function coilOver(
	[x1, y1]: readonly [number, number],
	[x2, y2]: readonly [number, number],
	halfWidth: number,
	turns = 8
): { axis: string; coil: string; seats: string } {
	const length = Math.hypot(x2 - x1, y2 - y1);
	if (length < 12) return { axis: '', coil: '', seats: '' };
	const [dx, dy] = [(x2 - x1) / length, (y2 - y1) / length];
	const half = Math.min(halfWidth, length / 6);
	const tube = half * 0.45;
	const at = (along: number, across: number) =>
		[x1 + dx * along * length - dy * across, y1 + dy * along * length + dx * across] as const;
	const [start, middle, end] = [0.14, 0.5, 0.84];
	const pitch = (end - start) / turns;
	let coil = '';
	for (let k = 0; k < turns; k += 1)
		coil += polyline([at(start + pitch * k, -half), at(start + pitch * (k + 1), half)]);
	const seat = (along: number) => polyline([at(along, -half - 2), at(along, half + 2)]);
	return {
		axis:
			polyline([at(0, 0), at(middle, 0)]) +
			polyline([at(1, 0), at(0.9, 0), at(0.9, tube), at(middle, tube), at(middle, -tube), at(0.9, -tube), at(0.9, 0)]),
		coil,
		seats: seat(start) + seat(end)
	};
}
