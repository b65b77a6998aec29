import { mkdtempSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { startMariadb } from './mariadb.mjs';

/**
 * Gives the server tests a database server: the one in TEST_DATABASE_URL when it is set (`npm test` does), otherwise
 * a private one in a temporary folder, so that a single file can be run by hand.
 */
export default async function setup() {
	if (process.env.TEST_DATABASE_URL) return undefined;
	const folder = mkdtempSync(path.join(os.tmpdir(), 'trammel-test-'));
	const server = await startMariadb({ dir: path.join(folder, 'mariadb'), fast: true });
	process.env.TEST_DATABASE_URL = server.rootUrl;
	return async () => {
		await server.stop();
		delete process.env.TEST_DATABASE_URL;
		rmSync(folder, { recursive: true, force: true });
	};
}
