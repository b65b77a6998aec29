import { gridGroups } from '$lib/components/grid/rows';
import { emptyAxle } from '$lib/domain/axle';
import { GROUND_DATUM, type Datum } from '$lib/domain/datum';
import { axleSchema, type AxleDocument } from '$lib/schemas/axle';
import { DEFAULT_PREFERENCES, type Preferences } from '$lib/schemas/preferences';
import { DraftEditor } from '$lib/state/draft.svelte';
import { Selection } from '$lib/state/selection.svelte';
import { fireEvent, render, screen, within } from '@testing-library/svelte';
import userEvent from '@testing-library/user-event';
import { describe, expect, test, vi } from 'vitest';
import Bench from './Bench.svelte';

/** An invented corner; the numbers only have to differ from each other. Stored as [fore, out, up], mm. */
function axle(): AxleDocument {
	const document = emptyAxle();
	document.left.points.upperFront = [150, 380, 480];
	document.left.points.upperRear = [-150, 382, 470];
	document.left.points.upperBall = [-22, 618, 474];
	document.left.points.lowerFront = [200, 300, 200];
	document.left.points.lowerRear = [-200, 302, 195];
	document.left.points.lowerBall = [10, 680, 190];
	document.left.points.tieRodInner = [100, 320, 260];
	document.left.points.tieRodOuter = [110, 660, 250];
	document.left.wheel = { track: 1480, x: 0, loadedRadius: 310, camber: -0.75, toe: 0.05 };
	return document;
}

interface Wish {
	preferences?: Partial<Preferences>;
	datum?: Datum;
	readOnly?: string;
	document?: AxleDocument;
	whole?: boolean;
}

async function bench({ preferences, datum = GROUND_DATUM, readOnly, document = axle(), whole }: Wish = {}) {
	const editor = new DraftEditor({
		place: { shop: 'harrow-lane', build: 'one' },
		person: 'ines',
		draft: { version: 1, document, updatedAt: '2026-03-02T09:00:00.000Z', updatedBy: 'Ines Calder', parent: null },
		readOnly: readOnly ?? null,
		// Nothing leaves this page: the line to the server is cut.
		fetch: () => Promise.reject(new TypeError('cut')),
		pause: 1e7
	});
	const selection = new Selection();
	const onforeign = vi.fn<(text: string) => void>();
	const user = userEvent.setup();
	const view = render(Bench, {
		editor,
		selection,
		datum,
		preferences: { ...DEFAULT_PREFERENCES, ...preferences },
		onforeign,
		whole
	});
	/** The cell of a row's head and a column, by what a screen reader hears. */
	const cell = (label: string) => {
		const found = screen.getAllByRole('gridcell', { name: new RegExp(`^${label}: `) });
		// A message under a row is a cell too; it has no place in the block.
		const [one, ...more] = found.filter((element) => element.dataset.cell !== undefined);
		if (!one || more.length > 0) throw new Error(`${label}: ${found.length} cells`);
		return one;
	};
	const focused = () => window.document.activeElement?.getAttribute('aria-label');
	return { editor, selection, onforeign, user, cell, focused, view };
}

describe('what the table shows', () => {
	test('rows by what is bolted there, columns out, up, fore, in mm from the ground', async () => {
		const { cell } = await bench();
		expect(screen.getByRole('grid', { name: 'Points, left side' })).toBeInTheDocument();
		expect(screen.getAllByRole('columnheader').map((head) => head.textContent?.replace(/\s+/g, ' ').trim())).toEqual(
			expect.arrayContaining(['out mm', 'up mm', 'fore mm'])
		);
		expect(cell('upper ball joint, out')).toHaveTextContent('618.0');
		expect(cell('upper ball joint, fore')).toHaveTextContent('−22.0');
		expect(cell('static camber')).toHaveTextContent('−0.75');
	});

	test("the builder's datum: up from the table top, aft positive from its own zero", async () => {
		const datum: Datum = { origin: 'table', height: 140, foreAft: 'aft', foreOrigin: 100 };
		const { cell, user, editor } = await bench({ datum });
		expect(cell('upper ball joint, up')).toHaveTextContent('334.0');
		expect(cell('upper ball joint, aft')).toHaveTextContent('122.0');
		await user.click(cell('upper ball joint, aft'));
		await user.keyboard('130{Enter}');
		expect(editor.document.left.points.upperBall).toEqual([-30, 618, 474]);
	});

	test('inches as fractions are shown, typed and kept exactly', async () => {
		const { cell, user, editor } = await bench({ preferences: { length: 'in', inches: 'fraction' } });
		await user.click(cell('upper ball joint, out'));
		await user.keyboard('24 3/8{Enter}');
		expect(editor.document.left.points.upperBall[1]).toBeCloseTo(619.125, 9);
		expect(cell('upper ball joint, out')).toHaveTextContent('24 3/8');
	});

	test('limits of the cells are those of the schema', () => {
		const both = [...gridGroups('left', GROUND_DATUM, true)].flatMap((group) => group.rows.flatMap((row) => row.cells));
		const untyped = { rate: null, forceAtRide: null, openLength: null, closedLength: null };
		const withCoilover = axle();
		withCoilover.left.coilover = { top: [null, null, null], bottom: [null, null, null], on: 'lowerArm', ...untyped };
		const accepts = (cell: (typeof both)[number], value: number | null) => {
			const copy = structuredClone(withCoilover);
			cell.write(copy, value);
			return axleSchema.safeParse(copy).success;
		};
		expect(both).toHaveLength(38);
		for (const cell of both) {
			expect(accepts(cell, cell.low), `${cell.key} low`).toBe(true);
			expect(accepts(cell, cell.high), `${cell.key} high`).toBe(true);
			expect(accepts(cell, cell.low - 1), `${cell.key} below`).toBe(false);
			expect(accepts(cell, cell.high + 1), `${cell.key} above`).toBe(false);
			expect(accepts(cell, null), `${cell.key} empty`).toBe(true);
		}
	});

	test('the chosen point of the drawing is where the keyboard comes in', async () => {
		const { selection, user, focused } = await bench();
		selection.choose('lowerBall');
		await user.tab();
		expect(focused()).toBe('lower ball joint, out: 680.0');
	});
});

describe('moving', () => {
	test('arrows, Home, End, Enter, Tab; the drawing follows', async () => {
		const { cell, user, focused, selection } = await bench();
		await user.click(cell('upper arm, front pivot, out'));
		await user.keyboard('{ArrowRight}{ArrowDown}');
		expect(focused()).toBe('upper arm, rear pivot, up: 470.0');
		expect(selection.point).toBe('upperRear');
		await user.keyboard('{End}');
		expect(focused()).toBe('upper arm, rear pivot, fore: −150.0');
		await user.keyboard('{Home}{Enter}');
		expect(focused()).toBe('upper ball joint, out: 618.0');
		await user.keyboard('{Shift>}{Enter}{/Shift}');
		expect(focused()).toBe('upper arm, rear pivot, out: 382.0');
		await user.keyboard('{End}{Tab}');
		expect(focused()).toBe('upper ball joint, out: 618.0');
		await user.keyboard('{Shift>}{Tab}{/Shift}');
		expect(focused()).toBe('upper arm, rear pivot, fore: −150.0');
		await user.keyboard('{Control>}{End}{/Control}');
		expect(focused()).toBe('static toe, per wheel: 0.05');
		await user.keyboard('{Control>}{Home}{/Control}{ArrowUp}{ArrowLeft}');
		expect(focused()).toBe('upper arm, front pivot, out: 380.0');
	});

	test('a narrower row keeps the column for the next wide one', async () => {
		const { cell, user, focused } = await bench();
		await user.click(cell('outer tie-rod joint, fore'));
		await user.keyboard('{ArrowDown}');
		expect(focused()).toBe('track: 1480.0');
		await user.keyboard('{ArrowUp}');
		expect(focused()).toBe('outer tie-rod joint, fore: 110.0');
	});

	test('one cell is in the tab order; Tab leaves past the last cell, and after Escape from anywhere', async () => {
		const { cell, user } = await bench();
		expect(screen.getAllByRole('gridcell').filter((one) => one.tabIndex === 0)).toHaveLength(1);
		await user.click(cell('static toe, per wheel'));
		await user.tab();
		expect(screen.getByRole('button', { name: 'after the table' })).toHaveFocus();
		await user.click(cell('upper ball joint, out'));
		await user.keyboard('{Escape}');
		await user.tab();
		expect(screen.getByRole('button', { name: 'after the table' })).toHaveFocus();
	});
});

describe('editing', () => {
	test('typing starts an entry, Enter takes it and goes down, and the cell is marked', async () => {
		const { cell, user, editor, focused } = await bench();
		await user.click(cell('upper ball joint, out'));
		expect(cell('upper ball joint, out')).not.toHaveAttribute('data-edited');
		await user.keyboard('620.5{Enter}');
		expect(editor.document.left.points.upperBall).toEqual([-22, 620.5, 474]);
		expect(cell('upper ball joint, out')).toHaveAttribute('data-edited');
		expect(cell('upper ball joint, up')).not.toHaveAttribute('data-edited');
		expect(focused()).toBe('lower arm, front pivot, out: 300.0');
		expect(editor.undoLabel).toBe('upper ball joint, out');
	});

	test('Tab takes it and goes right; an arrow too while it was started by typing', async () => {
		const { cell, user, editor, focused } = await bench();
		await user.click(cell('upper ball joint, out'));
		await user.keyboard('1{Tab}2{ArrowRight}3{ArrowUp}');
		expect(editor.document.left.points.upperBall).toEqual([3, 1, 2]);
		expect(focused()).toBe('upper arm, rear pivot, fore: −150.0');
	});

	test('F2 opens the value; left right move in the text; Escape restores', async () => {
		const { cell, user, editor, focused } = await bench();
		await user.click(cell('upper ball joint, out'));
		await user.keyboard('{F2}');
		expect(screen.getByRole('textbox')).toHaveValue('618.0');
		await user.keyboard('{ArrowLeft}{ArrowLeft}{ArrowLeft}0{Escape}');
		expect(editor.revisionCounter).toBe(0);
		expect(focused()).toBe('upper ball joint, out: 618.0');
	});

	test('opened and left as it was, a value keeps the digits that are not shown', async () => {
		const document = axle();
		document.left.points.upperBall = [-22, 618.0372, 474];
		const { cell, user, editor } = await bench({ document });
		await user.click(cell('upper ball joint, out'));
		await user.keyboard('{F2}');
		expect(screen.getByRole('textbox')).toHaveValue('618.0372');
		await user.keyboard('{Enter}');
		expect(editor.revisionCounter).toBe(0);
	});

	test('what is not accepted stays typed, with what would be accepted under it', async () => {
		const { cell, user, editor } = await bench();
		await user.click(cell('upper ball joint, out'));
		await user.keyboard('6x8{Enter}');
		expect(screen.getByRole('textbox')).toHaveValue('6x8');
		expect(screen.getByRole('textbox')).toBeInvalid();
		expect(screen.getByRole('alert')).toHaveTextContent(/upper ball joint, out: .*mm/);
		expect(editor.revisionCounter).toBe(0);
		await user.click(cell('lower ball joint, out'));
		expect(cell('upper ball joint, out')).toHaveTextContent('6x8');
		expect(cell('upper ball joint, out')).toBeInvalid();
		expect(screen.getByRole('alert')).toBeInTheDocument();
		await user.click(cell('upper ball joint, out'));
		await user.keyboard('{F2}{Backspace}{Backspace}{Backspace}628{Enter}');
		expect(editor.document.left.points.upperBall[1]).toBe(628);
		expect(screen.queryByRole('alert')).not.toBeInTheDocument();
	});

	test('out of range names the range in the units of the person', async () => {
		const { cell, user } = await bench({ preferences: { length: 'in' } });
		await user.click(cell('track'));
		await user.keyboard('5{Enter}');
		expect(screen.getByRole('alert')).toHaveTextContent('track: accepted from 11.811 to 157.480 in.');
	});

	test('Delete empties a coordinate; a field that must be a number says so', async () => {
		const { cell, user, editor } = await bench();
		await user.click(cell('upper ball joint, out'));
		await user.keyboard('{Delete}');
		expect(editor.document.left.points.upperBall).toEqual([-22, null, 474]);
		expect(cell('upper ball joint, out')).toHaveTextContent('–');
		expect(editor.missing).toHaveLength(1);
		expect(editor.geometry).toBeNull();
		await user.click(cell('static camber'));
		await user.keyboard('{Delete}');
		expect(editor.document.left.wheel.camber).toBe(-0.75);
		expect(screen.getByRole('alert')).toHaveTextContent('static camber: a number is needed');
	});

	test('undo and redo from the keyboard', async () => {
		const { cell, user, editor } = await bench();
		await user.click(cell('upper ball joint, out'));
		await user.keyboard('700{Enter}{Control>}z{/Control}');
		expect(editor.document).toEqual(axle());
		await user.keyboard('{Control>}{Shift>}z{/Shift}{/Control}');
		expect(editor.document.left.points.upperBall[1]).toBe(700);
		await user.keyboard('{Control>}z{/Control}{Control>}y{/Control}');
		expect(editor.document.left.points.upperBall[1]).toBe(700);
	});

	test('read only: nothing opens, nothing changes', async () => {
		const { cell, user, editor } = await bench({ readOnly: 'Revision B does not change.' });
		await user.click(cell('upper ball joint, out'));
		await user.keyboard('5{F2}{Delete}');
		expect(screen.queryByRole('textbox')).not.toBeInTheDocument();
		expect(editor.revisionCounter).toBe(0);
		expect(screen.getByRole('grid')).toHaveAttribute('aria-readonly', 'true');
	});
});

describe('copy and paste', () => {
	test('a block goes out as tab-separated lines, exact, with a plain minus', async () => {
		const { cell, user } = await bench();
		await user.click(cell('upper arm, rear pivot, up'));
		await user.keyboard('{Shift>}{ArrowRight}{ArrowDown}{/Shift}');
		const setData = vi.fn();
		await fireEvent.copy(window.document.activeElement as Element, { clipboardData: { setData } });
		expect(setData).toHaveBeenCalledWith('text/plain', '470\t-150\n474\t-22');
	});

	test('and comes in as one step', async () => {
		const { cell, user, editor } = await bench();
		await user.click(cell('lower arm, front pivot, out'));
		await user.paste('301\t201\t-1\n303\t196\t−2\n');
		expect(editor.document.left.points.lowerFront).toEqual([-1, 301, 201]);
		expect(editor.document.left.points.lowerRear).toEqual([-2, 303, 196]);
		editor.undo();
		expect(editor.document).toEqual(axle());
	});

	test('a block with a name or an unreadable number changes nothing and is handed on', async () => {
		const { cell, user, editor, onforeign } = await bench();
		await user.click(cell('lower arm, front pivot, out'));
		await user.paste('point\tout\nupper ball joint\t618');
		await user.paste('1\t2\t3\t4');
		expect(onforeign.mock.calls.map(([text]) => text)).toEqual(['point\tout\nupper ball joint\t618', '1\t2\t3\t4']);
		expect(editor.revisionCounter).toBe(0);
	});

	test('one value into one cell; one that is not accepted stays with its message', async () => {
		const { cell, user, editor } = await bench();
		await user.click(cell('track'));
		await user.paste('1502.5');
		expect(editor.document.left.wheel.track).toBe(1502.5);
		await user.paste('wide');
		expect(cell('track')).toHaveTextContent('wide');
		expect(screen.getByRole('alert')).toHaveTextContent('track');
		expect(editor.document.left.wheel.track).toBe(1502.5);
	});
});

describe('round the table', () => {
	test('the right side mirrors the left until it is entered on its own, out positive on both', async () => {
		const { user, editor, view } = await bench({ whole: true });
		await user.click(screen.getByRole('radio', { name: 'right' }));
		expect(screen.queryByRole('grid')).not.toBeInTheDocument();
		await user.click(screen.getByRole('button', { name: 'enter it on its own' }));
		expect(editor.document.right).toMatchObject({ points: { upperBall: [-22, -618, 474] } });
		const grid = within(view.container).getByRole('grid', { name: 'Points, right side' });
		expect(within(grid).getByRole('gridcell', { name: /^upper ball joint, out: / })).toHaveTextContent('618.0');
		await user.click(screen.getByRole('button', { name: 'undo' }));
		expect(editor.document.right).toBe('mirror');
	});

	test('a coil-over is added with its points and figures, and removed, each one step', async () => {
		const { user, editor } = await bench({ whole: true });
		await user.click(screen.getByRole('button', { name: 'add a coil-over' }));
		expect(screen.getByRole('gridcell', { name: /^coil-over, top, out: / })).toHaveTextContent('–');
		expect(screen.getByRole('gridcell', { name: /^coil-over, spring rate: / })).toBeInTheDocument();
		await user.selectOptions(screen.getByLabelText('Coil-over, bottom bolted to'), 'upright');
		expect(editor.document.left.coilover?.on).toBe('upright');
		await user.click(screen.getByRole('button', { name: 'remove the coil-over' }));
		expect(editor.document.left.coilover).toBeNull();
		editor.undo();
		expect(editor.document.left.coilover?.on).toBe('upright');
	});

	test('on a phone: a point a row, opened by a tap, keys of 1 mm or 1/16 in', async () => {
		const { user, editor } = await bench({ whole: true, preferences: { length: 'in' } });
		await user.click(screen.getByRole('button', { name: /^upper ball joint: / }));
		const more = screen.getByRole('button', { name: 'upper ball joint, out, 1/16 in more' });
		await user.click(more);
		await user.click(more);
		expect(editor.document.left.points.upperBall[1]).toBeCloseTo(618 + 2 * 1.5875, 9);
		expect(editor.undo()).toBe('upper ball joint, out');
		expect(editor.document.left.points.upperBall[1]).toBe(618);
	});
});
