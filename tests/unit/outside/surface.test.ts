import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	applyAlignment,
	KinematicsError,
	solveAlignment,
	solveCorner,
	sweepBump,
	sweepRoll,
	sweepSteer
} from '../../../src/lib/kinematics';
import { roadCorner } from '../../fixtures/corners';
import { cornerArbitrary, real } from '../../support/corners';
import { notFinite } from '../../support/finite';
import { mirrored, type Corner } from '../../support/newton';
import { runs, SEED } from '../../support/seed';

console.log(`outside surface: FC_SEED=${SEED}`);

/** What a caller of the kernel may rely on beside the numbers: absence with a reason, typed refusals, both kinds of right corner. */

const FIGURES = [
	'camber',
	'toe',
	'caster',
	'kpi',
	'includedAngle',
	'scrubRadius',
	'mechanicalTrail',
	'kingpinOffsetAtHub',
	'trailAtHub',
	'camberRate',
	'toeRate',
	'casterRate',
	'instantCentreFront',
	'rollCentreHeight',
	'rollCentreByArms',
	'instantCentreByArms',
	'swingArmFront',
	'halfTrackRate',
	'antiDive',
	'motionRatio',
	'wheelRate',
	'rideFrequency'
] as const;

type State = ReturnType<typeof solveCorner>;

/** Every absent figure carries a reason in words, and no present one does. */
function reasoned(state: State): void {
	const reasons = state.reasons as Readonly<Record<string, string | undefined>>;
	for (const name of FIGURES) {
		if (state[name] === null) expect(reasons[name]?.length ?? 0, name).toBeGreaterThan(10);
		else expect(reasons[name], name).toBeUndefined();
	}
}

describe('absence', () => {
	it('a figure that is missing says why; one that is there says nothing', () => {
		fc.assert(
			fc.property(cornerArbitrary, real(-60, 60), fc.nat(7), (corner, travel, bits) => {
				const { coilover, vehicle, ...bare } = corner;
				const cut: Corner = {
					...bare,
					...(bits & 1 && coilover ? { coilover } : {}),
					...(bits & 2 && vehicle ? { vehicle } : {})
				};
				const { states } = sweepBump(cut, { from: travel, to: travel, step: 1 });
				for (const state of states) {
					reasoned(state);
					expect(state.antiDive === null).toBe(!cut.vehicle);
					expect(state.motionRatio === null).toBe(!cut.coilover);
					if (!cut.coilover || !cut.vehicle) expect(state.rideFrequency).toBeNull();
				}
			}),
			runs(300)
		);
	});

	it('parallel level arms have no instant centre and no swing arm, and say so', () => {
		const points = {
			...roadCorner.points,
			lowerFront: [150, 350, 200],
			lowerRear: [-150, 350, 200],
			lowerBall: [0, 680, 200],
			upperFront: [120, 350, 500],
			upperRear: [-120, 350, 500],
			upperBall: [0, 680, 500],
			tieRodInner: [-120, 350, 250],
			tieRodOuter: [-120, 680, 250]
		} as const;
		const state = solveCorner({ ...roadCorner, points }, { travel: 0, rack: 0 });
		expect(state.instantCentreFront).toBeNull();
		expect(state.instantCentreByArms).toBeNull();
		expect(state.swingArmFront).toBeNull();
		expect(state.rollCentreHeight).toBeCloseTo(0, 9);
		reasoned(state);
	});
});

describe('ranges', () => {
	const odd = fc.constantFrom(NaN, Infinity, -Infinity, 0, -1, 1e-9, 3, 17, -40, 1e9, -1e9);
	it('any range gives finite states or a typed refusal, in bump, roll and steer', () => {
		let refused = 0;
		let answered = 0;
		fc.assert(
			fc.property(cornerArbitrary, odd, odd, odd, odd, fc.nat(2), (corner, from, to, step, other, which) => {
				const range = { from, to, step };
				const act = [
					() => sweepBump(corner, { ...range, rack: other }),
					() => sweepRoll(corner, { ...range, heave: other }),
					() => sweepSteer(corner, { ...range, travel: other })
				][which];
				try {
					const swept = act?.();
					answered++;
					expect(notFinite(swept)).toEqual([]);
				} catch (error) {
					if (!(error instanceof KinematicsError)) throw error;
					expect(error.message.length).toBeGreaterThan(10);
					refused++;
				}
			}),
			runs(600)
		);
		expect(refused).toBeGreaterThan(100);
		expect(answered).toBeGreaterThan(20);
	});

	it('roll and steer sweeps carry no NaN', () => {
		fc.assert(
			fc.property(cornerArbitrary, real(-15, 15), real(-15, 15), (corner, heave, travel) => {
				expect(notFinite(sweepRoll(corner, { from: -6, to: 6, step: 1.5, heave }))).toEqual([]);
				expect(notFinite(sweepSteer(corner, { from: -80, to: 80, step: 20, travel }))).toEqual([]);
			}),
			runs(150)
		);
	});
});

describe('a right corner entered on its own', () => {
	it('may be given in vehicle coordinates or with +y outboard', () => {
		fc.assert(
			fc.property(cornerArbitrary, cornerArbitrary, real(-4, 4), real(-40, 40), (left, right, roll, rack) => {
				const outboard = { left, right };
				const vehicle = { left, right: mirrored(right) };
				const rolled = [outboard, vehicle].map((axle) => sweepRoll(axle, { from: roll, to: roll, step: 1 }).states[0]);
				const steered = [outboard, vehicle].map(
					(axle) => sweepSteer(axle, { from: rack, to: rack, step: 1 }).states[0]
				);
				for (const [a, b] of [rolled, steered]) {
					expect(a === undefined).toBe(b === undefined);
					if (!a || !b) continue;
					expect(a.right.camber).toBeCloseTo(b.right.camber, 10);
					expect(a.right.toe).toBeCloseTo(b.right.toe, 10);
					expect(a.right.contactPoint[1]).toBeCloseTo(b.right.contactPoint[1], 9);
					expect(b.right.contactPoint[1]).toBeLessThan(0);
				}
			}),
			runs(100)
		);
	});
});

describe('alignment beyond reach and away from ride height', () => {
	it.each([
		['camber', { camber: 70, caster: 3, toe: 0 }],
		['toe', { camber: -1, caster: 3, toe: 89 }]
	])('a %s that cannot be had is refused by name, with the nearest', (target, targets) => {
		for (const adjusters of [{ kind: 'pivotShift' }, { kind: 'legLength' }] as const) {
			try {
				solveAlignment(roadCorner, adjusters, targets);
				expect.fail('refused');
			} catch (error) {
				if (!(error instanceof KinematicsError)) throw error;
				expect(error.code).toBe('no-solution');
				expect(error.at).toBe(target);
				expect(error.message).toMatch(/\d/);
			}
		}
	});

	it('a car that stands low is aligned on the ground it stands on', () => {
		fc.assert(
			fc.property(cornerArbitrary, real(-25, 25), real(-0.8, 0.8), (corner, travel, rake) => {
				const stands = solveCorner(corner, { travel, rack: 0 });
				const targets = { camber: stands.camber + 0.3, caster: stands.caster - rake + 0.4, toe: stands.toe - 0.2 };
				const adjusters = { kind: 'legLength' } as const;
				const answer = solveAlignment(corner, adjusters, targets, { travel, rake });
				const state = applyAlignment(corner, adjusters, answer, { travel, rake });
				for (const s of [state, answer.state]) {
					expect(s.camber).toBeCloseTo(targets.camber, 6);
					expect(s.caster).toBeCloseTo(targets.caster + rake, 6);
					expect(s.toe).toBeCloseTo(targets.toe, 6);
					expect(s.contactPoint[2]).toBeCloseTo(stands.contactPoint[2], 7);
				}
			}),
			runs(150)
		);
	});
});
