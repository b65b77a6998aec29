import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { load as buildLayout } from '../../src/routes/(app)/[shop=slug]/builds/[build=uuid]/+layout.server';
import { load as alignmentLoad } from '../../src/routes/(app)/[shop=slug]/builds/[build=uuid]/alignment/+page.server';
import { load as compareLoad } from '../../src/routes/(app)/[shop=slug]/builds/[build=uuid]/compare/+page.server';
import { load as pointsLoad } from '../../src/routes/(app)/[shop=slug]/builds/[build=uuid]/points/+page.server';
import { load as stockLoad } from '../../src/routes/(app)/[shop=slug]/stock/+page.server';
import type { BuildList, RevisionFull, RevisionSummary } from '../../src/lib/schemas/build';
import { guard } from '../../src/lib/server/guard';
import { seedDemo } from '../../src/lib/server/migrator';
import { COUPE_ID, NEIGHBOUR_ID, PICKUP_ID, ROADSTER_ID } from '../../seeders/demo/builds';
import { PICKUP } from '../../seeders/demo/others';
import { api } from '../support/api';
import { everyone, SHOP } from '../support/people';
import { openTestServer, refusal, Visitor } from '../support/server';

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

const wheel = { camber: -0.4, caster: 5, toe: 0.1 };
const record = () => ({ requestId: randomUUID(), kind: 'asFound', left: wheel, right: wheel, travel: 0, rake: 0 });
const keep = () => ({ note: 'x', requestId: randomUUID(), draftVersion: 1 });

/** Status of every call of the API on one build. */
async function statuses(who: Visitor, build: string, shop = SHOP): Promise<Record<string, number>> {
	const calls = api(who, build, shop);
	const answers = {
		read: await calls.read(),
		change: await calls.change({}),
		draft: await calls.draft(),
		put: await calls.put(PICKUP, 99),
		start: await calls.start('A', 99),
		revisions: await calls.revisions(),
		keep: await calls.keep({ ...keep(), draftVersion: 99 }),
		revision: await calls.revision('D'),
		unreleased: await calls.revision('A'),
		release: await calls.release('D'),
		records: await calls.records('D'),
		addRecord: await calls.addRecord('D', record())
	};
	return Object.fromEntries(Object.entries(answers).map(([name, { status }]) => [name, status]));
}

const all = (status: number) =>
	Object.fromEntries(
		[
			'read',
			'change',
			'draft',
			'put',
			'start',
			'revisions',
			'keep',
			'revision',
			'unreleased',
			'release',
			'records',
			'addRecord'
		].map((name) => [name, status])
	);

describe('another shop', () => {
	test('its owner gets 404 everywhere in ours, and our build is not in theirs', async () => {
		expect(await statuses(people.neighbour, ROADSTER_ID)).toEqual(all(404));
		expect(await statuses(people.neighbour, ROADSTER_ID, 'northgate-frames')).toEqual(all(404));
		expect((await api(people.neighbour).list()).status).toBe(404);
		expect((await api(people.neighbour).shims()).status).toBe(404);
		expect((await api(people.neighbour).create({ name: 'x' })).status).toBe(404);
	});

	test('our owner gets 404 on theirs', async () => {
		expect(await statuses(people.owner, NEIGHBOUR_ID)).toEqual(all(404));
		expect(await statuses(people.owner, NEIGHBOUR_ID, 'northgate-frames')).toEqual(all(404));
	});

	test('nobody of another shop can be put on a build', async () => {
		const [row] = await db.query("SELECT id FROM people WHERE email = 'neighbour@demo.example'");
		const answer = await api(people.owner, PICKUP_ID).change({ people: [String(row?.id)] });
		expect(answer).toMatchObject({ status: 422, body: { errors: [{ field: 'people' }] } });
		await expect(
			db.query(
				`INSERT INTO build_people SELECT shop_id, id, '${String(row?.id)}', NOW(3) FROM builds WHERE id = '${PICKUP_ID}'`
			)
		).rejects.toThrow();
	});

	test('a page answers the same', async () => {
		const event = await people.neighbour.event('/', { params: { shop: SHOP, build: ROADSTER_ID } });
		expect(await refusal(() => buildLayout(event as never))).toMatchObject({ status: 404 });
	});
});

describe('nobody', () => {
	test('the API says 401, a page leads to sign-in and back', async () => {
		expect(await statuses(new Visitor(), ROADSTER_ID)).toEqual(all(401));
		const event = await new Visitor().event(`/${SHOP}/builds/${ROADSTER_ID}/points?rev=C`, { params: { shop: SHOP } });
		expect(await refusal(guard(event, 'build.read'))).toEqual({
			status: 303,
			location: `/sign-in?next=${encodeURIComponent(`/${SHOP}/builds/${ROADSTER_ID}/points?rev=C`)}`
		});
	});
});

describe('technician and client', () => {
	test('see no draft and no unreleased revision; what they know but may not do is 403', async () => {
		const forbidden = {
			...all(403),
			read: 200,
			revisions: 200,
			revision: 200,
			records: 200,
			unreleased: 404,
			draft: 404,
			put: 404,
			start: 404
		};
		expect(await statuses(people.technician, ROADSTER_ID)).toEqual({ ...forbidden, addRecord: 201 });
		expect(await statuses(people.client, ROADSTER_ID)).toEqual(forbidden);
	});

	test('revisions are the released ones, an unreleased parent is not named', async () => {
		for (const who of [people.technician, people.client]) {
			const list = (await api(who, ROADSTER_ID).revisions()).body as RevisionSummary[];
			expect(list.map(({ letter, parentLetter }) => [letter, parentLetter])).toEqual([['D', null]]);
		}
		const listed = (await api(people.owner, ROADSTER_ID).revisions()).body as RevisionSummary[];
		expect(listed.map(({ letter, parentLetter }) => `${letter}<${parentLetter ?? ''}`)).toEqual([
			'E<D',
			'D<C',
			'C<B',
			'B<A',
			'A<'
		]);
	});

	test('know only builds they are assigned to, unless the shop shows technicians all', async () => {
		expect(await statuses(people.technician, PICKUP_ID)).toEqual(all(404));
		expect(await statuses(people.client, COUPE_ID)).toEqual(all(404));
		const names = async (who: Visitor) =>
			((await api(who).list('?sort=name')).body as BuildList).items.map(({ name }) => name);
		expect(await names(people.technician)).toEqual(['Grey roadster', 'Long coupe']);
		expect(await names(people.client)).toEqual(['Grey roadster']);
		await db.query(`UPDATE shops SET technicians_see_all = TRUE WHERE slug = '${SHOP}'`);
		expect(await names(people.technician)).toEqual(['Grey roadster', 'Long coupe', 'Shop pick-up']);
		expect(await names(people.client)).toEqual(['Grey roadster']);
		await db.query(`UPDATE shops SET technicians_see_all = FALSE WHERE slug = '${SHOP}'`);
	});

	test('taken off a build they no longer know it, at the next request', async () => {
		const [row] = await db.query("SELECT id FROM people WHERE email = 'client@demo.example'");
		const facts = (await api(people.owner, ROADSTER_ID).read()).body as { people: { id: string }[] };
		const ids = facts.people.map(({ id }) => id);
		await api(people.owner, ROADSTER_ID).change({ people: ids.filter((id) => id !== row?.id) });
		expect((await api(people.client, ROADSTER_ID).read()).status).toBe(404);
		await api(people.owner, ROADSTER_ID).change({ people: ids });
		expect((await api(people.client, ROADSTER_ID).read()).status).toBe(200);
	});

	test('a role taken away counts at the next request, and refusals are in the audit', async () => {
		await db.query(
			`UPDATE memberships SET role = 'technician' WHERE person_id = (SELECT id FROM people WHERE email = 'builder@demo.example')`
		);
		expect((await api(people.builder).create({ name: 'x' })).status).toBe(403);
		await db.query(
			`UPDATE memberships SET role = 'builder' WHERE person_id = (SELECT id FROM people WHERE email = 'builder@demo.example')`
		);
		expect((await api(people.builder).list()).status).toBe(200);
		const [row] = await db.query(
			"SELECT COUNT(*) AS n FROM audit_entries WHERE act = 'refused' AND detail = 'build.create'"
		);
		expect(Number(row?.n)).toBeGreaterThan(0);
	});

	test('a client has no shim stock', async () => {
		expect((await api(people.client).shims()).status).toBe(403);
		expect((await api(people.technician).shims()).status).toBe(200);
		expect((await api(people.technician).putShims({ version: 1, items: [] })).status).toBe(403);
		const event = await people.client.event('/', { params: { shop: SHOP } });
		expect(await refusal(() => stockLoad(event as never))).toMatchObject({ status: 403 });
	});
});

describe('pages', () => {
	const load = async (page: (event: never) => unknown, who: Visitor, search = '') =>
		(await page((await who.event(`/${search}`, { params: { shop: SHOP, build: ROADSTER_ID } })) as never)) as Record<
			string,
			unknown
		>;

	test('the build’s layout gives a draft only to those who may see it', async () => {
		expect(await load(buildLayout, people.builder)).toMatchObject({ draft: { version: 1, parent: 'E' } });
		expect(await load(buildLayout, people.technician)).toMatchObject({ draft: null, revisions: [{ letter: 'D' }] });
	});

	test('without ?rev= the builder has the draft, the client the newest released revision', async () => {
		expect((await load(pointsLoad, people.builder)).revision).toBeNull();
		expect((await load(pointsLoad, people.builder, '?rev=b')).revision).toMatchObject({ letter: 'B' });
		expect((await load(pointsLoad, people.client)).revision).toMatchObject({ letter: 'D', note: '' });
		for (const rev of ['A', 'ZZ', '"'])
			expect(await refusal(() => load(pointsLoad, people.client, `?rev=${encodeURIComponent(rev)}`))).toMatchObject({
				status: 404
			});
	});

	test('compare takes two to four, and keeps the draft from those who may not see it', async () => {
		const letters = async (who: Visitor, revs = '') =>
			((await load(compareLoad, who, revs)).compared as { letter: string | null }[]).map(({ letter }) => letter);
		// The seeded draft is revision E as it was kept.
		expect(await letters(people.owner)).toEqual(['D', 'E']);
		expect(await letters(people.owner, '?revs=B,C,draft,D')).toEqual(['B', 'C', null, 'D']);
		expect(await letters(people.client)).toEqual(['D']);
		expect(await refusal(() => load(compareLoad, people.owner, '?revs=A,B,C,D,E'))).toMatchObject({ status: 400 });
		expect(await refusal(() => load(compareLoad, people.client, '?revs=D,draft'))).toMatchObject({ status: 404 });
		expect(await refusal(() => load(compareLoad, people.client, '?revs=D,C'))).toMatchObject({ status: 404 });
	});

	test('alignment brings records and stock', async () => {
		const data = await load(alignmentLoad, people.technician);
		expect((data.revision as RevisionFull).letter).toBe('D');
		expect((data.stock as { items: unknown[] }).items).toHaveLength(9);
		expect((await load(alignmentLoad, people.client)).stock).toBeNull();
	});
});
