import { vec3 } from 'gl-matrix';
import type { Vec3 } from './geometry';

/**
 * A circle in space as every place `centre + cos·along + sin·across`; `along` and `across` are square to each other and
 * to `axis`, and as long as the radius.
 */
export interface Circle {
	readonly centre: Vec3;
	readonly axis: Vec3;
	readonly along: Vec3;
	readonly across: Vec3;
	readonly radius: number;
}

function plain(v: vec3): Vec3 {
	return [v[0], v[1], v[2]];
}

/**
 * The places at `fromA` from a and `fromB` from b: the circle in which two spheres meet, turned so that `along` points
 * to `near`. The foot of the circle lies at (D² + fromA² − fromB²) / 2D from a on the line of centres (law of cosines).
 * @returns null where the spheres do not meet, or where `near` lies on the line of centres.
 */
export function circleOfSpheres(a: Vec3, fromA: number, b: Vec3, fromB: number, near: Vec3): Circle | null {
	const line = vec3.subtract([0, 0, 0], b, a);
	const apart = vec3.length(line);
	const axis = vec3.scale([0, 0, 0], line, 1 / apart);
	const foot = (apart * apart + fromA * fromA - fromB * fromB) / (2 * apart);
	const radiusSquared = (fromA - foot) * (fromA + foot);
	if (!(apart > 0) || !(radiusSquared > 0)) return null;
	const radius = Math.sqrt(radiusSquared);
	const centre = vec3.scaleAndAdd([0, 0, 0], a, axis, foot);
	const outward = vec3.subtract([0, 0, 0], near, centre);
	vec3.scaleAndAdd(outward, outward, axis, -vec3.dot(outward, axis));
	const reach = vec3.length(outward);
	if (!(reach > 0)) return null;
	const along = vec3.scale([0, 0, 0], outward, radius / reach);
	const across = vec3.cross([0, 0, 0], axis, along);
	return { centre: plain(centre), axis: plain(axis), along: plain(along), across: plain(across), radius };
}

/**
 * Where a circle meets a sphere. With v from the circle's centre to the sphere's, |v|² + r² − 2 v·(cos·along +
 * sin·across) = distance², which is a·cos + b·sin = c; the two roots are mirror images in the plane through v and the axis.
 * @param branch +1 for the root that lies to the `axis × v` side, −1 for the other.
 * @returns null where they do not meet.
 */
export function circleMeetsSphere(circle: Circle, from: Vec3, distance: number, branch: 1 | -1): Vec3 | null {
	const v = vec3.subtract([0, 0, 0], from, circle.centre);
	const a = vec3.dot(v, circle.along);
	const b = vec3.dot(v, circle.across);
	const c = (vec3.squaredLength(v) + circle.radius * circle.radius - distance * distance) / 2;
	const square = a * a + b * b;
	const rest = square - c * c;
	if (!(square > 0) || !(rest >= 0)) return null;
	const root = branch * Math.sqrt(rest);
	const place = vec3.scaleAndAdd([0, 0, 0], circle.centre, circle.along, (a * c - b * root) / square);
	return plain(vec3.scaleAndAdd(place, place, circle.across, (b * c + a * root) / square));
}

/**
 * Where three spheres meet: the place at the three distances from a, b and c (mm). `branch` is the sign of the triple
 * product (place − a) · ((b − a) × (c − a)).
 * @returns null where they do not meet.
 */
export function threeSpheres(
	a: Vec3,
	fromA: number,
	b: Vec3,
	fromB: number,
	c: Vec3,
	fromC: number,
	branch: 1 | -1
): Vec3 | null {
	const circle = circleOfSpheres(a, fromA, b, fromB, c);
	return circle && circleMeetsSphere(circle, c, fromC, branch);
}
