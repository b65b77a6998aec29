/**
 * The independent solver with both sides of an axle: body roll as one system of twelve unknowns, steering as two
 * corners on one rack.
 */
import {
	add,
	asSolved,
	contactOf,
	continues,
	dot,
	linkage,
	linkRows,
	norm,
	place,
	pointRow,
	RAD,
	rideHub,
	ridePose,
	scale,
	settle,
	solveAt,
	solveNear,
	sub,
	turn,
	VERTICAL,
	type Corner,
	type Linkage,
	type Pose,
	type Solved,
	type V3
} from './newton';
import { attitude, materialVelocity, type Attitude } from './newton-figures';

export interface Sided<T> {
	left: T;
	right: T;
}

/** One wheel of a rolled body: figures against the body, camber also against the ground. */
export interface RolledWheel extends Attitude {
	travel: number;
	camberToGround: number;
	wheelCentre: V3;
	spinAxis: V3;
	/** Lowest point of the tyre above the rolled ground, body axes. */
	ground: V3;
}

export interface Rolled extends Sided<RolledWheel> {
	rollCentre: { height: number; lateral: number } | null;
}

/** The ground's normal in body axes when the body is rolled by `roll` degrees about +x. */
export const groundNormal = (roll: number): V3 => [0, Math.sin(roll * RAD), Math.cos(roll * RAD)];

function rollRows(links: Linkage[], poses: Pose[], up: V3, heave: number) {
	const rows = links.flatMap((link, i) => linkRows(link, poses[i] as Pose, i, 2));
	const ends = links.map((link, i) => {
		const pose = poses[i] as Pose;
		const hub = place(pose, link.hub);
		const contact = contactOf(link, pose, up);
		return {
			mean: pointRow(pose, hub, scale(VERTICAL, 0.5), (hub[2] - rideHub(link)) / 2, i, 2),
			level: pointRow(pose, contact, i === 0 ? up : scale(up, -1), dot(contact, up) * (i === 0 ? 1 : -1), i, 2)
		};
	});
	const join = (key: 'mean' | 'level', offset: number) => ({
		residual: ends.reduce((sum, e) => sum + e[key].residual, -offset),
		gradient: Float64Array.from({ length: 12 }, (_, k) => ends.reduce((sum, e) => sum + (e[key].gradient[k] ?? 0), 0))
	});
	return [...rows, join('mean', heave), join('level', 0)];
}

interface Posed {
	links: Linkage[];
	poses: Pose[];
}

/** Follows both uprights from level to a roll and heave in steps that shrink; how far it came, 1 being all the way. */
function followRoll(axle: Sided<Corner>, roll: number, heave: number, smallest: number): Posed & { reached: number } {
	const links = [linkage(axle.left), linkage(axle.right)];
	let here = links.map((link) => solveNear(link, { point: 'hub', z: rideHub(link) }, ridePose(link)) as Solved);
	const hubs = here.map((s) => s.signs[0]);
	let u = 0;
	let step = Math.min(1, 1 / Math.max(1, Math.abs(roll), Math.abs(heave) / 8));
	while (u < 1) {
		const next = Math.min(1, u + step);
		const up = groundNormal(roll * next);
		const done = settle(
			here.map((s) => s.pose),
			(now) => rollRows(links, now, up, heave * next)
		);
		const solved =
			done && links.map((link, i) => asSolved(link, here[i]?.pose, done.first[i], done.poses[i], done.sign));
		if (solved && smooth(solved, u === 0 ? null : here) && forward(links, solved, hubs)) {
			[here, u] = [solved, next];
			step *= 1.5;
		} else {
			step = (next - u) / 2;
			if (step < smallest) break;
		}
	}
	return { links, poses: here.map((s) => s.pose), reached: u };
}

/** Whether a step went near where its tangent pointed, and, after the first, kept the way of assembly. */
const smooth = (next: Solved[], before: Solved[] | null): boolean =>
	next.every((s, i) => (before ? continues(s, before[i] as Solved) : s.bend < 0.35));

/** Whether no wheel has gone over its own dead point: its linkage still answers to travel as it did at ride height. */
function forward(links: Linkage[], solved: Solved[], hubs: number[]): boolean {
	return links.every((link, i) => {
		const pose = solved[i]?.pose as Pose;
		const own = solveNear(link, { point: 'hub', z: place(pose, link.hub)[2] }, pose);
		return own?.signs[0] === hubs[i];
	});
}

/** The two uprights when the body rolls (degrees) at a heave (mm of mean wheel travel); null where it binds. */
export function solveRoll(axle: Sided<Corner>, roll: number, heave = 0): Rolled | null {
	const { links, poses, reached } = followRoll(axle, roll, heave, 1e-6);
	if (reached < 1) return null;
	const up = groundNormal(roll);
	const [left, right] = links.map((link, i) => rolledWheel(link, poses[i] as Pose, up)) as [RolledWheel, RolledWheel];
	return { left, right, rollCentre: rollCentre(links, poses, up, roll) };
}

/** The roll (degrees, signed) at which one side or the pair binds on the way to `to`, or null when `to` is reached. */
export function rollLimit(axle: Sided<Corner>, to: number): number | null {
	const { reached } = followRoll(axle, to, 0, 1e-11);
	return reached < 1 ? reached * to : null;
}

function rolledWheel(link: Linkage, pose: Pose, up: V3): RolledWheel {
	const spin = turn(pose.q, link.spin);
	const hub = place(pose, link.hub);
	return {
		...attitude(link, pose),
		travel: hub[2] - rideHub(link),
		camberToGround: -Math.asin(dot(spin, up)) / RAD,
		wheelCentre: hub,
		spinAxis: spin,
		ground: contactOf(link, pose, up)
	};
}

/** Where the front-view normals to the two contact points' paths meet, against the ground line. */
function rollCentre(links: Linkage[], poses: Pose[], up: V3, roll: number): { height: number; lateral: number } | null {
	const feet = links.map((link, i) => contactOf(link, poses[i] as Pose, up)) as [V3, V3];
	const paths = links.map((link, i) => {
		const pose = poses[i] as Pose;
		const own = solveNear(link, { point: 'hub', z: place(pose, link.hub)[2] }, pose);
		return own && materialVelocity(link, own, feet[i] as V3);
	});
	const [a, b] = paths;
	if (!a || !b) return null;
	// A point P of the normal of wheel i satisfies (P - foot) . velocity = 0 in the y-z plane.
	const det = a[1] * b[2] - a[2] * b[1];
	if (Math.abs(det) < 1e-12) return null;
	const e = feet[0][1] * a[1] + feet[0][2] * a[2];
	const f = feet[1][1] * b[1] + feet[1][2] * b[2];
	const meet: V3 = [0, (e * b[2] - a[2] * f) / det, (a[1] * f - e * b[1]) / det];
	const middle = scale(add(feet[0], feet[1]), 0.5);
	const offset: V3 = [0, meet[1] - middle[1], meet[2] - middle[2]];
	const along: V3 = [0, Math.cos(roll * RAD), -Math.sin(roll * RAD)];
	return { height: dot(offset, up), lateral: dot(offset, along) };
}

export interface Steered extends Sided<Attitude & { steerAngle: number }> {
	/** Ackermann percentage, or null where it has no meaning. */
	ackermann: number | null;
}

/** Heading of both wheels at a rack movement (mm, + to the left) and travel; null where one side binds. */
export function solveSteer(axle: Sided<Corner>, rack: number, travel = 0): Steered | null {
	const side = (corner: Corner, movement: number): (Attitude & { steerAngle: number; ground: V3 }) | null => {
		const found = solveAt(corner, travel, movement);
		if (!found) return null;
		const a = attitude(found.link, found.at.pose);
		return { ...a, steerAngle: -found.link.side * a.toe, ground: axisFoot(found.link, found.at) };
	};
	const now = { left: side(axle.left, rack), right: side(axle.right, rack) };
	const straight = { left: side(axle.left, 0), right: side(axle.right, 0) };
	if (!now.left || !now.right || !straight.left || !straight.right) return null;
	const turned = {
		left: now.left.steerAngle - straight.left.steerAngle,
		right: now.right.steerAngle - straight.right.steerAngle
	};
	const base = norm(sub(straight.left.ground, straight.right.ground));
	return {
		left: now.left,
		right: now.right,
		ackermann: ackermann(turned, base, axle.left.vehicle?.wheelbase)
	};
}

/** Where the steering axis meets the ground of its state. */
function axisFoot(link: Linkage, at: Solved): V3 {
	const axis = sub(place(at.pose, link.moving[2] as V3), at.pose.t);
	const ground = contactOf(link, at.pose)[2];
	return add(at.pose.t, scale(axis, (ground - at.pose.t[2]) / axis[2]));
}

/** Outer-based Ackermann percentage of two turned angles (degrees, + left); null under 3 degrees or without a wheelbase. */
export function ackermann(turned: Sided<number>, base: number, wheelbase: number | undefined): number | null {
	const toLeft = turned.left + turned.right > 0;
	const inner = Math.abs(toLeft ? turned.left : turned.right);
	const outer = Math.abs(toLeft ? turned.right : turned.left);
	if (!wheelbase || inner < 3 || outer < 3 || turned.left * turned.right < 0) return null;
	const cotIdeal = 1 / Math.tan(outer * RAD) - base / wheelbase;
	const ideal = Math.atan2(1, cotIdeal) / RAD;
	return (100 * (inner - outer)) / (ideal - outer);
}
