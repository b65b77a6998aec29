import type { Vec3 } from '$lib/kinematics';
import type { Segment, Spot } from './dimension';
import type { Box, ViewWindow } from './layout';
import {
	axisAtHeight,
	coilOver,
	placeBars,
	placeMarks,
	polyline,
	type PlacedBar,
	type PlacedMark,
	type Places
} from './linkage';
import { project, toSheet, type Frame, type Plane, type ViewKey } from './projection';
import { tyreOutline, wheelCircle, type TyreShape } from './tyre';

/** A corner as the drawing needs it: places of the marks, and the wheel where the geometry is complete. */
export interface DrawnCorner {
	places: Places;
	wheel: { centre: Vec3; spin: Vec3; contact: Vec3; tyre: TyreShape; rimRadius: number | null } | null;
	/** Height of the roll centre above the contact point, mm; null where there is none. */
	rollCentre: number | null;
	rollCentreByArms: number | null;
}

/** Everything of one view in sheet pixels, ready to be drawn. */
export interface ViewScene {
	bars: PlacedBar[];
	marks: PlacedMark[];
	/** With the room it takes, so that a window that cuts it can say so. */
	tyre: { edge: string; circles: string; x1: number; x2: number; y1: number; y2: number } | null;
	/** Wheel centre, contact point, and where the steering axis meets the ground. */
	hub: Spot | null;
	contact: Spot | null;
	axisFoot: Spot | null;
	/** The steering axis from the ground to a little past the upper ball joint. */
	axis: Segment | null;
	/** From the wheel centre to the steering axis at the same height. */
	stub: Segment | null;
	coil: { axis: string; coil: string; seats: string } | null;
	rollCentre: Spot | null;
	rollCentreByArms: Spot | null;
	/** Page y of the ground where the view shows it. */
	groundY: number | null;
	/** Page x of the car's centreline where the view shows it. */
	centreX: number | null;
	/** Loaded radius in sheet pixels. */
	wheelRadius: number | null;
	/** The wheel plane's line through the hub as a page direction (radians, y down, toward the top or front). */
	wheelLine: number | null;
}

/** A view's eye: its frame, and a place about which it is set (the orbit view turns about the corner's middle). */
export interface Eye {
	key: ViewKey;
	frame: Frame;
	about?: Vec3;
}

const PAST_UPPER = 26;

/** Where a view's body origin falls: its placement, less the place about which the eye is set. */
function placementOf(eye: Eye, at: ViewWindow['at']): ViewWindow['at'] {
	const shift = eye.about ? project(eye.frame, eye.about) : ([0, 0] as const);
	return { ...at, x: at.x - shift[0] * at.pxPerMm, y: at.y + shift[1] * at.pxPerMm };
}

/** Sheet pixels of a body point in a view. */
export function spotIn(eye: Eye, at: ViewWindow['at'], point: Vec3): Spot {
	return toSheet(placementOf(eye, at), project(eye.frame, point));
}

/** Lays a corner out in one window. Pure: the same corner and window always give the same scene. */
export function viewScene(eye: Eye, at: ViewWindow['at'], corner: DrawnCorner): ViewScene {
	const placement = placementOf(eye, at);
	const spot = (point: Vec3): Spot => toSheet(placement, project(eye.frame, point));
	const { places, wheel } = corner;
	const [lower, upper] = [places.lowerBall, places.upperBall];
	const level = eye.key === 'front' || eye.key === 'side';
	const foot = lower && upper && wheel ? axisAtHeight(lower, upper, wheel.contact[2]) : null;
	const stubEnd = lower && upper && wheel ? axisAtHeight(lower, upper, wheel.centre[2]) : null;
	const [top, bottom] = [places.coiloverTop, places.coiloverBottom];
	const groundZ = wheel?.contact[2] ?? 0;
	return {
		bars: placeBars(eye.frame, placement, places),
		marks: placeMarks(eye.frame, placement, places),
		tyre: wheel ? tyreOnce(eye, wheel, placement) : null,
		hub: wheel && spot(wheel.centre),
		contact: wheel && spot(wheel.contact),
		axisFoot: foot && spot(foot),
		axis: foot && upper ? pastEnd(spot(foot), spot(upper), PAST_UPPER) : null,
		stub: wheel && stubEnd ? [...spot(wheel.centre), ...spot(stubEnd)] : null,
		coil: top && bottom ? coilOver(spot(top), spot(bottom), 26 * placement.pxPerMm) : null,
		rollCentre: corner.rollCentre === null || eye.key !== 'front' ? null : spot([0, 0, groundZ + corner.rollCentre]),
		rollCentreByArms:
			corner.rollCentreByArms === null || eye.key !== 'front' ? null : spot([0, 0, groundZ + corner.rollCentreByArms]),
		groundY: level ? spot([0, 0, groundZ])[1] : null,
		centreX: eye.key === 'front' || eye.key === 'top' ? spot([0, 0, 0])[0] : null,
		wheelRadius: wheel && wheel.tyre.radius * placement.pxPerMm,
		wheelLine: wheel ? wheelLine(eye.frame, wheel.spin) : null
	};
}

function pastEnd([x1, y1]: Spot, [x2, y2]: Spot, past: number): Segment {
	const length = Math.hypot(x2 - x1, y2 - y1) || 1;
	return [x1, y1, x2 + ((x2 - x1) / length) * past, y2 + ((y2 - y1) / length) * past];
}

/** The wheel plane seen on edge: square to the projected spin axis, toward the top of the page (front) or its foot (top view). */
function wheelLine(frame: Frame, spin: Vec3): number | null {
	const [u, v] = project(frame, spin);
	if (Math.hypot(u, v) < 0.2) return null;
	// Square to (u, v) on the plane is (−v, u); page y runs down. Of the two senses take the one that rises.
	const [du, dv] = u >= 0 ? [-v, u] : [v, -u];
	return Math.atan2(-dv, du);
}

type Wheel = NonNullable<DrawnCorner['wheel']>;
type Tyre = ViewScene['tyre'];

/** A wheel that stands still in a window that stands still is laid out once: most edits leave it where it is. */
const LAID = new WeakMap<Wheel, WeakMap<Eye, { at: ViewWindow['at']; tyre: Tyre }>>();

function tyreOnce(eye: Eye, wheel: Wheel, at: ViewWindow['at']): Tyre {
	const byEye = LAID.get(wheel) ?? new WeakMap<Eye, { at: ViewWindow['at']; tyre: Tyre }>();
	LAID.set(wheel, byEye);
	const laid = byEye.get(eye);
	if (laid && laid.at.x === at.x && laid.at.y === at.y && laid.at.pxPerMm === at.pxPerMm) return laid.tyre;
	const tyre = tyrePaths(eye, wheel, at);
	byEye.set(eye, { at, tyre });
	return tyre;
}

function tyrePaths(eye: Eye, wheel: Wheel, at: ViewWindow['at']): Tyre {
	const lay = (plane: readonly Plane[]) => plane.map((one) => toSheet(at, one));
	const outline = lay(tyreOutline(eye.frame, wheel.centre, wheel.spin, wheel.tyre));
	const [xs, ys] = [outline.map(([x]) => x), outline.map(([, y]) => y)];
	const room = { x1: Math.min(...xs), x2: Math.max(...xs), y1: Math.min(...ys), y2: Math.max(...ys) };
	const ring = (radius: number, offset: number) =>
		polyline(lay(wheelCircle(eye.frame, wheel.centre, wheel.spin, radius, offset)), true);
	const rim = wheel.rimRadius ?? wheel.tyre.radius * 0.7;
	const edge = polyline(outline, true);
	if (eye.key === 'side') return { edge, circles: ring(rim, 0), ...room };
	if (eye.key !== 'orbit') return { edge, circles: '', ...room };
	const half = wheel.tyre.width / 2 - wheel.tyre.shoulder / 2;
	return { edge, circles: ring(rim, half) + ring(rim, -half), ...room };
}

/** How far a break line stands in from the window's edge, and past the outline it breaks (px). */
const BREAK_INSET = 7;
const BREAK_PAST = 9;

/**
 * Break lines across a tyre that a window cuts off at its top or foot, as a draughtsman marks a part that runs on:
 * level lines with one zigzag. Gives their path data and the window left between them; null where nothing is cut.
 */
export function tyreBreaks(
	tyre: NonNullable<ViewScene['tyre']>,
	box: Box
): { path: string; top: number; foot: number } | null {
	const cutTop = tyre.y1 < box.y;
	const cutFoot = tyre.y2 > box.y + box.h;
	if (!cutTop && !cutFoot) return null;
	const middle = (tyre.x1 + tyre.x2) / 2;
	const line = (y: number) =>
		polyline([
			[tyre.x1 - BREAK_PAST, y],
			[middle - 6, y],
			[middle - 2.5, y - 6],
			[middle + 2.5, y + 6],
			[middle + 6, y],
			[tyre.x2 + BREAK_PAST, y]
		]);
	const [top, foot] = [cutTop ? box.y + BREAK_INSET : box.y, cutFoot ? box.y + box.h - BREAK_INSET : box.y + box.h];
	return { path: (cutTop ? line(top) : '') + (cutFoot ? line(foot) : ''), top, foot };
}
