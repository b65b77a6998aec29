/** Layout of dimensions in sheet pixels: where lines, arrows and the figure go. Nothing here draws. */

export type Spot = readonly [x: number, y: number];
export type Segment = readonly [x1: number, y1: number, x2: number, y2: number];

/** A slim arrow head: its tip and the page direction (radians, y down) in which it points. */
export interface Arrow {
	x: number;
	y: number;
	angle: number;
}

export interface DimensionLayout {
	extension: Segment[];
	line: Segment[];
	/** Path data of arcs, for an angle. */
	arcs: string[];
	arrows: Arrow[];
	text: { x: number; y: number; anchor: 'start' | 'middle' | 'end' };
	/** True where arrows and figure stand outside because the distance is short. */
	outside: boolean;
}

/** Extension lines leave this gap at the object and run this far past the dimension line (px). */
export const EXTENSION_GAP = 3;
export const EXTENSION_PAST = 4;
export const ARROW_LENGTH = 9;
/** Half the width of an arrow's base (px): slim, about 1 to 6. */
export const ARROW_HALF = 1.6;
const TEXT_PAD = 4;
const TAIL = 14;
const MIN_LINE = 5;
/** JetBrains Mono is 0.6 em wide a glyph. */
const GLYPH_EM = 0.6;

/** The room a dimension's figure takes on the sheet. */
export function textBox(layout: DimensionLayout, width: number): { x: number; y: number; w: number; h: number } {
	const { x, y, anchor } = layout.text;
	return { x: anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2, y: y - 8, w: width, h: 16 };
}

/** Width in px of a text in the sheet's fixed-pitch face at `size` px. */
export const textWidth = (text: string, size = 11): number => [...text].length * size * GLYPH_EM;

/** Path data of a slim filled arrow head with its tip at the arrow's place. */
export function arrowPath({ x, y, angle }: Arrow): string {
	const [c, s] = [Math.cos(angle), Math.sin(angle)];
	const bx = x - c * ARROW_LENGTH;
	const by = y - s * ARROW_LENGTH;
	const corner = (k: number) => `${round(bx - s * k)} ${round(by + c * k)}`;
	return `M${round(x)} ${round(y)}L${corner(ARROW_HALF)}L${corner(-ARROW_HALF)}Z`;
}

const round = (value: number): number => Math.round(value * 100) / 100;

/** One extension line from an anchor to the dimension line, or none where the anchor is already near it. */
function extension(anchor: number, line: number): readonly [from: number, to: number] | null {
	const away = Math.sign(line - anchor);
	if (Math.abs(line - anchor) <= EXTENSION_GAP) return null;
	return [anchor + away * EXTENSION_GAP, line + away * EXTENSION_PAST];
}

/**
 * A level or upright dimension between two anchors, its line at `at` (y of a level one, x of an upright one).
 * The figure stands upright in a break of the line; where the distance is short, arrows and figure flip outside,
 * the figure beyond the end that `side` names (+1: right or down).
 */
export function linearDimension(spec: {
	from: Spot;
	to: Spot;
	run: 'level' | 'upright';
	at: number;
	textWidth: number;
	textHeight?: number;
	side?: 1 | -1;
}): DimensionLayout {
	const { run, at, side = 1 } = spec;
	const level = run === 'level';
	const along = (spot: Spot) => (level ? spot[0] : spot[1]);
	const across = (spot: Spot) => (level ? spot[1] : spot[0]);
	const segment = (a: number, b: number): Segment => (level ? [a, at, b, at] : [at, a, at, b]);
	const [first, last] = along(spec.from) <= along(spec.to) ? [spec.from, spec.to] : [spec.to, spec.from];
	const [start, end] = [along(first), along(last)];
	const extensions: Segment[] = [];
	for (const anchor of [first, last]) {
		const drawn = extension(across(anchor), at);
		const place = along(anchor);
		if (drawn) extensions.push(level ? [place, drawn[0], place, drawn[1]] : [drawn[0], place, drawn[1], place]);
	}
	const size = level ? spec.textWidth : (spec.textHeight ?? 14);
	const outside = end - start < size + 2 * (TEXT_PAD + ARROW_LENGTH + MIN_LINE);
	const forward = level ? 0 : Math.PI / 2;
	const arrow = (place: number, angle: number): Arrow => ({ ...spot(level, place, at), angle });
	if (!outside) {
		const middle = (start + end) / 2;
		return {
			extension: extensions,
			line: [segment(start, middle - size / 2 - TEXT_PAD), segment(middle + size / 2 + TEXT_PAD, end)],
			arcs: [],
			arrows: [arrow(start, forward + Math.PI), arrow(end, forward)],
			text: { ...spot(level, middle, at), anchor: 'middle' },
			outside
		};
	}
	const tail = ARROW_LENGTH + TAIL;
	const textPlace = side > 0 ? end + tail + TEXT_PAD : start - tail - TEXT_PAD;
	return {
		extension: extensions,
		line: [segment(start - tail, start), segment(start, end), segment(end, end + tail)],
		arcs: [],
		arrows: [arrow(start, forward), arrow(end, forward + Math.PI)],
		text: level
			? { x: textPlace, y: at, anchor: side > 0 ? 'start' : 'end' }
			: { x: at, y: textPlace + (side * size) / 2, anchor: 'middle' },
		outside
	};
}

const spot = (level: boolean, along: number, at: number) => (level ? { x: along, y: at } : { x: at, y: along });

/**
 * An angle between two rays from `centre`, as an arc of `radius`; angles are page radians (y down), `from` < `to`
 * meant as a sweep through increasing angle. The figure is set over the arc's end or in its break.
 */
export function angularDimension(spec: {
	centre: Spot;
	radius: number;
	from: number;
	to: number;
	textWidth: number;
	/** Beyond which end the figure stands when it does not fit in the arc. */
	side?: 'from' | 'to';
}): DimensionLayout {
	const { centre, radius, side = 'to' } = spec;
	const [from, to] = spec.from <= spec.to ? [spec.from, spec.to] : [spec.to, spec.from];
	const swap = spec.from > spec.to;
	const polar = (angle: number): Spot => [centre[0] + radius * Math.cos(angle), centre[1] + radius * Math.sin(angle)];
	const arc = (a: number, b: number) => arcPath(polar(a), polar(b), radius, b - a);
	const along = (px: number) => px / radius;
	const arrow = (angle: number, sense: 1 | -1): Arrow => {
		const [x, y] = polar(angle);
		// A straight head on a curved line: turn it by half its own length so that its axis is a chord of the arc.
		return { x, y, angle: angle + sense * (Math.PI / 2 - along(ARROW_LENGTH) / 2) };
	};
	const length = (to - from) * radius;
	const outside = length < spec.textWidth + 2 * (TEXT_PAD + ARROW_LENGTH + MIN_LINE);
	if (!outside) {
		const middle = (from + to) / 2;
		const half = along(spec.textWidth / 2 + TEXT_PAD);
		const [x, y] = polar(middle);
		return {
			extension: [],
			line: [],
			arcs: [arc(from, middle - half), arc(middle + half, to)],
			arrows: [arrow(from, -1), arrow(to, 1)],
			text: { x, y, anchor: 'middle' },
			outside
		};
	}
	const tail = along(ARROW_LENGTH + TAIL);
	const atTo = (side === 'to') !== swap;
	const end = atTo ? to + tail : from - tail;
	const [x, y] = polar(end);
	const leftwards = x < centre[0] + radius * Math.cos((from + to) / 2);
	return {
		extension: [],
		line: [],
		arcs: [arc(from - tail, from), arc(from, to), arc(to, to + tail)],
		arrows: [arrow(from, 1), arrow(to, -1)],
		text: { x: x + (leftwards ? -TEXT_PAD : TEXT_PAD), y, anchor: leftwards ? 'end' : 'start' },
		outside
	};
}

function arcPath([x1, y1]: Spot, [x2, y2]: Spot, radius: number, sweep: number): string {
	const large = Math.abs(sweep) > Math.PI ? 1 : 0;
	return `M${round(x1)} ${round(y1)}A${round(radius)} ${round(radius)} 0 ${large} ${sweep > 0 ? 1 : 0} ${round(x2)} ${round(y2)}`;
}
