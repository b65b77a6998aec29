import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { applyAlignment, KinematicsError, solveAlignment } from '../../../src/lib/kinematics';
import { cornerArbitrary, real } from '../../support/corners';
import { contactOf, mirrored, scale, solveAdjusted, unit, type LinkChange, type V3 } from '../../support/newton';
import { attitude, movedPoints } from '../../support/newton-figures';
import { runs, SEED } from '../../support/seed';

console.log(`outside alignment: FC_SEED=${SEED}`);

type Adjusters = Parameters<typeof applyAlignment>[1];
interface Settings {
	front: number;
	rear: number;
	tieRod: number;
}

const directionArbitrary: fc.Arbitrary<V3> = fc
	.tuple(real(-0.4, 0.4), real(0.5, 1), real(-0.4, 0.4))
	.map((d) => unit(d as V3));
const adjustersArbitrary: fc.Arbitrary<Adjusters> = fc.oneof(
	fc.constant<Adjusters>({ kind: 'pivotShift' }),
	directionArbitrary.map<Adjusters>((direction) => ({ kind: 'pivotShift', direction })),
	fc.constant<Adjusters>({ kind: 'legLength' })
);
const settingsArbitrary: fc.Arbitrary<Settings> = fc.record({
	front: real(-6, 6),
	rear: real(-6, 6),
	tieRod: real(-4, 4)
});

/** What the settings do to the links of a left corner. */
function changeOf(adjusters: Adjusters, { front, rear, tieRod }: Settings): LinkChange {
	if (adjusters.kind === 'legLength') return { legFront: front, legRear: rear, tieRod };
	const direction = adjusters.direction ?? [0, 1, 0];
	return { upperFront: scale(direction, front), upperRear: scale(direction, rear), tieRod };
}

/** Fails unless two numbers are within a tolerance. (A plain comparison first: most of a run is spent here.) */
function near(a: number, b: number, tolerance: number, name = ''): void {
	if (!(Math.abs(a - b) <= tolerance)) expect.fail(`${name}: ${a} against ${b}, off ${a - b}, allowed ${tolerance}`);
}

const ANGLES = ['camber', 'caster', 'toe'] as const;

describe('alignment', () => {
	it('applied settings agree with the outside solver on links changed by them, the tyre on the ground', () => {
		let compared = 0;
		fc.assert(
			fc.property(cornerArbitrary, adjustersArbitrary, settingsArbitrary, (corner, adjusters, settings) => {
				const mine = solveAdjusted(corner, changeOf(adjusters, settings));
				if (!mine) return;
				const state = applyAlignment(corner, adjusters, settings);
				compared++;
				const a = attitude(mine.link, mine.at.pose);
				for (const key of ['camber', 'toe', 'caster', 'kpi'] as const) near(a[key], state[key], 1e-6, key);
				near(a.scrubRadius, state.scrubRadius ?? NaN, 1e-6, 'scrub radius');
				near(0, state.contactPoint[2], 1e-8, 'ground');
				const points = movedPoints(mine.link, mine.at.pose);
				for (const key of ['upperFront', 'upperRear', 'upperBall', 'lowerBall', 'tieRodOuter'] as const) {
					points[key].forEach((x, i) => near(x, state.points[key][i] ?? NaN, 1e-6, key));
				}
				const contact = contactOf(mine.link, mine.at.pose);
				contact.forEach((x, i) => near(x, state.contactPoint[i] ?? NaN, 1e-6, 'contact point'));
			}),
			runs(500)
		);
		expect(compared).toBeGreaterThan(480);
	});

	it('solved settings, applied, give the targets; both adjuster kinds, both sides', () => {
		let solved = 0;
		fc.assert(
			fc.property(
				cornerArbitrary,
				adjustersArbitrary,
				settingsArbitrary,
				fc.boolean(),
				(corner, adjusters, settings, right) => {
					// Targets that some setting does give: those of a setting drawn first.
					const mine = solveAdjusted(corner, changeOf(adjusters, settings));
					if (!mine) return;
					const targets = attitude(mine.link, mine.at.pose);
					const side = right && !('direction' in adjusters) ? mirrored(corner) : corner;
					const answer = settle(() => solveAlignment(side, adjusters, targets));
					if (answer === 'no-solution') return;
					solved++;
					const state = applyAlignment(side, adjusters, answer);
					for (const key of ANGLES) {
						near(targets[key], state[key], 1e-6, key);
						near(targets[key], answer.state[key], 1e-6, key);
					}
					near(0, state.contactPoint[2], 1e-8, 'ground');
					near(0, answer.state.contactPoint[2], 1e-8, 'ground');
					near(answer.state.travel, state.travel, 1e-7, 'travel');
				}
			),
			runs(500)
		);
		expect(solved).toBeGreaterThan(480);
	});

	it('with no change asked for, nothing moves', () => {
		fc.assert(
			fc.property(cornerArbitrary, adjustersArbitrary, (corner, adjusters) => {
				const state = applyAlignment(corner, adjusters, { front: 0, rear: 0, tieRod: 0 });
				near(state.travel, 0, 1e-9, 'travel');
				near(state.camber, corner.wheel.camber, 1e-9, 'camber');
				const answer = solveAlignment(corner, adjusters, state);
				for (const key of ['front', 'rear', 'tieRod'] as const) near(answer[key], 0, 1e-6, key);
			}),
			runs(150)
		);
	});

	it('a nose-down rake takes its angle from the caster to the road', () => {
		fc.assert(
			fc.property(cornerArbitrary, real(-1, 1), (corner, rake) => {
				const level = applyAlignment(corner, { kind: 'legLength' }, { front: 0, rear: 0, tieRod: 0 });
				const targets = { camber: level.camber, caster: level.caster - rake, toe: level.toe };
				const answer = solveAlignment(corner, { kind: 'legLength' }, targets, { rake });
				// Caster in the body is the target plus the rake: what the car had, so the adjusters stay.
				near(answer.state.caster, targets.caster + rake, 1e-6, 'caster in the body');
			}),
			runs(100)
		);
	});
});

/** The answer, or that the kernel found none; other errors fail. */
function settle<T>(act: () => T): T | 'no-solution' {
	try {
		return act();
	} catch (error) {
		if (error instanceof KinematicsError && error.code === 'no-solution') return 'no-solution';
		throw error;
	}
}
