import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { migrateDown, migrateUp, pendingMigrations } from '../../src/lib/server/migrator';
import { createTestDatabase } from '../support/db';

let db: Awaited<ReturnType<typeof createTestDatabase>>;
beforeAll(async () => {
	db = await createTestDatabase({ migrate: false });
});
afterAll(async () => {
	await db.drop();
});

async function schema(): Promise<string[]> {
	const tables = await db.query('SHOW TABLES');
	const names = tables.map((row) => String(Object.values(row)[0])).sort();
	return Promise.all(
		names.map(async (name) => String((await db.query(`SHOW CREATE TABLE ${name}`))[0]?.['Create Table']))
	);
}

describe('migrations', () => {
	test('up, down and up again give the same schema', async () => {
		const all = await pendingMigrations(db.url);
		expect(await migrateUp(db.url)).toEqual(all);
		const first = await schema();
		expect(first.length).toBe(all.length + 1);
		expect(await pendingMigrations(db.url)).toEqual([]);
		expect(await migrateDown(db.url, { to: 0 })).toEqual([...all].reverse());
		expect(await schema()).toHaveLength(1);
		await migrateUp(db.url);
		expect(await schema()).toEqual(first);
	});
});
