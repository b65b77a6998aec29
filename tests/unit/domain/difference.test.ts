import { describe, expect, it } from 'vitest';
import { changeInWords, diffAxles, rightEntry } from '$lib/domain/difference';
import { exampleAxle } from '$lib/domain/example';
import { fieldOf } from '$lib/domain/fields';
import type { AxleDocument } from '$lib/schemas/axle';
import { DEFAULT_PREFERENCES } from '$lib/schemas/preferences';

const changed = (change: (axle: AxleDocument) => void): AxleDocument => {
	const axle = exampleAxle();
	change(axle);
	return axle;
};
const words = (from: AxleDocument, to: AxleDocument, person = DEFAULT_PREFERENCES) =>
	diffAxles(from, to).fields.map((field) => changeInWords(field, person));

describe('the difference of two axles', () => {
	it('is nothing for the same document', () => {
		expect(diffAxles(exampleAxle(), exampleAxle())).toEqual({
			points: [],
			fields: [],
			targets: { added: [], removed: [] },
			same: true
		});
	});

	it('tells a moved point with its displacement', () => {
		const moved = changed((axle) => (axle.left.points.upperBall = [-16, 625, 511]));
		expect(diffAxles(exampleAxle(), moved).points).toEqual([
			{
				side: 'left',
				key: 'upperBall',
				before: [-16, 622, 507],
				after: [-16, 625, 511],
				displacement: [0, 3, 4],
				distance: 5
			}
		]);
	});

	it('tells a point that is not whole without a displacement', () => {
		const open = changed((axle) => (axle.left.points.upperBall = [-16, null, 507]));
		expect(diffAxles(exampleAxle(), open).points[0]).toMatchObject({ displacement: null, distance: null });
	});

	it('tells fields in words, in the person’s units', () => {
		const other = changed((axle) => {
			axle.left.wheel.track = 1500;
			axle.left.wheel.camber = -1;
			axle.vehicle.tyreRate = null;
			axle.alignment.left.camber = { value: -0.5, tolerance: 0.25 };
			if (axle.adjusters.upper.kind === 'shim') axle.adjusters.upper.side = 'inboard';
		});
		expect(words(exampleAxle(), other)).toEqual([
			'Track: 1480.0 → 1500.0 mm',
			'Static camber: −0.50 → −1.00°',
			'Tyre rate: 200.0 N/mm → none',
			'A shim moves the pivot: outboard → inboard',
			'Wanted camber, left: none → −0.50°',
			'Wanted camber, left, tolerance: none → 0.25°'
		]);
		expect(words(exampleAxle(), other, { ...DEFAULT_PREFERENCES, length: 'in', angle: 'minutes' })[1]).toBe(
			'Static camber: −0°30′ → −1°00′'
		);
	});

	it('tells a coil-over taken off, and another kind of adjuster', () => {
		const other = changed((axle) => {
			axle.left.coilover = null;
			axle.adjusters.upper = {
				kind: 'rodEnd',
				thread: 'M16x1.5',
				fitting: 'throughBolt',
				handedness: 'right',
				engagementNow: 20,
				minEngagement: null
			};
		});
		const told = words(exampleAxle(), other);
		expect(told).toContain('Coil-over: fitted → none');
		expect(told).toContain('Upper arm adjusted by: shim → rodEnd');
		expect(diffAxles(exampleAxle(), other).points).toEqual([]);
	});

	it('tells the right side apart only where one has its own', () => {
		const own = changed((axle) => {
			axle.right = rightEntry(axle);
			axle.right.points.upperFront[1] = -406;
			axle.right.wheel.camber = -0.75;
		});
		const difference = diffAxles(exampleAxle(), own);
		expect(difference.points).toMatchObject([{ side: 'right', key: 'upperFront', displacement: [0, -2, 0] }]);
		expect(words(exampleAxle(), own)).toEqual([
			'Right side, static camber: −0.50 → −0.75°',
			'Right side: mirrors the left → entered on its own'
		]);
	});

	it('tells targets that came and went', () => {
		const target = { figure: 'camber', at: 'ride', low: -1, high: null } as const;
		const other = changed((axle) => (axle.targets = [target]));
		expect(diffAxles(exampleAxle(), other).targets).toEqual({ added: [target], removed: [] });
		expect(diffAxles(other, exampleAxle()).targets).toEqual({ added: [], removed: [target] });
		expect(
			diffAxles(
				other,
				changed((axle) => (axle.targets = [{ high: null, low: -1, at: 'ride', figure: 'camber' }]))
			).same
		).toBe(true);
	});

	it('has a name for every field of a document', () => {
		const full = changed((axle) => {
			axle.right = rightEntry(axle);
			for (const side of [axle.alignment.left, axle.alignment.right])
				side.camber = side.caster = side.toe = { value: 0, tolerance: 1 };
		});
		const unnamed: string[] = [];
		const walk = (value: unknown, path: string): void => {
			if (/\.(points|top|bottom)$|^(targets|schema)$/.test(path)) return;
			if (typeof value === 'object' && value !== null)
				for (const [key, inner] of Object.entries(value)) walk(inner, path ? `${path}.${key}` : key);
			else if (fieldOf(path) === null) unnamed.push(path);
		};
		walk(full, '');
		walk(
			{
				adjusters: {
					upper: { kind: 'rodEnd', thread: '', fitting: '', handedness: '', engagementNow: 1, minEngagement: 1 }
				}
			},
			''
		);
		expect(unnamed).toEqual([]);
	});
});
