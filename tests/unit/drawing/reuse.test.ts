import { reuse } from '$lib/drawing/reuse';
import fc from 'fast-check';
import { expect, it } from 'vitest';

const tree = fc.letrec((tie) => ({
	node: fc.oneof(
		{ maxDepth: 3 },
		fc.oneof(fc.integer({ min: 0, max: 3 }), fc.constantFrom('a', 'b', null)),
		fc.array(tie('node'), { maxLength: 3 }),
		// Plain objects: fast-check's records have no prototype unless asked.
		fc.record({ p: tie('node'), q: tie('node') }, { noNullPrototype: true })
	)
})).node;

it('always gives what it was given last, in content', () => {
	fc.assert(
		fc.property(tree, tree, (before, after) => {
			expect(reuse(before, after)).toEqual(after);
		})
	);
});

it('is the earlier one itself where nothing changed', () => {
	fc.assert(
		fc.property(tree, (one) => {
			expect(Object.is(reuse(one, structuredClone(one)), one)).toBe(true);
		})
	);
});

it('keeps every part that did not change, and nothing of one that did', () => {
	const before = {
		marks: [
			{ key: 'a', x: 1 },
			{ key: 'b', x: 2 }
		],
		edge: 'M0 0'
	};
	const after = {
		marks: [
			{ key: 'a', x: 1 },
			{ key: 'b', x: 3 }
		],
		edge: 'M0 0'
	};
	const made = reuse(before, after);
	expect(made.marks[0]).toBe(before.marks[0]);
	expect(made.marks[1]).not.toBe(before.marks[1]);
	expect(made).not.toBe(before);
});

it('takes what is no plain object by identity', () => {
	const [one, other] = [() => 1, () => 1];
	expect(reuse({ format: one }, { format: other }).format).toBe(other);
	expect(reuse(new Date(0), new Date(0))).toEqual(new Date(0));
});
