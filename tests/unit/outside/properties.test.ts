import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { KinematicsError, solveCorner, sweepBump, type CornerGeometry } from '../../../src/lib/kinematics';
import { comparePlaces, compareRates } from '../../support/agreement';
import { cornerArbitrary, rackArbitrary, travelArbitrary, real } from '../../support/corners';
import {
	add,
	cross,
	diskUp,
	dot,
	mirrored,
	norm,
	RAD,
	scale,
	solveAt,
	spinAxis,
	sub,
	travelLimit,
	unit,
	VERTICAL,
	type Corner,
	type LinkPoint,
	type V3
} from '../../support/newton';
import { evaluate } from '../../support/newton-figures';
import { notFinite } from '../../support/finite';
import { runs, SEED } from '../../support/seed';

console.log(`outside properties: FC_SEED=${SEED}`);

type State = ReturnType<typeof solveCorner>;

const CODES = ['not-finite', 'degenerate', 'out-of-reach', 'no-solution'];
const LINKS: [LinkPoint, LinkPoint][] = [
	['lowerFront', 'lowerBall'],
	['lowerRear', 'lowerBall'],
	['upperFront', 'upperBall'],
	['upperRear', 'upperBall'],
	['tieRodInner', 'tieRodOuter']
];

/** The state, or the typed error; anything else thrown fails the test. */
function attempt<T>(act: () => T): T | KinematicsError {
	try {
		return act();
	} catch (error) {
		if (!(error instanceof KinematicsError)) throw error;
		expect(CODES).toContain(error.code);
		expect(error.message.length).toBeGreaterThan(10);
		return error;
	}
}

const failed = (x: unknown): x is KinematicsError => x instanceof KinematicsError;

/** Fails unless two numbers are within a tolerance. (A plain comparison first: most of a run is spent here.) */
function near(a: number, b: number, tolerance: number, name = ''): void {
	if (!(Math.abs(a - b) <= tolerance)) expect.fail(`${name}: ${a} against ${b}, off ${a - b}, allowed ${tolerance}`);
}

const figuresOf = (state: State): Record<string, number | null> => {
	const names = [
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
		'rollCentreHeight',
		'rollCentreByArms',
		'swingArmFront',
		'halfTrackRate',
		'antiDive',
		'motionRatio',
		'wheelRate',
		'rideFrequency'
	] as const;
	return Object.fromEntries(names.map((name) => [name, state[name]]));
};

/** Both states carry the same figures, to rounding, each number relative to its size. */
function sameFigures(a: State, b: State, but: string[] = [], lengths = 1, loose = 1e-9): void {
	const other = figuresOf(b);
	for (const [name, value] of Object.entries(figuresOf(a))) {
		if (but.includes(name)) continue;
		const twin = other[name] ?? null;
		if (value === null || twin === null) expect(value, name).toBe(twin);
		else near(value, twin, loose * (lengths + Math.abs(value)), name);
	}
}

describe('against the independent solver', () => {
	const agree = (corner: Corner, travel: number, rack: number): 'agreed' | 'bound' | 'doubted' => {
		const mine = evaluate(corner, travel, rack);
		const theirs = attempt(() => solveCorner(corner, { travel, rack }));
		if (failed(theirs)) {
			expect(theirs.code).toBe('out-of-reach');
			// What the outside solver reaches by more than a mm of travel and of rack, the kernel must reach too.
			const inside = mine !== null && [-1, 1].every((d) => solveAt(corner, travel, rack + d));
			expect(inside, 'reached outside, refused by the kernel').toBe(false);
			return 'bound';
		}
		// Tolerances hold to within 1 mm of a bind.
		if (!mine) return 'bound';
		expect(comparePlaces(mine, theirs)).toEqual([]);
		if (mine.doubt > 1e-7) return 'doubted';
		expect(compareRates(mine, theirs)).toEqual([]);
		return 'agreed';
	};

	it('agrees in every place, angle, rate and centre over travel and rack, on the left', () => {
		const seen = { agreed: 0, bound: 0, doubted: 0 };
		fc.assert(
			fc.property(cornerArbitrary, travelArbitrary, rackArbitrary, (corner, travel, rack) => {
				seen[agree(corner, travel, rack)]++;
			}),
			runs(3000)
		);
		expect(seen.agreed).toBeGreaterThan(2800);
		expect(seen.doubted).toBeLessThan(10);
	});

	it('agrees on a right corner in true vehicle coordinates', () => {
		const seen = { agreed: 0, bound: 0, doubted: 0 };
		fc.assert(
			fc.property(cornerArbitrary, travelArbitrary, rackArbitrary, (corner, travel, rack) => {
				seen[agree(mirrored(corner), travel, rack)]++;
			}),
			runs(800)
		);
		expect(seen.agreed).toBeGreaterThan(700);
	});
});

describe('laws', () => {
	it('mirror: a right corner is the mirrored left, the rack turned about', () => {
		fc.assert(
			fc.property(cornerArbitrary, travelArbitrary, rackArbitrary, (corner, travel, rack) => {
				const left = attempt(() => solveCorner(corner, { travel, rack }));
				const right = attempt(() => solveCorner(mirrored(corner), { travel, rack: -rack }));
				if (failed(left) || failed(right)) {
					expect(failed(left) && failed(right)).toBe(true);
					return;
				}
				sameFigures(left, right, [], 1, 1e-12);
				for (const [key, p] of Object.entries(left.points)) {
					const q = right.points[key as LinkPoint];
					near(p[1], -q[1], 1e-9, key);
					near(p[2], q[2], 1e-9, key);
				}
				near(left.contactPoint[1], -right.contactPoint[1], 1e-9);
				near(left.spinAxis[1], -right.spinAxis[1], 1e-12);
			}),
			runs(1000)
		);
	});

	it('translation along x: every figure stays, every point moves along', () => {
		fc.assert(
			fc.property(cornerArbitrary, travelArbitrary, rackArbitrary, real(-2000, 2000), (corner, travel, rack, dx) => {
				const moved = shifted(corner, [dx, 0, 0], { x: corner.wheel.x + dx });
				const here = attempt(() => solveCorner(corner, { travel, rack }));
				const there = attempt(() => solveCorner(moved, { travel, rack }));
				if (failed(here) || failed(there)) return;
				sameFigures(here, there, [], 1, 1e-7);
				near(there.wheelCentre[0] - here.wheelCentre[0], dx, 1e-8);
			}),
			runs(1000)
		);
	});

	it('translation along y with the track: the upright moves the same, only what is measured from the centreline changes', () => {
		fc.assert(
			fc.property(cornerArbitrary, travelArbitrary, real(0, 400), (corner, travel, dy) => {
				const moved = shifted(corner, [0, dy, 0], { track: corner.wheel.track + 2 * dy });
				const here = attempt(() => solveCorner(corner, { travel, rack: 0 }));
				const there = attempt(() => solveCorner(moved, { travel, rack: 0 }));
				if (failed(here) || failed(there)) return;
				sameFigures(here, there, ['rollCentreHeight', 'rollCentreByArms'], 1, 1e-7);
				// The line from contact point to instant centre stays; the centreline cuts it further away.
				const y = here.contactPoint[1];
				if (here.rollCentreHeight !== null && there.rollCentreHeight !== null) {
					near(
						(here.rollCentreHeight * (y + dy)) / y,
						there.rollCentreHeight,
						1e-6 * (1 + Math.abs(here.rollCentreHeight))
					);
				}
			}),
			runs(700)
		);
	});

	it('translation up with a taller tyre: nothing that is measured at the hub changes', () => {
		fc.assert(
			fc.property(cornerArbitrary, travelArbitrary, rackArbitrary, real(0, 100), (corner, travel, rack, dr) => {
				const up = scale(diskUp(spinAxis(corner.wheel, 1), VERTICAL), dr);
				const moved = shifted(corner, up, { loadedRadius: corner.wheel.loadedRadius + dr });
				const here = attempt(() => solveCorner(corner, { travel, rack }));
				const there = attempt(() => solveCorner(moved, { travel, rack }));
				if (failed(here) || failed(there)) return;
				const atGround = [
					'scrubRadius',
					'mechanicalTrail',
					'rollCentreHeight',
					'rollCentreByArms',
					'swingArmFront',
					'halfTrackRate',
					'antiDive'
				];
				sameFigures(here, there, atGround, 1, 1e-7);
			}),
			runs(700)
		);
	});

	it('scale: lengths grow, angles and ratios stay, rates shrink', () => {
		const lengths = [
			'scrubRadius',
			'mechanicalTrail',
			'kingpinOffsetAtHub',
			'trailAtHub',
			'rollCentreHeight',
			'rollCentreByArms',
			'swingArmFront'
		] as const;
		const angles = [
			'camber',
			'toe',
			'caster',
			'kpi',
			'includedAngle',
			'halfTrackRate',
			'antiDive',
			'motionRatio'
		] as const;
		const rates = ['camberRate', 'toeRate', 'casterRate'] as const;
		fc.assert(
			fc.property(cornerArbitrary, travelArbitrary, rackArbitrary, real(0.2, 5), (corner, travel, rack, k) => {
				const here = attempt(() => solveCorner(corner, { travel, rack }));
				const there = attempt(() => solveCorner(scaled(corner, k), { travel: travel * k, rack: rack * k }));
				if (failed(here) || failed(there)) return;
				const check = (names: readonly (keyof State)[], factor: number): void => {
					for (const name of names) {
						const [a, b] = [here[name] as number | null, there[name] as number | null];
						if (a === null || b === null) expect(a, name).toBe(b);
						else near(a * factor, b, 1e-7 * factor * (1 + Math.abs(a)), name);
					}
				};
				check(lengths, k);
				check(angles, 1);
				check(rates, 1 / k);
			}),
			runs(700)
		);
	});

	it('every state of a sweep keeps its link lengths and the angle between spin and steering axis, and holds no NaN', () => {
		fc.assert(
			fc.property(cornerArbitrary, rackArbitrary, real(3, 17), (corner, rack, step) => {
				const swept = attempt(() => sweepBump(corner, { from: -80, to: 80, step, rack }));
				if (failed(swept)) {
					expect(swept.code).toBe('out-of-reach');
					return;
				}
				const apart = angleBetween(spinAxis(corner.wheel, 1), sub(corner.points.upperBall, corner.points.lowerBall));
				for (const state of swept.states) {
					for (const [a, b] of LINKS) {
						const rest = norm(sub(corner.points[b], corner.points[a]));
						near(norm(sub(state.points[b], state.points[a])), rest, 1e-9, `${a} to ${b}`);
					}
					near(
						norm(sub(state.points.upperBall, state.points.lowerBall)),
						norm(sub(corner.points.upperBall, corner.points.lowerBall)),
						1e-9
					);
					near(norm(state.spinAxis), 1, 1e-12);
					near(angleBetween(state.spinAxis, sub(state.points.upperBall, state.points.lowerBall)), apart, 1e-9);
					expect(notFinite(state)).toEqual([]);
				}
			}),
			runs(600)
		);
	});

	it('energy: the wheel rate is the second derivative of what the spring stores', () => {
		let checked = 0;
		fc.assert(
			fc.property(cornerArbitrary, real(-50, 50), (corner, travel) => {
				if (!corner.coilover) return;
				const h = 1;
				const around = [-4, -3, -2, -1, 0, 1, 2, 3, 4].map((i) =>
					attempt(() => solveCorner(corner, { travel: travel + i * h, rack: 0 }))
				);
				if (around.some(failed)) return;
				const stored = (around as State[]).map((s) => energy(corner, s));
				const weights = [-1 / 560, 8 / 315, -1 / 5, 8 / 5, -205 / 72, 8 / 5, -1 / 5, 8 / 315, -1 / 560];
				const narrow = [0, 1 / 90, -3 / 20, 3 / 2, -49 / 18, 3 / 2, -3 / 20, 1 / 90, 0];
				const curve = (w: number[]): number => w.reduce((sum, x, i) => sum + x * (stored[i] ?? NaN), 0) / (h * h);
				const tolerance = 1e-6 * (10 + Math.abs(curve(weights)));
				// Skip where the differences themselves have not settled to what is asked of them (next to a bind).
				if (Math.abs(curve(weights) - curve(narrow)) > tolerance) return;
				const state = around[4] as State;
				checked++;
				near(curve(weights), state.wheelRate ?? NaN, tolerance, 'wheel rate');
			}),
			runs(700)
		);
		expect(checked).toBeGreaterThan(400);
	});
});

describe('reach', () => {
	it('the limit of a sweep is where the linkage binds: solvable there, out of reach just past it', () => {
		let limits = 0;
		fc.assert(
			fc.property(cornerArbitrary, (corner) => {
				const swept = attempt(() => sweepBump(corner, { from: -250, to: 250, step: 10 }));
				if (failed(swept)) throw swept;
				for (const [limit, way] of [
					[swept.lowLimit, -1],
					[swept.highLimit, 1]
				] as const) {
					const outside = travelLimit(corner, 250 * way);
					if (!limit) {
						expect(outside === null || Math.abs(outside) > 249.999, `no limit, but bound at ${outside}`).toBe(true);
						continue;
					}
					limits++;
					near(limit.value, outside ?? NaN, 1e-6, 'limit');
					expect(String(limit.locks).length).toBeGreaterThan(2);
					expect(notFinite(solveCorner(corner, { travel: limit.value, rack: 0 }))).toEqual([]);
					const past = attempt(() => solveCorner(corner, { travel: limit.value + 1e-5 * way, rack: 0 }));
					expect(failed(past) && past.code).toBe('out-of-reach');
					if (failed(past)) near(past.lastReachable ?? NaN, limit.value, 1e-6, 'last reachable');
				}
				// Every step inside is there.
				const low = swept.lowLimit?.value ?? -250;
				const high = swept.highLimit?.value ?? 250;
				for (let t = -250; t <= 250; t += 10) {
					if (t > low + 1e-3 && t < high - 1e-3)
						expect(swept.states.some((s) => Math.abs(s.travel - t) < 1e-9)).toBe(true);
				}
				for (const s of swept.states) expect(s.travel >= low - 1e-9 && s.travel <= high + 1e-9).toBe(true);
			}),
			runs(400)
		);
		expect(limits).toBeGreaterThan(200);
	});

	it('a sweep holds both ends, steps evenly, and one state where from equals to', () => {
		fc.assert(
			fc.property(cornerArbitrary, real(-30, 0), real(0.5, 30), real(0.7, 40), (corner, from, to, step) => {
				const swept = attempt(() => sweepBump(corner, { from, to, step }));
				if (failed(swept) || swept.lowLimit || swept.highLimit) return;
				const travels = swept.states.map((s) => s.travel);
				expect(travels[0] === from).toBe(true);
				expect(travels.at(-1) === to).toBe(true);
				travels.slice(1, -1).forEach((t, i) => near(t, from + (i + 1) * step, 1e-9));
				const last = to - (travels.at(-2) ?? from);
				expect(last).toBeGreaterThan(0);
				expect(last).toBeLessThanOrEqual(step * (1 + 1e-9));
				expect(sweepBump(corner, { from: to, to, step }).states.length).toBe(1);
				expect(sweepBump(corner, { from: to, to: from, step }).states.map((s) => s.travel)[0]).toBe(to);
			}),
			runs(300)
		);
	});

	it('broken input is answered by a typed error or by finite figures, never by anything else', () => {
		const bad = fc.constantFrom(NaN, Infinity, -Infinity, 0, -1, 1e-9, 1e9, -1e9, 1e300, 5e-324);
		const names = LINKS.flat();
		const harm = fc.oneof(
			fc.record({
				kind: fc.constant('number' as const),
				a: fc.constantFrom(...names),
				b: fc.constantFrom(...names),
				axis: fc.nat(2),
				value: bad,
				c: fc.constantFrom(...names)
			}),
			fc.record({
				kind: fc.constant('meet' as const),
				a: fc.constantFrom(...names),
				b: fc.constantFrom(...names),
				axis: fc.nat(2),
				value: bad,
				c: fc.constantFrom(...names)
			}),
			fc.record({
				kind: fc.constant('line' as const),
				a: fc.constantFrom(...names),
				b: fc.constantFrom(...names),
				axis: fc.nat(2),
				value: bad,
				c: fc.constantFrom(...names)
			}),
			fc.record({
				kind: fc.constant('wheel' as const),
				a: fc.constantFrom(...names),
				b: fc.constantFrom(...names),
				axis: fc.nat(4),
				value: bad,
				c: fc.constantFrom(...names)
			}),
			fc.record({
				kind: fc.constant('ask' as const),
				a: fc.constantFrom(...names),
				b: fc.constantFrom(...names),
				axis: fc.nat(1),
				value: bad,
				c: fc.constantFrom(...names)
			})
		);
		let threw = 0;
		fc.assert(
			fc.property(cornerArbitrary, harm, travelArbitrary, (corner, h, travel) => {
				const points: Record<LinkPoint, V3> = { ...corner.points };
				const wheel = { ...corner.wheel };
				let ask = { travel, rack: 0 };
				if (h.kind === 'number') points[h.a] = points[h.a].map((x, i) => (i === h.axis ? h.value : x)) as unknown as V3;
				if (h.kind === 'meet') points[h.a] = points[h.b];
				if (h.kind === 'line') points[h.a] = add(scale(points[h.b], 0.3), scale(points[h.c], 0.7));
				if (h.kind === 'wheel')
					wheel[(['track', 'x', 'loadedRadius', 'camber', 'toe'] as const)[h.axis] ?? 'x'] = h.value;
				if (h.kind === 'ask') ask = h.axis ? { travel: h.value, rack: 0 } : { travel, rack: h.value };
				const state = attempt(() => solveCorner({ ...corner, points, wheel }, ask));
				if (failed(state)) threw++;
				else {
					expect(notFinite(state)).toEqual([]);
					for (const [a, b] of LINKS) {
						const rest = norm(sub(points[b], points[a]));
						near(norm(sub(state.points[b], state.points[a])) / rest, 1, 1e-11, `${a} to ${b}`);
					}
				}
			}),
			runs(1500)
		);
		expect(threw).toBeGreaterThan(300);
	});
});

const angleBetween = (a: V3, b: V3): number => Math.atan2(norm(cross(a, b)), dot(a, b)) / RAD;

/** The corner with every point moved and some of its wheel changed. */
function shifted(corner: Corner, by: V3, wheel: Partial<Corner['wheel']>): Corner {
	const points = mapPoints(corner, (p) => add(p, by));
	const coil = corner.coilover;
	return {
		...corner,
		points,
		wheel: { ...corner.wheel, ...wheel },
		...(coil && { coilover: { ...coil, top: add(coil.top, by), bottom: add(coil.bottom, by) } })
	};
}

/** The corner grown by a factor, vehicle lengths included. */
function scaled(corner: Corner, k: number): CornerGeometry {
	const coil = corner.coilover;
	const { track, x, loadedRadius, camber, toe } = corner.wheel;
	const { wheelbase = 1, cgHeight = 1 } = corner.vehicle ?? {};
	return {
		points: mapPoints(corner, (p) => scale(p, k)),
		wheel: { track: track * k, x: x * k, loadedRadius: loadedRadius * k, camber, toe },
		vehicle: { ...corner.vehicle, wheelbase: wheelbase * k, cgHeight: cgHeight * k },
		...(coil && { coilover: { ...coil, top: scale(coil.top, k), bottom: scale(coil.bottom, k) } })
	};
}

function mapPoints(corner: Corner, change: (p: V3) => V3): Record<LinkPoint, V3> {
	return Object.fromEntries(Object.entries(corner.points).map(([k, p]) => [k, change(p)])) as Record<LinkPoint, V3>;
}

/** Energy of the spring in a state, N mm, from the moved points alone. */
function energy(corner: Corner, state: State): number {
	const coil = corner.coilover;
	if (!coil) return NaN;
	const three = {
		lowerArm: ['lowerFront', 'lowerRear', 'lowerBall'],
		upperArm: ['upperFront', 'upperRear', 'upperBall'],
		upright: ['lowerBall', 'upperBall', 'tieRodOuter']
	} as const;
	const [a, b, c] = three[coil.on];
	const frame = (p: Readonly<Record<LinkPoint, V3>>): V3[] => {
		const e = unit(sub(p[b], p[a]));
		const n = unit(cross(e, sub(p[c], p[a])));
		return [e, cross(n, e), n];
	};
	const before = frame(corner.points);
	const after = frame(state.points);
	const offset = sub(coil.bottom, corner.points[a]);
	const bottom = before.reduce<V3>((p, e, i) => add(p, scale(after[i] ?? e, dot(offset, e))), state.points[a]);
	const shortened = norm(sub(coil.bottom, coil.top)) - norm(sub(bottom, coil.top));
	return (coil.forceAtRide ?? NaN) * shortened + ((coil.rate ?? NaN) * shortened * shortened) / 2;
}
