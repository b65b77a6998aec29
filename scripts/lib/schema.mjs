import {
	constants,
	existsSync,
	mkdirSync,
	readFileSync,
	readdirSync,
	renameSync,
	rmSync,
	writeFileSync
} from 'node:fs';
import { cp } from 'node:fs/promises';
import path from 'node:path';
import { hashOf } from './build.mjs';
import { HouseError, diskFull, lastLines, root, say, saysDiskFull } from './house.mjs';
import { startMariadb } from './mariadb.mjs';
import { run } from './processes.mjs';

const copiesKept = 5;

/** Runs migration steps (`pending`, `up`, `seed`, `down=<name>`) on a database; gives the names per step. */
export async function migrationSteps(databaseUrl, ...steps) {
	const { code, output } = await run(process.execPath, ['--import', 'tsx', 'scripts/lib/migrate-cli.ts', ...steps], {
		cwd: root,
		env: { ...process.env, DATABASE_URL: databaseUrl }
	});
	if (code !== 0) throw new HouseError(saysDiskFull(output) ? diskFull() : lastLines(output, 25));
	return JSON.parse(lastLines(output, 1));
}

/**
 * Brings the private server's database up to date: nothing when the migrations are those of last time; otherwise a
 * copy of what is there, the pending ones, and the demo once. The notes about it live in the server's own folder,
 * so they go where the data goes. Gives the server, which is another one when it was stopped for the copy.
 */
export async function prepareSchema(server, copies) {
	const notes = { schema: path.join(server.dir, 'schema'), seeded: path.join(server.dir, 'seeded') };
	const hash = hashOf(['migrations']);
	const known = existsSync(notes.schema) ? readFileSync(notes.schema, 'utf8') : null;
	const seeded = existsSync(notes.seeded);
	if (known === hash && seeded) return server;
	let current = server;
	if (known === null) await migrationSteps(server.url, 'up');
	else if (known !== hash) current = (await migrateWithCopy(server, copies)).server;
	writeFileSync(notes.schema, hash);
	if (seeded) return current;
	await migrationSteps(current.url, 'seed');
	writeFileSync(notes.seeded, new Date().toISOString());
	return current;
}

/** Applies what is pending on a private server, after copying its data; gives `{ server, names }`. */
export async function migrateWithCopy(server, copies) {
	const { pending } = await migrationSteps(server.url, 'pending');
	if (pending.length === 0) return { server, names: [] };
	await server.stop();
	const copy = await copyData(server.dir, copies);
	const kept = path.relative(root, copy);
	say(
		`Migrating the database. A copy from before is kept in ${kept}; to go back, put it in the place of ${path.relative(root, server.dir)}.`
	);
	const restarted = await startMariadb({ dir: server.dir });
	return { server: restarted, names: (await migrationSteps(restarted.url, 'up')).up };
}

/** Copies the data folder of a stopped server; the oldest copies beyond five go. Gives the copy's folder. */
async function copyData(dir, copies) {
	mkdirSync(copies, { recursive: true, mode: 0o700 });
	const target = path.join(copies, new Date().toISOString().replace(/[:.]/g, '-'));
	await cp(dir, `${target}.part`, { recursive: true, mode: constants.COPYFILE_FICLONE, preserveTimestamps: true });
	renameSync(`${target}.part`, target);
	const old = readdirSync(copies).sort().slice(0, -copiesKept);
	for (const name of old) rmSync(path.join(copies, name), { recursive: true, force: true });
	return target;
}
