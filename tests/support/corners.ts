/**
 * Random double A-arm corners for property tests, as fast-check arbitraries. All pure: a corner follows from the drawn
 * numbers alone, so a seed and a path name it for ever. Ranges: arms 150 to 600 mm, ball joints 150 to 450 mm apart,
 * caster -2 to 12 degrees, kingpin inclination 0 to 18 degrees, track 1.1 to 2.1 m; tie rod before or behind the
 * axle; coil-over on any member or none.
 */
import fc from 'fast-check';
import { add, cross, dot, norm, RAD, scale, sub, unit, type Coilover, type Corner, type V3 } from './newton';

/**
 * A number between two bounds in a million even steps, one in ten drawn with a leaning to the bounds themselves.
 * (fc.double draws by bit pattern, mostly next to zero, where no corner lives.)
 */
export const real = (min: number, max: number): fc.Arbitrary<number> => {
	const steps = fc.integer({ min: 0, max: 1_000_000 });
	return fc
		.oneof({ weight: 9, arbitrary: fc.noBias(steps) }, { weight: 1, arbitrary: steps })
		.map((i) => min + ((max - min) * i) / 1_000_000);
};

/** Numbers behind one arm: perpendicular length, front-view slope, direction of the pivot line, places of the pivots. */
const armNumbers = fc.record({
	length: real(150, 600),
	slope: real(-14, 14),
	yaw: real(-10, 10),
	pitch: real(-10, 10),
	front: real(-60, 320),
	spread: real(120, 480)
});
type ArmNumbers = typeof armNumbers extends fc.Arbitrary<infer T> ? T : never;

const cornerNumbers = fc.record({
	track: real(1100, 2100),
	wheelX: real(-20, 20),
	radius: real(250, 420),
	camber: real(-4, 2),
	toe: real(-1, 1),
	caster: real(-2, 12),
	kpi: real(0, 18),
	gap: real(150, 450),
	lowerInboard: real(30, 160),
	lowerFore: real(-40, 40),
	lowerDrop: real(0.2, 0.7),
	lower: armNumbers,
	upper: armNumbers,
	// Pivot lines exactly along x, as many shops build them.
	square: fc.boolean(),
	ahead: fc.boolean(),
	steeringArm: real(70, 180),
	steeringOut: real(-40, 20),
	steeringUp: real(0.05, 0.7),
	rodShare: real(0.75, 1.2),
	rodSlope: real(-3, 3),
	rodSweep: real(-40, 40),
	spring: fc.constantFrom<Coilover['on'] | null>('lowerArm', 'upperArm', 'upright', null),
	springAt: real(0.35, 0.95),
	springLean: real(-60, 60),
	springIn: real(20, 160),
	springLength: real(220, 420),
	springRate: real(15, 250),
	springForce: real(500, 9000),
	wheelbase: real(2000, 3500),
	cgHeight: real(300, 800),
	frontBrakeShare: real(0.4, 0.9),
	inboard: fc.boolean(),
	sprungCornerMass: real(150, 600),
	tyreRate: real(120, 350)
});
type CornerNumbers = typeof cornerNumbers extends fc.Arbitrary<infer T> ? T : never;

/** The two pivots of an arm whose ball joint stands `length` from the pivot line. */
function pivots(ball: V3, n: ArmNumbers, square: boolean): [V3, V3] {
	// The pivot line stays 20 mm on its own side of the centreline.
	const length = Math.min(n.length, ball[1] - 60);
	const yaw = square ? 0 : n.yaw * RAD;
	const pitch = square ? 0 : n.pitch * RAD;
	const along: V3 = [Math.cos(yaw) * Math.cos(pitch), Math.sin(yaw) * Math.cos(pitch), Math.sin(pitch)];
	const across: V3 = [0, Math.cos(n.slope * RAD), Math.sin(n.slope * RAD)];
	const outward = unit(sub(across, scale(along, dot(across, along))));
	const foot = sub(ball, scale(outward, length));
	return [add(foot, scale(along, n.front)), add(foot, scale(along, n.front - n.spread))];
}

/** Foot of the perpendicular from a ball joint to the pivot line. */
function footOf(front: V3, rear: V3, ball: V3): V3 {
	const along = unit(sub(rear, front));
	return add(front, scale(along, dot(sub(ball, front), along)));
}

function spring(n: CornerNumbers, points: Corner['points']): Coilover | undefined {
	if (!n.spring) return undefined;
	const seat = {
		lowerArm: () =>
			add(
				scale(footOf(points.lowerFront, points.lowerRear, points.lowerBall), 1 - n.springAt),
				scale(points.lowerBall, n.springAt)
			),
		upperArm: () =>
			add(
				scale(footOf(points.upperFront, points.upperRear, points.upperBall), 1 - n.springAt),
				scale(points.upperBall, n.springAt)
			),
		upright: () => add(points.lowerBall, [n.springLean / 2, -20, 60])
	}[n.spring]();
	const bottom = add(seat, [0, 0, 15]);
	const lean: V3 = [n.springLean, -n.springIn, 300];
	const top = add(bottom, scale(lean, n.springLength / norm(lean)));
	return { top, bottom, on: n.spring, rate: n.springRate, forceAtRide: n.springForce };
}

/** A left corner from its numbers. */
export function buildCorner(n: CornerNumbers): Corner {
	const up: V3 = unit([-Math.tan(n.caster * RAD), -Math.tan(n.kpi * RAD), 1]);
	const lowerBall: V3 = [
		n.wheelX + n.lowerFore,
		n.track / 2 - n.lowerInboard,
		Math.max(90, n.radius - n.lowerDrop * n.gap)
	];
	const upperBall = add(lowerBall, scale(up, n.gap));
	const [lowerFront, lowerRear] = pivots(lowerBall, n.lower, n.square);
	const [upperFront, upperRear] = pivots(upperBall, n.upper, n.square);
	const tieRodOuter = add(add(lowerBall, scale(up, n.steeringUp * n.gap)), [
		n.ahead ? n.steeringArm : -n.steeringArm,
		n.steeringOut,
		0
	]);
	// A rod about as long as the lower arm, its slope between those of the arms, gives a bump steer a shop might meet.
	const slope = n.lower.slope + (n.upper.slope - n.lower.slope) * n.steeringUp + n.rodSlope;
	const rod = Math.min(n.lower.length, lowerBall[1] - 60) * n.rodShare;
	const tieRodInner = add(tieRodOuter, [n.rodSweep, -rod * Math.cos(slope * RAD), -rod * Math.sin(slope * RAD)]);
	const points = { upperFront, upperRear, upperBall, lowerFront, lowerRear, lowerBall, tieRodInner, tieRodOuter };
	const coilover = spring(n, points);
	return {
		points,
		wheel: { track: n.track, x: n.wheelX, loadedRadius: n.radius, camber: n.camber, toe: n.toe },
		...(coilover && { coilover }),
		vehicle: {
			wheelbase: n.wheelbase,
			cgHeight: n.cgHeight,
			frontBrakeShare: n.frontBrakeShare,
			frontBrakes: n.inboard ? 'inboard' : 'upright',
			sprungCornerMass: n.sprungCornerMass,
			tyreRate: n.tyreRate
		}
	};
}

/** How far the three links of a corner are from lining up; small: the corner binds almost where it stands. */
function clearance({ points: p }: Corner): number {
	const lift = cross(sub(p.upperRear, p.upperFront), sub(p.upperBall, p.upperFront));
	const upper = Math.abs(dot(unit(lift), unit(sub(p.upperBall, p.lowerBall))));
	const steer = cross(sub(p.tieRodOuter, p.lowerBall), sub(p.tieRodOuter, p.upperBall));
	const tie = Math.abs(dot(unit(steer), unit(sub(p.tieRodOuter, p.tieRodInner))));
	return Math.min(upper, tie);
}

/** Any left corner of the ranges above that does not bind at ride height itself. */
export const cornerArbitrary: fc.Arbitrary<Corner> = cornerNumbers.map(buildCorner).filter((c) => clearance(c) > 0.15);

/** Corners whose pivot lines run exactly along x: seen from the front, a four-bar linkage. */
export const squareCornerArbitrary: fc.Arbitrary<Corner> = cornerNumbers
	.map((n) => buildCorner({ ...n, square: true }))
	.filter((c) => clearance(c) > 0.15);

/** A travel and a rack movement to try, mm. */
export const travelArbitrary = real(-90, 90);
export const rackArbitrary = real(-60, 60);
