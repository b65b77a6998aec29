/**
 * An independent solver of one double A-arm corner, for checks only: the upright is a free rigid body (a quaternion
 * and a translation, six unknowns) and Newton's method closes five link lengths and one height. It shares nothing
 * with the kernel: no closed form, no branch formula, no screw. Axes, points and signs as everywhere in this project:
 * x forward, y left, z up, millimetres; angles in degrees where they leave a function.
 */

export type V3 = readonly [number, number, number];

export type LinkPoint =
	'upperFront' | 'upperRear' | 'upperBall' | 'lowerFront' | 'lowerRear' | 'lowerBall' | 'tieRodInner' | 'tieRodOuter';

export interface Wheel {
	track: number;
	x: number;
	loadedRadius: number;
	camber: number;
	toe: number;
}

export interface Coilover {
	top: V3;
	bottom: V3;
	on: 'lowerArm' | 'upperArm' | 'upright';
	rate?: number;
	forceAtRide?: number;
	openLength?: number;
	closedLength?: number;
}

export interface Vehicle {
	wheelbase?: number;
	cgHeight?: number;
	frontBrakeShare?: number;
	frontBrakes?: 'upright' | 'inboard';
	sprungCornerMass?: number;
	tyreRate?: number;
}

/** One corner as it is entered, at ride height. A right corner has negative y. */
export interface Corner {
	points: Readonly<Record<LinkPoint, V3>>;
	wheel: Wheel;
	coilover?: Coilover;
	vehicle?: Vehicle;
}

/** Where the upright is: unit quaternion (w, x, y, z) and the place of its lower ball joint. */
export interface Pose {
	q: readonly [number, number, number, number];
	t: V3;
}

/** Five links between a fixed end and an end on the upright, and the wheel that the upright carries. */
export interface Linkage {
	corner: Corner;
	/** +1 on the left, -1 on the right: the outboard direction along y. */
	side: 1 | -1;
	fixed: V3[];
	/** Ends on the upright, from the lower ball joint at ride height, in body axes at ride height. */
	moving: V3[];
	lengths: number[];
	hub: V3;
	spin: V3;
	radius: number;
}

/** What closes the sixth freedom: the height of the wheel centre, or of the tyre's lowest point. */
export interface Closing {
	point: 'hub' | 'contact';
	z: number;
}

export const RAD = Math.PI / 180;

export const add = (a: V3, b: V3): V3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
export const sub = (a: V3, b: V3): V3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
export const scale = (a: V3, k: number): V3 => [a[0] * k, a[1] * k, a[2] * k];
export const dot = (a: V3, b: V3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const cross = (a: V3, b: V3): V3 => [
	a[1] * b[2] - a[2] * b[1],
	a[2] * b[0] - a[0] * b[2],
	a[0] * b[1] - a[1] * b[0]
];
export const norm = (a: V3): number => Math.sqrt(dot(a, a));
export const unit = (a: V3): V3 => scale(a, 1 / norm(a));

/** Turns a vector by a unit quaternion. */
export function turn(q: Pose['q'], v: V3): V3 {
	const [w, x, y, z] = q;
	const u: V3 = [x, y, z];
	const c = scale(cross(u, v), 2);
	return add(add(v, scale(c, w)), cross(u, c));
}

function multiply(a: Pose['q'], b: Pose['q']): Pose['q'] {
	const w = a[0] * b[0] - a[1] * b[1] - a[2] * b[2] - a[3] * b[3];
	const x = a[0] * b[1] + a[1] * b[0] + a[2] * b[3] - a[3] * b[2];
	const y = a[0] * b[2] - a[1] * b[3] + a[2] * b[0] + a[3] * b[1];
	const z = a[0] * b[3] + a[1] * b[2] - a[2] * b[1] + a[3] * b[0];
	const n = Math.sqrt(w * w + x * x + y * y + z * z);
	return [w / n, x / n, y / n, z / n];
}

/** The pose after a small turn `step[0..2]` (rad, body axes) about the lower ball joint and a shift `step[3..5]`. */
function advance(pose: Pose, step: ArrayLike<number>, at: number): Pose {
	const r: V3 = [step[at] ?? 0, step[at + 1] ?? 0, step[at + 2] ?? 0];
	const angle = norm(r);
	const k = angle < 1e-9 ? 0.5 : Math.sin(angle / 2) / angle;
	const dq: Pose['q'] = [Math.cos(angle / 2), r[0] * k, r[1] * k, r[2] * k];
	return {
		q: multiply(dq, pose.q),
		t: add(pose.t, [step[at + 3] ?? 0, step[at + 4] ?? 0, step[at + 5] ?? 0])
	};
}

/** Place of an upright point given by its offset from the lower ball joint at ride height. */
export const place = (pose: Pose, local: V3): V3 => add(pose.t, turn(pose.q, local));

/** The outboard spin axis of a wheel with the given static camber and toe (degrees). */
export function spinAxis(wheel: Wheel, side: 1 | -1): V3 {
	const c = wheel.camber * RAD;
	const t = wheel.toe * RAD;
	return [Math.sin(t) * Math.cos(c), side * Math.cos(t) * Math.cos(c), -Math.sin(c)];
}

/** From the lowest point of a disc with spin axis `s` to its centre, per unit radius; `up` is the ground's normal. */
export const diskUp = (s: V3, up: V3): V3 => unit(sub(up, scale(s, dot(up, s))));

export const VERTICAL: V3 = [0, 0, 1];

/** Adjustment of a corner's links: pivots moved and legs lengthened, mm. */
export interface LinkChange {
	upperFront?: V3;
	upperRear?: V3;
	legFront?: number;
	legRear?: number;
	tieRod?: number;
}

/** Builds the five links of a corner; `rack` in mm to the left; `change` alters the upper arm and the tie rod. */
export function linkage(corner: Corner, rack = 0, change: LinkChange = {}): Linkage {
	const p = corner.points;
	const side = p.lowerBall[1] >= 0 ? 1 : -1;
	const spin = spinAxis(corner.wheel, side);
	const contact: V3 = [corner.wheel.x, (side * corner.wheel.track) / 2, 0];
	const hub = add(contact, scale(diskUp(spin, VERTICAL), corner.wheel.loadedRadius));
	const pairs: [V3, V3][] = [
		[p.lowerFront, p.lowerBall],
		[p.lowerRear, p.lowerBall],
		[p.upperFront, p.upperBall],
		[p.upperRear, p.upperBall],
		[p.tieRodInner, p.tieRodOuter]
	];
	const growth = [0, 0, change.legFront ?? 0, change.legRear ?? 0, change.tieRod ?? 0];
	const shift: V3[] = [
		[0, 0, 0],
		[0, 0, 0],
		change.upperFront ?? [0, 0, 0],
		change.upperRear ?? [0, 0, 0],
		[0, rack, 0]
	];
	return {
		corner,
		side,
		fixed: pairs.map(([a], i) => add(a, shift[i] ?? [0, 0, 0])),
		moving: pairs.map(([, b]) => sub(b, p.lowerBall)),
		lengths: pairs.map(([a, b], i) => norm(sub(b, a)) + (growth[i] ?? 0)),
		hub: sub(hub, p.lowerBall),
		spin,
		radius: corner.wheel.loadedRadius
	};
}

/** The entered position. */
export const ridePose = (link: Linkage): Pose => ({ q: [1, 0, 0, 0], t: link.corner.points.lowerBall });

/** Height of the wheel centre at ride height, mm. */
export const rideHub = (link: Linkage): number => link.corner.points.lowerBall[2] + link.hub[2];

/** Lowest point of the tyre against a ground whose normal (body axes) is `up`. */
export function contactOf(link: Linkage, pose: Pose, up: V3 = VERTICAL): V3 {
	return sub(place(pose, link.hub), scale(diskUp(turn(pose.q, link.spin), up), link.radius));
}

/** One equation: its residual, and the derivative against turn and shift of each body in a row. */
export interface Row {
	residual: number;
	gradient: Float64Array;
}

/** The row for "component of an upright point along `d`", body number `index` of `count`. */
export function pointRow(pose: Pose, point: V3, d: V3, residual: number, index = 0, count = 1): Row {
	const gradient = new Float64Array(6 * count);
	const m = cross(sub(point, pose.t), d);
	for (let i = 0; i < 3; i++) {
		gradient[6 * index + i] = m[i] ?? 0;
		gradient[6 * index + 3 + i] = d[i] ?? 0;
	}
	return { residual, gradient };
}

/** The five link-length rows of a body. */
export function linkRows(link: Linkage, pose: Pose, index = 0, count = 1): Row[] {
	return link.moving.map((local, i) => {
		const end = place(pose, local);
		const along = sub(end, link.fixed[i] ?? end);
		const length = norm(along);
		return pointRow(pose, end, scale(along, 1 / length), length - (link.lengths[i] ?? 0), index, count);
	});
}

/** Gaussian elimination with row exchange; null where a pivot vanishes. Also gives the sign of the determinant. */
export function eliminate(rows: Row[]): { step: Float64Array; sign: number } | null {
	const n = rows.length;
	const a: Float64Array[] = rows.map((row) => Float64Array.from([...row.gradient, -row.residual]));
	let sign = 1;
	for (let c = 0; c < n; c++) {
		let best = c;
		for (let r = c + 1; r < n; r++) if (Math.abs(at(a, r, c)) > Math.abs(at(a, best, c))) best = r;
		const pivot = at(a, best, c);
		if (!(Math.abs(pivot) > 1e-14)) return null;
		const top = a[best] as Float64Array;
		if (best !== c) {
			a[best] = a[c] as Float64Array;
			a[c] = top;
			sign = -sign;
		}
		if (pivot < 0) sign = -sign;
		for (let r = c + 1; r < n; r++) {
			const row = a[r] as Float64Array;
			const f = (row[c] ?? 0) / pivot;
			if (f !== 0) for (let k = c; k <= n; k++) row[k] = (row[k] ?? 0) - f * (top[k] ?? 0);
		}
	}
	const step = new Float64Array(n);
	for (let r = n - 1; r >= 0; r--) {
		let sum = at(a, r, n);
		for (let k = r + 1; k < n; k++) sum -= at(a, r, k) * (step[k] ?? 0);
		step[r] = sum / at(a, r, r);
	}
	return { step, sign };
}

const at = (a: Float64Array[], r: number, c: number): number => a[r]?.[c] ?? 0;

/** Newton's method on any number of bodies; null when it does not settle. */
export function settle(
	poses: Pose[],
	rowsOf: (poses: Pose[]) => Row[]
): { poses: Pose[]; first: Pose[]; sign: number } | null {
	let now = poses;
	let first = poses;
	for (let i = 0; i < 25; i++) {
		const solved = eliminate(rowsOf(now));
		if (!solved) return null;
		let size = 0;
		for (let k = 0; k < solved.step.length; k++) {
			size = Math.max(size, Math.abs(solved.step[k] ?? 0) * (k % 6 < 3 ? 200 : 1));
		}
		if (!(size < 400)) return null;
		now = now.map((pose, b) => advance(pose, solved.step, 6 * b));
		if (i === 0) first = now;
		// The error left after a step of this size is its square, far below rounding.
		if (size < 1e-7) return { poses: now, first, sign: solved.sign };
	}
	return null;
}

/** One position of a corner, with the signs that name its way of assembly. */
export interface Solved {
	pose: Pose;
	signs: [number, number, number];
	/** How far the last solution lies from its first Newton step, as a share of the way: large where the path bends. */
	bend: number;
}

/** Signs of the three singular events: the whole linkage, the upper arm in line, the tie rod flat. */
function signsOf(link: Linkage, pose: Pose, determinant: number): [number, number, number] {
	const ends = link.moving.map((local) => place(pose, local));
	const end = (i: number): V3 => ends[i] ?? [NaN, NaN, NaN];
	const fix = (i: number): V3 => link.fixed[i] ?? [NaN, NaN, NaN];
	const upperTangent = cross(sub(fix(3), fix(2)), sub(end(2), fix(2)));
	const upper = dot(upperTangent, sub(end(2), end(0)));
	const tie = dot(sub(end(4), fix(4)), cross(sub(end(4), end(0)), sub(end(4), end(2))));
	return [determinant, Math.sign(upper), Math.sign(tie)];
}

/** Newton from a nearby pose. */
export function solveNear(link: Linkage, closing: Closing, from: Pose): Solved | null {
	const done = settle([from], ([pose]) => {
		const here = pose as Pose;
		const point = closing.point === 'hub' ? place(here, link.hub) : contactOf(link, here);
		return [...linkRows(link, here), pointRow(here, point, VERTICAL, point[2] - closing.z)];
	});
	return done && asSolved(link, from, done.first[0], done.poses[0], done.sign);
}

/** A body's part of a settled system, with its signs and how straight the way there was. */
export function asSolved(
	link: Linkage,
	from: Pose | undefined,
	first: Pose | undefined,
	last: Pose | undefined,
	sign: number
): Solved {
	if (!from || !first || !last) throw new Error('One pose a body is expected.');
	return { pose: last, signs: signsOf(link, last, sign), bend: bendOf(link, from, first, last) };
}

/** Largest distance of a link end or the hub between two poses, mm. */
function apart(link: Linkage, a: Pose, b: Pose): number {
	return Math.max(...[...link.moving, link.hub].map((local) => norm(sub(place(a, local), place(b, local)))));
}

function bendOf(link: Linkage, from: Pose, first: Pose, last: Pose): number {
	const way = apart(link, from, last);
	return way < 1e-6 ? 0 : apart(link, first, last) / way;
}

/**
 * Whether a solution carries on from the one before: assembled the same way, and near where the tangent pointed. The
 * second half keeps Newton from leaping over a gap in the travel to the far side of a bind.
 */
export const continues = (next: Solved, before: Solved): boolean =>
	next.bend < 0.35 && next.signs.every((s, i) => s === before.signs[i]);

/**
 * Follows the linkage along a path of (linkage, closing) given for 0 to 1, from a solved position, in steps that
 * shrink where Newton fails or the way of assembly changes. Gives how far it came (1: all the way).
 */
export function follow(
	path: (u: number) => [Linkage, Closing],
	start: Solved,
	firstStep: number,
	smallest = 1e-9
): { reached: number; at: Solved } {
	let u = 0;
	let here = start;
	let step = firstStep;
	while (u < 1) {
		const next = Math.min(1, u + step);
		const tried = solveNear(...path(next), here.pose);
		if (tried && continues(tried, here)) {
			u = next;
			here = tried;
			step *= 1.5;
		} else {
			step = (next - u) / 2;
			if (step < smallest) break;
		}
	}
	return { reached: u, at: here };
}

/** The position at a travel and rack (mm), reached first by travel, then by rack; null where the path binds. */
export function solveAt(corner: Corner, travel: number, rack = 0): { link: Linkage; at: Solved } | null {
	const link = linkage(corner);
	const start = solveNear(link, { point: 'hub', z: rideHub(link) }, ridePose(link));
	if (!start) return null;
	const bump = follow(
		(u) => [link, { point: 'hub', z: rideHub(link) + u * travel }],
		start,
		Math.min(1, 12 / Math.max(Math.abs(travel), 1e-9)),
		1e-6
	);
	if (bump.reached < 1) return null;
	if (rack === 0) return { link, at: bump.at };
	const closing: Closing = { point: 'hub', z: rideHub(link) + travel };
	const steer = follow((u) => [linkage(corner, u * rack), closing], bump.at, Math.min(1, 6 / Math.abs(rack)), 1e-6);
	return steer.reached < 1 ? null : { link: linkage(corner, rack), at: steer.at };
}

/** The travel (mm, signed) at which the linkage binds in the direction of `to`, or null when `to` is reached. */
export function travelLimit(corner: Corner, to: number): number | null {
	const link = linkage(corner);
	const start = solveNear(link, { point: 'hub', z: rideHub(link) }, ridePose(link));
	if (!start) return 0;
	const way = follow((u) => [link, { point: 'hub', z: rideHub(link) + u * to }], start, 10 / Math.abs(to), 1e-11);
	return way.reached < 1 ? way.reached * to : null;
}

/** The rack movement (mm, signed) at which the linkage binds at a travel, or null when `to` is reached. */
export function rackLimit(corner: Corner, travel: number, to: number): number | null {
	const start = solveAt(corner, travel);
	if (!start) return 0;
	const closing: Closing = { point: 'hub', z: rideHub(start.link) + travel };
	const way = follow((u) => [linkage(corner, u * to), closing], start.at, 5 / Math.abs(to), 1e-11);
	return way.reached < 1 ? way.reached * to : null;
}

/** The corner with its links changed, body held, tyre's lowest point on the ground (z = 0). */
export function solveAdjusted(corner: Corner, change: LinkChange): { link: Linkage; at: Solved } | null {
	const closing: Closing = { point: 'contact', z: 0 };
	const start = solveNear(linkage(corner), closing, ridePose(linkage(corner)));
	if (!start) return null;
	const part = (u: number): LinkChange => ({
		...(change.upperFront && { upperFront: scale(change.upperFront, u) }),
		...(change.upperRear && { upperRear: scale(change.upperRear, u) }),
		legFront: u * (change.legFront ?? 0),
		legRear: u * (change.legRear ?? 0),
		tieRod: u * (change.tieRod ?? 0)
	});
	const way = follow((u) => [linkage(corner, 0, part(u)), closing], start, 0.25, 1e-6);
	return way.reached < 1 ? null : { link: linkage(corner, 0, change), at: way.at };
}

/** The same corner on the other side of the car. */
export function mirrored(corner: Corner): Corner {
	const flip = (p: V3): V3 => [p[0], -p[1], p[2]];
	const points = Object.fromEntries(Object.entries(corner.points).map(([k, p]) => [k, flip(p)])) as Record<
		LinkPoint,
		V3
	>;
	const coilover = corner.coilover && {
		...corner.coilover,
		top: flip(corner.coilover.top),
		bottom: flip(corner.coilover.bottom)
	};
	return { ...corner, points, ...(coilover && { coilover }) };
}
