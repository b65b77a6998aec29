import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { KinematicsError, solveCorner, sweepRoll, sweepSteer } from '../../../src/lib/kinematics';
import { lowCorner, roadCorner } from '../../fixtures/corners';
import { cornerArbitrary, real } from '../../support/corners';
import { diskUp, dot, mirrored, rackLimit, RAD, scale, sub, type Corner, type V3 } from '../../support/newton';
import { ackermann, groundNormal, rollLimit, solveRoll, solveSteer, type Sided } from '../../support/newton-axle';
import { runs, SEED } from '../../support/seed';

console.log(`outside roll and steer: FC_SEED=${SEED}`);

const SIDES = ['left', 'right'] as const;

/** Two corners of one car: mirrored, or each its own. */
const axleArbitrary: fc.Arbitrary<{ axle: Sided<Corner>; mirror: boolean }> = fc
	.tuple(cornerArbitrary, cornerArbitrary, fc.boolean())
	.map(([left, other, mirror]) => ({
		mirror,
		axle: { left, right: mirrored(mirror || !left.vehicle ? left : { ...other, vehicle: left.vehicle }) }
	}));

/** Fails unless two numbers are within a tolerance. (A plain comparison first: most of a run is spent here.) */
function near(a: number, b: number, tolerance: number, name = ''): void {
	if (!(Math.abs(a - b) <= tolerance)) expect.fail(`${name}: ${a} against ${b}, off ${a - b}, allowed ${tolerance}`);
}

/** Whether a corner gets to a travel at all; where it does not, an axle says so by an error, not by a shorter sweep. */
function reaches(corner: Corner, travel: number): boolean {
	try {
		return solveCorner(corner, { travel, rack: 0 }) !== null;
	} catch (error) {
		if (error instanceof KinematicsError && error.code === 'out-of-reach') return false;
		throw error;
	}
}

/** Lowest point of a tyre over a ground with this normal, from the state's own wheel centre and spin axis. */
const lowest = (state: { wheelCentre: V3; spinAxis: V3 }, radius: number, up: V3): V3 =>
	sub(state.wheelCentre, scale(diskUp(state.spinAxis, up), radius));

describe('roll', () => {
	it('agrees with twelve-unknown Newton; both tyres stand on the ground and the mean travel is the heave', () => {
		let compared = 0;
		let centres = 0;
		fc.assert(
			fc.property(axleArbitrary, real(-5, 5), real(-25, 25), ({ axle, mirror }, roll, heave) => {
				const given = mirror ? axle.left : axle;
				if (SIDES.some((side) => !reaches(axle[side], heave))) {
					expect(() => sweepRoll(given, { from: roll, to: roll, step: 1, heave })).toThrow(KinematicsError);
					return;
				}
				const swept = sweepRoll(given, { from: roll, to: roll, step: 1, heave });
				const mine = solveRoll(axle, roll, heave);
				const state = swept.states[0];
				if (!state || !mine) return;
				compared++;
				expect(state.roll).toBe(roll);
				const up = groundNormal(roll);
				const [a, b] = SIDES.map((side) => lowest(state[side], axle[side].wheel.loadedRadius, up)) as [V3, V3];
				near(dot(a, up), dot(b, up), 1e-8, 'ground');
				near((state.left.travel + state.right.travel) / 2, heave, 1e-8, 'heave');
				for (const side of SIDES) {
					near(mine[side].travel, state[side].travel, 1e-6, `${side} travel`);
					near(mine[side].camberToGround, state[side].camberToGround, 1e-6, `${side} camber to ground`);
					for (const key of ['camber', 'toe', 'caster', 'kpi'] as const) {
						near(mine[side][key], state[side][key], 1e-6, `${side} ${key}`);
					}
				}
				if (!mine.rollCentre) return;
				const away = Math.hypot(mine.rollCentre.height, mine.rollCentre.lateral);
				if (away > 50_000) return;
				centres++;
				near(mine.rollCentre.height, state.rollCentre?.height ?? NaN, 1e-6 * (1 + away), 'roll centre height');
				near(mine.rollCentre.lateral, state.rollCentre?.lateral ?? NaN, 1e-6 * (1 + away), 'roll centre lateral');
			}),
			runs(400)
		);
		expect(compared).toBeGreaterThan(300);
		expect(centres).toBeGreaterThan(200);
	});

	it('leans the right way: a positive roll lifts the left side, so the right wheel goes into bump', () => {
		const { states } = sweepRoll(roadCorner, { from: -3, to: 3, step: 1 });
		expect(states.map((s) => s.roll)).toEqual([-3, -2, -1, 0, 1, 2, 3]);
		const last = states.at(-1);
		expect(last?.right.travel).toBeGreaterThan(10);
		expect(last?.left.travel).toBeLessThan(-10);
		// The body leans to the right; the outer wheel loses camber to the ground against what it gains to the body.
		near((last?.right.camber ?? NaN) + 3, last?.right.camberToGround ?? NaN, 0.02, 'outer camber');
		near((last?.left.camber ?? NaN) - 3, last?.left.camberToGround ?? NaN, 0.02, 'inner camber');
	});

	it('straight ahead and level, the roll centre is on the centreline at the height of the one-wheel figure', () => {
		for (const corner of [roadCorner, lowCorner]) {
			const [state] = sweepRoll(corner, { from: 0, to: 0, step: 1 }).states;
			const single = solveCorner(corner, { travel: 0, rack: 0 });
			near(single.rollCentreHeight ?? NaN, state?.rollCentre?.height ?? NaN, 1e-6, 'height');
			near(0, state?.rollCentre?.lateral ?? NaN, 1e-6, 'lateral');
		}
	});

	it('stops where the axle binds; the last roll can be asked for', () => {
		let limits = 0;
		fc.assert(
			fc.property(axleArbitrary, ({ axle }) => {
				const swept = sweepRoll(axle, { from: -15, to: 15, step: 1 });
				for (const [limit, way] of [
					[swept.lowLimit, -1],
					[swept.highLimit, 1]
				] as const) {
					const outside = rollLimit(axle, 15 * way);
					if (!limit) {
						expect(outside === null || Math.abs(outside) > 14.999, `no limit, but bound at ${outside}`).toBe(true);
						continue;
					}
					limits++;
					near(outside ?? NaN, limit.value, 1e-5, 'limit');
					expect(sweepRoll(axle, { from: limit.value, to: limit.value, step: 1 }).states.length).toBe(1);
				}
			}),
			runs(120)
		);
		expect(limits).toBeGreaterThan(60);
	});

	it('a mirrored car rolls to the left as it rolls to the right', () => {
		fc.assert(
			fc.property(axleArbitrary, real(0, 4), ({ axle }, roll) => {
				const turned = { left: mirrored(axle.right), right: mirrored(axle.left) };
				const [one] = sweepRoll(axle, { from: roll, to: roll, step: 1 }).states;
				const [two] = sweepRoll(turned, { from: -roll, to: -roll, step: 1 }).states;
				if (!one || !two) return;
				near(one.left.travel, two.right.travel, 1e-8, 'travel');
				near(one.left.camberToGround, two.right.camberToGround, 1e-8, 'camber');
				near(one.right.toe, two.left.toe, 1e-8, 'toe');
			}),
			runs(150)
		);
	});
});

describe('steer', () => {
	it('agrees with the outside solver at both sides: headings, figures and Ackermann', () => {
		let compared = 0;
		let percentages = 0;
		fc.assert(
			fc.property(axleArbitrary, real(-70, 70), real(-30, 30), ({ axle, mirror }, rack, travel) => {
				const mine = solveSteer(axle, rack, travel);
				// A travel that binds is refused as such: a corner of its own says the same.
				if (SIDES.some((side) => !reaches(axle[side], travel))) {
					expect(() => sweepSteer(mirror ? axle.left : axle, { from: rack, to: rack, step: 1, travel })).toThrow(
						KinematicsError
					);
					return;
				}
				const [state] = sweepSteer(mirror ? axle.left : axle, { from: rack, to: rack, step: 1, travel }).states;
				if (!state || !mine) return;
				compared++;
				expect(state.rack).toBe(rack);
				for (const side of SIDES) {
					near(mine[side].steerAngle, state[side].steerAngle, 1e-6, `${side} steer angle`);
					near(state[side].steerAngle, side === 'left' ? -state.left.toe : state.right.toe, 1e-12, 'definition');
					near(travel, state[side].travel, 1e-8, 'travel');
					for (const key of ['camber', 'toe', 'caster', 'kpi'] as const) {
						near(mine[side][key], state[side][key], 1e-6, `${side} ${key}`);
					}
				}
				if (mine.ackermann === null) return void expect(state.ackermann).toBeNull();
				percentages++;
				near(mine.ackermann, state.ackermann ?? NaN, 1e-6 * (100 + Math.abs(mine.ackermann)), 'Ackermann');
			}),
			runs(400)
		);
		expect(compared).toBeGreaterThan(300);
		expect(percentages).toBeGreaterThan(150);
	});

	it('stops where one side binds', () => {
		let limits = 0;
		fc.assert(
			fc.property(axleArbitrary, ({ axle }) => {
				const swept = sweepSteer(axle, { from: -220, to: 220, step: 20 });
				for (const [limit, way] of [
					[swept.lowLimit, -1],
					[swept.highLimit, 1]
				] as const) {
					const ends = SIDES.map((side) => rackLimit(axle[side], 0, 220 * way)).filter((x) => x !== null);
					const first = ends.length ? Math.min(...ends.map(Math.abs)) * way : null;
					if (!limit) {
						expect(first === null || Math.abs(first) > 219.999, `no limit, but bound at ${first}`).toBe(true);
						continue;
					}
					limits++;
					near(first ?? NaN, limit.value, 1e-4, 'limit');
					expect(sweepSteer(axle, { from: limit.value, to: limit.value, step: 1 }).states.length).toBe(1);
				}
			}),
			runs(120)
		);
		expect(limits).toBeGreaterThan(60);
	});

	it('is even: a symmetric car steers to the right as to the left', () => {
		for (const corner of [roadCorner, lowCorner]) {
			const { states } = sweepSteer(corner, { from: -60, to: 60, step: 20 });
			states.forEach((state, i) => {
				const other = states[states.length - 1 - i];
				near(state.left.steerAngle, -(other?.right.steerAngle ?? NaN), 1e-9, 'heading');
				if (state.ackermann === null) expect(other?.ackermann).toBeNull();
				else near(state.ackermann, other?.ackermann ?? NaN, 1e-7, 'Ackermann');
			});
			expect(states[3]?.ackermann).toBeNull();
		}
	});

	it('Ackermann by its definition on known angles', () => {
		// cot(outer) - cot(inner) = t / L (ISO 8855:2011 7.1.9): L 2.6 m, t 1.5 m, inner 28 gives outer 22.141 degrees.
		near(100, ackermann({ left: 28, right: 22.141 }, 1.5, 2.6) ?? NaN, 0.02, 'full Ackermann');
		expect(ackermann({ left: 20, right: 20 }, 1.5, 2.6)).toBeCloseTo(0, 12);
		expect(ackermann({ left: 2.9, right: 3.2 }, 1.5, 2.6)).toBeNull();
		// And on the kernel's own headings, static toe taken out.
		const wheelbase = roadCorner.vehicle?.wheelbase ?? NaN;
		const { states } = sweepSteer(roadCorner, { from: -60, to: 60, step: 60 });
		const [right, straight] = states;
		if (!right || !straight) throw new Error('three states expected');
		const cot = (degrees: number): number => 1 / Math.tan(degrees * RAD);
		const turned = SIDES.map((side) => Math.abs(right[side].steerAngle - straight[side].steerAngle));
		const toLeft = right.left.steerAngle > 0;
		const [inner = NaN, outer = NaN] = toLeft ? turned : [...turned].reverse();
		const { points, contactPoint } = straight.left;
		const lean = (points.upperBall[1] - points.lowerBall[1]) / (points.upperBall[2] - points.lowerBall[2]);
		const foot = points.lowerBall[1] + lean * (contactPoint[2] - points.lowerBall[2]);
		const ideal = Math.atan(1 / (cot(outer) - (2 * foot) / wheelbase)) / RAD;
		near((100 * (inner - outer)) / (ideal - outer), right.ackermann ?? NaN, 1e-6, 'percentage');
	});
});
