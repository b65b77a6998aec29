import PasteDialog from '$lib/components/paste/PasteDialog.svelte';
import { emptyAxle } from '$lib/domain/axle';
import { GROUND_DATUM, type Datum } from '$lib/domain/datum';
import { DEFAULT_PREFERENCES, type Preferences } from '$lib/schemas/preferences';
import { DraftEditor } from '$lib/state/draft.svelte';
import { Selection } from '$lib/state/selection.svelte';
import { render, screen, within } from '@testing-library/svelte';
import userEvent from '@testing-library/user-event';
import type { Component } from 'svelte';
import { expect, test } from 'vitest';
import Frame from '../../support/Frame.svelte';

function open(text: string, preferences: Partial<Preferences> = {}, datum: Datum = GROUND_DATUM) {
	const editor = new DraftEditor({
		place: { shop: 'harrow-lane', build: 'one' },
		person: 'ines',
		draft: { version: 1, document: emptyAxle(), updatedAt: '2026-03-02T09:00:00.000Z', updatedBy: 'Ines Calder' },
		fetch: () => Promise.reject(new TypeError('cut')),
		pause: 1e7
	});
	const given = { open: true, editor, selection: new Selection(), datum, text };
	render(Frame, {
		props: {
			part: PasteDialog as unknown as Component<Record<string, unknown>>,
			given,
			preferences: { ...DEFAULT_PREFERENCES, ...preferences }
		}
	});
	const accept = () => screen.getByRole('button', { name: /^Put in/ });
	return { editor, accept, user: userEvent.setup() };
}

test('a list with heads and names is shown first and goes in as one step', async () => {
	const { editor, accept, user } = open(
		'point,out,up,aft\nupper ball joint,618,474,22\nlower ball joint,680,190,-10\n'
	);
	const preview = screen.getByRole('table', { name: 'What would be put in' });
	expect(within(preview).getByRole('row', { name: /upper ball joint 618.0 474.0 −22.0/ })).toBeInTheDocument();
	expect(editor.revisionCounter).toBe(0);
	expect(accept()).toHaveTextContent('Put in 2 points');
	await user.click(accept());
	expect(editor.document.left.points.upperBall).toEqual([-22, 618, 474]);
	expect(editor.document.left.points.lowerBall).toEqual([10, 680, 190]);
	expect(editor.undo()).toBe('pasting 2 points');
	expect(editor.document).toEqual(emptyAxle());
});

test('a wrong cell is named; its point is left out, the others go in', async () => {
	const { editor, accept, user } = open('upper ball joint\t618\t47x\t22\nlower ball joint\t680\t190\t10');
	expect(screen.getByRole('alert')).toHaveTextContent('row 1, up: "47x" is not a length');
	expect(accept()).toHaveTextContent('Put in 1 point');
	await user.click(accept());
	expect(editor.document.left.points.upperBall).toEqual([null, null, null]);
	expect(editor.document.left.points.lowerBall).toEqual([10, 680, 190]);
});

test('a comma that may be either is asked first; until then nothing can be put in', async () => {
	const { editor, accept, user } = open('upper ball joint\t24,331\t18,661\t10,866', { length: 'in' });
	expect(accept()).toBeDisabled();
	await user.click(
		within(screen.getByRole('group', { name: 'A question first' })).getByRole('button', { name: /^(decimal )?comma/i })
	);
	expect(accept()).toBeEnabled();
	await user.click(accept());
	expect(editor.document.left.points.upperBall[1]).toBeCloseTo(24.331 * 25.4, 9);
});

test('the unit may be told otherwise, and is asked when the size does not fit', async () => {
	const { editor, accept, user } = open('upper ball joint\t24.331\t18.661\t0.866');
	expect(screen.getByText(/Are these mm or inches/)).toBeInTheDocument();
	expect(accept()).toBeDisabled();
	await user.click(screen.getByRole('button', { name: 'inches' }));
	await user.click(accept());
	expect(editor.document.left.points.upperBall[1]).toBeCloseTo(24.331 * 25.4, 9);
});

test('without names the order is that of the table, from the row the person says', async () => {
	const { editor, accept, user } = open('618\t474\t22');
	await user.selectOptions(screen.getByLabelText('The first row is'), 'upperBall');
	await user.click(accept());
	expect(editor.document.left.points.upperBall).toEqual([22, 618, 474]);
	expect(editor.document.left.points.upperFront).toEqual([null, null, null]);
});

test('points of the right side make it an entry of its own; those of a coil-over make one', async () => {
	const { editor, accept, user } = open('right upper ball joint\t618\t474\t22\ncoil-over top\t400\t700\t0');
	expect(screen.getByText(/make it an entry of its own/)).toBeInTheDocument();
	await user.click(accept());
	expect(editor.document.right).toMatchObject({ points: { upperBall: [22, -618, 474] } });
	expect(editor.document.left.coilover?.top).toEqual([0, 400, 700]);
});

test('text that is no list changes nothing and says what a list is; it can be typed into', async () => {
	const { accept, user } = open('hello');
	expect(screen.getByRole('alert')).toHaveTextContent('No row has three numbers');
	expect(accept()).toBeDisabled();
	await user.clear(screen.getByLabelText('Points'));
	await user.type(screen.getByLabelText('Points'), 'upper ball joint; 618; 474; 22');
	expect(accept()).toBeEnabled();
});
