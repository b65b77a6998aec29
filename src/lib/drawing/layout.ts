import type { Vec3 } from '$lib/kinematics';
import type { Places } from './linkage';
import { viewFrame, type Frame, type Hand, type Placement, type ProjectionAngle, type ViewKey } from './projection';
import { chooseScale, pxPerMm, type Scale } from './scale';
import type { TyreShape } from './tyre';

export interface Box {
	x: number;
	y: number;
	w: number;
	h: number;
}

/** A view's window on the sheet: where it may draw, where the body's origin falls, and how it looks. */
export interface ViewWindow {
	box: Box;
	at: Placement;
	frame: Frame;
}

/** What has to find room, in mm about the body's origin. `outboard` is counted from the centreline, always positive. */
export interface Extents {
	outboard: number;
	top: number;
	/** Fore and aft reach of everything, tyre included. */
	fore: number;
	aft: number;
	/** Fore and aft reach of the points alone: what the top view must show even where the tyre is cut off. */
	pointsFore: number;
	pointsAft: number;
	/** Distance of the innermost point from the centreline. */
	inboard: number;
	/** Height of the wheel centre at ride height. */
	wheelCentre: number;
}

/** `full`: every view at once; `narrow`: front, top and one cell beside them; `single`: one thing at a time. */
export type SheetMode = 'full' | 'narrow' | 'single';
export type SideCell = 'curves' | 'side' | 'orbit';

export interface SheetSpec {
	width: number;
	height: number;
	mode: SheetMode;
	angle: ProjectionAngle;
	hand: Hand;
	extents: Extents;
	/** In `narrow` what stands beside the front view; in `single` what is shown. */
	cell: SideCell | 'front' | 'top';
}

export interface SheetLayout {
	width: number;
	height: number;
	scale: Scale;
	groundY: number;
	/** Page y of the wheel centre at ride height in the front view. */
	wheelY: number;
	views: Partial<Record<ViewKey, ViewWindow>>;
	charts: Box | null;
	figures: Box | null;
	title: Box;
	/** On which hand of the front view the side view lies, and how the views are unfolded. */
	sideAt: Hand;
	angle: ProjectionAngle;
}

const MARGIN = 16;
const CAPTION = 28;
const TITLE = 84;
/** The acts of the sheet stand in one line along its lower edge. */
const TOOLBAR = 30;
/** Room under the ground line for two rows of dimensions; more where the title block stands below. */
const UNDER_GROUND = 66;
const ABOVE_TYRE = 60;
const SIDE_PAD = 18;
const CENTRELINE_PAD = 44;
/** Between tyre and curves: the leader from the wheel to the travel slide runs here. */
const GUTTER = 40;
const CHARTS_LEAST = 236;
const GROW = 20;

const up = (value: number): number => Math.ceil(value / GROW) * GROW;

/**
 * The room a corner needs, rounded up to 20 mm so that the sheet keeps still under small edits. Fallbacks stand in
 * for what is not typed yet.
 */
export function extentsOf(places: Places, wheel: { centre: Vec3; tyre: TyreShape }): Extents {
	const points = Object.values(places).filter((point) => point !== undefined);
	const reach = (pick: (point: Vec3) => number, least: number) => Math.max(least, ...points.map(pick));
	const { centre, tyre } = wheel;
	const pointsFore = up(reach((p) => p[0], centre[0]));
	const pointsAft = up(reach((p) => -p[0], -centre[0]));
	return {
		outboard: up(reach((p) => Math.abs(p[1]), Math.abs(centre[1]) + tyre.width / 2 + 6)),
		top: up(reach((p) => p[2], centre[2] + tyre.radius)),
		fore: Math.max(pointsFore, up(centre[0] + tyre.radius)),
		aft: Math.max(pointsAft, up(tyre.radius - centre[0])),
		pointsFore,
		pointsAft,
		inboard: Math.min(Math.abs(centre[1]) - tyre.width, ...points.map((p) => Math.abs(p[1]))),
		wheelCentre: centre[2]
	};
}

const topNeed = (e: Extents): number => e.pointsFore + e.pointsAft + 60;

interface Columns {
	front: Box;
	beside: Box;
	side: Box | null;
	/** Page x of the centreline. */
	centreX: number;
}

/** The columns of a sheet from the centreline's hand outward: side view, front view, curves; mirrored for a right corner. */
function columns(spec: SheetSpec, s: number): Columns {
	const { extents: e, width } = spec;
	const sideW = spec.mode === 'full' ? (e.fore + e.aft) * s + 2 * SIDE_PAD : 0;
	const frontW = CENTRELINE_PAD + e.outboard * s + GUTTER;
	const besideW = width - 2 * MARGIN - sideW - frontW;
	const flip = spec.hand === 'right';
	const column = (x: number, w: number): Box => ({ x: flip ? width - x - w : x, y: 0, w, h: 0 });
	const frontX = MARGIN + sideW;
	const centreFromLeft = frontX + CENTRELINE_PAD;
	return {
		side: spec.mode === 'full' ? column(MARGIN, sideW) : null,
		front: column(frontX, frontW),
		beside: column(frontX + frontW, besideW),
		centreX: flip ? width - centreFromLeft : centreFromLeft
	};
}

/** Whether a sheet of several views fits at s pixels a mm. */
function fitsSheet(spec: SheetSpec, s: number): boolean {
	const { extents: e, height } = spec;
	const tall =
		2 * MARGIN + topNeed(e) * s + ABOVE_TYRE + e.top * s + (spec.angle === 'third' ? TITLE + 20 : UNDER_GROUND);
	const cell = spec.mode === 'narrow' && spec.cell === 'side' ? (e.fore + e.aft) * s : 0;
	return columns(spec, s).beside.w >= Math.max(CHARTS_LEAST, cell) && tall <= height;
}

/** Where everything goes on a sheet of several views, or of one. */
export function layoutSheet(spec: SheetSpec): SheetLayout {
	return spec.mode === 'single' ? layoutSingle(spec) : layoutSeveral(spec);
}

function layoutSeveral(spec: SheetSpec): SheetLayout {
	const { extents: e, width, height, angle, hand } = spec;
	const scale = chooseScale((s) => fitsSheet(spec, s));
	const s = pxPerMm(scale);
	const cols = columns(spec, s);
	const third = angle === 'third';
	const rise = ABOVE_TYRE + e.top * s;
	const groundY = third ? height - MARGIN - TITLE - 20 : MARGIN + rise;
	const frontRow = third
		? { y: groundY - rise, h: height - groundY + rise - TOOLBAR }
		: { y: MARGIN / 2, h: groundY + UNDER_GROUND - MARGIN / 2 };
	const topRow = third
		? { y: MARGIN / 2, h: frontRow.y - MARGIN / 2 }
		: { y: frontRow.y + frontRow.h, h: height - frontRow.y - frontRow.h - TOOLBAR };
	const title: Box = { x: cols.beside.x, y: height - MARGIN - TITLE, w: cols.beside.w, h: TITLE };
	const sideAt: Hand = spec.mode === 'full' ? (hand === 'left' ? 'left' : 'right') : hand === 'left' ? 'right' : 'left';
	const beside: Box = { ...cols.beside, y: frontRow.y, h: third ? title.y - frontRow.y - 4 : frontRow.h };
	const spare: Box = { ...cols.beside, y: topRow.y, h: third ? topRow.h : title.y - topRow.y - 8 };
	const place = (x: number): Placement => ({ x, y: groundY, pxPerMm: s });
	const views: SheetLayout['views'] = {
		front: { box: { ...cols.front, ...frontRow }, at: place(cols.centreX), frame: viewFrame('front', angle, sideAt) },
		top: {
			box: { ...cols.front, ...topRow },
			at: topPlacement(topRow, e, s, cols.centreX),
			frame: viewFrame('top', angle, sideAt)
		}
	};
	const sideBox = cols.side ? { ...cols.side, ...frontRow } : spec.cell === 'side' ? beside : null;
	if (sideBox) views.side = sideWindow(sideBox, e, place(0), viewFrame('side', angle, sideAt));
	const orbitBox = spec.mode === 'full' ? spare : spec.cell === 'orbit' ? beside : null;
	if (orbitBox) views.orbit = orbitWindow(orbitBox, e, hand);
	return {
		width,
		height,
		scale,
		groundY,
		wheelY: groundY - e.wheelCentre * s,
		views,
		charts: spec.mode === 'full' || spec.cell === 'curves' ? beside : null,
		figures: cols.side ? { ...cols.side, ...topRow } : spare,
		title,
		sideAt,
		angle
	};
}

/** The top view centred on the wheel, moved only so far as the points need to stay inside. */
function topPlacement(row: { y: number; h: number }, e: Extents, s: number, x: number): Placement {
	const [first, last] = [row.y + 4, row.y + row.h - 4];
	const middle = (first + last) / 2 - ((e.fore - e.aft) / 2) * s;
	const lowest = first + (e.pointsAft + 30) * s;
	const highest = last - (e.pointsFore + 30) * s;
	return { x, y: lowest > highest ? (lowest + highest) / 2 : Math.max(lowest, Math.min(highest, middle)), pxPerMm: s };
}

function sideWindow(box: Box, e: Extents, at: Placement, frame: Frame): ViewWindow {
	const middle = ((e.fore - e.aft) / 2) * frame.right[0];
	return { box, at: { ...at, x: box.x + box.w / 2 - middle * at.pxPerMm }, frame };
}

/** The orbit view fills its window: the ball about everything drawn, with a little of it cut, since no corner is a ball. */
function orbitWindow(box: Box, e: Extents, hand: Hand): ViewWindow {
	const across = 0.8 * Math.hypot(e.outboard - e.inboard, e.top, (e.fore + e.aft) * 0.8);
	return {
		box,
		at: {
			x: box.x + box.w / 2,
			y: box.y + CAPTION + (box.h - CAPTION) / 2,
			pxPerMm: Math.min(box.w - 16, box.h - CAPTION - 12) / across
		},
		frame: viewFrame('front', 'third', hand)
	};
}

/** The point about which the orbit view turns (mm): the middle of what is drawn. */
export function orbitCentre(e: Extents, hand: Hand): Vec3 {
	const outboard = (e.outboard + e.inboard) / 2;
	return [(e.fore - e.aft) / 2, hand === 'left' ? outboard : -outboard, e.top / 2];
}

function layoutSingle(spec: SheetSpec): SheetLayout {
	const { extents: e, width, height, angle, hand, cell } = spec;
	const titleH = width < 560 ? 0 : 52;
	const box: Box = { x: 0, y: 0, w: width, h: height - titleH };
	const sideAt: Hand = hand === 'left' ? 'left' : 'right';
	const across = cell === 'side' ? e.fore + e.aft : e.outboard + (width < 560 ? 0 : 60);
	const tall = cell === 'top' ? topNeed(e) : e.top;
	const [padX, padY] = [2 * MARGIN + 36, cell === 'top' ? CAPTION + 24 : 32 + ABOVE_TYRE + UNDER_GROUND];
	const scale = chooseScale((s) => across * s + padX <= box.w && tall * s + padY <= box.h);
	const s = pxPerMm(scale);
	const spare = box.h - padY - tall * s;
	const groundY = box.h - UNDER_GROUND - Math.max(0, spare / 2);
	const used = e.outboard * s;
	const inset = Math.max(MARGIN + 28, (box.w - used) / 2);
	const centreX = hand === 'left' ? inset : box.w - inset;
	const at: Placement = { x: centreX, y: groundY, pxPerMm: s };
	const views: SheetLayout['views'] = {};
	if (cell === 'front') views.front = { box, at, frame: viewFrame('front', angle, sideAt) };
	if (cell === 'top') {
		views.top = { box, at: topPlacement({ y: 0, h: box.h }, e, s, centreX), frame: viewFrame('top', angle, sideAt) };
	}
	if (cell === 'side') views.side = sideWindow(box, e, at, viewFrame('side', angle, sideAt));
	if (cell === 'orbit') views.orbit = orbitWindow(box, e, hand);
	return {
		width,
		height,
		scale,
		groundY,
		wheelY: cell === 'curves' ? box.h / 2 : groundY - e.wheelCentre * s,
		views,
		charts: cell === 'curves' ? box : null,
		figures: null,
		title: { x: MARGIN, y: height - titleH, w: width - 2 * MARGIN, h: Math.max(0, titleH - 8) },
		sideAt,
		angle
	};
}
