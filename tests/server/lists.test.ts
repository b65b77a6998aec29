import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { buildListSchema } from '../../src/lib/schemas/build';
import type { Actor } from '../../src/lib/server/actor';
import { listBuilds, PAGE_SIZE } from '../../src/lib/server/builds';
import { database } from '../../src/lib/server/db';
import { seedDemo } from '../../src/lib/server/migrator';
import { listRecords } from '../../src/lib/server/records';
import { listRevisions } from '../../src/lib/server/revisions';
import { findActor, listShops } from '../../src/lib/server/shops';
import { listAssignable } from '../../src/lib/server/people';
import { COUPE_ID, ROADSTER_ID } from '../../seeders/demo/builds';
import { SHOP, signedIn } from '../support/people';
import { openTestServer } from '../support/server';

const ROWS = 10_000;
let db: Awaited<ReturnType<typeof openTestServer>>;
let owner: Actor;
let technician: Actor;

beforeAll(async () => {
	db = await openTestServer();
	await seedDemo(db.url);
	const [shop] = await db.query(`SELECT id FROM shops WHERE slug = '${SHOP}'`);
	const numbers = `SELECT seq FROM seq_1_to_${ROWS}`;
	await db.query(
		`INSERT INTO builds (id, shop_id, name, client, stage, stage_order, datum, tyre_size, notes, archived, created_at, updated_at)
		SELECT CONCAT('01900000-0000-7000-8000-', LPAD(seq, 12, '0')), '${String(shop?.id)}', CONCAT('Car ', LPAD(seq, 5, '0')), CONCAT('Client ', seq % 97),
		ELT(seq % 5 + 1, 'quoted', 'laidOut', 'inFabrication', 'onItsWheels', 'delivered'), seq % 5, '{"origin":"ground","height":0,"foreAft":"fore","foreOrigin":0}',
		'', '', seq % 10 = 0, NOW(3), NOW(3) - INTERVAL seq MINUTE FROM (${numbers}) AS n`
	);
	await db.query(
		`INSERT INTO revisions (id, shop_id, build_id, number, note, document, hash, request_id, created_at, created_by)
		SELECT CONCAT('01910000-0000-7000-8000-', LPAD(seq, 12, '0')), shop_id, id, 1, '', '{}', '', UUID(), NOW(3), (SELECT id FROM people LIMIT 1)
		FROM builds JOIN (${numbers}) AS n ON builds.id = CONCAT('01900000-0000-7000-8000-', LPAD(seq, 12, '0'))`
	);
	await db.query(
		`INSERT INTO releases (id, shop_id, build_id, revision_id, figures, kernel_version, released_at, released_by)
		SELECT id, shop_id, build_id, id, '{}', '', NOW(3), created_by FROM revisions WHERE id LIKE '01910000%'`
	);
	await db.query(
		`INSERT INTO people (id, name, email, password_hash, preferences, created_at)
		SELECT CONCAT('01920000-0000-7000-8000-', LPAD(seq, 12, '0')), 'Someone', CONCAT('someone', seq, '@example.test'), '', '{}', NOW(3) FROM (${numbers}) AS n`
	);
	await db.query('ANALYZE TABLE builds, revisions, releases, build_people, people');
	const actorOf = async (role: 'owner' | 'technician') => {
		const { person } = (await (await signedIn(role)).event('/')).locals;
		const actor = person && (await findActor(person, SHOP, 'test'));
		if (!actor) throw new Error('no actor');
		return actor;
	};
	owner = await actorOf('owner');
	technician = await actorOf('technician');
});
afterAll(async () => {
	await db.close();
});

const query = (search: string) => buildListSchema.parse(Object.fromEntries(new URLSearchParams(search)));

/** The statements a piece of work sends, as sent. */
async function statements(work: () => Promise<unknown>): Promise<string[]> {
	const sent: string[] = [];
	const { options } = database() as unknown as { options: { logging: false | ((sql: string) => void) } };
	options.logging = (sql) => void sent.push(sql.replace(/^Executing \([^)]*\): /, ''));
	try {
		await work();
	} finally {
		options.logging = false;
	}
	return sent.filter((sql) => sql.startsWith('SELECT'));
}

/** Full scans and sorts in the plans of those statements. */
async function plan(
	sql: string
): Promise<{ table: string; type: string; key: string | null; rows: number; sorts: boolean }[]> {
	const rows = await db.query(`EXPLAIN ${sql}`);
	return rows.map((row) => ({
		table: String(row.table),
		type: String(row.type),
		key: row.key === null ? null : String(row.key),
		rows: Number(row.rows),
		sorts: /filesort|temporary/.test(String(row.Extra))
	}));
}

describe(`lists on ${ROWS} builds`, () => {
	test.each([
		'',
		'sort=name',
		'sort=name&dir=down',
		'sort=client',
		'sort=stage',
		'sort=updated&dir=up',
		'archived=yes',
		'stage=quoted',
		'q=car+0077',
		'page=300'
	])('builds?%s: every statement uses an index, the page is not sorted in a pile', async (search) => {
		const sent = await statements(() => listBuilds(owner, query(search)));
		expect(sent.length).toBeGreaterThanOrEqual(2);
		for (const sql of sent) {
			for (const step of await plan(sql)) {
				expect(step, sql).toMatchObject({ key: expect.any(String) as string });
				expect(step.type, sql).not.toBe('ALL');
				if (/LIMIT/.test(sql)) expect(step.sorts, sql).toBe(false);
			}
		}
	});

	test('a technician’s list goes through their assignments', async () => {
		for (const sql of await statements(() => listBuilds(technician, query('')))) {
			const steps = await plan(sql);
			for (const step of steps) expect(step.type, sql).not.toBe('ALL');
			// Two builds are theirs: nothing near the ten thousand is read.
			if (/build_people/.test(sql)) expect(Math.max(...steps.map(({ rows }) => rows)), sql).toBeLessThan(100);
		}
	});

	test.each([
		['revisions', () => listRevisions(owner, ROADSTER_ID)],
		['released revisions', () => listRevisions(technician, ROADSTER_ID)],
		['records', () => listRecords(technician, COUPE_ID, 'B')],
		['people to assign', () => listAssignable(owner)]
	])('%s: no full scan', async (_name, work) => {
		for (const sql of await statements(work))
			for (const step of await plan(sql)) expect(step.type, sql).not.toBe('ALL');
	});

	test('the shops of a person: no full scan of memberships', async () => {
		const { person } = (await (await signedIn('owner')).event('/')).locals;
		if (!person) throw new Error('nobody');
		for (const sql of await statements(() => listShops(person)))
			for (const step of await plan(sql)) if (/emberships?/.test(step.table)) expect(step.type, sql).not.toBe('ALL');
	});

	test('one page costs a fixed number of statements', async () => {
		expect((await statements(() => listBuilds(owner, query('')))).length).toBe(3);
	});

	test('pages do not overlap and hold what was asked for', async () => {
		const first = await listBuilds(owner, query('stage=quoted&sort=name'));
		const second = await listBuilds(owner, query('stage=quoted&sort=name&page=2'));
		expect(first.items).toHaveLength(PAGE_SIZE);
		expect(new Set([...first.items, ...second.items].map(({ id }) => id)).size).toBe(2 * PAGE_SIZE);
		expect(first.items.every(({ stage }) => stage === 'quoted')).toBe(true);
		const names = [...first.items, ...second.items].map(({ name }) => name);
		expect(names).toEqual([...names].sort());
	});

	test('a page past the end is the last one; an unreadable search falls back', async () => {
		const last = await listBuilds(owner, query('page=99999'));
		expect(last.page).toBe(last.pages);
		expect(last.items.length).toBeGreaterThan(0);
		expect(query('page=-3&sort=colour&stage=lost&dir=sideways&archived=maybe')).toEqual(query(''));
	});

	test('% and _ in a search are characters, not wildcards', async () => {
		expect((await listBuilds(owner, query('q=%25'))).total).toBe(0);
		expect((await listBuilds(owner, query('q=Car_00771'))).total).toBe(0);
		expect((await listBuilds(owner, query('q=car 00771'))).total).toBe(1);
	});
});
