import { emptyAxle } from '$lib/domain/axle';
import { solveCorner } from '$lib/kinematics';
import type { AxleDocument } from '$lib/schemas/axle';
import { DraftEditor } from '$lib/state/draft.svelte';
import { Selection } from '$lib/state/selection.svelte';
import { Solution } from '$lib/state/solution.svelte';
import { expect, test } from 'vitest';

/** An invented corner, [fore, out, up] in mm; nothing is expected of its figures but what the kernel itself says. */
function axle(): AxleDocument {
	const document = emptyAxle();
	document.left.points = {
		upperFront: [150, 380, 480],
		upperRear: [-150, 382, 470],
		upperBall: [-22, 618, 474],
		lowerFront: [200, 300, 200],
		lowerRear: [-200, 302, 195],
		lowerBall: [10, 680, 190],
		tieRodInner: [100, 320, 260],
		tieRodOuter: [110, 660, 250]
	};
	document.left.wheel = { track: 1480, x: 0, loadedRadius: 310, camber: -0.75, toe: 0.05 };
	document.targets = [{ figure: 'camber', at: 'ride', low: -1, high: -0.5 }];
	return document;
}

function open(document: AxleDocument) {
	const editor = new DraftEditor({
		place: { shop: 'harrow-lane', build: 'one' },
		person: 'ines',
		draft: { version: 1, document, updatedAt: '2026-03-02T09:00:00.000Z', updatedBy: 'Ines Calder' },
		fetch: () => Promise.reject(new TypeError('cut')),
		pause: 1e7
	});
	const selection = new Selection();
	return { editor, selection, solution: new Solution(editor, selection) };
}

test('follows every edit: ride height, curves, targets, and the edit it belongs to', () => {
	const { editor, solution } = open(axle());
	expect(solution.ride?.camber).toBeCloseTo(-0.75, 9);
	expect(solution.judgements[0]).toMatchObject({ verdict: 'pass' });
	expect(solution.sweep?.states[0]?.travel).toBe(-75);
	editor.edit((document) => void (document.left.wheel.camber = -3), 'camber');
	expect(solution.ride?.camber).toBeCloseTo(-3, 9);
	expect(solution.judgements[0]).toMatchObject({ verdict: 'miss' });
	expect(solution.revisionCounter).toBe(editor.revisionCounter);
	editor.undo();
	expect(solution.ride?.camber).toBeCloseTo(-0.75, 9);
});

test('the travel slide has its own state, exactly as the kernel gives it', () => {
	const { solution } = open(axle());
	expect(solution.atTravel).toBe(solution.ride);
	solution.travel = 30;
	const corner = solution.corner;
	if (!corner) throw new Error('the corner is complete');
	expect(solution.atTravel?.camber).toBe(solveCorner(corner, { travel: 30, rack: 0 }).camber);
});

test('a place out of reach says so and keeps the rest; the reach tells how far it goes', () => {
	const { solution } = open(axle());
	solution.travel = 5000;
	expect(solution.atTravel).toBeNull();
	expect(solution.travelError).toMatchObject({ code: 'out-of-reach' });
	expect(solution.ride).not.toBeNull();
	expect(solution.error).toBeNull();
	expect(solution.reach.high).toBeLessThanOrEqual(75);
});

test('a corner that cannot work keeps the last good one and names what is at fault', () => {
	const { editor, solution } = open(axle());
	const good = solution.ride;
	// The upper ball joint on the line through its own pivots.
	editor.edit((document) => void (document.left.points.upperBall = [0, 381, 475]), 'upper ball joint');
	expect(solution.error).toMatchObject({ code: 'degenerate' });
	expect(solution.ride).toBeNull();
	expect(solution.judgements).toEqual([]);
	expect(solution.lastGood?.ride).toBe(good);
	editor.undo();
	expect(solution.error).toBeNull();
});

test('nothing is solved while something has still to be typed', () => {
	const { editor, solution } = open(axle());
	editor.edit((document) => void (document.left.points.lowerBall[1] = null), 'lower ball joint');
	expect(editor.missing).not.toBeNull();
	expect(solution.corner).toBeNull();
	expect(solution.ride).toBeNull();
	expect(solution.error).toBeNull();
});

test('the right side is the left mirrored until it is entered on its own', () => {
	const { editor, selection, solution } = open(axle());
	selection.side = 'right';
	expect(solution.ride?.camber).toBeCloseTo(-0.75, 9);
	editor.edit((document) => {
		const right = structuredClone(axle().left);
		for (const entry of Object.values(right.points)) entry[1] = -(entry[1] ?? 0);
		document.right = { ...right, wheel: { ...right.wheel, camber: -2 } };
	}, 'right on its own');
	expect(solution.ride?.camber).toBeCloseTo(-2, 9);
	expect(solution.ride?.side).toBe('right');
	selection.side = 'left';
	expect(solution.ride?.camber).toBeCloseTo(-0.75, 9);
});
