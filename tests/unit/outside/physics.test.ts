import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { solveCorner } from '../../../src/lib/kinematics';
import { lowCorner, roadCorner, shimTableCorner } from '../../fixtures/corners';
import { EngineCorner, type EnginePose } from '../../support/engine';
import { RAD, rackLimit, solveAt, sub, type Corner } from '../../support/newton';
import { attitude } from '../../support/newton-figures';

/**
 * Camber, toe, caster and kingpin inclination of three corners over the whole of bump travel and steering, against a
 * general physics engine: it knows bodies, joints and constraints, and nothing of suspensions.
 */
const TRAVELS = [-70, -60, -50, -40, -30, -20, -10, 0, 10, 20, 30, 40, 50, 60, 70];
const RACK_PARTS = [-1, -0.75, -0.5, -0.25, 0, 0.25, 0.5, 0.75, 1];
const LOCK = 35;
const DEGREES = 1e-6;

/** Rack movement at which the wheel has steered 35 degrees at ride height, or 0.1 mm short of where it binds. */
function lock(corner: Corner, direction: 1 | -1): number {
	const toe = (rack: number): number => {
		const found = solveAt(corner, 0, rack);
		return found ? attitude(found.link, found.at.pose).toe : NaN;
	};
	let far = (rackLimit(corner, 0, direction * 250) ?? direction * 250) - 0.1 * direction;
	const turned = (rack: number): number => Math.abs(toe(rack) - toe(0)) - LOCK;
	if (turned(far) < 0) return far;
	let near = 0;
	while (Math.abs(far - near) > 1e-6) {
		const middle = (near + far) / 2;
		if (turned(middle) < 0) near = middle;
		else far = middle;
	}
	return near;
}

/** The four angles from the definitions, on places read off the engine. */
function angles(pose: EnginePose) {
	const axis = sub(pose.upperBall, pose.lowerBall);
	return {
		camber: -Math.asin(pose.spin[2]) / RAD,
		toe: Math.atan2(pose.spin[0], pose.spin[1]) / RAD,
		caster: Math.atan2(-axis[0], axis[2]) / RAD,
		kpi: Math.atan2(-axis[1], axis[2]) / RAD
	};
}

describe.each([
	['a road corner, rack behind the axle', roadCorner],
	['a low corner, rack ahead of the axle', lowCorner],
	['the corner of the published shim table', shimTableCorner]
])('the engine on %s', (_, corner) => {
	let engine: EngineCorner;
	beforeAll(async () => {
		engine = await EngineCorner.open(corner);
	});
	afterAll(() => engine.close());

	it('gives the same camber, toe, caster and kingpin inclination from droop to bump and lock to lock', () => {
		const ride = engine.joints;
		const locks = { right: lock(corner, -1), left: lock(corner, 1) };
		const worst = { camber: 0, toe: 0, caster: 0, kpi: 0 };
		let gap = 0;
		let steered = 0;
		for (const travel of TRAVELS) {
			for (const way of [1, -1] as const) {
				engine.joints = ride;
				engine.assemble(travel / 2, 0);
				for (const part of RACK_PARTS.filter((p) => p * way >= 0).sort((a, b) => way * (a - b))) {
					const rack = Math.abs(part) * (way > 0 ? locks.left : locks.right);
					// Half a step first, so that the engine's Newton starts near.
					engine.assemble(travel, rack * 0.9);
					const pose = engine.assemble(travel, rack);
					gap = Math.max(gap, pose.gap);
					const seen = angles(pose);
					const state = solveCorner(corner, { travel, rack });
					steered = Math.max(steered, Math.abs(seen.toe));
					for (const key of ['camber', 'toe', 'caster', 'kpi'] as const) {
						worst[key] = Math.max(worst[key], Math.abs(seen[key] - state[key]));
					}
				}
			}
		}
		expect(gap).toBeLessThan(1e-9);
		expect(steered).toBeGreaterThan(30);
		for (const key of ['camber', 'toe', 'caster', 'kpi'] as const) expect(worst[key], key).toBeLessThan(DEGREES);
	});
});
