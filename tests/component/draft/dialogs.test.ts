import ConflictDialog from '$lib/components/draft/ConflictDialog.svelte';
import KeepRevisionDialog from '$lib/components/draft/KeepRevisionDialog.svelte';
import ReadOnlyStrip from '$lib/components/draft/ReadOnlyStrip.svelte';
import StaleStrip from '$lib/components/draft/StaleStrip.svelte';
import StatusLine from '$lib/components/draft/StatusLine.svelte';
import TargetsDialog from '$lib/components/draft/TargetsDialog.svelte';
import { emptyAxle } from '$lib/domain/axle';
import { GROUND_DATUM } from '$lib/domain/datum';
import type { AxleDocument } from '$lib/schemas/axle';
import type { RevisionSummary } from '$lib/schemas/build';
import { DEFAULT_PREFERENCES } from '$lib/schemas/preferences';
import { DraftEditor } from '$lib/state/draft.svelte';
import { render, screen, within } from '@testing-library/svelte';
import userEvent from '@testing-library/user-event';
import type { Component } from 'svelte';
import { beforeEach, describe, expect, test, vi } from 'vitest';
import Frame from '../../support/Frame.svelte';
import { DraftServer } from '../state/draftServer';

let server: DraftServer;
let editor: DraftEditor;

function document(change: (axle: AxleDocument) => void = () => {}): AxleDocument {
	const axle = emptyAxle();
	axle.left.points.upperBall = [-5, 620, 520];
	axle.left.points.lowerBall = [10, 680, 200];
	change(axle);
	return axle;
}

function open(): DraftEditor {
	return new DraftEditor({
		place: { shop: 'harrow-lane', build: 'one' },
		person: 'ines',
		draft: { ...server.held },
		fetch: server.fetch,
		pause: 1e7
	});
}

beforeEach(() => {
	server = new DraftServer(document());
	editor = open();
});

function show(part: unknown, given: Record<string, unknown>) {
	const framed = part as Component<Record<string, unknown>>;
	render(Frame, { props: { part: framed, given, preferences: DEFAULT_PREFERENCES } });
	return userEvent.setup();
}

/** Two people moved the upper ball joint; the other changed the track as well. */
async function conflict() {
	server.otherKeeps(
		document((axle) => {
			axle.left.points.upperBall = [-5, 640, 520];
			axle.left.wheel.camber = -1;
		})
	);
	editor.edit((axle) => {
		axle.left.points.upperBall = [-5, 620, 530];
		axle.left.wheel.camber = -2;
	}, 'mine');
	await editor.flush();
}

describe('a conflict', () => {
	test('lists every point and field with both values, in the units of the person, and takes what is chosen', async () => {
		await conflict();
		const user = show(ConflictDialog, { open: true, editor, datum: GROUND_DATUM });
		const ball = screen.getByRole('radiogroup', { name: 'Upper ball joint' });
		expect(ball).toHaveTextContent('before: 620.0 out 520.0 up −5.0 fore');
		expect(within(ball).getByRole('radio', { name: /^mine: 620.0 out +530.0 up/ })).toBeChecked();
		expect(screen.getByRole('radio', { name: /^mine: −2.00°/ })).toBeChecked();
		await user.click(within(ball).getByRole('radio', { name: /^Tomas Reed’s: 640.0 out/ }));
		await user.click(screen.getByRole('button', { name: 'Keep these choices' }));
		expect(await editor.flush()).toBe(true);
		expect(server.held.document.left.points.upperBall).toEqual([-5, 640, 520]);
		expect(server.held.document.left.wheel.camber).toBe(-2);
	});

	test('is told in the strip, with who and what, and opens both', async () => {
		await conflict();
		const user = show(StaleStrip, { editor });
		expect(screen.getByRole('status')).toHaveTextContent('Tomas Reed changed upper ball joint; static camber on');
		await user.click(screen.getByRole('button', { name: 'Show both' }));
		expect(screen.getByRole('dialog', { name: 'Changed by two people' })).toBeInTheDocument();
	});

	test('a change by another that fits is told and can be looked at', async () => {
		server.otherKeeps(document((axle) => void (axle.left.wheel.camber = -1)));
		await editor.refresh();
		const user = show(StaleStrip, { editor });
		expect(screen.getByRole('status')).toHaveTextContent('Tomas Reed changed static camber');
		await user.click(screen.getByRole('button', { name: 'show both' }));
		expect(screen.getByRole('row', { name: /Static camber 0.00° −1.00°/ })).toBeInTheDocument();
	});
});

describe('where the draft is kept', () => {
	test('says each state in words', async () => {
		show(StatusLine, { editor });
		const line = () => screen.getByRole('status');
		expect(line()).toHaveTextContent('kept on the server');
		server.mode = 'offline';
		editor.edit((axle) => void (axle.left.wheel.camber = -1), 'one');
		editor.edit((axle) => void (axle.left.wheel.toe = 0.1), 'two');
		await editor.flush();
		await vi.waitFor(() => expect(line()).toHaveTextContent('held on this page only, 2 edits waiting'));
		server.mode = 'expired';
		await editor.flush();
		await vi.waitFor(() => expect(line()).toHaveTextContent('signed out, 2 edits'));
		expect(screen.getByRole('link', { name: 'sign in' })).toHaveAttribute(
			'href',
			expect.stringMatching(/^\/sign-in\?next=/)
		);
		server.mode = 'well';
		await editor.flush();
		await vi.waitFor(() => expect(line()).toHaveTextContent('kept on the server'));
	});
});

describe('keeping a revision', () => {
	/** The revisions' part of the contract: the next letter, and the same again for the same request id. */
	function revisions() {
		const kept = new Map<string, RevisionSummary>();
		const asked: { note: string; requestId: string; draftVersion: number }[] = [];
		let lost = 0;
		const fetch: typeof globalThis.fetch = async (_url, init) => {
			const body = JSON.parse(String(init?.body)) as (typeof asked)[number];
			asked.push(body);
			const number = kept.size + 3;
			const made = kept.get(body.requestId) ?? {
				id: `r${number}`,
				letter: 'ABCDE'[number - 1] ?? '',
				number,
				note: body.note,
				parentLetter: 'B',
				hash: 'h',
				createdAt: '2026-03-02T10:00:00.000Z',
				createdBy: 'Ines Calder',
				releasedAt: null,
				releasedBy: null
			};
			kept.set(body.requestId, made);
			if (lost-- > 0) throw new TypeError('Failed to fetch');
			return Response.json(made, { status: 201 });
		};
		return { asked, kept, fetch, loseNext: () => (lost = 1) };
	}

	const before = [{ number: 2, letter: 'B' }] as RevisionSummary[];

	test('wants a note, sends the draft first, stamps the letter; a lost answer does not make two', async () => {
		const keeping = revisions();
		vi.stubGlobal('fetch', keeping.fetch);
		const onkept = vi.fn();
		const user = show(KeepRevisionDialog, { open: true, editor, revisions: before, onkept });
		await user.click(screen.getByRole('button', { name: 'Keep as C' }));
		expect(screen.getByRole('alert')).toHaveTextContent('Note: say in a few words what changed.');
		expect(keeping.asked).toHaveLength(0);

		editor.edit((axle) => void (axle.left.wheel.camber = -1), 'camber');
		await user.type(screen.getByLabelText('Note to revision C'), 'lower ball joint down 5 mm');
		keeping.loseNext();
		await user.click(screen.getByRole('button', { name: 'Keep as C' }));
		expect(await screen.findByRole('alert')).toHaveTextContent('The server cannot be reached.');
		expect(screen.getByLabelText('Note to revision C')).toHaveValue('lower ball joint down 5 mm');
		await user.click(screen.getByRole('button', { name: 'Keep as C' }));
		expect(await screen.findByRole('dialog', { name: 'Revision C is kept' })).toBeInTheDocument();
		expect(keeping.kept.size).toBe(1);
		expect(keeping.asked[1]).toEqual({
			note: 'lower ball joint down 5 mm',
			requestId: keeping.asked[0]?.requestId,
			draftVersion: server.held.version
		});
		expect(server.held.document.left.wheel.camber).toBe(-1);
		expect(editor.parent).toBe('C');
		expect(onkept).toHaveBeenCalledOnce();
		vi.unstubAllGlobals();
	});

	test('is not done while two people disagree', async () => {
		await conflict();
		const user = show(KeepRevisionDialog, { open: true, editor, revisions: before });
		await user.type(screen.getByLabelText('Note to revision C'), 'try');
		await user.click(screen.getByRole('button', { name: 'Keep as C' }));
		expect(await screen.findByRole('alert')).toHaveTextContent('Somebody changed the same points');
	});
});

describe('targets', () => {
	test('are set at ride height and over travel, as one step', async () => {
		const user = show(TargetsDialog, { open: true, editor });
		await user.click(screen.getByRole('button', { name: 'add a target' }));
		await user.type(screen.getByLabelText('At least'), '-1');
		await user.type(screen.getByLabelText('At most'), '-0.5');
		await user.click(screen.getByRole('button', { name: 'add a target' }));
		const second = screen.getAllByRole('group', { name: /^Target of/ })[1] as HTMLElement;
		await user.selectOptions(within(second).getByLabelText('Judged'), 'travel');
		await user.selectOptions(within(second).getByLabelText('Figure'), 'bumpSteer');
		await user.type(within(second).getByLabelText('At most'), '0.1');
		await user.click(screen.getByRole('button', { name: 'Set these targets' }));
		expect(editor.document.targets).toEqual([
			{ figure: 'camber', at: 'ride', low: -1, high: -0.5 },
			{ figure: 'bumpSteer', at: 'travel', measure: 'peak', from: -25, to: 25, low: null, high: 0.1 }
		]);
		editor.undo();
		expect(editor.document.targets).toEqual([]);
	});

	test('without a bound, or the wrong way round, they are not set and the field says why', async () => {
		const user = show(TargetsDialog, { open: true, editor });
		await user.click(screen.getByRole('button', { name: 'add a target' }));
		await user.click(screen.getByRole('button', { name: 'Set these targets' }));
		expect(screen.getByRole('alert')).toHaveTextContent(/bound/);
		await user.type(screen.getByLabelText('At least'), '2');
		await user.type(screen.getByLabelText('At most'), 'x');
		await user.click(screen.getByRole('button', { name: 'Set these targets' }));
		expect(screen.getByLabelText('At most')).toBeInvalid();
		expect(screen.getByLabelText('At most')).toHaveValue('x');
		expect(editor.document.targets).toEqual([]);
	});
});

describe('read only', () => {
	test('says why, and starts the draft from what it shows after asking', async () => {
		server.revision = document((axle) => void (axle.left.wheel.camber = -3));
		const onstarted = vi.fn();
		const user = show(ReadOnlyStrip, { why: 'Revision A does not change.', letter: 'A', draft: editor, onstarted });
		expect(screen.getByRole('status')).toHaveTextContent('Revision A does not change.');
		await user.click(screen.getByRole('button', { name: 'Start the draft from it' }));
		expect(onstarted).not.toHaveBeenCalled();
		await user.click(screen.getByRole('button', { name: 'Replace the draft by A' }));
		await vi.waitFor(() => expect(onstarted).toHaveBeenCalledOnce());
		expect(editor.document.left.wheel.camber).toBe(-3);
		expect(editor.parent).toBe('A');
	});

	test('offers nothing to who may not write the draft', () => {
		show(ReadOnlyStrip, { why: 'Revision A does not change.', letter: 'A' });
		expect(screen.queryByRole('button')).not.toBeInTheDocument();
	});
});
