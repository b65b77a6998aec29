import path from 'node:path';
import { parseArgs } from 'node:util';
import { HouseError, dataFolder, root, say } from './house.mjs';
import { takeLock } from './lock.mjs';
import { startMariadb, stopMariadb } from './mariadb.mjs';
import { databasePrograms, ensurePackages, ensurePrograms } from './packages.mjs';
import { migrateWithCopy, migrationSteps } from './schema.mjs';
import { readSettings } from './settings.mjs';

const usage = `node scripts/database.mjs <command>
  start [--dir folder] [--port n]   a private MariaDB for tests by hand; runs until Ctrl-C, prints its addresses
  stop [--dir folder]               stops it
  migrate                           applies pending migrations (npm run migrate)
  seed                              adds what is missing of the demo (npm run seed); private server only
The folder is .test/mariadb unless given. migrate uses DATABASE_URL, or the private server of npm start.`;

const privateFolder = path.join(dataFolder, 'mariadb');
const copies = path.join(dataFolder, 'copies');

/** Runs one command; gives the exit code. */
export async function databaseCommand(args) {
	const { values, positionals } = parseArgs({
		args,
		allowPositionals: true,
		options: { dir: { type: 'string' }, port: { type: 'string' } }
	});
	const dir = path.resolve(values.dir ?? path.join(root, '.test', 'mariadb'));
	const commands = {
		start: () => runServer(dir, values.port === undefined ? undefined : Number(values.port)),
		stop: async () => say((await stopMariadb(dir)) ? 'Stopped.' : 'No server was running on that folder.'),
		migrate,
		seed
	};
	const command = commands[positionals[0]];
	if (!command || positionals.length > 1) throw new HouseError(usage);
	await command();
	return 0;
}

async function runServer(dir, port) {
	const server = await startMariadb({ dir, port, fast: true });
	say(`DATABASE_URL=${server.url}\nTEST_DATABASE_URL=${server.rootUrl}\nProcess ${server.pid}; Ctrl-C stops it.`);
	throw new HouseError(`The database server ended by itself:\n${await server.exited}`);
}

async function migrate() {
	await ensurePackages();
	const { databaseUrl } = readSettings();
	const names = databaseUrl
		? (await migrationSteps(databaseUrl, 'up')).up
		: (await onPrivateServer((server) => migrateWithCopy(server, copies))).names;
	say(names.length === 0 ? 'Nothing to migrate.' : `Migrated: ${names.join(', ')}`);
}

async function seed() {
	if (readSettings().databaseUrl)
		throw new HouseError(
			'The demo goes only into the private server: its passwords are published. Unset DATABASE_URL to seed that one.'
		);
	await ensurePackages();
	await onPrivateServer((server) => migrationSteps(server.url, 'up', 'seed'));
	say('The demo is complete.');
}

/** Works on the private server, which must not be in use: it may have to be stopped for a copy of its data. */
async function onPrivateServer(work) {
	await ensurePrograms(databasePrograms);
	const lock = await takeLock('start');
	if (lock === null)
		throw new HouseError(
			'Trammel is running. Stop it first (Ctrl-C in its terminal); npm start migrates by itself too.'
		);
	return await work(await startMariadb({ dir: privateFolder }));
}
