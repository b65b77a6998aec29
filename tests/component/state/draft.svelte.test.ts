import { createUnsentStore } from '$lib/client/unsent';
import { emptyAxle } from '$lib/domain/axle';
import type { AxleDocument, PointEntry } from '$lib/schemas/axle';
import type { PointName } from '$lib/kinematics';
import { DraftEditor, type DraftOptions } from '$lib/state/draft.svelte';
import 'fake-indexeddb/auto';
import { IDBFactory } from 'fake-indexeddb';
import { flushSync } from 'svelte';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { DraftServer } from './draftServer';

/** An invented corner; the numbers only have to differ from each other. */
function document(): AxleDocument {
	const axle = emptyAxle();
	axle.left.points.upperBall = [-5, 620, 520];
	axle.left.points.lowerBall = [10, 680, 200];
	axle.left.wheel.track = 1480;
	return axle;
}

function place(name: PointName, entry: PointEntry) {
	return (axle: AxleDocument) => void (axle.left.points[name] = entry);
}

function having(change: (axle: AxleDocument) => void): AxleDocument {
	const axle = document();
	change(axle);
	return axle;
}

let server: DraftServer;
let editors: (() => void)[] = [];

function open(more: Partial<DraftOptions> = {}): DraftEditor {
	const { version, document, updatedAt, updatedBy, parent } = server.held;
	return new DraftEditor({
		place: { shop: 'harrow-lane', build: '0198d6a2-0000-7000-8000-000000000001' },
		person: 'ines',
		draft: { version, document, updatedAt, updatedBy, parent },
		fetch: server.fetch,
		...more
	});
}

/** As a page does: joined to the window, let go at the end. */
function connected(more: Partial<DraftOptions> = {}): DraftEditor {
	const editor = open({ unsent: createUnsentStore(), ...more });
	editors.push(editor.connect());
	return editor;
}

beforeEach(() => {
	server = new DraftServer(document());
	globalThis.indexedDB = new IDBFactory();
	vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout', 'Date'] });
});

afterEach(() => {
	editors.forEach((let_go) => let_go());
	editors = [];
	vi.useRealTimers();
});

/** Lets promises and IndexedDB's own turns run; only the timers of the editor are held. */
const settled = async () => {
	for (let turn = 0; turn < 30; turn += 1) await new Promise<void>((resolve) => setImmediate(resolve));
};
const after = async (ms: number) => {
	await vi.advanceTimersByTimeAsync(ms);
	await settled();
};

describe('undo and redo', () => {
	test('an edit is one named step, back and forward', () => {
		const editor = open();
		editor.edit(place('upperBall', [-5, 625, 520]), 'upper ball joint, out');
		expect(editor.document.left.points.upperBall).toEqual([-5, 625, 520]);
		expect(editor.undoLabel).toBe('upper ball joint, out');
		expect(editor.undo()).toBe('upper ball joint, out');
		expect(editor.document).toEqual(document());
		expect(editor.undoLabel).toBeNull();
		expect(editor.redo()).toBe('upper ball joint, out');
		expect(editor.document.left.points.upperBall).toEqual([-5, 625, 520]);
		expect(editor.redo()).toBeNull();
	});

	test('a new edit ends what could be done again', () => {
		const editor = open();
		editor.edit(place('upperBall', [0, 625, 520]), 'first');
		editor.undo();
		editor.edit(place('lowerBall', [0, 690, 200]), 'second');
		expect(editor.redoLabel).toBeNull();
		expect(editor.undoLabel).toBe('second');
	});

	test('the counter rises with every change and the old document stays as it was', () => {
		const editor = open();
		const before = editor.document;
		editor.edit(place('upperBall', [0, 625, 520]), 'move');
		editor.undo();
		editor.redo();
		expect(editor.revisionCounter).toBe(3);
		expect(before).toEqual(document());
	});

	test('an edit that changes nothing is no step', () => {
		const editor = open();
		expect(editor.edit((axle) => void (axle.left.wheel.track = 1480), 'track')).toBe(false);
		expect(editor.undoLabel).toBeNull();
		expect(editor.revisionCounter).toBe(0);
	});

	test('a held key is one step; the same key after a pause is another', () => {
		const editor = open();
		for (let step = 1; step <= 5; step += 1)
			editor.edit(place('upperBall', [0, 620 + step, 520]), 'nudge', 'upperBall');
		vi.advanceTimersByTime(2000);
		editor.edit(place('upperBall', [0, 630, 520]), 'nudge', 'upperBall');
		editor.undo();
		expect(editor.document.left.points.upperBall).toEqual([0, 625, 520]);
		editor.undo();
		expect(editor.document).toEqual(document());
	});

	test('a drag is one step, sends nothing while it lasts, and can be given up', async () => {
		const editor = open();
		editor.beginDrag('dragging the upper ball joint');
		for (let step = 1; step <= 60; step += 1) editor.dragTo(place('upperBall', [0, 620 + step, 520]));
		await after(10_000);
		expect(server.puts).toHaveLength(0);
		expect(editor.dragFrom?.left.points.upperBall).toEqual([-5, 620, 520]);
		expect(editor.revisionCounter).toBe(60);
		editor.commitDrag();
		await after(600);
		expect(server.puts).toHaveLength(1);
		editor.undo();
		expect(editor.document).toEqual(document());

		editor.beginDrag('again');
		editor.dragTo(place('upperBall', [0, 700, 520]));
		editor.cancelDrag();
		expect(editor.document).toEqual(document());
		expect(editor.redoLabel).toBe('dragging the upper ball joint');
	});

	test('read only refuses every way of changing and sends nothing', async () => {
		const editor = open({ readOnly: 'Revision B does not change.' });
		expect(editor.edit(place('upperBall', [0, 0, 0]), 'no')).toBe(false);
		editor.beginDrag('no');
		editor.dragTo(place('upperBall', [0, 0, 0]));
		editor.commitDrag();
		await after(5000);
		expect(editor.document).toEqual(document());
		expect(editor.readOnly).toBe(true);
		expect(server.puts).toHaveLength(0);
	});

	test('status and labels are seen by what draws them', () => {
		const editor = open();
		const seen: (string | null)[] = [];
		const stop = $effect.root(() => {
			$effect(() => void seen.push(`${editor.status} ${editor.waiting} ${editor.undoLabel}`));
		});
		flushSync();
		editor.edit(place('upperBall', [0, 625, 520]), 'move');
		flushSync();
		stop();
		expect(seen).toEqual(['kept 0 null', 'waiting 1 move']);
	});
});

describe('keeping', () => {
	test('waits for a pause, then sends once with the version it was made against', async () => {
		const editor = open();
		editor.edit(place('upperBall', [0, 621, 520]), 'one');
		await after(400);
		editor.edit(place('upperBall', [0, 622, 520]), 'two');
		await after(400);
		expect(server.puts).toHaveLength(0);
		expect(editor.status).toBe('waiting');
		await after(200);
		expect(server.puts).toHaveLength(1);
		expect(server.puts[0]?.version).toBe(1);
		expect(editor.status).toBe('kept');
		expect(editor.version).toBe(2);
	});

	test('who never pauses is kept every five seconds all the same', async () => {
		const editor = open();
		for (let step = 1; step <= 13; step += 1) {
			editor.edit(place('upperBall', [0, 620 + step, 520]), 'nudge', 'upperBall');
			await after(400);
		}
		expect(server.puts.length).toBeGreaterThanOrEqual(1);
	});

	test('one write at a time: an edit made meanwhile follows with the new version', async () => {
		const editor = open();
		const release = server.hold();
		editor.edit(place('upperBall', [0, 621, 520]), 'one');
		await after(600);
		expect(editor.status).toBe('saving');
		editor.edit(place('lowerBall', [0, 681, 200]), 'two');
		await after(600);
		release();
		await settled();
		expect(server.puts.map((put) => put.version)).toEqual([1, 2]);
		expect(server.held.document).toEqual(editor.document);
		expect(editor.status).toBe('kept');
	});

	test('undone before it is sent: nothing is sent', async () => {
		const editor = open();
		editor.edit(place('upperBall', [0, 621, 520]), 'one');
		editor.undo();
		await after(1000);
		expect(editor.status).toBe('kept');
		expect(server.puts).toHaveLength(0);
	});

	test('offline: counts what waits, tries again by itself, and is kept when the line is back', async () => {
		const editor = connected();
		server.mode = 'offline';
		editor.edit(place('upperBall', [0, 621, 520]), 'one');
		editor.edit((axle) => void (axle.left.wheel.track = 1490), 'two');
		await after(600);
		expect(editor.status).toBe('offline');
		expect(editor.waiting).toBe(2);
		expect(editor.onDevice).toBe(true);
		await after(2000);
		expect(editor.status).toBe('offline');
		server.mode = 'well';
		await after(5000);
		expect(editor.status).toBe('kept');
		expect(editor.waiting).toBe(0);
		expect(server.held.document).toEqual(editor.document);
	});

	test('the window coming online sends at once', async () => {
		const editor = connected();
		server.mode = 'offline';
		editor.edit(place('upperBall', [0, 621, 520]), 'one');
		await after(600);
		server.mode = 'well';
		window.dispatchEvent(new Event('online'));
		await settled();
		expect(editor.status).toBe('kept');
	});

	test('a write whose answer was lost is recognised, not taken for another person', async () => {
		const editor = open();
		server.mode = 'lost';
		editor.edit(place('upperBall', [0, 621, 520]), 'one');
		await after(600);
		expect(editor.status).toBe('offline');
		server.mode = 'well';
		await after(2000);
		expect(editor.status).toBe('kept');
		expect(editor.notice).toBeNull();
		expect(editor.conflict).toBeNull();
		expect(editor.version).toBe(2);
	});

	test('a server fault is told and tried again', async () => {
		const editor = open();
		server.mode = 'fault';
		editor.edit(place('upperBall', [0, 621, 520]), 'one');
		await after(600);
		expect(editor.status).toBe('waiting');
		expect(editor.message).toBe('Something went wrong.');
		server.mode = 'well';
		await after(2000);
		expect(editor.status).toBe('kept');
	});

	test('a refusal names what is not accepted, keeps the entry, and the next edit is sent', async () => {
		const editor = open();
		server.mode = 'refuse';
		editor.edit((axle) => void (axle.left.wheel.track = 9000), 'track');
		await after(600);
		expect(editor.status).toBe('refused');
		expect(editor.message).toBe('Track: 600 to 2600 mm.');
		expect(editor.document.left.wheel.track).toBe(9000);
		server.mode = 'well';
		editor.edit((axle) => void (axle.left.wheel.track = 1500), 'track');
		await after(600);
		expect(editor.status).toBe('kept');
		expect(server.held.document.left.wheel.track).toBe(1500);
	});

	test('an expired session keeps the entries, and they go once somebody is signed in', async () => {
		const editor = connected();
		server.mode = 'expired';
		editor.edit(place('upperBall', [0, 621, 520]), 'one');
		await after(600);
		expect(editor.status).toBe('expired');
		expect(editor.waiting).toBe(1);
		expect(editor.document.left.points.upperBall).toEqual([0, 621, 520]);
		server.mode = 'well';
		expect(await editor.flush()).toBe(true);
		expect(server.held.document.left.points.upperBall).toEqual([0, 621, 520]);
	});
});

describe('two people', () => {
	test('different points: both are in, the other is named, and undo takes back only mine', async () => {
		const editor = open();
		server.otherKeeps(having(place('lowerBall', [10, 690, 205])));
		editor.edit(place('upperBall', [0, 621, 520]), 'mine');
		await after(600);
		expect(editor.status).toBe('kept');
		expect(editor.notice?.by).toBe('Tomas Reed');
		expect(editor.notice?.entries).toEqual([
			{ path: ['left', 'points', 'lowerBall'], was: [10, 680, 200], now: [10, 690, 205] }
		]);
		expect(server.held.document.left.points).toMatchObject({ upperBall: [0, 621, 520], lowerBall: [10, 690, 205] });
		editor.undo();
		expect(editor.document.left.points).toMatchObject({ upperBall: [-5, 620, 520], lowerBall: [10, 690, 205] });
	});

	test('the same point: nothing is sent, both values are shown, mine stays until I choose', async () => {
		const editor = open();
		server.otherKeeps(
			having((axle) => {
				axle.left.points.upperBall = [-5, 640, 520];
				axle.left.wheel.track = 1500;
			})
		);
		editor.edit(place('upperBall', [-5, 620, 530]), 'mine');
		await after(600);
		expect(editor.status).toBe('conflict');
		expect(server.puts).toHaveLength(0);
		expect(editor.conflict?.entries).toEqual([
			{ path: ['left', 'points', 'upperBall'], base: [-5, 620, 520], mine: [-5, 620, 530], theirs: [-5, 640, 520] }
		]);
		expect(editor.document.left.points.upperBall).toEqual([-5, 620, 530]);
		await after(60_000);
		expect(server.puts).toHaveLength(0);

		editor.resolve(new Set());
		await after(600);
		expect(editor.status).toBe('kept');
		expect(server.held.document.left.points.upperBall).toEqual([-5, 620, 530]);
		expect(server.held.document.left.wheel.track).toBe(1500);
	});

	test('choosing theirs is a step: undo brings mine back', async () => {
		const editor = open();
		server.otherKeeps(having(place('upperBall', [-5, 640, 520])));
		editor.edit(place('upperBall', [-5, 620, 530]), 'mine');
		await after(600);
		editor.resolve(new Set(['left.points.upperBall']));
		await after(600);
		expect(editor.status).toBe('kept');
		expect(editor.document.left.points.upperBall).toEqual([-5, 640, 520]);
		editor.undo();
		await after(600);
		expect(server.held.document.left.points.upperBall).toEqual([-5, 620, 530]);
	});

	test('a third write while one chooses is met again', async () => {
		const editor = open();
		server.otherKeeps(having(place('upperBall', [-5, 640, 520])));
		editor.edit(place('upperBall', [-5, 620, 530]), 'mine');
		await after(600);
		server.otherKeeps(having(place('upperBall', [-5, 650, 520])), 'Third Hand');
		editor.resolve(new Set());
		await after(600);
		expect(editor.status).toBe('conflict');
		expect(editor.conflict?.by).toBe('Third Hand');
		expect(editor.conflict?.entries[0]).toMatchObject({ mine: [-5, 620, 530], theirs: [-5, 650, 520] });
	});

	test('nothing moves under the hand during a drag; the end of it is met', async () => {
		const editor = open();
		editor.edit((axle) => void (axle.left.wheel.track = 1490), 'track');
		const release = server.hold();
		await after(600);
		server.otherKeeps(having(place('lowerBall', [10, 690, 205])));
		editor.beginDrag('drag');
		editor.dragTo(place('upperBall', [0, 621, 520]));
		release();
		await settled();
		expect(editor.document.left.points.lowerBall).toEqual([10, 680, 200]);
		editor.dragTo(place('upperBall', [0, 622, 520]));
		editor.commitDrag();
		await after(600);
		expect(editor.status).toBe('kept');
		expect(server.held.document.left.points).toMatchObject({ upperBall: [0, 622, 520], lowerBall: [10, 690, 205] });
		expect(server.held.document.left.wheel.track).toBe(1490);
	});

	test('coming back to the window shows what the other did meanwhile', async () => {
		const editor = connected();
		await settled();
		server.otherKeeps(having(place('lowerBall', [10, 690, 205])));
		window.document.dispatchEvent(new Event('visibilitychange'));
		await settled();
		expect(editor.document.left.points.lowerBall).toEqual([10, 690, 205]);
		expect(editor.notice?.by).toBe('Tomas Reed');
		expect(server.puts).toHaveLength(0);
	});

	test('another turns a list round: old steps no longer fit and are forgotten', async () => {
		const editor = open();
		editor.edit((axle) => axle.targets.push({ figure: 'camber', at: 'ride', low: -1, high: 0 }), 'target');
		await after(600);
		const held = server.held.document;
		server.otherKeeps({ ...held, targets: [{ figure: 'caster', at: 'ride', low: 3, high: 5 }, ...held.targets] });
		await editor.refresh();
		expect(editor.document.targets).toHaveLength(2);
		expect(editor.undoLabel).toBeNull();
	});
});

describe('unsent edits on this device', () => {
	test('survive a reload before the pause was over', async () => {
		const first = connected();
		await settled();
		first.edit(place('upperBall', [0, 621, 520]), 'one');
		await settled();
		// The page dies: no timer, no goodbye.
		vi.clearAllTimers();
		const second = connected();
		await settled();
		expect(second.document.left.points.upperBall).toEqual([0, 621, 520]);
		await after(600);
		expect(server.held.document.left.points.upperBall).toEqual([0, 621, 520]);
		expect(await createUnsentStore().read('ines', second.place.build)).toBeNull();
		second.undo();
		expect(second.document.left.points.upperBall).toEqual([-5, 620, 520]);
	});

	test('meet what another kept while the page was closed', async () => {
		const first = connected();
		await settled();
		server.mode = 'expired';
		first.edit(place('upperBall', [0, 621, 520]), 'one');
		await after(600);
		server.mode = 'well';
		server.otherKeeps(
			having((axle) => {
				axle.left.points.lowerBall = [10, 690, 205];
				axle.left.points.upperBall = [-5, 640, 520];
			})
		);
		const second = connected();
		await settled();
		expect(second.status).toBe('conflict');
		expect(second.conflict?.entries).toEqual([
			{ path: ['left', 'points', 'upperBall'], base: [-5, 620, 520], mine: [0, 621, 520], theirs: [-5, 640, 520] }
		]);
		// Still not chosen, and the page is read once more: the question stands.
		const third = connected();
		await settled();
		expect(third.conflict?.entries).toEqual(second.conflict?.entries);
		third.resolve(new Set(['left.points.upperBall']));
		await after(600);
		expect(server.held.document.left.points).toMatchObject({ upperBall: [-5, 640, 520], lowerBall: [10, 690, 205] });
	});

	test('belong to one person and one build', async () => {
		const first = connected();
		await settled();
		first.edit(place('upperBall', [0, 621, 520]), 'one');
		await settled();
		const stranger = connected({ person: 'tomas' });
		await settled();
		expect(stranger.document).toEqual(document());
	});
});

describe('starting from a revision', () => {
	test('replaces the draft, and undo gives back what it held', async () => {
		const editor = open();
		server.revision = having((axle) => void (axle.left.wheel.track = 1400));
		editor.edit(place('upperBall', [0, 621, 520]), 'mine');
		await editor.startFrom('A');
		expect(editor.parent).toBe('A');
		expect(editor.document).toEqual(server.revision);
		expect(editor.status).toBe('kept');
		editor.undo();
		expect(editor.document.left.points.upperBall).toEqual([0, 621, 520]);
		expect(editor.document.left.wheel.track).toBe(1480);
		await after(600);
		expect(server.held.document).toEqual(editor.document);
	});

	test('is refused while another has changed the draft; that change is taken in first', async () => {
		const editor = open();
		server.revision = document();
		server.otherKeeps(having(place('lowerBall', [10, 690, 205])));
		await expect(editor.startFrom('A')).rejects.toThrow('has changed on the server');
		expect(editor.document.left.points.lowerBall).toEqual([10, 690, 205]);
		expect(server.held.document.left.points.lowerBall).toEqual([10, 690, 205]);
	});
});
