import {
	dot,
	fromSheet,
	orbitFrame,
	project,
	toSheet,
	turnOrbit,
	unprojectMove,
	viewFrame,
	zoomed,
	type Frame,
	type Hand,
	type ProjectionAngle
} from '$lib/drawing/projection';
import type { Vec3 } from '$lib/kinematics';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

// Values follow from the definitions of first- and third-angle projection (ISO 5456-2) and the body axes
// x forward, y left, z up; none is taken from the code.

const cross = (a: Vec3, b: Vec3): Vec3 => [
	a[1] * b[2] - a[2] * b[1],
	a[2] * b[0] - a[0] * b[2],
	a[0] * b[1] - a[1] * b[0]
];
const ANGLES: ProjectionAngle[] = ['third', 'first'];
const HANDS: Hand[] = ['left', 'right'];

function frames(): Frame[] {
	const aligned = ANGLES.flatMap((angle) =>
		HANDS.flatMap((hand) => (['front', 'top', 'side'] as const).map((view) => viewFrame(view, angle, hand)))
	);
	return [...aligned, orbitFrame({ yaw: -38, pitch: 24 }), orbitFrame({ yaw: 131, pitch: -60 })];
}

describe('frames of the views', () => {
	it('are right-handed and orthonormal: right × up points at the eye', () => {
		for (const { right, up, toward } of frames()) {
			for (const axis of [right, up, toward]) expect(dot(axis, axis)).toBeCloseTo(1, 12);
			const made = cross(right, up);
			for (const k of [0, 1, 2] as const) expect(made[k]).toBeCloseTo(toward[k], 12);
		}
	});

	it('share an axis: front and top the one across, front and side the one up', () => {
		const point: Vec3 = [-120, 640, 310];
		for (const angle of ANGLES) {
			const [front, top, side] = (['front', 'top', 'side'] as const).map((view) =>
				project(viewFrame(view, angle, 'left'), point)
			);
			expect(front).toEqual([640, 310]);
			expect(top?.[0]).toBe(640);
			expect(side?.[1]).toBe(310);
		}
	});

	it('put what is ahead of the axle lower in the top view, toward the front view in third angle', () => {
		const ahead: Vec3 = [100, 0, 0];
		for (const angle of ANGLES) expect(project(viewFrame('top', angle, 'left'), ahead)[1]).toBe(-100);
	});

	it('turn the side view so that the front of the car faces the front view in third angle and away in first', () => {
		const ahead: Vec3 = [100, 0, 0];
		// At the left of the front view its right edge lies next to it, and the other way about.
		expect(project(viewFrame('side', 'third', 'left'), ahead)[0]).toBe(100);
		expect(project(viewFrame('side', 'third', 'right'), ahead)[0]).toBe(-100);
		expect(project(viewFrame('side', 'first', 'left'), ahead)[0]).toBe(-100);
		expect(project(viewFrame('side', 'first', 'right'), ahead)[0]).toBe(100);
	});

	it('make the orbit view the front view at yaw 0 and the top view at pitch 90', () => {
		const point: Vec3 = [33, 620, 480];
		const near = (a: readonly number[], b: readonly number[]) =>
			a.forEach((value, k) => expect(value).toBeCloseTo(b[k] ?? NaN, 9));
		near(project(orbitFrame({ yaw: 0, pitch: 0 }), point), project(viewFrame('front', 'third', 'left'), point));
		near(project(orbitFrame({ yaw: 0, pitch: 90 }), point), project(viewFrame('top', 'third', 'left'), point));
	});
});

describe('going back', () => {
	const number = fc.double({ min: -500, max: 500, noNaN: true });

	it('a move on the drawing plane is that move in body axes, with nothing along the line of sight', () => {
		fc.assert(
			fc.property(number, number, fc.integer({ min: 0, max: frames().length - 1 }), (du, dv, index) => {
				const frame = frames()[index] as Frame;
				const move = unprojectMove(frame, [du, dv]);
				const back = project(frame, move);
				expect(back[0]).toBeCloseTo(du, 8);
				expect(back[1]).toBeCloseTo(dv, 8);
				expect(dot(move, frame.toward)).toBeCloseTo(0, 8);
			})
		);
	});

	it('a sheet pixel is the place it came from, zoomed or not', () => {
		fc.assert(
			fc.property(number, number, fc.double({ min: 0.5, max: 12, noNaN: true }), (u, v, k) => {
				const at = zoomed({ x: 420, y: 730, pxPerMm: 0.567 }, { k, x: -50, y: 12 });
				const [x, y] = toSheet(at, [u, v]);
				const back = fromSheet(at, x, y);
				expect(back[0]).toBeCloseTo(u, 6);
				expect(back[1]).toBeCloseTo(v, 6);
			})
		);
	});

	it('zoom keeps a place under the pixel about which it is made', () => {
		const at = { x: 100, y: 200, pxPerMm: 0.5 };
		// k = 3 about (300, 150): x' = 3x − 600, y' = 3y − 300.
		const zoom = { k: 3, x: -600, y: -300 };
		const place = fromSheet(at, 300, 150);
		expect(toSheet(zoomed(at, zoom), place)).toEqual([300, 150]);
	});
});

it('the eye never passes straight up or down, and its yaw stays within half a turn', () => {
	const turned = turnOrbit({ yaw: -170, pitch: 80 }, 60, 200);
	expect(turned.pitch).toBe(89);
	expect(turned.yaw).toBe(160);
	expect(turnOrbit({ yaw: 0, pitch: -80 }, 0, -200).pitch).toBe(-89);
});
