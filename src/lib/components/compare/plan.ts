import type { Box, Extents } from '$lib/drawing/layout';
import { viewFrame, type Frame, type Hand, type Placement } from '$lib/drawing/projection';
import { chooseScale, pxPerMm, type Scale } from '$lib/drawing/scale';

export type PlainView = 'front' | 'top' | 'side';

export interface ViewWindow {
	view: PlainView;
	box: Box;
	at: Placement;
	frame: Frame;
}

export interface ViewsPlan {
	width: number;
	height: number;
	scale: Scale;
	views: ViewWindow[];
	/** Where the names of the series stand. */
	notes: Box;
	title: Box;
}

/** From this width the three views lie aligned by projection; under it one under the other. */
const ALIGNED = 640;
const MARGIN = 16;
const PAD = 28;
const CAPTION = 34;
const UNDER = 30;
const TITLE = 84;
const FLAT_TITLE = 52;
const TITLE_WIDTH = 400;
const NOTES = 100;

interface Sizes {
	front: number;
	side: number;
	top: number;
	tall: number;
}

const sizes = (e: Extents, s: number, drop: number, rise: number): Sizes => ({
	front: e.outboard * s + 2 * PAD,
	side: (e.fore + e.aft) * s + 2 * PAD,
	// The points decide what the top view shows; of the tyre, what is left of the window.
	top: (e.pointsFore + e.pointsAft) * s + CAPTION + 2 * PAD,
	tall: (Math.max(e.top, rise) + drop) * s + CAPTION + UNDER
});

/**
 * Three views of one corner in third angle: top over front, side beside it on the hand of the centreline. `drop` and `rise` are
 * how far under and over the ground at ride height the drawing reaches, mm.
 */
export function planViews(spec: {
	width: number;
	hand: Hand;
	extents: Extents;
	drop: number;
	rise: number;
}): ViewsPlan {
	const { width, extents, drop, rise } = spec;
	const scale = chooseScale((s) => {
		const { front, side, top, tall } = sizes(extents, s, drop, rise);
		if (width < ALIGNED) return Math.max(front, side) <= width;
		return front + side <= width && top + tall <= 900;
	});
	return width < ALIGNED ? stacked(spec, scale) : aligned(spec, scale);
}

type Spec = Parameters<typeof planViews>[0];

const frames = (hand: Hand): Record<PlainView, Frame> => ({
	front: viewFrame('front', 'third', hand),
	top: viewFrame('top', 'third', hand),
	side: viewFrame('side', 'third', hand)
});

/** Where the body's origin lies so that what reaches fore and aft is centred in a window. */
function sideOrigin(box: Box, e: Extents, frame: Frame, s: number): number {
	return box.x + box.w / 2 - ((e.fore - e.aft) / 2) * frame.right[0] * s;
}

function aligned({ width, hand, extents: e, drop, rise }: Spec, scale: Scale): ViewsPlan {
	const s = pxPerMm(scale);
	const { front, side, top, tall } = sizes(e, s, drop, rise);
	const start = Math.max(0, (width - front - side) / 2);
	// The side view lies on the centreline's hand of the front view: at left for a left corner.
	const [sideX, frontX] = hand === 'left' ? [start, start + side] : [start + front, start];
	const frontBox = { x: frontX, y: top, w: front, h: tall };
	const sideBox = { x: sideX, y: top, w: side, h: tall };
	const topBox = { x: frontX, y: 0, w: front, h: top };
	const groundY = top + tall - UNDER - drop * s;
	const centreX = hand === 'left' ? frontX + PAD : frontX + front - PAD;
	const of = frames(hand);
	const views: ViewWindow[] = [
		{ view: 'front', box: frontBox, at: { x: centreX, y: groundY, pxPerMm: s }, frame: of.front },
		{
			view: 'side',
			box: sideBox,
			at: { x: sideOrigin(sideBox, e, of.side, s), y: groundY, pxPerMm: s },
			frame: of.side
		},
		{ view: 'top', box: topBox, at: { x: centreX, y: CAPTION + PAD / 2 + e.pointsAft * s, pxPerMm: s }, frame: of.top }
	];
	const bottom = top + tall;
	const title = { x: width - MARGIN - TITLE_WIDTH, y: bottom + MARGIN, w: TITLE_WIDTH, h: TITLE };
	// The quadrant over the side view is free.
	return {
		width,
		height: title.y + TITLE + MARGIN,
		scale,
		views,
		notes: { x: sideX + MARGIN, y: MARGIN + 8, w: side - MARGIN, h: NOTES },
		title
	};
}

function stacked({ width, hand, extents: e, drop, rise }: Spec, scale: Scale): ViewsPlan {
	const s = pxPerMm(scale);
	const { front, top, tall } = sizes(e, s, drop, rise);
	const of = frames(hand);
	const inset = PAD + Math.max(0, (width - front) / 2);
	const centreX = hand === 'left' ? inset : width - inset;
	const topBox = { x: 0, y: 0, w: width, h: top };
	const frontBox = { x: 0, y: top, w: width, h: tall };
	const sideBox = { x: 0, y: top + tall, w: width, h: tall };
	const ground = (box: Box) => box.y + box.h - UNDER - drop * s;
	const end = top + 2 * tall;
	return {
		width,
		height: end + NOTES + MARGIN + FLAT_TITLE,
		scale,
		views: [
			{
				view: 'top',
				box: topBox,
				at: { x: centreX, y: CAPTION + PAD / 2 + e.pointsAft * s, pxPerMm: s },
				frame: of.top
			},
			{ view: 'front', box: frontBox, at: { x: centreX, y: ground(frontBox), pxPerMm: s }, frame: of.front },
			{
				view: 'side',
				box: sideBox,
				at: { x: sideOrigin(sideBox, e, of.side, s), y: ground(sideBox), pxPerMm: s },
				frame: of.side
			}
		],
		notes: { x: MARGIN, y: end + MARGIN, w: width - 2 * MARGIN, h: NOTES },
		title: { x: 0, y: end + NOTES + MARGIN, w: width, h: FLAT_TITLE }
	};
}
