import type { Vec3 } from '$lib/kinematics';
import { dot, project, type Frame, type Plane } from './projection';

/** A tyre as the drawing knows it: radius and section width in mm, with the shoulder's rounding. */
export interface TyreShape {
	radius: number;
	width: number;
	shoulder: number;
}

const STEP = Math.PI / 36;

/** Shoulder rounding and a section width that serve until a tyre size is known: 0.6 of the loaded radius wide. */
export function tyreShape(radius: number, width: number | null): TyreShape {
	const section = width ?? 0.6 * radius;
	return { radius, width: section, shoulder: Math.min(0.18 * section, 0.3 * radius) };
}

const mix = (a: Vec3, ka: number, b: Vec3, kb: number): Vec3 => [
	a[0] * ka + b[0] * kb,
	a[1] * ka + b[1] * kb,
	a[2] * ka + b[2] * kb
];
const add = (a: Vec3, b: Vec3): Vec3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];

/**
 * The seen edge of a tyre in any parallel projection: a closed run of plane points (mm), no last repeat.
 *
 * The body is a disc (radius − shoulder) drawn out along the spin axis (width − 2·shoulder) and rounded by a ball
 * (shoulder). It is convex, so the edge is where each direction d of the plane is supported: the three parts'
 * support points added (Minkowski sum). Straight tread and wall lines fall out where a part's support jumps.
 */
export function tyreOutline(frame: Frame, centre: Vec3, spin: Vec3, shape: TyreShape): Plane[] {
	const half = shape.width / 2 - shape.shoulder;
	const disc = shape.radius - shape.shoulder;
	const edge: Plane[] = [];
	const axisAngle = Math.atan2(dot(spin, frame.up), dot(spin, frame.right));
	const support = (angle: number, sense: number) => {
		const d = mix(frame.right, Math.cos(angle), frame.up, Math.sin(angle));
		const along = dot(spin, d);
		const radial = mix(d, 1, spin, -along);
		const length = Math.hypot(...radial);
		const onDisc: Vec3 = length < 1e-9 ? [0, 0, 0] : mix(radial, disc / length, radial, 0);
		const onAxis = mix(spin, sense * half, spin, 0);
		edge.push(project(frame, add(add(centre, onAxis), add(onDisc, mix(d, shape.shoulder, d, 0)))));
	};
	// Start square to the projected axis, so that the two jumps from wall to wall fall on the ends of the two halves.
	for (const [start, sense] of [
		[axisAngle - Math.PI / 2, 1],
		[axisAngle + Math.PI / 2, -1]
	] as const) {
		const nudge = 1e-6;
		for (let step = 0; step <= 36; step += 1) {
			// Either side of the axis itself the disc's support jumps across: take both.
			if (step === 18) {
				support(start + step * STEP - nudge, sense);
				support(start + step * STEP + nudge, sense);
			} else support(start + step * STEP, sense);
		}
	}
	return edge;
}

/** A circle square to the spin axis, offset along it (mm), as plane points: rim edge or side wall in the orbit view. */
export function wheelCircle(frame: Frame, centre: Vec3, spin: Vec3, radius: number, offset = 0): Plane[] {
	const seed: Vec3 = Math.abs(spin[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0];
	const raw = mix(seed, 1, spin, -dot(seed, spin));
	const first = mix(raw, 1 / Math.hypot(...raw), raw, 0);
	const second: Vec3 = [
		spin[1] * first[2] - spin[2] * first[1],
		spin[2] * first[0] - spin[0] * first[2],
		spin[0] * first[1] - spin[1] * first[0]
	];
	const middle = add(centre, mix(spin, offset, spin, 0));
	return Array.from({ length: 72 }, (_, k) => {
		const angle = k * STEP;
		return project(frame, add(middle, mix(first, radius * Math.cos(angle), second, radius * Math.sin(angle))));
	});
}
