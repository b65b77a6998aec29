import { randomBytes } from 'node:crypto';
import { connect } from '../../src/lib/server/db/connection';
import { migrateUp } from '../../src/lib/server/migrator';

/** A database of the file's own on the test server: `{ url, query(sql), drop() }`; migrated unless asked otherwise. */
export async function createTestDatabase({ migrate = true }: { migrate?: boolean } = {}) {
	const serverUrl = process.env.TEST_DATABASE_URL;
	if (!serverUrl)
		throw new Error(
			'TEST_DATABASE_URL is not set: run the server tests with `npm test` or `vitest run --project server`.'
		);
	const name = `test_${randomBytes(6).toString('hex')}`;
	await administer(serverUrl, `CREATE DATABASE ${name} CHARACTER SET utf8mb4`);
	const url = new URL(serverUrl);
	url.pathname = `/${name}`;
	if (migrate) await migrateUp(url.href);
	const sequelize = connect(url.href, { poolSize: 2 });
	return {
		url: url.href,
		/** Rows of a raw query. */
		query: async (sql: string): Promise<Record<string, unknown>[]> =>
			(await sequelize.query(sql))[0] as Record<string, unknown>[],
		drop: async (): Promise<void> => {
			await sequelize.close();
			await administer(serverUrl, `DROP DATABASE ${name}`);
		}
	};
}

async function administer(serverUrl: string, sql: string): Promise<void> {
	const sequelize = connect(serverUrl, { poolSize: 1 });
	try {
		await sequelize.query(sql);
	} finally {
		await sequelize.close();
	}
}
