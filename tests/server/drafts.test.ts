import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { axleHash } from '../../src/lib/domain/axle';
import type { AxleDocument } from '../../src/lib/schemas/axle';
import type { BuildFacts, DraftData, RevisionFull, RevisionSummary } from '../../src/lib/schemas/build';
import type { Problem } from '../../src/lib/schemas/problem';
import { seedDemo } from '../../src/lib/server/migrator';
import { PICKUP_ID } from '../../seeders/demo/builds';
import { PICKUP } from '../../seeders/demo/others';
import { api } from '../support/api';
import { everyone } from '../support/people';
import { openTestServer } from '../support/server';

let db: Awaited<ReturnType<typeof openTestServer>>;
let people: Awaited<ReturnType<typeof everyone>>;
beforeAll(async () => {
	db = await openTestServer();
	await seedDemo(db.url);
	people = await everyone();
});
afterAll(async () => {
	await db.close();
});

const moved = (document: AxleDocument, up: number): AxleDocument => ({
	...document,
	left: { ...document.left, points: { ...document.left.points, upperBall: [-16, 700, 512 + up] } }
});
async function newBuild(): Promise<{ build: string; draft: DraftData }> {
	const { body } = await api(people.builder).create({ name: 'Trial', track: 1640, loadedRadius: 345, wheelbase: 3050 });
	const { id: build } = body as BuildFacts;
	return { build, draft: (await api(people.builder, build).draft()).body as DraftData };
}

describe('the draft', () => {
	test('a new build has one that already holds its facts', async () => {
		const { draft } = await newBuild();
		expect(draft).toMatchObject({ version: 1, parent: null, updatedBy: 'Tobias Renner' });
		expect(draft.document.left.wheel).toMatchObject({ track: 1640, loadedRadius: 345 });
		expect(draft.document.vehicle.wheelbase).toBe(3050);
	});

	test('changed facts follow into the draft only where it still held the old ones', async () => {
		const { build, draft } = await newBuild();
		const own = {
			...draft.document,
			left: { ...draft.document.left, wheel: { ...draft.document.left.wheel, track: 1650 } }
		};
		await api(people.builder, build).put(own, 1);
		await api(people.builder, build).change({ track: 1700, wheelbase: 3100 });
		const after = (await api(people.builder, build).draft()).body as DraftData;
		expect(after.version).toBe(3);
		expect(after.document.left.wheel.track).toBe(1650);
		expect(after.document.vehicle.wheelbase).toBe(3100);
		await api(people.builder, build).change({ notes: 'nothing of the geometry' });
		expect(((await api(people.builder, build).draft()).body as DraftData).version).toBe(3);
	});

	test('a write names the version it was made against: 428 without, 409 when stale, and nothing is overwritten', async () => {
		const { build } = await newBuild();
		const builder = api(people.builder, build);
		expect((await builder.put(PICKUP, null)).status).toBe(428);
		const saved = await builder.put(PICKUP, 1);
		expect(saved).toMatchObject({ status: 200, body: { version: 2, updatedBy: 'Tobias Renner' } });
		expect(saved.headers.get('etag')).toBe('"2"');
		const stale = await api(people.owner, build).put(moved(PICKUP, 5), 1);
		expect(stale.status).toBe(409);
		expect(stale.headers.get('content-type')).toBe('application/problem+json');
		const { current } = stale.body as Problem & { current: DraftData };
		expect(current).toMatchObject({ version: 2, updatedBy: 'Tobias Renner', document: PICKUP });
		expect((await builder.draft()).body).toMatchObject({ version: 2, document: PICKUP });
	});

	test('of two writes at once on one version exactly one is kept', async () => {
		const { build } = await newBuild();
		const answers = await Promise.all([1, 2, 3, 4].map((up) => api(people.owner, build).put(moved(PICKUP, up), 1)));
		expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409, 409]);
		expect((await api(people.owner, build).draft()).body).toMatchObject({ version: 2 });
	});

	test('a document that does not fit its schema is refused by field', async () => {
		const { build } = await newBuild();
		const wrong = { ...PICKUP, left: { ...PICKUP.left, points: { ...PICKUP.left.points, upperBall: [0, 'ten', 0] } } };
		const answer = await api(people.builder, build).put(wrong, 1);
		expect(answer.status).toBe(422);
		expect((answer.body as Problem).errors?.[0]).toMatchObject({
			field: 'document.left.points.upperBall.1',
			message: expect.stringContaining('mm') as string
		});
		const newer = await api(people.builder, build).put({ ...PICKUP, schema: 2 }, 1);
		expect((newer.body as Problem).errors).toEqual([
			{ field: 'document.schema', message: 'This document has schema 2; this server reads up to 1.' }
		]);
	});
});

describe('keeping a revision', () => {
	const ask = (draftVersion: number, requestId = randomUUID()) => ({ note: 'tried', requestId, draftVersion });

	test('an incomplete draft is refused, each missing point named', async () => {
		const { build } = await newBuild();
		const answer = await api(people.builder, build).keep(ask(1));
		expect(answer.status).toBe(422);
		const fields = (answer.body as Problem).errors?.map(({ field }) => field);
		expect(fields).toContain('left.points.upperBall');
		expect(fields).toHaveLength(8);
	});

	test('a draft that cannot be solved is refused, the point named', async () => {
		const { build } = await newBuild();
		const flat = {
			...PICKUP,
			left: { ...PICKUP.left, points: { ...PICKUP.left.points, lowerRear: PICKUP.left.points.lowerFront } }
		};
		await api(people.builder, build).put(flat, 1);
		const answer = await api(people.builder, build).keep(ask(2));
		expect(answer.status).toBe(422);
		const [error] = (answer.body as Problem).errors ?? [];
		expect(error?.field).toMatch(/^left\.points\.lower/);
		expect(error?.message).toMatch(/lower/i);
	});

	test('a double click makes one revision, also when both arrive at once', async () => {
		const { build } = await newBuild();
		await api(people.builder, build).put(PICKUP, 1);
		const once = ask(2);
		const answers = await Promise.all([1, 2, 3].map(() => api(people.builder, build).keep(once)));
		expect(answers.map(({ status }) => status).sort()).toEqual([200, 200, 201]);
		expect(new Set(answers.map(({ body }) => (body as RevisionSummary).id)).size).toBe(1);
		expect((await api(people.builder, build).revisions()).body).toHaveLength(1);
		expect((await api(people.builder, build).keep(once)).status).toBe(200);
	});

	test('letters follow each other, the parent is the revision the draft came from', async () => {
		const { build } = await newBuild();
		const builder = api(people.builder, build);
		await builder.put(PICKUP, 1);
		for (const requestId of [randomUUID(), randomUUID()]) await builder.keep(ask(2, requestId));
		const started = (await builder.start('A', 2)).body as DraftData;
		expect(started).toMatchObject({ version: 3, parent: 'A' });
		await builder.put(moved(PICKUP, 4), 3);
		const kept = (await builder.keep(ask(4))).body as RevisionSummary;
		expect(kept).toMatchObject({
			letter: 'C',
			number: 3,
			parentLetter: 'A',
			createdBy: 'Tobias Renner',
			releasedAt: null
		});
		expect(((await builder.revisions()).body as RevisionSummary[]).map(({ letter }) => letter)).toEqual([
			'C',
			'B',
			'A'
		]);
		const second = (await builder.revision('B')).body as RevisionFull;
		expect(second.document).toEqual(PICKUP);
		expect(second.hash).toBe(await axleHash(PICKUP));
	});

	test('a stale draft version and a start without or with an old version are refused', async () => {
		const { build } = await newBuild();
		const builder = api(people.builder, build);
		await builder.put(PICKUP, 1);
		expect((await builder.keep(ask(1))).status).toBe(409);
		await builder.keep(ask(2));
		expect((await builder.start('A', 1)).status).toBe(409);
		expect((await builder.start('B', 2)).status).toBe(404);
	});

	test('the note is asked for', async () => {
		const answer = await api(people.builder, PICKUP_ID).keep({ ...ask(1), note: '  ' });
		expect((answer.body as Problem).errors).toEqual([
			{ field: 'note', message: 'Note: say in a few words what changed.' }
		]);
	});

	test('a revision whose stored bytes were changed is not shown as one', async () => {
		const { build } = await newBuild();
		await api(people.builder, build).put(PICKUP, 1);
		await api(people.builder, build).keep(ask(2));
		await db.query(`UPDATE revisions SET document = REPLACE(document, '512', '513') WHERE build_id = '${build}'`);
		const answer = await api(people.builder, build).revision('A');
		expect(answer.status).toBe(500);
		expect((answer.body as Problem).detail).toContain('does not match its fingerprint');
	});
});

describe('release', () => {
	test('stores the figures and the kernel that computed them, once', async () => {
		const { build } = await newBuild();
		const builder = api(people.builder, build);
		await builder.put(PICKUP, 1);
		await builder.keep({ note: 'for the shop', requestId: randomUUID(), draftVersion: 2 });
		const first = (await builder.release('A')).body as RevisionSummary;
		expect(first).toMatchObject({ letter: 'A', releasedBy: 'Tobias Renner' });
		expect((await api(people.owner, build).release('A')).body).toEqual(first);
		const { figures } = (await builder.revision('A')).body as RevisionFull;
		expect(figures?.kernelVersion).toMatch(/^\d+\.\d+\.\d+$/);
		expect(figures?.left.camber).toBeCloseTo(-0.5, 9);
		expect(figures?.right).toEqual(figures?.left);
		expect(await db.query(`SELECT act, detail FROM audit_entries WHERE build_id = '${build}' ORDER BY id`)).toEqual([
			{ act: 'build.created', detail: '' },
			{ act: 'revision.kept', detail: 'A' },
			{ act: 'revision.released', detail: 'A' }
		]);
	});
});
