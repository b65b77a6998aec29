import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import {
	AxleDocumentError,
	axleGeometry,
	axleHash,
	canonicalAxle,
	emptyAxle,
	missingCoilover,
	rightCorner,
	toGeometry,
	upgradeAxle
} from '$lib/domain/axle';
import { exampleAxle, examplePoints } from '$lib/domain/example';
import { POINTS } from '$lib/domain/points';
import { POINT_NAMES, solveCorner } from '$lib/kinematics';
import { AXLE_POINTS, axleSchema } from '$lib/schemas/axle';

const stored = (): unknown => JSON.parse(readFileSync('tests/fixtures/axle/schema-1.json', 'utf8'));
const refusal = (act: () => unknown): AxleDocumentError => {
	try {
		act();
	} catch (error) {
		if (error instanceof AxleDocumentError) return error;
		throw error;
	}
	throw new Error('It was not refused.');
};
const issuesOf = (change: (document: Record<string, never>) => void): string[] => {
	const document = structuredClone(exampleAxle()) as unknown as Record<string, never>;
	change(document);
	const read = axleSchema.safeParse(document);
	return read.success ? [] : read.error.issues.map(({ path, message }) => `${path.join('.')}: ${message}`);
};

describe('the axle document', () => {
	it('has the eight points of the kernel, in its order', () => {
		expect(AXLE_POINTS).toEqual(POINT_NAMES);
	});

	it('accepts the empty one, the example and its own JSON', () => {
		for (const document of [emptyAxle(), exampleAxle(), examplePoints()]) {
			expect(upgradeAxle(JSON.parse(JSON.stringify(document)))).toEqual(document);
		}
	});

	it('gives a fresh empty one each time', () => {
		emptyAxle().left.points.upperBall[0] = 5;
		expect(emptyAxle().left.points.upperBall).toEqual([null, null, null]);
	});

	it('names the point and what is accepted where a coordinate is wrong', () => {
		const far = issuesOf((axle: { left?: ReturnType<typeof exampleAxle>['left'] }) => {
			if (axle.left) axle.left.points.upperBall[2] = 10_000.5;
		});
		expect(far).toEqual(['left.points.upperBall.2: Upper ball joint, up: a number from −10000 to 10000 mm.']);
		const text = issuesOf((axle: { left?: { points: Record<string, unknown> } }) => {
			if (axle.left) axle.left.points.lowerFront = ['a', 1, 2];
		});
		expect(text).toEqual(['left.points.lowerFront.0: Lower arm, front pivot, fore: a number from −10000 to 10000 mm.']);
	});

	it('names the point of a right side of its own too', () => {
		const issues = issuesOf((axle: { left?: unknown; right?: unknown }) => {
			const right = structuredClone(axle.left) as ReturnType<typeof exampleAxle>['left'];
			right.points.tieRodOuter[1] = Number.NaN;
			axle.right = right;
		});
		expect(issues).toEqual(['right.points.tieRodOuter.1: Outer tie-rod joint, out: a number from −10000 to 10000 mm.']);
		expect(issuesOf((axle: { right?: unknown }) => (axle.right = 'copy'))).toEqual([
			'right: Right side: "mirror" or a corner of its own.'
		]);
	});

	it.each([
		['an unknown key', { extra: 1 }],
		['a missing key', { vehicle: undefined }],
		['text for a number', { vehicle: { ...exampleAxle().vehicle, wheelbase: '2560' } }],
		[
			'a shim with no direction',
			{ adjusters: { ...exampleAxle().adjusters, upper: { ...exampleAxle().adjusters.upper, direction: [0, 0, 0] } } }
		],
		['a target without bounds', { targets: [{ figure: 'camber', at: 'ride', low: null, high: null }] }],
		['a target upside down', { targets: [{ figure: 'camber', at: 'ride', low: 1, high: 0 }] }],
		[
			'a target of no travel',
			{ targets: [{ figure: 'bumpSteer', at: 'travel', from: 5, to: 5, measure: 'peak', low: 0, high: 1 }] }
		],
		['an unknown figure', { targets: [{ figure: 'grip', at: 'ride', low: 0, high: 1 }] }],
		[
			'sixty-one targets',
			{ targets: Array.from({ length: 61 }, () => ({ figure: 'camber', at: 'ride', low: 0, high: 1 })) }
		]
	])('refuses %s', (_, change) => {
		expect(axleSchema.safeParse({ ...exampleAxle(), ...change }).success).toBe(false);
	});
});

describe('upgradeAxle', () => {
	it('reads the document of schema 1 that is kept for ever', () => {
		const document = upgradeAxle(stored());
		expect(document.left.points.upperBall).toEqual([-16, 622, 507]);
		expect(document.right).not.toBe('mirror');
	});

	it('refuses a newer schema in words', () => {
		const error = refusal(() => upgradeAxle({ ...exampleAxle(), schema: 2 }));
		expect(error.code).toBe('newer');
		expect(error.message).toMatch(/newer version.*schema 2.*reads up to 1/);
	});

	it.each([null, 7, 'axle', [], {}, { schema: '1' }, { schema: 0 }, { schema: 1.5 }])('refuses %j', (json) => {
		expect(refusal(() => upgradeAxle(json)).code).toBe('invalid');
	});

	it('names every field that is wrong', () => {
		const wrong = structuredClone(exampleAxle());
		wrong.left.wheel.loadedRadius = -1;
		wrong.vehicle.wheelbase = 1e9;
		const fields = refusal(() => upgradeAxle(wrong)).fields.map(({ field }) => field);
		expect(fields).toEqual(['left.wheel.loadedRadius', 'vehicle.wheelbase']);
	});
});

describe('geometry of a document', () => {
	it('names what is missing, by point and coordinate', () => {
		const axle = exampleAxle();
		axle.left.points.upperBall = [null, 622, null];
		axle.left.points.lowerRear = [null, null, null];
		axle.left.wheel.track = null;
		expect(axleGeometry(axle)).toEqual({
			missing: [
				{ path: 'left.points.upperBall', label: 'Upper ball joint: up and fore' },
				{ path: 'left.points.lowerRear', label: 'Lower arm, rear pivot: all three coordinates' },
				{ path: 'left.wheel.track', label: 'Track' }
			]
		});
		const empty = axleGeometry(emptyAxle());
		expect('missing' in empty && empty.missing).toHaveLength(10);
	});

	it('says the side where the right is entered on its own', () => {
		const axle = exampleAxle();
		axle.right = structuredClone(axle.left);
		axle.right.points.tieRodInner[1] = null;
		expect(axleGeometry(axle)).toEqual({
			missing: [{ path: 'right.points.tieRodInner', label: 'Right side, inner tie-rod joint: out' }]
		});
	});

	it('leaves a half-typed coil-over out and says what it lacks', () => {
		const { left, vehicle } = exampleAxle();
		if (left.coilover) left.coilover.top = [null, 452, 560];
		const read = toGeometry(left, vehicle);
		expect('geometry' in read && read.geometry.coilover).toBeNull();
		expect(missingCoilover(left)).toEqual([{ path: 'left.coilover.top', label: 'Coil-over, top: fore' }]);
	});

	it('is solved by the kernel, the mirrored right side with the figures of the left', () => {
		const read = axleGeometry(exampleAxle());
		if ('missing' in read) throw new Error('The example is whole.');
		const left = solveCorner(read.left, { travel: 20, rack: 0 });
		const right = solveCorner(rightCorner(read.axle), { travel: 20, rack: 0 });
		expect(right.side).toBe('right');
		expect(right.camber).toBeCloseTo(left.camber, 10);
		expect(right.motionRatio).toBeCloseTo(left.motionRatio ?? NaN, 10);
		expect(right.wheelCentre[1]).toBeCloseTo(-left.wheelCentre[1], 9);
	});
});

describe('canonical bytes and hash', () => {
	/** RFC 8785, appendix B: IEEE 754 bits and how the number is written. */
	it.each([
		['0000000000000000', '0'],
		['8000000000000000', '0'],
		['0000000000000001', '5e-324'],
		['8000000000000001', '-5e-324'],
		['7fefffffffffffff', '1.7976931348623157e+308'],
		['4340000000000000', '9007199254740992'],
		['4430000000000000', '295147905179352830000'],
		['44b52d02c7e14af5', '9.999999999999997e+22'],
		['44b52d02c7e14af6', '1e+23'],
		['44b52d02c7e14af7', '1.0000000000000001e+23'],
		['444b1ae4d6e2ef50', '1e+21'],
		['3eb0c6f7a0b5ed8c', '9.999999999999997e-7'],
		['3eb0c6f7a0b5ed8d', '0.000001'],
		['41b3de4355555555', '333333333.3333333']
	])('writes %s as %s', (bits, written) => {
		const view = new DataView(new ArrayBuffer(8));
		view.setBigUint64(0, BigInt(`0x${bits}`));
		const axle = emptyAxle();
		axle.left.wheel.x = view.getFloat64(0);
		expect(canonicalAxle(axle)).toContain(`"x":${written}}`);
	});

	/** RFC 8785, 3.2.2: how the numbers of its sample are written. */
	it('writes the numbers of the sample', () => {
		const axle = emptyAxle();
		axle.left.points.upperBall = [333333333.3333333, 1e30, 4.5];
		axle.left.points.lowerBall = [2e-3, 0.000000000000000000000000001, null];
		expect(canonicalAxle(axle)).toContain('"upperBall":[333333333.3333333,1e+30,4.5]');
		expect(canonicalAxle(axle)).toContain('"lowerBall":[0.002,1e-27,null]');
	});

	it.each([Number.NaN, Infinity, -Infinity])('refuses %d and names where it stands', (value) => {
		const axle = exampleAxle();
		axle.left.points.upperBall[1] = value;
		expect(refusal(() => canonicalAxle(axle)).message).toContain('left.points.upperBall.1');
	});

	/** Made apart from this code: Python's json (sort_keys, no spaces) and hashlib over tests/fixtures/axle/schema-1.json. */
	it('has the hash that another program gives the stored document', async () => {
		expect(await axleHash(upgradeAxle(stored()))).toBe(
			'2a3045a31ea7d9672ac11ae4e331e359dcd2ece8e2bc559dec2daf5d06317688'
		);
		expect(canonicalAxle(upgradeAxle(stored()))).toHaveLength(1562);
	});

	it('does not depend on the order of keys or the sign of zero, and does on every number', async () => {
		const axle = exampleAxle();
		const turned = Object.fromEntries(Object.entries(axle).reverse()) as typeof axle;
		expect(await axleHash(turned)).toBe(await axleHash(axle));
		const minus = exampleAxle();
		minus.left.wheel.x = -0;
		expect(await axleHash(minus)).toBe(await axleHash(axle));
		minus.left.points.lowerBall[0] = 10.000000000000002;
		expect(await axleHash(minus)).not.toBe(await axleHash(axle));
	});
});

describe('points', () => {
	it('has every row named, in one place', () => {
		const names = Object.values(POINTS).map(({ name }) => name);
		expect(new Set(names).size).toBe(10);
		for (const [key, info] of Object.entries(POINTS)) expect(info.key).toBe(key);
	});

	it('names a point in messages as in tables', () => {
		for (const key of AXLE_POINTS) {
			const [issue] = issuesOf((axle: { left?: { points: Record<string, unknown> } }) => {
				if (axle.left) axle.left.points[key] = 7;
			});
			expect(issue?.toLowerCase()).toContain(`: ${POINTS[key].name}: three coordinates in mm`);
		}
	});
});
