import { columnsFor, ROW_FOOT, ROW_HEAD } from '$lib/charts/multiples';
import { extentsOf, type Box } from '$lib/drawing/layout';
import type { Hand, Placement } from '$lib/drawing/projection';
import { chooseScale, pxPerMm, type Scale } from '$lib/drawing/scale';
import type { DrawnCorner } from '$lib/drawing/scene';

/** What the front view has to find room for, mm: out from the centreline, and up and down from the ground at ride height. */
export interface Room {
	outboard: number;
	rise: number;
	drop: number;
}

export interface SheetPlan {
	width: number;
	height: number;
	view: Box;
	scale: Scale;
	/** Where the body's origin lies on the sheet. */
	at: Placement;
	/** Where the figures at the slide stand; null where each chart's own must do. */
	figures: Box | null;
	charts: { x: number; y: number; w: number; across: number; plot: number };
	/** Where the names of the series stand. */
	notes: Box;
	title: Box;
}

export interface PlanSpec {
	width: number;
	/** The height there is; the sheet is higher where it must be. */
	height: number;
	/** How many charts. */
	charts: number;
	hand: Hand;
	room: Room;
	/** Whether the figures at the slide stand in a list of their own; without it the view has their room. */
	listed?: boolean;
}

/** From this width the view stands beside the charts. */
export const WIDE = 1000;
export const FIGURE_PITCH = 20;
const MARGIN = 16;
const TITLE = 84;
const FLAT_TITLE = 52;
const TITLE_WIDTH = 420;
const NOTE_LINE = 20;
const CENTRELINE_PAD = 28;
const OUT_PAD = 30;
const OVER = 40;
const UNDER = 34;
const LEAST_PLOT = 118;
const MOST_PLOT = 420;

const clamp = (value: number, low: number, high: number) => Math.max(low, Math.min(high, value));

/** The room a corner needs in the front view while its wheel travels from `low` to `high`, mm. */
export function roomOf(corner: DrawnCorner, low: number, high: number): Room {
	const wheel = corner.wheel ?? { centre: [0, 700, 300] as const, tyre: { radius: 300, width: 190, shoulder: 30 } };
	const { outboard, top } = extentsOf(corner.places, wheel);
	return {
		outboard,
		rise: Math.max(top, wheel.centre[2] + wheel.tyre.radius + Math.max(0, high)),
		drop: Math.max(0, -low)
	};
}

/** The largest scale at which the front view fits a window of this size. */
function viewScale({ outboard, rise, drop }: Room, w: number, h: number): Scale {
	return chooseScale((s) => outboard * s + CENTRELINE_PAD + OUT_PAD <= w && (rise + drop) * s + OVER + UNDER <= h);
}

const viewHeight = ({ rise, drop }: Room, s: number) => (rise + drop) * s + OVER + UNDER;

function placed(box: Box, { rise, drop, outboard }: Room, scale: Scale, hand: Hand): Placement {
	const s = pxPerMm(scale);
	const spare = Math.max(0, box.h - viewHeight({ rise, drop, outboard }, s));
	const inset = CENTRELINE_PAD + Math.max(0, (box.w - outboard * s - CENTRELINE_PAD - OUT_PAD) / 2);
	return {
		x: hand === 'left' ? box.x + inset : box.x + box.w - inset,
		y: box.y + box.h - UNDER - drop * s - spare / 2,
		pxPerMm: s
	};
}

/** Where view, figures, charts and title block lie. The view stands beside the charts on a wide sheet, over them on a narrow one. */
export function planSheet(spec: PlanSpec): SheetPlan {
	return spec.width >= WIDE ? planWide(spec) : planTall(spec);
}

function planWide({ width, height, charts, hand, room, listed = true }: PlanSpec): SheetPlan {
	const across = Math.min(3, Math.max(1, charts));
	const rows = Math.ceil(charts / across);
	const figuresH = listed ? charts * FIGURE_PITCH + 34 : 0;
	const under = TITLE + 2 * MARGIN;
	const least = Math.max(MARGIN + rows * (ROW_HEAD + LEAST_PLOT + ROW_FOOT) + under, 320 + figuresH + MARGIN);
	const whole = Math.max(height, least);
	const plot = Math.floor(clamp((whole - MARGIN - under) / rows - ROW_HEAD - ROW_FOOT, LEAST_PLOT, MOST_PLOT));
	const viewH = whole - figuresH - MARGIN;
	const scale = viewScale(room, Math.min(460, 0.38 * width), viewH);
	const column = Math.round(Math.max(320, room.outboard * pxPerMm(scale) + CENTRELINE_PAD + OUT_PAD));
	const view = { x: 0, y: 0, w: column, h: viewH };
	const beside = width - column;
	const titleW = Math.min(TITLE_WIDTH, beside - 2 * MARGIN);
	const title = { x: width - MARGIN - titleW, y: whole - MARGIN - TITLE, w: titleW, h: TITLE };
	return {
		width,
		height: whole,
		view,
		scale,
		at: placed(view, room, scale, hand),
		figures: listed ? { x: MARGIN, y: viewH, w: column - MARGIN, h: figuresH } : null,
		charts: { x: column, y: MARGIN / 2, w: beside, across, plot },
		notes: { x: column + MARGIN, y: title.y, w: title.x - column - 2 * MARGIN, h: TITLE },
		title
	};
}

const NARROW_VIEW = 400;
const NARROW_PLOT = 200;
const LIST = 300;

function planTall({ width, charts, hand, room, ...spec }: PlanSpec): SheetPlan {
	const listed = width >= 640 && spec.listed !== false;
	const figuresH = charts * FIGURE_PITCH + 34;
	const viewW = listed ? width - LIST - MARGIN : width;
	const scale = viewScale(room, viewW, NARROW_VIEW);
	const viewH = Math.round(Math.max(viewHeight(room, pxPerMm(scale)), listed ? figuresH + 2 * MARGIN : 0));
	const view = { x: 0, y: 0, w: viewW, h: viewH };
	const across = Math.min(columnsFor(width), Math.max(1, charts));
	const rows = Math.ceil(charts / across);
	const chartsEnd = viewH + rows * (ROW_HEAD + NARROW_PLOT + ROW_FOOT) + MARGIN;
	const flat = width < 560;
	const notesH = 3 * NOTE_LINE;
	const titleW = flat ? width : Math.min(TITLE_WIDTH, width - 2 * MARGIN);
	const title = flat
		? { x: 0, y: chartsEnd + notesH + MARGIN, w: width, h: FLAT_TITLE }
		: { x: width - MARGIN - titleW, y: chartsEnd, w: titleW, h: TITLE };
	return {
		width,
		height: title.y + title.h + (flat ? 0 : MARGIN),
		view,
		scale,
		at: placed(view, room, scale, hand),
		figures: listed ? { x: viewW, y: MARGIN, w: LIST, h: figuresH } : null,
		charts: { x: 0, y: viewH, w: width, across, plot: NARROW_PLOT },
		notes: { x: MARGIN, y: chartsEnd, w: flat ? width - 2 * MARGIN : title.x - 2 * MARGIN, h: notesH },
		title
	};
}
