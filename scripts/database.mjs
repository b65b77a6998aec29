import path from 'node:path';
import { parseArgs } from 'node:util';
import { HouseError, complain, root, say } from './lib/house.mjs';
import { startMariadb, stopMariadb } from './lib/mariadb.mjs';

const usage = `A private MariaDB for development and tests.
  node scripts/database.mjs start [--dir folder] [--port n]   runs until Ctrl-C; prints DATABASE_URL and TEST_DATABASE_URL
  node scripts/database.mjs stop [--dir folder]
The folder is .test/mariadb unless given.`;

async function start({ dir, port }) {
	const server = await startMariadb({ dir, port: port === undefined ? undefined : Number(port), fast: true });
	say(`DATABASE_URL=${server.url}`);
	say(`TEST_DATABASE_URL=${server.rootUrl}`);
	say(`Process ${server.pid}; Ctrl-C stops it.`);
	const asked = new Promise((resolve) => {
		for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.once(signal, () => resolve(null));
	});
	const lines = await Promise.race([asked, server.exited]);
	if (lines !== null) throw new HouseError(`The database server ended by itself:\n${lines}`);
	await server.stop();
}

async function main() {
	const { values, positionals } = parseArgs({
		allowPositionals: true,
		options: { dir: { type: 'string' }, port: { type: 'string' } }
	});
	const dir = path.resolve(values.dir ?? path.join(root, '.test', 'mariadb'));
	if (positionals[0] === 'start') await start({ dir, port: values.port });
	else if (positionals[0] === 'stop')
		say((await stopMariadb(dir)) ? 'Stopped.' : 'No server was running on that folder.');
	else throw new HouseError(usage);
}

main().catch((error) => {
	complain(error);
	process.exitCode = 1;
});
