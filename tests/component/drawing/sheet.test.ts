import { exampleAxle } from '$lib/domain/example';
import { emptyAxle } from '$lib/domain/axle';
import { GROUND_DATUM, type Datum } from '$lib/domain/datum';
import type { AxleDocument } from '$lib/schemas/axle';
import type { BuildFacts } from '$lib/schemas/build';
import { DEFAULT_PREFERENCES, type Preferences } from '$lib/schemas/preferences';
import { DraftEditor } from '$lib/state/draft.svelte';
import { Selection } from '$lib/state/selection.svelte';
import { Solution } from '$lib/state/solution.svelte';
import { render, screen, within } from '@testing-library/svelte';
import userEvent from '@testing-library/user-event';
import { tick, type Component } from 'svelte';
import { beforeAll, describe, expect, onTestFinished, test, vi } from 'vitest';
import Frame from '../../support/Frame.svelte';
import PointsWork from '../../../src/routes/(app)/[shop=slug]/builds/[build=uuid]/points/PointsWork.svelte';

beforeAll(() => {
	// jsdom measures nothing and knows no media; the sheet then stands at its 1440 size, on a desk.
	vi.stubGlobal('matchMedia', (query: string) => ({
		matches: true,
		media: query,
		addEventListener() {},
		removeEventListener() {}
	}));
	vi.stubGlobal(
		'ResizeObserver',
		class {
			observe() {}
			unobserve() {}
			disconnect() {}
		}
	);
	vi.spyOn(HTMLElement.prototype, 'clientWidth', 'get').mockReturnValue(1224);
	Object.defineProperty(Element.prototype, 'hasPointerCapture', { configurable: true, value: () => false });
	Object.defineProperty(SVGElement.prototype, 'getScreenCTM', { configurable: true, value: () => null });
	vi.spyOn(HTMLElement.prototype, 'clientHeight', 'get').mockReturnValue(852);
});

interface Given {
	document?: AxleDocument;
	previous?: AxleDocument;
	readOnly?: string;
	preferences?: Partial<Preferences>;
	datum?: Datum;
}

function open({ document = exampleAxle(), previous, readOnly, preferences = {}, datum = GROUND_DATUM }: Given = {}) {
	const editor = new DraftEditor({
		place: { shop: 'harrow-lane', build: 'one' },
		person: 'ines',
		draft: {
			version: 1,
			document,
			updatedAt: '2026-03-02T09:00:00.000Z',
			updatedBy: 'Ines Calder',
			parent: previous ? 'C' : null
		},
		readOnly: readOnly ?? null,
		fetch: () => Promise.reject(new TypeError('cut')),
		pause: 1e7
	});
	const selection = new Selection();
	const solution = new Solution(editor, selection);
	const build = { id: 'one', name: 'Wren coupe', datum, tyreSize: '185/60R15' } as BuildFacts;
	const title = {
		shop: 'Harrow Lane',
		letter: readOnly ? 'C' : null,
		after: 'C',
		date: '2026-03-02T09:00:00.000Z',
		drawnBy: 'Ines Calder'
	};
	const given = {
		editor,
		selection,
		solution,
		build,
		title,
		previous: previous ? { letter: 'C', document: previous } : null
	};
	render(Frame, {
		props: {
			part: PointsWork as unknown as Component<Record<string, unknown>>,
			given,
			preferences: { ...DEFAULT_PREFERENCES, ...preferences }
		}
	});
	const view = (name: string) => screen.getByRole('group', { name });
	return { editor, selection, solution, view, user: userEvent.setup() };
}

const upperBall = (editor: DraftEditor) => editor.document.left.points.upperBall;

describe('keys', () => {
	test('arrows move the chosen point in the plane of the view: 1 mm, with Shift 0.1 mm, and undo takes the run back', async () => {
		// The presses are one run of a held hand, however slow the machine that tests it.
		const clock = vi.spyOn(Date, 'now').mockReturnValue(1_700_000_000_000);
		onTestFinished(() => clock.mockRestore());
		const { editor, view, user } = open();
		const [x, y, z] = upperBall(editor) as [number, number, number];
		within(view('Front view'))
			.getByRole('button', { name: /^upper ball joint/ })
			.focus();
		await user.keyboard('{ArrowRight}{ArrowUp}{ArrowUp}{Shift>}{ArrowLeft}{/Shift}');
		expect(upperBall(editor)).toEqual([x, y + 0.9, z + 2]);
		within(view('Top view'))
			.getByRole('button', { name: /^upper ball joint/ })
			.focus();
		// Up the page in the top view is rearward.
		await user.keyboard('{ArrowUp}');
		expect(upperBall(editor)).toEqual([x - 1, y + 0.9, z + 2]);
		await user.keyboard('{Control>}z{/Control}');
		expect(upperBall(editor)).toEqual([x, y, z]);
	});

	test('in inches a press is 1/16 in, with Alt 1/64', async () => {
		const { editor, view, user } = open({ preferences: { length: 'in' } });
		const [x, y, z] = upperBall(editor) as [number, number, number];
		within(view('Front view'))
			.getByRole('button', { name: /^upper ball joint/ })
			.focus();
		await user.keyboard('{ArrowRight}{Alt>}{ArrowUp}{/Alt}');
		expect(upperBall(editor)).toEqual([x, y + 25.4 / 16, z + 25.4 / 64]);
	});

	test('brackets go from point to point in the order of the table, Escape lets go', async () => {
		const { selection, view, user } = open();
		within(view('Side view')).getAllByRole('button')[0]?.focus();
		await user.keyboard('{]}');
		const first = selection.point;
		await user.keyboard('{]}[[');
		expect(selection.point).toBe(first);
		await user.keyboard('{Escape}');
		expect(selection.point).toBeNull();
	});

	test('a revision refuses: nothing moves', async () => {
		const { editor, view, user } = open({ readOnly: 'A revision never changes.' });
		const before = upperBall(editor);
		within(view('Front view'))
			.getByRole('button', { name: /^upper ball joint/ })
			.focus();
		await user.keyboard('{ArrowRight}');
		expect(upperBall(editor)).toBe(before);
		expect(screen.queryByRole('button', { name: /type another/ })).toBeNull();
	});
});

describe('one edit', () => {
	test('stands under one number on every view, the figures, the curves and the table', async () => {
		const { editor, user, view } = open();
		await user.keyboard('p');
		within(view('Front view'))
			.getByRole('button', { name: /^lower ball joint/ })
			.focus();
		await user.keyboard('{ArrowUp}');
		const marks = [...document.querySelectorAll('[data-edit]')];
		expect(marks.length).toBeGreaterThanOrEqual(7);
		expect(new Set(marks.map((one) => one.getAttribute('data-edit')))).toEqual(
			new Set([String(editor.revisionCounter)])
		);
	});

	test('changes figure and curve before the next frame is drawn', async () => {
		const { editor } = open();
		const figure = () => document.querySelector('[data-figure="kpi"] td')?.textContent;
		const curve = () => document.querySelector('[data-series="draft"]')?.getAttribute('d');
		const [before, drawn] = [figure(), curve()];
		editor.edit((axle) => void (axle.left.points.upperBall[1] = 600), 'a move');
		await tick();
		expect(figure()).not.toBe(before);
		expect(curve()).not.toBe(drawn);
	});
});

describe('figures on the drawing', () => {
	test('static camber is typed where it stands; what cannot be read is kept with its reason', async () => {
		const { editor, user, view } = open();
		await user.click(within(view('Front view')).getByRole('button', { name: /Camber .* type another/ }));
		const field = screen.getByRole('textbox', { name: /static camber/ });
		await user.clear(field);
		await user.type(field, 'lots{Enter}');
		expect(screen.getByRole('alert')).toHaveTextContent(/static camber/);
		expect(field).toHaveValue('lots');
		await user.clear(field);
		await user.type(field, '-1.25{Enter}');
		expect(editor.document.left.wheel.camber).toBe(-1.25);
		expect(screen.queryByRole('textbox', { name: /static camber/ })).toBeNull();
	});

	test('a target wears its mark, always with the word', () => {
		const axle = exampleAxle();
		axle.targets = [
			{ figure: 'camber', at: 'ride', low: -1, high: 0 },
			{ figure: 'scrubRadius', at: 'ride', low: 500, high: 600 },
			{ figure: 'bumpSteer', at: 'travel', from: -25, to: 25, measure: 'peak', low: null, high: 5 }
		];
		open({ document: axle });
		const table = screen.getByRole('table', { name: /Figures at ride height/ });
		expect(within(table).getByRole('row', { name: /camber −0.50.*pass/ })).toBeInTheDocument();
		expect(within(table).getByRole('row', { name: /scrub.*miss/ })).toBeInTheDocument();
		expect(within(table).getByRole('row', { name: /bump steer ±25.*pass/ })).toBeInTheDocument();
		expect(screen.getByRole('img', { name: /Scrub radius .*, miss, target/ })).toBeInTheDocument();
	});

	test('a figure that does not exist says why', () => {
		const axle = exampleAxle();
		axle.vehicle.cgHeight = null;
		open({ document: axle });
		const row = document.querySelector('[data-figure="antiDive"]');
		expect(row).toHaveTextContent('–');
		expect(row).toHaveTextContent(/centre of gravity/);
	});
});

describe('the travel slide', () => {
	test('moves linkage, cursors and figures together', async () => {
		const { solution, user, view } = open();
		const hub = () => view('Front view').querySelector('[data-mark="lowerBall"] g')?.getAttribute('transform');
		const before = hub();
		screen.getByRole('slider', { name: 'travel' }).focus();
		await user.keyboard('{PageUp}{PageUp}{ArrowUp}');
		expect(solution.travel).toBe(21);
		expect(screen.getByRole('slider', { name: 'travel' })).toHaveAttribute('aria-valuetext', '+21 mm bump');
		expect(hub()).not.toBe(before);
		expect(screen.getByRole('columnheader', { name: 'at +21' })).toBeInTheDocument();
		await user.keyboard('0');
		expect(solution.travel).toBe(0);
	});
});

describe('the trammel', () => {
	test('is set on two points by keyboard and reads length and diagonals', async () => {
		const { selection, user, view } = open();
		await user.keyboard('m');
		const mark = (name: RegExp) => within(view('Front view')).getByRole('button', { name });
		mark(/^lower arm, front pivot/).focus();
		await user.keyboard('{Enter}');
		mark(/^upper arm, rear pivot/).focus();
		await user.keyboard('{Enter}');
		expect(selection.trammel).toEqual(['lowerFront', 'upperRear']);
		// From the example's points: 265, 94 and 272 mm apart.
		const length = Math.hypot(265, 94, 272).toFixed(1);
		expect(
			screen.getByRole('status', { name: new RegExp(`Trammel: .*this side ${length} mm.*difference 0.0`) })
		).toBeInTheDocument();
	});
});

describe('states', () => {
	test('without points: a faint example that cannot be taken hold of, one sentence, one button', async () => {
		const { user } = open({ document: emptyAxle() });
		expect(screen.getByText(/No points yet/)).toBeInTheDocument();
		expect(document.querySelectorAll('[data-mark]')).toHaveLength(0);
		expect(document.querySelectorAll('[data-view] path').length).toBeGreaterThan(10);
		await user.keyboard('p');
		expect(screen.queryByRole('grid')).toBeNull();
		await user.click(screen.getByRole('button', { name: 'Enter the points' }));
		expect(screen.getByRole('grid')).toBeInTheDocument();
	});

	test('part typed: what is there is drawn, what is missing is named', () => {
		const axle = exampleAxle();
		axle.left.points.tieRodInner = [null, null, null];
		open({ document: axle });
		expect(screen.getByRole('status', { name: '' })).toBeDefined();
		expect(screen.getByText(/Inner tie-rod joint: all three coordinates/)).toBeInTheDocument();
		expect(document.querySelectorAll('[data-view="front"] [data-mark]')).toHaveLength(9);
	});

	test('at fault: the point is named with what would do, the last good figures stay, marked as such', async () => {
		const { editor } = open();
		editor.edit((axle) => void (axle.left.points.upperRear = [...axle.left.points.upperFront]), 'a slip');
		await tick();
		expect(screen.getByRole('alert')).toHaveAccessibleName(/upper arm.*pivot.*apart/i);
		expect(screen.getByRole('columnheader', { name: 'last good' })).toBeInTheDocument();
		expect(document.querySelectorAll('[data-view="front"] .stroke-dye-miss').length).toBeGreaterThan(0);
	});

	test('the previous revision lies under the drawing and its curves, and can be taken away', async () => {
		const previous = exampleAxle();
		previous.left.points.upperBall = [-16, 612, 500];
		const { user } = open({ previous });
		const curves = () => document.querySelectorAll('[data-series="C"]').length;
		expect(curves()).toBeGreaterThan(0);
		await user.click(screen.getByRole('button', { name: 'C under it' }));
		expect(curves()).toBe(0);
	});

	test('coordinates are those of the builder’s datum', () => {
		const datum: Datum = { origin: 'table', height: 100, foreAft: 'aft', foreOrigin: 0 };
		const { view } = open({ datum });
		expect(
			within(view('Front view')).getByRole('button', { name: 'upper ball joint, 622.0 out, 407.0 up, 16.0 aft' })
		).toBeInTheDocument();
	});
});
