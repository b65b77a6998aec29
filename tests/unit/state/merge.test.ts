import { differences, mergeThreeWay, same, valueAt, writeAt } from '$lib/state/merge';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';

describe('three-way merge', () => {
	const base = {
		left: { points: { a: [0, 0, 0], b: [1, 1, 1] }, track: 1480 },
		right: 'mirror' as unknown,
		list: [1, 2]
	};

	test('a point is one thing: two coordinates changed by two people are a conflict', () => {
		const mine = { ...base, left: { ...base.left, points: { ...base.left.points, a: [5, 0, 0] } } };
		const theirs = { ...base, left: { ...base.left, points: { ...base.left.points, a: [0, 0, 7] } } };
		const { merged, conflicts, taken } = mergeThreeWay(base, mine, theirs);
		expect(conflicts).toEqual([{ path: ['left', 'points', 'a'], base: [0, 0, 0], mine: [5, 0, 0], theirs: [0, 0, 7] }]);
		expect(merged).toEqual(mine);
		expect(taken).toEqual([]);
	});

	test('coordinates not typed yet are filled from the other; only what both typed is disagreed about', () => {
		const empty = { points: { a: [null, null, null], b: [null, 5, null] } };
		const mine = { points: { a: [null, 640, null], b: [1, 5, null] } };
		const theirs = { points: { a: [-22, 618, 474], b: [null, 5, 3] } };
		const { merged, conflicts, taken } = mergeThreeWay<object>(empty, mine, theirs);
		expect(merged).toEqual({ points: { a: [-22, 640, 474], b: [1, 5, 3] } });
		expect(conflicts).toEqual([
			{ path: ['points', 'a'], base: [null, null, null], mine: [-22, 640, 474], theirs: [-22, 618, 474] }
		]);
		expect(taken).toEqual([['points', 'b']]);
	});

	test('the same change by both is no conflict and nothing to tell', () => {
		const changed = { ...base, left: { ...base.left, track: 1500 } };
		expect(mergeThreeWay(base, changed, structuredClone(changed))).toEqual({
			merged: changed,
			conflicts: [],
			taken: []
		});
	});

	test('a change of kind is one thing: mirror made its own corner against an edit elsewhere', () => {
		const mine = { ...base, right: { points: { a: [0, 0, 0] } } };
		const theirs = { ...base, list: [2, 1] };
		const { merged, conflicts, taken } = mergeThreeWay(base, mine, theirs);
		expect(conflicts).toEqual([]);
		expect(taken).toEqual([['list']]);
		expect(merged).toEqual({ ...base, right: mine.right, list: [2, 1] });
	});

	test('objects of another kind are not mixed', () => {
		const shim = { upper: { kind: 'shim', frontNow: 3 } };
		const mine = { upper: { kind: 'shim', frontNow: 4 } };
		const theirs = { upper: { kind: 'rodEnd', thread: 'M16x1.5' } };
		const { merged, conflicts } = mergeThreeWay<{ upper: object }>(shim, mine, theirs);
		expect(merged).toEqual(mine);
		expect(conflicts.map((entry) => entry.path)).toEqual([['upper']]);
	});

	const documents = fc.record({
		points: fc.record({ a: fc.tuple(fc.integer(), fc.integer()), b: fc.tuple(fc.integer(), fc.integer()) }),
		track: fc.option(fc.integer()),
		on: fc.constantFrom('lowerArm', 'upright')
	});

	test('laws: mine alone and theirs alone come through whole; order of people changes only who stands in a conflict', () => {
		fc.assert(
			fc.property(documents, documents, documents, (ground, mine, theirs) => {
				expect(mergeThreeWay(ground, mine, ground).merged).toEqual(mine);
				expect(mergeThreeWay(ground, ground, theirs).merged).toEqual(theirs);
				const one = mergeThreeWay(ground, mine, theirs);
				const other = mergeThreeWay(ground, theirs, mine);
				expect(one.conflicts.map((entry) => entry.path)).toEqual(other.conflicts.map((entry) => entry.path));
				if (one.conflicts.length === 0) expect(one.merged).toEqual(other.merged);
				for (const { path } of one.conflicts) expect(valueAt(one.merged, path)).toEqual(valueAt(mine, path));
			})
		);
	});

	test('law: writing every difference turns one document into the other', () => {
		fc.assert(
			fc.property(documents, documents, (from, to) => {
				const copy = structuredClone(from);
				for (const path of differences(from, to)) writeAt(copy, path, valueAt(to, path));
				expect(copy).toEqual(to);
				expect(differences(copy, to)).toEqual([]);
			})
		);
	});

	test('equal as JSON', () => {
		expect(same({ a: 1, b: [0] }, { b: [-0], a: 1 })).toBe(true);
		expect(same({ a: 1 }, { a: 1, b: undefined })).toBe(false);
		expect(same([1, 2], [2, 1])).toBe(false);
		expect(same(null, {})).toBe(false);
	});
});
