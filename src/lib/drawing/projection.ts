import type { Vec3 } from '$lib/kinematics';

/** The four ways a corner is looked at. */
export type ViewKey = 'front' | 'top' | 'side' | 'orbit';
/** How the views are unfolded on the sheet. */
export type ProjectionAngle = 'third' | 'first';
/** A hand: of the car for a corner, of the page for a place on the sheet. */
export type Hand = 'left' | 'right';
/** A place on the drawing plane in mm, u to the right and v up the page. */
export type Plane = readonly [u: number, v: number];

/** The drawing plane of a view in body axes (x forward, y left, z up): unit vectors, right × up = toward the eye. */
export interface Frame {
	right: Vec3;
	up: Vec3;
	toward: Vec3;
}

/** Where the eye of the orbit view stands, in degrees: 0 is ahead of the car, 90 on its left; pitch up from level. */
export interface Orbit {
	yaw: number;
	pitch: number;
}

export const ORBIT_HOME: Orbit = { yaw: -38, pitch: 24 };
const PITCH_LIMIT = 89;
const RADIAN = Math.PI / 180;

export const dot = (a: Vec3, b: Vec3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/**
 * The frame of an aligned view. Forward is down the page in the top view under either angle. A side view set to the
 * right of the front view is seen from the right of the page in third angle, from its left in first; and so mirrored.
 */
export function viewFrame(view: Exclude<ViewKey, 'orbit'>, angle: ProjectionAngle, sideAt: Hand): Frame {
	if (view === 'front') return { right: [0, 1, 0], up: [0, 0, 1], toward: [1, 0, 0] };
	if (view === 'top') return { right: [0, 1, 0], up: [-1, 0, 0], toward: [0, 0, 1] };
	const eyeAtPlusY = (angle === 'third') === (sideAt === 'right');
	return eyeAtPlusY
		? { right: [-1, 0, 0], up: [0, 0, 1], toward: [0, 1, 0] }
		: { right: [1, 0, 0], up: [0, 0, 1], toward: [0, -1, 0] };
}

/** The frame of the orbit view: yaw 0, pitch 0 is the front view, pitch 90 the top view. */
export function orbitFrame({ yaw, pitch }: Orbit): Frame {
	const [cy, sy, cp, sp] = [
		Math.cos(yaw * RADIAN),
		Math.sin(yaw * RADIAN),
		Math.cos(pitch * RADIAN),
		Math.sin(pitch * RADIAN)
	];
	return { right: [-sy, cy, 0], up: [-sp * cy, -sp * sy, cp], toward: [cp * cy, cp * sy, sp] };
}

/** The eye turned by a drag of (dx, dy) pixels, half a degree a pixel; pitch stays short of straight up or down. */
export function turnOrbit(orbit: Orbit, dx: number, dy: number): Orbit {
	const pitch = Math.max(-PITCH_LIMIT, Math.min(PITCH_LIMIT, orbit.pitch + dy / 2));
	const yaw = ((((orbit.yaw - dx / 2 + 180) % 360) + 360) % 360) - 180;
	return { yaw, pitch };
}

/** A body point (mm) on the drawing plane of a frame (mm). */
export function project(frame: Frame, point: Vec3): Plane {
	return [dot(frame.right, point), dot(frame.up, point)];
}

/** A move on the drawing plane (mm) as a move in body axes (mm), nothing along the line of sight. */
export function unprojectMove(frame: Frame, [du, dv]: Plane): Vec3 {
	const along = (k: 0 | 1 | 2) => frame.right[k] * du + frame.up[k] * dv;
	return [along(0), along(1), along(2)];
}

/** A view on the sheet: pixels of the drawing plane's origin, and pixels a mm. Page y runs down. */
export interface Placement {
	x: number;
	y: number;
	pxPerMm: number;
}

/** Sheet pixels of a place on the drawing plane. */
export function toSheet(at: Placement, [u, v]: Plane): [x: number, y: number] {
	return [at.x + u * at.pxPerMm, at.y - v * at.pxPerMm];
}

/** The place on the drawing plane (mm) under a sheet pixel; the inverse of `toSheet`. */
export function fromSheet(at: Placement, x: number, y: number): Plane {
	return [(x - at.x) / at.pxPerMm, (at.y - y) / at.pxPerMm];
}

/** A placement after zoom and pan: k times as large, moved by (x, y) pixels, as d3-zoom's transform does it. */
export function zoomed(at: Placement, zoom: { k: number; x: number; y: number }): Placement {
	return { x: at.x * zoom.k + zoom.x, y: at.y * zoom.k + zoom.y, pxPerMm: at.pxPerMm * zoom.k };
}
