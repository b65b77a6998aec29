/**
 * Every figure of a corner from its definition, on top of the independent solver: attitudes from the pose itself,
 * rates by eighth-order central differences over travel, centres from the velocities of material points.
 */
import {
	add,
	contactOf,
	continues,
	cross,
	diskUp,
	dot,
	norm,
	place,
	RAD,
	rideHub,
	scale,
	solveAt,
	solveNear,
	sub,
	turn,
	unit,
	VERTICAL,
	type Corner,
	type Linkage,
	type LinkPoint,
	type Pose,
	type Solved,
	type V3
} from './newton';

/** Figures that need no rate. Degrees and mm. */
export interface Attitude {
	camber: number;
	toe: number;
	caster: number;
	kpi: number;
	includedAngle: number;
	scrubRadius: number;
	mechanicalTrail: number;
	kingpinOffsetAtHub: number;
	trailAtHub: number;
}

/** All figures of a state; null where the figure or its input does not exist. */
export interface Outside extends Attitude {
	camberRate: number;
	toeRate: number;
	casterRate: number;
	instantCentreFront: [number, number] | null;
	rollCentreHeight: number | null;
	instantCentreByArms: [number, number] | null;
	rollCentreByArms: number | null;
	swingArmFront: number | null;
	halfTrackRate: number;
	/** What the finite differences may be off by, relative: sixth against eighth order. */
	doubt: number;
	/** dx/dz behind the anti-dive percentage. */
	diveSlope: number;
	antiDive: number | null;
	motionRatio: number | null;
	motionRatioRate: number | null;
	springForce: number | null;
	wheelRate: number | null;
	rideFrequency: number | null;
	rideFrequencyOnTyre: number | null;
	points: Record<LinkPoint, V3>;
	wheelCentre: V3;
	contactPoint: V3;
	spinAxis: V3;
	/** Velocity of the upright's material points at the contact point and the wheel centre, per mm of travel. */
	contactVelocity: V3;
	hubVelocity: V3;
}

/** Attitude of the wheel and of the steering axis, from places alone. */
export function attitude(link: Linkage, pose: Pose): Attitude {
	const spin = turn(pose.q, link.spin);
	const lower = pose.t;
	const upper = place(pose, link.moving[2] ?? [NaN, NaN, NaN]);
	const axis = sub(upper, lower);
	const hub = place(pose, link.hub);
	const contact = contactOf(link, pose);
	const flat = Math.hypot(spin[0], spin[1]);
	const outboard: V3 = [spin[0] / flat, spin[1] / flat, 0];
	const heading: V3 = [(link.side * spin[1]) / flat, (-link.side * spin[0]) / flat, 0];
	const axisAt = (z: number): V3 => add(lower, scale(axis, (z - lower[2]) / axis[2]));
	const ground = axisAt(contact[2]);
	const level = axisAt(hub[2]);
	const camber = -Math.asin(spin[2]) / RAD;
	const kpi = Math.atan2(-link.side * axis[1], axis[2]) / RAD;
	return {
		camber,
		toe: Math.atan2(spin[0], link.side * spin[1]) / RAD,
		caster: Math.atan2(-axis[0], axis[2]) / RAD,
		kpi,
		includedAngle: kpi + camber,
		scrubRadius: dot(sub(contact, ground), outboard),
		mechanicalTrail: dot(sub(ground, contact), heading),
		kingpinOffsetAtHub: dot(sub(hub, level), outboard),
		trailAtHub: dot(sub(level, hub), heading)
	};
}

/** Moved points of the corner. */
export function movedPoints(link: Linkage, pose: Pose): Record<LinkPoint, V3> {
	const fixed = (i: number): V3 => link.fixed[i] ?? [NaN, NaN, NaN];
	const moving = (i: number): V3 => place(pose, link.moving[i] ?? [NaN, NaN, NaN]);
	return {
		lowerFront: fixed(0),
		lowerRear: fixed(1),
		lowerBall: moving(0),
		upperFront: fixed(2),
		upperRear: fixed(3),
		upperBall: moving(2),
		tieRodInner: fixed(4),
		tieRodOuter: moving(4)
	};
}

/** Frame of an arm: along its pivot line, toward the ball joint, and square to both. */
function armFrame(front: V3, rear: V3, ball: V3): [V3, V3, V3] {
	const along = unit(sub(rear, front));
	const normal = unit(cross(along, sub(ball, front)));
	return [along, cross(normal, along), normal];
}

/** Length of the coil-over in a pose, mm; NaN without one. */
export function coilLength(link: Linkage, pose: Pose): number {
	const coil = link.corner.coilover;
	if (!coil) return NaN;
	const ride = link.corner.points;
	if (coil.on === 'upright') return norm(sub(place(pose, sub(coil.bottom, ride.lowerBall)), coil.top));
	const now = movedPoints(link, pose);
	const [f, r, b] =
		coil.on === 'lowerArm'
			? (['lowerFront', 'lowerRear', 'lowerBall'] as const)
			: (['upperFront', 'upperRear', 'upperBall'] as const);
	const before = armFrame(ride[f], ride[r], ride[b]);
	const after = armFrame(now[f], now[r], now[b]);
	const offset = sub(coil.bottom, ride[f]);
	const bottom = before.reduce<V3>((sum, e, i) => add(sum, scale(after[i] ?? e, dot(offset, e))), now[f]);
	return norm(sub(bottom, coil.top));
}

/** The quantities that are differentiated over travel, in a fixed order. */
function sample(link: Linkage, pose: Pose, contactLocal: V3): number[] {
	const a = attitude(link, pose);
	const material = place(pose, contactLocal);
	return [
		a.camber,
		a.toe,
		a.caster,
		contactOf(link, pose)[1],
		...material,
		// Two more material points of the upright give its turning without any rotation algebra.
		...pose.t,
		...place(pose, link.hub),
		...turn(pose.q, [100, 0, 0]),
		...turn(pose.q, [0, 100, 0]),
		...turn(pose.q, [0, 0, 100]),
		coilLength(link, pose)
	];
}

// Central difference weights for offsets 1 to 4 (B. Fornberg, Mathematics of Computation 51, 1988, table 1).
const FIRST_8 = [4 / 5, -1 / 5, 4 / 105, -1 / 280];
const FIRST_6 = [3 / 4, -3 / 20, 1 / 60, 0];
const SECOND_8 = [8 / 5, -1 / 5, 8 / 315, -1 / 560];
const SECOND_8_CENTRE = -205 / 72;

interface Rates {
	first: number[];
	second: number[];
	doubt: number;
}

/**
 * Derivatives over travel; the stencil shrinks until the sixth and eighth orders agree. Null within 1 mm of a bind: the
 * narrowest first stencil reaches that far to both sides.
 */
function rates(link: Linkage, at: Solved, travel: number, contactLocal: V3): Rates | null {
	let best: Rates | null = null;
	for (let h = 1; h > 0.02; h /= 2) {
		if (h < 0.25 && !best) return null;
		const samples = stencil(link, at, travel, contactLocal, h);
		if (!samples) continue;
		const next = differences(sample(link, at.pose, contactLocal), samples, h);
		if (!best || next.doubt < best.doubt) best = next;
		if (best.doubt < 1e-9) break;
	}
	return best;
}

function differences(centre: number[], samples: number[][][], h: number): Rates {
	const pick = (j: number, way: 0 | 1, k: number): number => samples[j]?.[way]?.[k] ?? 0;
	const slope = (w: number[], k: number): number =>
		w.reduce((sum, weight, j) => sum + weight * (pick(j, 0, k) - pick(j, 1, k)), 0) / h;
	const first = centre.map((_, k) => slope(FIRST_8, k));
	const second = centre.map((c, k) => {
		const sides = SECOND_8.reduce((sum, weight, j) => sum + weight * (pick(j, 0, k) + pick(j, 1, k)), 0);
		return (SECOND_8_CENTRE * c + sides) / (h * h);
	});
	const doubt = first.reduce(
		(g, d, k) => (Number.isNaN(d) ? g : Math.max(g, Math.abs(d - slope(FIRST_6, k)) / (1 + Math.abs(d)))),
		0
	);
	return { first, second, doubt };
}

/** Samples at plus and minus 1 to 4 steps of `h` mm of travel; null where one of them is out of reach. */
function stencil(link: Linkage, at: Solved, travel: number, contactLocal: V3, h: number): number[][][] | null {
	const out: number[][][] = [[], [], [], []];
	for (const sign of [1, -1]) {
		let here = at;
		for (let j = 1; j <= 4; j++) {
			const next = solveNear(link, { point: 'hub', z: rideHub(link) + travel + sign * j * h }, here.pose);
			if (!next || !continues(next, here)) return null;
			here = next;
			out[j - 1]?.push(sample(link, here.pose, contactLocal));
		}
	}
	return out;
}

/** Where the two arm planes, cut at x of the contact point, send the front-view instant centre and roll centre. */
function byArms(
	points: Record<LinkPoint, V3>,
	contact: V3
): { centre: [number, number] | null; height: number | null } {
	const cut = (front: V3, rear: V3, ball: V3): [number, number, number] => {
		const n = unit(cross(sub(rear, front), sub(ball, front)));
		return [n[1], n[2], dot(n, front) - n[0] * contact[0]];
	};
	const [a, b, e] = cut(points.upperFront, points.upperRear, points.upperBall);
	const [c, d, f] = cut(points.lowerFront, points.lowerRear, points.lowerBall);
	// The centre is (across / det, up / det); with parallel arms it is a direction, and the roll centre still exists.
	const det = a * d - b * c;
	const across = e * d - b * f;
	const up = a * f - e * c;
	const height = finite((-contact[1] * (up - det * contact[2])) / (across - det * contact[1]));
	return { centre: Math.abs(det) < 1e-14 ? null : [across / det, up / det], height };
}

const finite = (x: number): number | null => (Number.isFinite(x) ? x : null);

/** Spring figures: force there, motion ratio, its rate, wheel rate, undamped frequencies. */
function springFigures(link: Linkage, pose: Pose, lengthRate: number, lengthSecond: number) {
	const coil = link.corner.coilover;
	const none = { springForce: null, wheelRate: null, rideFrequency: null, rideFrequencyOnTyre: null };
	if (!coil) return { motionRatio: null, motionRatioRate: null, ...none };
	const ratio = { motionRatio: -lengthRate, motionRatioRate: -lengthSecond };
	if (coil.rate === undefined || coil.forceAtRide === undefined) return { ...ratio, ...none };
	const shortened = norm(sub(coil.bottom, coil.top)) - coilLength(link, pose);
	const springForce = coil.forceAtRide + coil.rate * shortened;
	const wheelRate = coil.rate * lengthRate ** 2 - springForce * lengthSecond;
	const mass = link.corner.vehicle?.sprungCornerMass;
	const tyre = link.corner.vehicle?.tyreRate;
	const frequency = (k: number): number => Math.sqrt((k * 1000) / (mass ?? NaN)) / (2 * Math.PI);
	return {
		...ratio,
		springForce,
		wheelRate,
		rideFrequency: mass ? finite(frequency(wheelRate)) : null,
		rideFrequencyOnTyre: mass && tyre ? finite(frequency((wheelRate * tyre) / (wheelRate + tyre))) : null
	};
}

/** All figures of a solved position. Null only when the stencil does not fit within reach. */
export function figuresAt(link: Linkage, at: Solved, travel: number): Outside | null {
	const { pose } = at;
	const contact = contactOf(link, pose);
	const spin = turn(pose.q, link.spin);
	const contactLocal = sub(link.hub, scale(unturn(pose, diskUp(spin, VERTICAL)), link.radius));
	const d = rates(link, at, travel, contactLocal);
	if (!d) return null;
	const v = (k: number): number => d.first[k] ?? NaN;
	const contactVelocity: V3 = [v(4), v(5), v(6)];
	const hubVelocity: V3 = [v(10), v(11), v(12)];
	// Half the curl of the velocity field: turning about x, from the turning of three body-fixed arrows of 100 mm.
	const now = [100, 0, 0].map((_, i) => turn(pose.q, [i === 0 ? 100 : 0, i === 1 ? 100 : 0, i === 2 ? 100 : 0]));
	const rolling = now.reduce((sum, e, i) => sum + e[1] * v(15 + 3 * i) - e[2] * v(14 + 3 * i), 0) / 2e4;
	const points = movedPoints(link, pose);
	const arms = byArms(points, contact);
	const centre: [number, number] | null =
		Math.abs(rolling) < 1e-12
			? null
			: [contact[1] - contactVelocity[2] / rolling, contact[2] + contactVelocity[1] / rolling];
	const vehicle = link.corner.vehicle ?? {};
	const way = vehicle.frontBrakes === 'inboard' ? hubVelocity : contactVelocity;
	const diveSlope = way[0] / way[2];
	const { frontBrakeShare: share, wheelbase, cgHeight } = vehicle;
	return {
		...attitude(link, pose),
		camberRate: v(0),
		toeRate: v(1),
		casterRate: v(2),
		instantCentreFront: centre,
		rollCentreHeight: finite((contact[1] * contactVelocity[1]) / contactVelocity[2]),
		instantCentreByArms: arms.centre,
		rollCentreByArms: arms.height,
		swingArmFront: centre && link.side * (contact[1] - centre[0]),
		halfTrackRate: link.side * v(3),
		diveSlope,
		antiDive: share !== undefined && wheelbase && cgHeight ? (100 * share * diveSlope * wheelbase) / cgHeight : null,
		...springFigures(link, pose, v(22), d.second[22] ?? NaN),
		points,
		wheelCentre: place(pose, link.hub),
		contactPoint: contact,
		spinAxis: spin,
		contactVelocity,
		hubVelocity,
		doubt: d.doubt
	};
}

/** Velocity over travel of the upright's material point at `point`; null within 1 mm of a bind. */
export function materialVelocity(link: Linkage, at: Solved, point: V3): V3 | null {
	const travel = place(at.pose, link.hub)[2] - rideHub(link);
	const d = rates(link, at, travel, unturn(at.pose, sub(point, at.pose.t)));
	return d && [d.first[4] ?? NaN, d.first[5] ?? NaN, d.first[6] ?? NaN];
}

/** A direction in body axes, seen from the upright. */
function unturn(pose: Pose, v: V3): V3 {
	const [w, x, y, z] = pose.q;
	return turn([w, -x, -y, -z], v);
}

/** All figures at a travel and rack (mm); null where the path there binds. */
export function evaluate(corner: Corner, travel: number, rack = 0): Outside | null {
	const found = solveAt(corner, travel, rack);
	return found && figuresAt(found.link, found.at, travel);
}
