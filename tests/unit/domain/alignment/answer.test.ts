import { answerAxle, type AxleTask, type WheelAnswer, type WheelTask } from '$lib/domain/alignment/answer';
import { straighten } from '$lib/domain/alignment/flats';
import { perStep } from '$lib/domain/alignment/perShim';
import { standOf } from '$lib/domain/alignment/stand';
import { changed, changedHoldingToe, standingWheel, type UpperAdjuster } from '$lib/domain/alignment/wheel';
import { applyAlignment, solveCorner, sweepBump, type CornerGeometry } from '$lib/kinematics';
import type { AdjusterEntry, AlignTarget } from '$lib/schemas/axle';
import type { Shim } from '$lib/schemas/shims';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { lowCorner, roadCorner, shimTableCorner } from '../../../fixtures/corners';

type ShimUpper = Extract<UpperAdjuster, { kind: 'shim' }>;
type RodUpper = Extract<UpperAdjuster, { kind: 'rodEnd' }>;

const shims: ShimUpper = {
	kind: 'shim',
	side: 'outboard',
	direction: [0, 1, 0],
	frontNow: 4,
	rearNow: 4,
	boltReserve: 10,
	maxPack: 19,
	maxDifference: 10
};
const rods: RodUpper = {
	kind: 'rodEnd',
	thread: '5/8-18',
	fitting: 'throughBolt',
	handedness: 'right',
	engagementNow: 22,
	minEngagement: null
};
const tieRod: AdjusterEntry['tieRod'] = { thread: '5/8-18', fitting: 'rodEnd', flats: 6 };
const none: AlignTarget = { camber: null, caster: null, toe: null };
const mirrored = (corner: CornerGeometry): CornerGeometry => ({
	...corner,
	coilover: null,
	points: Object.fromEntries(
		Object.entries(corner.points).map(([name, [x, y, z]]) => [name, [x, -y, z]])
	) as unknown as CornerGeometry['points']
});
const stock = (...rows: [number, number][]): Shim[] =>
	rows.map(([thickness, count]) => ({ thickness, unit: 'mm', count }));
const SHELF = stock([0.5, 8], [1, 8], [25.4 / 16, 8], [2, 8], [3, 8]);

function task(
	wheels: Partial<WheelTask>[],
	rest: { upper?: UpperAdjuster; stock?: Shim[]; stance?: AxleTask['stance'] } = {}
): AxleTask {
	return {
		adjusters: { upper: rest.upper ?? shims, tieRod },
		stance: rest.stance ?? {},
		stock: rest.stock ?? SHELF,
		wheels: wheels.map((wheel) => ({ side: 'left', geometry: roadCorner, targets: none, measured: null, ...wheel }))
	};
}

function solved(answer: ReturnType<typeof answerAxle>[number] | undefined): WheelAnswer {
	if (!answer || 'failed' in answer) throw new Error(answer?.failed ?? 'No answer.');
	return answer;
}
const one = (input: AxleTask) => solved(answerAxle(input)[0]);
const figure = (answer: WheelAnswer, name: string) => {
	const found = answer.figures.find((figure) => figure.name === name);
	if (!found) throw new Error(name);
	return found;
};

describe('the published shim table through this layer', () => {
	// US Army TM 9-2320-280-34 (1996), para 20-4 b, Table 20-3, p. 20-22, and TM 9-2320-387-24-2, para 34-3, Table 34-2,
	// p. 34-2 (half thickness). Hardpoints: Project Chrono (BSD-3). Printed to 0.1°, exact geometry up to 0.056° away.
	const TOLERANCE = 0.06;
	const ROWS: [number, 'front' | 'rear' | 'both', number, number][] = [
		[3.05, 'front', 0.6, 0.5],
		[3.05, 'rear', -0.6, 0],
		[3.05, 'both', 0, 0.5],
		[1.52, 'front', 0.3, 0.3],
		[1.52, 'rear', -0.3, 0],
		[1.52, 'both', 0, 0.3]
	];
	const wheel = standingWheel(shimTableCorner, shims, {});

	it.each(ROWS)('%f mm at the %s: caster %f°, camber %f°', (growth, place, caster, camber) => {
		const effect = perStep(wheel, [growth])[0]?.[place];
		expect(Math.abs((effect?.caster ?? NaN) - caster)).toBeLessThan(TOLERANCE);
		expect(Math.abs((effect?.camber ?? NaN) - camber)).toBeLessThan(TOLERANCE);
	});

	it.each(ROWS)('asked for what %f mm at the %s gives, answers with that pack', (growth, place) => {
		const effect = perStep(wheel, [growth])[0]?.[place];
		const targets: AlignTarget = {
			camber: { value: wheel.now.camber + (effect?.camber ?? NaN), tolerance: 0.1 },
			caster: { value: wheel.now.caster + (effect?.caster ?? NaN), tolerance: 0.1 },
			toe: { value: wheel.now.toe + (effect?.toe ?? NaN), tolerance: 0.02 }
		};
		const answer = one(task([{ geometry: shimTableCorner, targets }], { stock: stock([1.52, 4], [3.05, 4], [4, 2]) }));
		const front = place === 'rear' ? 0 : growth;
		const rear = place === 'front' ? 0 : growth;
		expect(answer.exact?.front).toBeCloseTo(front, 6);
		expect(answer.exact?.rear).toBeCloseTo(rear, 6);
		expect(answer.exact?.tieRod).toBeCloseTo(0, 6);
		// 4 mm are in the brackets now, so only the 4 mm shims with 1.52 or 3.05 beside them meet it.
		expect(answer.chosen?.front.pack?.thickness).toBeCloseTo(4 + front, 9);
		expect(answer.chosen?.rear.pack?.thickness).toBeCloseTo(4 + rear, 9);
		expect(answer.chosen?.miss).toBeLessThan(1e-6);
	});

	// Same manual's geometry: 0.42° of toe-out for 0.53° of camber when the shim goes in at both pivots.
	it('tells the toe that a shim disturbs', () => {
		const both = perStep(wheel, [3.05])[0]?.both;
		expect(both?.toe).toBeCloseTo(-0.42, 1);
		expect(both?.camber).toBeCloseTo(0.53, 1);
	});

	it('acts the other way where the pivot shaft sits on the other side of the bracket', () => {
		const inboard = standingWheel(shimTableCorner, { ...shims, side: 'inboard' }, {});
		const outboard = perStep(wheel, [-3.05])[0]?.front;
		const effect = perStep(inboard, [3.05])[0]?.front;
		expect(effect?.camber).toBeCloseTo(outboard?.camber ?? NaN, 9);
		expect(effect?.caster).toBeCloseTo(outboard?.caster ?? NaN, 9);
		expect(effect?.camber).toBeLessThan(-0.4);
	});
});

describe('a wheel where it stands', () => {
	it('re-entered after a change, takes a further change as the entered corner takes both', () => {
		const moves = { front: 1.7, rear: -0.9, tieRod: 0.6 };
		const more = { front: -2.1, rear: 1.3, tieRod: -0.4 };
		const sum = { front: -0.4, rear: 0.4, tieRod: 0.2 };
		for (const corner of [roadCorner, lowCorner, mirrored(lowCorner)]) {
			for (const upper of [shims, rods]) {
				const stance = { travel: 12, rake: 0.7 };
				const wheel = standingWheel(corner, upper, stance, moves);
				const there = changed(wheel, more).angles;
				const state = applyAlignment(corner, wheel.adjusters, sum, stance);
				expect(there.camber).toBeCloseTo(state.camber, 9);
				expect(there.caster).toBeCloseTo(state.caster - 0.7, 9);
				expect(there.toe).toBeCloseTo(state.toe, 9);
			}
		}
	});

	it('is higher or lower, and nose-down or nose-up, by its heights', () => {
		const design = { frontHeight: 180, rearHeight: null, wheelbase: 2600 };
		const stand = standOf({ frontHeight: 165, rearHeight: 175 }, design);
		expect(stand.travel).toBe(15);
		// A frame 10 mm higher at the rear over 2600 mm: atan(10 / 2600), nose-down positive.
		expect(stand.rake).toBeCloseTo(0.2204, 4);
		expect(standOf({ frontHeight: 180, rearHeight: 180 }, design)).toMatchObject({ travel: 0, rake: 0 });
		expect(standOf({ frontHeight: null, rearHeight: 175 }, design).unknown).toHaveLength(2);
	});

	// TM 5-4210-229-14&P, para 4-162: a nose-down frame takes caster away by its angle.
	it('loses caster to the road by its nose-down rake', () => {
		const level = one(task([{}]));
		const down = one(task([{}], { stance: { rake: 1.5 } }));
		expect(figure(down, 'caster').now).toBeCloseTo(figure(level, 'caster').now - 1.5, 9);
		expect(figure(down, 'camber').now).toBeCloseTo(figure(level, 'camber').now, 9);
	});
});

describe('the answer', () => {
	const targets: AlignTarget = {
		camber: { value: -1.1, tolerance: 0.15 },
		caster: { value: 5.2, tolerance: 0.3 },
		toe: { value: 0.08, tolerance: 0.03 }
	};

	it('is exact: set so, the wheel reads its targets', () => {
		for (const geometry of [roadCorner, mirrored(roadCorner)]) {
			for (const upper of [shims, { ...shims, side: 'inboard' as const }, rods]) {
				const stance = { travel: -8, rake: -0.4 };
				const answer = one(task([{ geometry, targets }], { upper, stance }));
				if (!answer.exact) throw new Error(answer.problem ?? '');
				const { angles } = changed(answer.found.wheel, answer.exact);
				expect(angles.camber).toBeCloseTo(-1.1, 7);
				expect(angles.caster).toBeCloseTo(5.2, 7);
				expect(angles.toe).toBeCloseTo(0.08, 7);
			}
		}
	});

	it('tells what remains with the pack that is on the shelf, and the tie rod that goes with it', () => {
		const answer = one(task([{ targets }]));
		const { chosen } = answer;
		if (!chosen) throw new Error('No pack.');
		const done = changedHoldingToe(answer.found.wheel, chosen.front.growth, chosen.rear.growth, 0.08);
		expect(figure(answer, 'camber').remains).toBeCloseTo(done.angles.camber + 1.1, 9);
		expect(figure(answer, 'toe').remains).toBeCloseTo(0, 9);
		expect(answer.tieRod?.length).toBeCloseTo(done.moves.tieRod, 9);
		expect(answer.tieRod?.flats).toBeCloseTo((done.moves.tieRod / (25.4 / 18)) * 6, 9);
	});

	it('tells what it does to bump steer, roll centre and kpi', () => {
		const answer = one(task([{ targets }]));
		const { states } = sweepBump(roadCorner, { from: -25, to: 25, step: 1.25 });
		const ride = solveCorner(roadCorner, { travel: 0, rack: 0 });
		expect(answer.before.bumpSteer).toBeCloseTo(Math.max(...states.map((state) => Math.abs(state.toe - ride.toe))), 9);
		expect(answer.before.rollCentre).toBeCloseTo(ride.rollCentreHeight ?? NaN, 6);
		// The included angle between spin and steering axis stays, so what camber loses, kpi gains (to second order).
		const gained = (figure(answer, 'camber').after ?? NaN) - figure(answer, 'camber').now;
		expect((answer.after?.kpi ?? NaN) - answer.before.kpi).toBeCloseTo(-gained, 1);
		expect(answer.after?.rollCentre).not.toBeCloseTo(answer.before.rollCentre ?? NaN, 1);
	});

	describe('with a target left free', () => {
		it('moves both pivots equally for camber alone and says so', () => {
			const answer = one(task([{ targets: { ...none, camber: targets.camber } }]));
			expect(answer.exact?.front).toBeCloseTo(answer.exact?.rear ?? NaN, 9);
			expect(answer.exact?.tieRod).toBe(0);
			expect(figure(answer, 'caster').freed).toBe('equalMoves');
			expect(figure(answer, 'toe').freed).toBe('tieRodStays');
			expect(figure(answer, 'caster').remains).toBeNull();
		});

		it('moves them against each other for caster alone', () => {
			const answer = one(task([{ targets: { ...none, caster: targets.caster, toe: targets.toe } }]));
			expect(answer.exact?.front).toBeCloseTo(-(answer.exact?.rear ?? NaN), 9);
			expect(figure(answer, 'camber').freed).toBe('oppositeMoves');
		});

		it('leaves the upper arm for toe alone', () => {
			const answer = one(task([{ targets: { ...none, toe: targets.toe } }]));
			expect(answer.chosen?.front).toEqual({ growth: 0, pack: null, turns: null });
			expect(figure(answer, 'camber').freed).toBe('armStays');
			expect(figure(answer, 'toe').after).toBeCloseTo(0.08, 9);
		});
	});

	it('names the target that cannot be had', () => {
		const answer = one(
			task([{ targets: { ...none, camber: { value: -30, tolerance: 0.2 }, caster: { value: 30, tolerance: 0.2 } } }])
		);
		expect(answer.exact).toBeNull();
		expect(answer.problem).toMatch(/camber|caster/);
	});
});

describe('packs judged by the kernel', () => {
	/** Every pair of sums for one wheel and every pair for the other, judged by the kernel itself. */
	function everyPair(wheel: WheelAnswer['found']['wheel'], targets: AlignTarget, sums: number[]) {
		return sums.flatMap((front) =>
			sums.map((rear) => {
				const { angles } = changedHoldingToe(wheel, front - 4, rear - 4, targets.toe?.value ?? null);
				const off = (name: 'camber' | 'caster') =>
					Math.abs(angles[name] - (targets[name]?.value ?? NaN)) / (targets[name]?.tolerance ?? NaN);
				return { front, rear, miss: Math.max(off('camber'), off('caster')) };
			})
		);
	}

	it('leave the least largest miss of all packs, by brute force through the kernel', () => {
		const angle = (min: number, max: number) => fc.double({ min, max, noNaN: true });
		// 0, 0.5, 1 … 6 mm: all sums that two 0.5, two 1 and one 3 mm can make.
		const sums = Array.from({ length: 13 }, (_, i) => i / 2);
		fc.assert(
			fc.property(
				fc.constantFrom(roadCorner, lowCorner),
				angle(-2, 0),
				angle(-1, 1),
				angle(-0.2, 0.2),
				(geometry, camber, gain, toe) => {
					const caster = solveCorner(geometry, { travel: 0, rack: 0 }).caster + gain;
					const targets: AlignTarget = {
						camber: { value: camber, tolerance: 0.2 },
						caster: { value: caster, tolerance: 0.5 },
						toe: { value: toe, tolerance: 0.05 }
					};
					// Stock enough for both ends, so that every pair of sums can be had.
					const answer = one(
						task([{ geometry, targets }], { stock: stock([0.5, 4], [1, 4], [3, 2]), upper: { ...shims, maxPack: 6 } })
					);
					const best = Math.min(...everyPair(answer.found.wheel, targets, sums).map((pair) => pair.miss));
					expect(answer.chosen?.miss).toBeCloseTo(best, 6);
					const remains = (['camber', 'caster'] as const).map(
						(name) => Math.abs(figure(answer, name).remains ?? NaN) / (targets[name]?.tolerance ?? NaN)
					);
					expect(Math.max(...remains)).toBeCloseTo(best, 6);
				}
			),
			{ numRuns: 20 }
		);
	});

	it('are drawn from the same counts for both wheels', () => {
		const targets: AlignTarget = {
			...none,
			camber: { value: -0.4, tolerance: 0.2 },
			caster: { value: 4.5, tolerance: 0.3 }
		};
		const wheels = [
			{ side: 'left' as const, targets },
			{ side: 'right' as const, targets, geometry: mirrored(roadCorner) }
		];
		const shelf = stock([0.5, 3], [1, 3], [2, 2], [3, 1]);
		const answers = answerAxle(task(wheels, { stock: shelf })).map(solved);
		const taken = answers
			.flatMap((answer) => [answer.chosen?.front.pack, answer.chosen?.rear.pack])
			.flatMap((pack) => pack?.lines ?? []);
		for (const shim of shelf) {
			const used = taken.filter((line) => line.thickness === shim.thickness).reduce((sum, line) => sum + line.count, 0);
			expect(used).toBeLessThanOrEqual(shim.count);
		}
	});

	it('mirror each other on a car whose wheels do, where the stock allows', () => {
		const targets: AlignTarget = {
			...none,
			camber: { value: -0.9, tolerance: 0.2 },
			caster: { value: 4.9, tolerance: 0.3 }
		};
		const wheels = [
			{ side: 'left' as const, targets },
			{ side: 'right' as const, targets, geometry: mirrored(roadCorner) }
		];
		const [left, right] = answerAxle(task(wheels, { stock: stock([0.5, 40], [1, 40], [3, 40]) })).map(solved);
		expect(left?.chosen?.miss).toBeCloseTo(right?.chosen?.miss ?? NaN, 9);
		expect(left?.chosen?.front.pack).toEqual(right?.chosen?.front.pack);
	});
});

describe('limits', () => {
	const far: AlignTarget = { ...none, camber: { value: -3.5, tolerance: 0.2 }, caster: { value: 4.5, tolerance: 0.3 } };
	const codes = (answer: WheelAnswer) => answer.warnings.map((warning) => warning.code);

	it('tell of a pack that would be thinner than nothing', () => {
		expect(codes(one(task([{ targets: far }])))).toContain('packBelowNothing');
	});

	it('tell of a pack over its limit and of ends too far apart, and keep within both', () => {
		const wide: AlignTarget = { ...none, camber: { value: 1.5, tolerance: 0.2 }, caster: { value: 7, tolerance: 0.3 } };
		const answer = one(
			task([{ targets: wide }], { upper: { ...shims, maxPack: 8, maxDifference: 2, boltReserve: 1 } })
		);
		expect(codes(answer)).toEqual(expect.arrayContaining(['packOverLimit', 'difference', 'bolt']));
		const [front, rear] = [answer.chosen?.front.pack?.thickness ?? NaN, answer.chosen?.rear.pack?.thickness ?? NaN];
		expect(Math.max(front, rear)).toBeLessThanOrEqual(8);
		expect(Math.abs(front - rear)).toBeLessThanOrEqual(2 + 1e-6);
	});

	it('tell that the shelf is empty', () => {
		expect(codes(one(task([{ targets: far }], { stock: [] })))).toContain('stockEmpty');
	});

	it('tell of thread that would not stay engaged; one diameter where the maker gives none (common practice, no source)', () => {
		const longer: AlignTarget = { ...none, camber: { value: 1, tolerance: 0.2 } };
		const answer = one(task([{ targets: longer }], { upper: { ...rods, engagementNow: 17 } }));
		const warning = answer.warnings.find((warning) => warning.code === 'engagement');
		expect(warning).toMatchObject({ least: 15.875, usual: true });
		expect(codes(one(task([{ targets: longer }], { upper: { ...rods, engagementNow: null } })))).toEqual([
			'engagementUnknown'
		]);
	});
});

describe('rod ends', () => {
	const targets: AlignTarget = {
		camber: { value: -1, tolerance: 0.2 },
		caster: { value: 4.6, tolerance: 0.4 },
		toe: { value: 0.05, tolerance: 0.02 }
	};

	it('go in whole half turns on a through bolt, the best of all near ones by brute force', () => {
		const answer = one(task([{ targets }], { upper: rods }));
		const step = 25.4 / 36;
		let best = Infinity;
		for (let front = -10; front <= 10; front++) {
			for (let rear = -10; rear <= 10; rear++) {
				const { angles } = changedHoldingToe(answer.found.wheel, front * step, rear * step, 0.05);
				best = Math.min(best, Math.max(Math.abs(angles.camber + 1) / 0.2, Math.abs(angles.caster - 4.6) / 0.4));
			}
		}
		expect(answer.chosen?.miss).toBeCloseTo(best, 9);
		for (const end of ['front', 'rear'] as const) {
			const halves = 2 * (answer.chosen?.[end].turns ?? NaN);
			expect(Math.abs(halves - Math.round(halves))).toBeLessThan(1e-9);
		}
	});

	it('meet the targets exactly with a sleeve, two pitches a turn', () => {
		const answer = one(task([{ targets }], { upper: { ...rods, fitting: 'sleeve' } }));
		expect(figure(answer, 'camber').remains).toBeCloseTo(0, 7);
		expect(answer.chosen?.front.turns).toBeCloseTo((answer.exact?.front ?? NaN) / ((2 * 25.4) / 18), 9);
	});
});

describe('as found', () => {
	const targets: AlignTarget = {
		camber: { value: -1, tolerance: 0.15 },
		caster: { value: 4.6, tolerance: 0.3 },
		toe: { value: 0.05, tolerance: 0.02 }
	};
	/** What a car of this very geometry would read with these packs and this much more tie rod. */
	function reading(front: number, rear: number, grown: number, error = { camber: 0, caster: 0 }) {
		const { angles } = changed(standingWheel(roadCorner, shims, {}), {
			front: front - 4,
			rear: rear - 4,
			tieRod: grown
		});
		return {
			camber: angles.camber + error.camber,
			caster: angles.caster + error.caster,
			toe: angles.toe,
			frontPack: front,
			rearPack: rear
		};
	}

	it('a car that is as the revision says needs what the model says', () => {
		const answer = one(task([{ targets, measured: reading(5, 3.5, 0.8) }]));
		expect(answer.found.implied?.matches).toBe(true);
		expect(answer.found.implied?.off).toBeLessThan(1e-6);
		const fresh = one(task([{ targets }]));
		expect((answer.exact?.front ?? NaN) + 5).toBeCloseTo((fresh.exact?.front ?? NaN) + 4, 6);
		expect((answer.exact?.rear ?? NaN) + 3.5).toBeCloseTo((fresh.exact?.rear ?? NaN) + 4, 6);
		expect((answer.exact?.tieRod ?? NaN) + 0.8).toBeCloseTo(fresh.exact?.tieRod ?? NaN, 6);
	});

	it('what it reads beyond the model is carried: reading the target already, it needs nothing', () => {
		const already = { camber: -1, caster: 4.6, toe: 0.05, frontPack: 4, rearPack: 4 };
		const answer = one(task([{ targets, measured: already }]));
		expect(answer.exact?.front).toBeCloseTo(0, 7);
		expect(answer.exact?.rear).toBeCloseTo(0, 7);
		expect(answer.exact?.tieRod).toBeCloseTo(0, 7);
		expect(figure(answer, 'camber').now).toBeCloseTo(-1, 9);
	});

	it('says that the car is not of this revision, and by how much, over 1 mm of pack', () => {
		const same = one(task([{ targets, measured: reading(4, 4, 0, { camber: 0.05, caster: 0 }) }]));
		expect(same.found.implied?.matches).toBe(true);
		// Packs said to be 4 and 4 while the car stands with 6.5 and 4.
		const other = one(task([{ targets, measured: { ...reading(6.5, 4, 0), frontPack: 4, rearPack: 4 } }]));
		expect(other.found.implied?.matches).toBe(false);
		expect(other.found.implied?.front).toBeCloseTo(6.5, 6);
		expect(other.found.implied?.off).toBeCloseTo(2.5, 6);
	});

	it('says it in words where no pack gives such readings', () => {
		const answer = one(task([{ targets, measured: { ...reading(4, 4, 0), camber: -30, caster: 30 } }]));
		expect(answer.found.implied).toBeNull();
		expect(answer.found.unlike).toMatch(/camber|caster/);
	});

	it('carries only what was read', () => {
		const { camber } = reading(4, 4, 0);
		const answer = one(
			task([{ targets, measured: { camber: camber - 0.3, caster: null, toe: null, frontPack: null, rearPack: null } }])
		);
		expect(answer.found.wheel.offset.camber).toBeCloseTo(-0.3, 9);
		expect(answer.found.wheel.offset.caster).toBe(0);
		expect(answer.found.implied).toBeNull();
	});
});

describe('a crooked steering wheel', () => {
	it.each([
		['behind the axle', roadCorner],
		['ahead of the axle', lowCorner]
	])('is straightened by the tie rods alone, the road wheels left where they point (rack %s)', (_name, corner) => {
		const handwheel = 9;
		const rackPerTurn = 44;
		const wheels = [corner, mirrored(corner)] as const;
		const grown = straighten(...wheels, { handwheel, rackPerTurn });
		// Which way the rack goes as the wheel is turned to the left: the left wheel toes out.
		const toOut = (rack: number) => -solveCorner(corner, { travel: 0, rack }).toe;
		const rack = (Math.sign(toOut(1) - toOut(-1)) * handwheel * rackPerTurn) / 360;
		wheels.forEach((geometry, index) => {
			// The car as it came: rods that lack this growth, so that its wheels are straight with the rack off centre.
			const lacking = { front: 0, rear: 0, tieRod: -(index === 0 ? grown.left : grown.right) };
			const crooked = standingWheel(geometry, rods, {}, lacking).geometry;
			expect(solveCorner(crooked, { travel: 0, rack }).toe).toBeCloseTo(geometry.wheel.toe, 2);
			expect(Math.abs(solveCorner(crooked, { travel: 0, rack: 0 }).toe - geometry.wheel.toe)).toBeGreaterThan(0.3);
		});
	});
});
