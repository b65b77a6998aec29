import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	applyAlignment,
	KinematicsError,
	solveAlignment,
	solveCorner,
	sweepBump,
	threeSpheres
} from '../../../src/lib/kinematics';
import { roadCorner, shimTableCorner } from '../../fixtures/corners';
import { rackArbitrary, squareCornerArbitrary } from '../../support/corners';
import {
	add,
	cross,
	dot,
	norm,
	RAD,
	scale,
	solveAdjusted,
	sub,
	unit,
	type Corner,
	type LinkPoint,
	type V3
} from '../../support/newton';
import { attitude } from '../../support/newton-figures';
import { runs, SEED } from '../../support/seed';

console.log(`outside references: FC_SEED=${SEED}`);

/** Published figures and exact closed forms; where each comes from stands beside it and in tests/fixtures/README.md. */

type State = ReturnType<typeof solveCorner>;

function near(a: number, b: number, tolerance: number, name = ''): void {
	if (!(Math.abs(a - b) <= tolerance)) expect.fail(`${name}: ${a} against ${b}, off ${a - b}, allowed ${tolerance}`);
}

/** The result, or nothing where the linkage does not reach. */
function attempt<T>(act: () => T): T | null {
	try {
		return act();
	} catch (error) {
		if (error instanceof KinematicsError && error.code === 'out-of-reach') return null;
		throw error;
	}
}

/** Root of a rising or falling function between two bounds, by halving. */
function root(f: (x: number) => number, from: number, to: number): number {
	let [low, high] = f(from) < 0 ? [from, to] : [to, from];
	for (let i = 0; i < 80; i++) {
		const middle = (low + high) / 2;
		if (f(middle) < 0) low = middle;
		else high = middle;
	}
	return (low + high) / 2;
}

/** A vector turned by an angle (degrees) about a unit axis (Rodrigues). */
const turned = (v: V3, axis: V3, angle: number): V3 => {
	const [c, s] = [Math.cos(angle * RAD), Math.sin(angle * RAD)];
	return add(add(scale(v, c), scale(cross(axis, v), s)), scale(axis, dot(axis, v) * (1 - c)));
};

describe('shim table of a truck front axle', () => {
	// US Army TM 9-2320-280-34 (1996), para 20-4 b, Table 20-3, p. 20-22; 1.52 mm rows: TM 9-2320-387-24-2, para 34-3,
	// Table 34-2, p. 34-2. Points: see the fixture. Printed to 0.1 degree; exact geometry is up to 0.056 away.
	const TOLERANCE = 0.06;
	const TABLE: [front: number, rear: number, caster: number, camber: number][] = [
		[3.05, 0, 0.6, 0.5],
		[0, 3.05, -0.6, 0],
		[3.05, 3.05, 0, 0.5],
		[1.52, 0, 0.3, 0.3],
		[0, 1.52, -0.3, 0],
		[1.52, 1.52, 0, 0.3]
	];
	const shims = { kind: 'pivotShift' } as const;
	const asBuilt = solveCorner(shimTableCorner, { travel: 0, rack: 0 });

	it.each(TABLE)('%d mm in front and %d mm at the rear: caster %d, camber %d', (front, rear, caster, camber) => {
		const state = applyAlignment(shimTableCorner, shims, { front, rear, tieRod: 0 });
		near(state.caster - asBuilt.caster, caster, TOLERANCE, 'caster');
		near(state.camber - asBuilt.camber, camber, TOLERANCE, 'camber');
	});

	// What 0.06 degree in each angle is worth in mm of shim: the rows' own differences, solved for the two shims.
	const perMm = TABLE.slice(0, 2).map(([front, rear]) => {
		const found = solveAdjusted(shimTableCorner, { upperFront: [0, front, 0], upperRear: [0, rear, 0] });
		if (!found) throw new Error('a shim of 3 mm is within reach');
		const a = attitude(found.link, found.at.pose);
		return { caster: (a.caster - asBuilt.caster) / 3.05, camber: (a.camber - asBuilt.camber) / 3.05 };
	});
	const [f, r] = perMm;
	if (!f || !r) throw new Error('two rows');
	const det = Math.abs(f.caster * r.camber - r.caster * f.camber);
	const slack = {
		front: (TOLERANCE * (Math.abs(r.camber) + Math.abs(r.caster))) / det,
		rear: (TOLERANCE * (Math.abs(f.camber) + Math.abs(f.caster))) / det
	};

	it('0.06 degree of print and inference leave 0.4 mm of slack in front and 0.7 mm at the rear', () => {
		near(slack.front, 0.36, 0.02, 'front');
		near(slack.rear, 0.73, 0.05, 'rear');
	});

	it.each(TABLE)('%d and %d mm come back from the angles they give, toe kept', (front, rear, caster, camber) => {
		const targets = { caster: asBuilt.caster + caster, camber: asBuilt.camber + camber, toe: asBuilt.toe };
		const answer = solveAlignment(shimTableCorner, shims, targets);
		near(answer.front, front, slack.front, 'front');
		near(answer.rear, rear, slack.rear, 'rear');
		near(answer.state.toe, asBuilt.toe, 1e-6, 'toe');
	});

	it('caster from the points stands inside the 3 (0 to +4) degrees of the same manual, at 2.92', () => {
		near(asBuilt.caster, 2.92, 0.005, 'caster');
	});

	it('adding camber by shims at both pivots moves toe out by almost as much: 0.42 for 0.53 degree', () => {
		const state = applyAlignment(shimTableCorner, shims, { front: 3.05, rear: 3.05, tieRod: 0 });
		near(state.camber - asBuilt.camber, 0.53, 0.005, 'camber');
		near(state.toe - asBuilt.toe, -0.42, 0.005, 'toe');
	});
});

/** A corner whose pivot lines run along x and whose motion is planar, of two arms and the distances between their ends. */
function planar(lowerPivot: V3, lowerBall: V3, upperPivot: V3, upperBall: V3, loadedRadius = 300): Corner {
	const pivots = (p: V3): [V3, V3] => [add(p, [120, 0, 0]), add(p, [-150, 0, 0])];
	const [lowerFront, lowerRear] = pivots(lowerPivot);
	const [upperFront, upperRear] = pivots(upperPivot);
	// A tie rod that copies the lower arm 110 mm behind it keeps the motion in the plane.
	const tieRodInner = add(lowerPivot, [-110, 0, 0]);
	const tieRodOuter = add(lowerBall, [-110, 0, 0]);
	const points = { upperFront, upperRear, upperBall, lowerFront, lowerRear, lowerBall, tieRodInner, tieRodOuter };
	const track = 2 * (Math.max(lowerBall[1], upperBall[1]) + 80);
	return { points, wheel: { track, x: 0, loadedRadius, camber: 0, toe: 0 } };
}

describe('closed forms', () => {
	it('equal, parallel, level arms of 300 mm: 50 mm of rise leaves camber and moves the wheel in by 4.19601 mm', () => {
		// 300 (1 - cos(asin(50 / 300))): a parallelogram only translates.
		const corner = planar([0, 400, 200], [0, 700, 200], [0, 400, 420], [0, 700, 420]);
		const ride = solveCorner(corner, { travel: 0, rack: 0 });
		const up = solveCorner(corner, { travel: 50, rack: 0 });
		near(up.camber, 0, 1e-9, 'camber');
		near(up.contactPoint[1] - ride.contactPoint[1], -4.19601, 5e-6, 'lateral');
		near(ride.rollCentreHeight ?? NaN, 0, 1e-9, 'roll centre');
		near(ride.rollCentreByArms ?? NaN, 0, 1e-9, 'roll centre by arms');
		expect(ride.instantCentreFront).toBeNull();
		expect(ride.instantCentreByArms).toBeNull();
		expect(ride.swingArmFront).toBeNull();
	});

	it('Freudenstein: ground 100, crank 40, coupler 120, rocker 80; crank at 40 puts the rocker at 57.325 degrees', () => {
		// Recalled as Norton, Design of Machinery; proved by loop closure below. A corner with parallel pivot lines is this
		// linkage: ground upward, crank the lower arm, coupler the upright, rocker the upper arm; all times 3.
		const [k, lower] = [3, [0, 400, 200] as V3];
		const upper = add(lower, [0, 0, 100 * k]);
		const end = (pivot: V3, length: number, angle: number): V3 =>
			add(pivot, [0, length * k * Math.sin(angle * RAD), length * k * Math.cos(angle * RAD)]);
		const open = (crank: number): number =>
			root((r) => norm(sub(end(upper, 80, r), end(lower, 40, crank))) - 120 * k, 20, 150);
		near(open(40), 57.325, 0.0005, 'loop closure');
		// Entered at 60 degrees of crank, moved to 40.
		const corner = planar(lower, end(lower, 40, 60), upper, end(upper, 80, open(60)));
		const crank = (s: State): number => Math.atan2(s.points.lowerBall[1] - 400, s.points.lowerBall[2] - 200) / RAD;
		const travel = root((t) => 40 - crank(solveCorner(corner, { travel: t, rack: 0 })), -5, 30);
		const state = solveCorner(corner, { travel, rack: 0 });
		const rocker = Math.atan2(state.points.upperBall[1] - upper[1], state.points.upperBall[2] - upper[2]) / RAD;
		near(crank(state), 40, 1e-9, 'crank');
		near(rocker, 57.325, 0.0005, 'rocker');
		near(rocker, open(40), 1e-8, 'rocker by loop closure');
	});

	it('any corner with pivot lines along x obeys the equation of Freudenstein in every state', () => {
		// (d/a) cos(rocker) - (d/c) cos(crank) + (a^2 - b^2 + c^2 + d^2) / 2ac = cos(crank - rocker), from loop closure
		// (F. Freudenstein, Transactions of the ASME 77, 1955, recalled); a crank, b coupler, c rocker, d ground.
		const plan = (p: V3): V3 => [0, p[1], p[2]];
		let states = 0;
		fc.assert(
			fc.property(squareCornerArbitrary, rackArbitrary, (corner, rack) => {
				const lower = plan(corner.points.lowerFront);
				const upper = plan(corner.points.upperFront);
				const ground = sub(upper, lower);
				const angle = (arm: V3): number => Math.atan2(cross(ground, arm)[0], dot(ground, arm));
				const { lowerBall, upperBall } = corner.points;
				const [a, b, c, d] = [
					sub(plan(lowerBall), lower),
					sub(plan(upperBall), plan(lowerBall)),
					sub(plan(upperBall), upper),
					ground
				].map(norm) as [number, number, number, number];
				const swept = attempt(() => sweepBump(corner, { from: -70, to: 70, step: 10, rack }));
				for (const state of swept?.states ?? []) {
					const crank = angle(sub(plan(state.points.lowerBall), lower));
					const rocker = angle(sub(plan(state.points.upperBall), upper));
					const left =
						(d / a) * Math.cos(rocker) - (d / c) * Math.cos(crank) + (a * a - b * b + c * c + d * d) / (2 * a * c);
					near(left, Math.cos(crank - rocker), 1e-11, 'loop');
					states++;
				}
			}),
			runs(300)
		);
		expect(states).toBeGreaterThan(3000);
	});

	it('three unit spheres about (4,1,2), (5,2,2), (5,1,3) meet at (5,1,2) and (13/3, 5/3, 8/3)', () => {
		const centres: [V3, V3, V3] = [
			[4, 1, 2],
			[5, 2, 2],
			[5, 1, 3]
		];
		const ends: V3[] = ([1, -1] as const).map((branch) => {
			const meet = threeSpheres(centres[0], 1, centres[1], 1, centres[2], 1, branch);
			if (!meet) throw new Error('the spheres meet');
			return meet;
		});
		for (const wanted of [[5, 1, 2] as V3, [13 / 3, 5 / 3, 8 / 3] as V3]) {
			for (const c of centres) near(norm(sub(wanted, c)), 1, 1e-15, 'distance');
			near(Math.min(...ends.map((e) => norm(sub(e, wanted)))), 0, 1e-12, 'meeting point');
		}
	});
});

/**
 * A corner turned about its standing steering axis: the rack and travel that turn the upright by `angle` degrees while
 * both ball joints stay. From rotation and one quadratic, without any solver.
 */
function turnedState(corner: Corner, angle: number): State {
	const p = corner.points;
	const axis = unit(sub(p.upperBall, p.lowerBall));
	const about = (v: V3): V3 => add(p.lowerBall, turned(sub(v, p.lowerBall), axis, angle));
	const outer = about(p.tieRodOuter);
	const rod = norm(sub(p.tieRodOuter, p.tieRodInner));
	const across = Math.sqrt(rod ** 2 - (outer[0] - p.tieRodInner[0]) ** 2 - (outer[2] - p.tieRodInner[2]) ** 2);
	const hub: V3 = [corner.wheel.x, corner.wheel.track / 2, corner.wheel.loadedRadius];
	const ask = { travel: about(hub)[2] - hub[2], rack: outer[1] - across - p.tieRodInner[1] };
	const state = solveCorner(corner, ask);
	for (const key of ['upperBall', 'lowerBall'] as const) {
		near(norm(sub(state.points[key], p[key])), 0, 1e-6, `${key} stands`);
	}
	near(norm(sub(state.points.tieRodOuter, outer)), 0, 1e-6, 'steering arm');
	return state;
}

/** A corner with a given steering axis and scrub radius, camber and toe 0. */
function steeringCorner(caster: number, kpi: number, scrub: number, loadedRadius: number): Corner {
	const half = 750;
	const onAxis = (z: number): V3 => [-z * Math.tan(caster * RAD), half - scrub - z * Math.tan(kpi * RAD), z];
	const points: Record<LinkPoint, V3> = {
		lowerBall: onAxis(190),
		upperBall: onAxis(440),
		lowerFront: [160, 330, 195],
		lowerRear: [-160, 330, 195],
		upperFront: [110, 400, 425],
		upperRear: [-130, 400, 425],
		tieRodInner: [-125, 330, 250],
		tieRodOuter: [-130, half - scrub - 60, 248]
	};
	return { points, wheel: { track: 2 * half, x: 0, loadedRadius, camber: 0, toe: 0 } };
}

describe('turned about the steering axis', () => {
	it.each([
		[28, 2.02806],
		[45, 4.75475]
	])('jacking lift at %d degrees: %d mm', (angle, lift) => {
		// Zero caster, ground offset d 25, inclination k 12 degrees, thin disc R 300: with s = sin k cos k (1 - cos turn),
		// lift = d s + R (sin^2 k (1 - cos turn) - 1 + sqrt(1 - s^2)). Proved by rotation.
		const [d, k, R] = [25, 12 * RAD, 300];
		const c = 1 - Math.cos(angle * RAD);
		const s = Math.sin(k) * Math.cos(k) * c;
		const exact = d * s + R * (Math.sin(k) ** 2 * c - 1 + Math.sqrt(1 - s * s));
		near(exact, lift, 5e-6, 'closed form');
		const corner = steeringCorner(0, 12, d, R);
		near(solveCorner(corner, { travel: 0, rack: 0 }).scrubRadius ?? NaN, d, 1e-9, 'scrub radius');
		// The tyre goes down against the body by what the body is lifted; to either side alike with zero caster.
		near(-turnedState(corner, angle).contactPoint[2], exact, 1e-6, 'turned one way');
		near(-turnedState(corner, -angle).contactPoint[2], exact, 1e-6, 'turned the other way');
	});

	it.each([
		[20, 4.1249],
		[14.5, 3.0178]
	])(
		'caster sweep at %d degrees to both sides: camber differs by %d for caster 6, inclination 10',
		(heading, spread) => {
			// By rotation; the shop factors 1 / (2 sin heading) are 1.4619 at 20 and 1.9970 at 14.5 degrees.
			const corner = steeringCorner(6, 10, 20, 300);
			const ride = solveCorner(corner, { travel: 0, rack: 0 });
			near(ride.caster, 6, 1e-9, 'caster');
			near(ride.kpi, 10, 1e-9, 'kpi');
			const camberAt = (toe: number): number => {
				const angle = root((a) => turnedState(corner, a).toe - toe, toe > 0 ? -40 : 40, 0);
				const state = turnedState(corner, angle);
				near(state.toe, toe, 1e-9, 'heading');
				return state.camber;
			};
			near(Math.abs(camberAt(heading) - camberAt(-heading)), spread, 5e-5, 'camber difference');
			near(spread / (2 * Math.sin(heading * RAD)), 6, 0.04, 'caster by the rule');
		}
	);
});

describe('ratios and frequencies', () => {
	it.each([
		[250, 0.9968],
		[248.41, 1],
		[110.4, 1.5],
		[62.1, 2]
	])('a static deflection of %d mm rides at %d Hz', (deflection, frequency) => {
		// f = (1 / 2 pi) sqrt(g / deflection), g 9.80665; the 250 mm case: J. Edgar, AutoSpeed 2007.
		const wheelRate = solveCorner(roadCorner, { travel: 0, rack: 0 }).wheelRate ?? NaN;
		const sprungCornerMass = (wheelRate * deflection) / 9.80665;
		const corner = { ...roadCorner, vehicle: { ...roadCorner.vehicle, sprungCornerMass } };
		near(solveCorner(corner, { travel: 0, rack: 0 }).rideFrequency ?? NaN, frequency, 5e-5, 'frequency');
	});

	/** Both arms on parallel pivot lines pitched by `slope` degrees: the upright moves forward as it rises. */
	const pitched = (slope: number): Corner => {
		const base = planar([0, 400, 200], [0, 700, 200], [0, 400, 420], [0, 700, 420]);
		const lean = (p: V3, about: V3): V3 => add(p, [0, 0, -(p[0] - about[0]) * Math.tan(slope * RAD)]);
		const points = { ...base.points };
		for (const key of ['lowerFront', 'lowerRear'] as const) points[key] = lean(points[key], [0, 0, 0]);
		for (const key of ['upperFront', 'upperRear'] as const) points[key] = lean(points[key], [0, 0, 0]);
		return { ...base, points };
	};

	it('anti-dive is full when tan(slope) = cg height / (wheelbase x front share): 500, 2500, 0.6 at 18.43 degrees', () => {
		// Moment balance; tan(slope) 0.3333.
		const slope = Math.atan(500 / (2500 * 0.6)) / RAD;
		near(slope, 18.43, 0.006, 'slope');
		const vehicle = { wheelbase: 2500, cgHeight: 500, frontBrakeShare: 0.6 };
		for (const frontBrakes of ['upright', 'inboard'] as const) {
			const state = solveCorner({ ...pitched(slope), vehicle: { ...vehicle, frontBrakes } }, { travel: 0, rack: 0 });
			near(state.antiDive ?? NaN, 100, 1e-7, frontBrakes);
		}
	});

	it('a quarter of anti-dive needs 5.6 degrees: share 0.60, wheelbase 2550, cg height 600', () => {
		// A kit builder's build notes (super7thheaven.co.uk, Anti Dive Geometry): tan(slope) 0.098.
		near(0.25 / ((0.6 * 2550) / 600), 0.098, 0.0005, 'tangent');
		const vehicle = { wheelbase: 2550, cgHeight: 600, frontBrakeShare: 0.6 };
		const state = solveCorner({ ...pitched(5.6), vehicle }, { travel: 0, rack: 0 });
		near(state.antiDive ?? NaN, 25, 0.05, 'anti-dive');
		// The same arms pitched the other way dive by as much.
		near(solveCorner({ ...pitched(-5.6), vehicle }, { travel: 0, rack: 0 }).antiDive ?? NaN, -25, 0.05, 'pro-dive');
	});

	it('camber gain is about the turning of the swing arm, atan(1 / length): within 1 % on the truck corner', () => {
		// An approximation in three dimensions; tabulated 1.4321, 0.9548, 0.7162, 0.5729, 0.3820 degrees an inch for 40 to 150 in.
		const TABLE = [
			[40, 1.4321],
			[60, 0.9548],
			[80, 0.7162],
			[100, 0.5729],
			[150, 0.382]
		];
		for (const [length = NaN, gain = NaN] of TABLE) near(Math.atan(1 / length) / RAD, gain, 5e-5, `${length} in`);
		const state = solveCorner(shimTableCorner, { travel: 0, rack: 0 });
		const gain = Math.atan(1 / (state.swingArmFront ?? NaN)) / RAD;
		near(-(state.camberRate ?? NaN) / gain, 1, 0.01, 'camber gain');
	});
});
