import { dot, orbitFrame, viewFrame, type Frame, type Plane } from '$lib/drawing/projection';
import { tyreOutline, tyreShape, wheelCircle } from '$lib/drawing/tyre';
import type { Vec3 } from '$lib/kinematics';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

const centre: Vec3 = [0, 700, 290];
const shape = { radius: 290, width: 185, shoulder: 30 };
const front = viewFrame('front', 'third', 'left');
const side = viewFrame('side', 'third', 'left');

const span = (edge: Plane[], k: 0 | 1) => {
	const values = edge.map((place) => place[k]);
	return [Math.min(...values), Math.max(...values)];
};

function unit(y: number, p: number): Vec3 {
	return [Math.cos(p) * Math.sin(y), Math.cos(p) * Math.cos(y), Math.sin(p)];
}

describe('the seen edge of a tyre', () => {
	it('is as wide as the section and as high as two radii, seen along the tread', () => {
		const edge = tyreOutline(front, centre, [0, 1, 0], shape);
		expect(span(edge, 0)[0]).toBeCloseTo(700 - 92.5, 6);
		expect(span(edge, 0)[1]).toBeCloseTo(700 + 92.5, 6);
		expect(span(edge, 1)[0]).toBeCloseTo(0, 6);
		expect(span(edge, 1)[1]).toBeCloseTo(580, 6);
	});

	it('is a circle of the loaded radius, seen along the axle', () => {
		for (const [u, v] of tyreOutline(side, centre, [0, 1, 0], shape))
			expect(Math.hypot(u - 0, v - 290)).toBeCloseTo(290, 4);
	});

	it('has its tread as a straight line between the shoulders', () => {
		const edge = tyreOutline(front, centre, [0, 1, 0], shape);
		const top = edge.filter(([, v]) => Math.abs(v - 580) < 1e-6).map(([u]) => u);
		expect(Math.max(...top) - Math.min(...top)).toBeCloseTo(185 - 2 * 30, 6);
	});

	// The reach of a sum of convex bodies in a direction is the sum of their reaches: axis, disc and ball, in closed form.
	it('reaches exactly as far in every direction as the body does, from any eye, at any lean', () => {
		fc.assert(
			fc.property(
				fc.double({ min: -3, max: 3, noNaN: true }),
				fc.double({ min: -1.4, max: 1.4, noNaN: true }),
				fc.double({ min: -0.6, max: 0.6, noNaN: true }),
				fc.double({ min: -0.2, max: 0.2, noNaN: true }),
				fc.integer({ min: 0, max: 71 }),
				(yaw, pitch, steer, lean, step) => {
					const frame: Frame = orbitFrame({ yaw: (yaw * 180) / Math.PI, pitch: (pitch * 180) / Math.PI });
					const spin = unit(steer, lean);
					const axis = Math.atan2(dot(spin, frame.up), dot(spin, frame.right));
					// Along the sampled directions the reach is exact; between them it is short by the chord.
					const angle = axis + (step * Math.PI) / 36;
					const d: Vec3 = [0, 1, 2].map(
						(k) => (frame.right[k] ?? 0) * Math.cos(angle) + (frame.up[k] ?? 0) * Math.sin(angle)
					) as unknown as Vec3;
					const along = dot(spin, d);
					const reach = Math.abs(along) * (92.5 - 30) + 260 * Math.sqrt(Math.max(0, 1 - along * along)) + 30;
					const [cu, cv] = [dot(frame.right, centre), dot(frame.up, centre)];
					const found = Math.max(
						...tyreOutline(frame, centre, spin, shape).map(
							([u, v]) => (u - cu) * Math.cos(angle) + (v - cv) * Math.sin(angle)
						)
					);
					expect(found).toBeCloseTo(reach, 3);
				}
			)
		);
	});
});

it('a wheel circle lies square to the spin axis at its offset', () => {
	const spin = unit(0.02, -0.015);
	const frame = orbitFrame({ yaw: -38, pitch: 24 });
	const circle = wheelCircle(frame, centre, spin, 200, 60);
	expect(circle).toHaveLength(72);
	const middle = [0, 1, 2].map((k) => (centre[k] ?? 0) + 60 * (spin[k] ?? 0)) as unknown as Vec3;
	const mean = circle.reduce(([u, v], place) => [u + place[0] / 72, v + place[1] / 72], [0, 0]);
	expect(mean[0]).toBeCloseTo(dot(frame.right, middle), 6);
	expect(mean[1]).toBeCloseTo(dot(frame.up, middle), 6);
});

it('without a tyre size the section is 0.6 of the loaded radius and the shoulder fits inside it', () => {
	const made = tyreShape(300, null);
	expect(made.width).toBe(180);
	expect(2 * made.shoulder).toBeLessThan(made.width);
});
