import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { ensureBuild } from './build.mjs';
import { HouseError, dataFolder, root, say } from './house.mjs';
import { askLock, takeLock } from './lock.mjs';
import { checkOwner } from './mariadb-folder.mjs';
import { startMariadb } from './mariadb.mjs';
import { databasePrograms, ensurePackages, ensurePrograms } from './packages.mjs';
import { firstFreePort, isFree } from './ports.mjs';
import { ended } from './processes.mjs';
import { migrationSteps, prepareSchema } from './schema.mjs';
import { readSettings } from './settings.mjs';
import { serveBuild, serveSources, webEnvironment } from './web.mjs';

const usualPort = 4173;

/** `npm start` and, with `dev`, `npm run dev`: everything from a fresh clone to a served address; runs until stopped. */
export async function start({ dev }) {
	const settings = readSettings();
	return settings.databaseUrl ? await onGivenDatabase(settings, dev) : await onPrivateDatabase(settings, dev);
}

async function onPrivateDatabase(settings, dev) {
	checkOwner(dataFolder);
	const lock = await takeLock('start');
	if (lock === null) throw new HouseError(alreadyRunning(await askLock('start')));
	mkdirSync(dataFolder, { recursive: true, mode: 0o700 });
	await ensurePrograms(databasePrograms);
	await ensurePackages();
	const [server] = await Promise.all([privateDatabase(), dev ? undefined : ensureBuild()]);
	const { child, url } = await serve({ settings, dev, databaseUrl: server.url, demo: true });
	lock.state.url = url;
	say(`\nTrammel is at ${url}\nThe demo's sign-ins are on the sign-in page. Ctrl-C stops it.`);
	return await Promise.race([
		server.exited.then((lines) => {
			throw new HouseError(`The private database server ended by itself:\n${lines}`);
		}),
		untilGone(child)
	]);
}

async function privateDatabase() {
	const server = await startMariadb({ dir: path.join(dataFolder, 'mariadb') });
	return await prepareSchema(server, path.join(dataFolder, 'copies'));
}

/** A database someone else looks after: nothing is started, seeded or migrated on it. */
async function onGivenDatabase(settings, dev) {
	await ensurePackages();
	if (!dev) await ensureBuild();
	const { pending } = await migrationSteps(settings.databaseUrl, 'pending');
	if (pending.length > 0) {
		throw new HouseError(
			`The database of DATABASE_URL lacks ${pending.length} migration${pending.length === 1 ? '' : 's'} (${pending[0]}${pending.length > 1 ? ' …' : ''}). ` +
				'Back it up, then run: npm run migrate'
		);
	}
	const { child, url } = await serve({ settings, dev, databaseUrl: settings.databaseUrl, demo: false });
	say(`\nTrammel is at ${url}. Ctrl-C stops it.`);
	return await untilGone(child);
}

async function serve({ settings, dev, databaseUrl, demo }) {
	const port = await choosePort(settings.port);
	const url = settings.origin ?? `http://localhost:${port}`;
	const env = webEnvironment({ port, host: settings.host, origin: url, databaseUrl, demo });
	const child = dev ? await serveSources({ env, port, host: settings.host }) : await serveBuild({ env });
	return { child, url };
}

async function choosePort(wanted) {
	if (wanted === null) {
		const port = await firstFreePort(usualPort);
		if (port !== usualPort) say(`Port ${usualPort} is taken; using ${port}.`);
		return port;
	}
	if (!(await isFree(wanted)))
		throw new HouseError(`PORT=${wanted} is taken by another program. Choose another, or leave PORT out.`);
	return wanted;
}

async function untilGone(child) {
	const code = await ended(child);
	throw new HouseError(`The application ended by itself (code ${code}).`);
}

function alreadyRunning(holder) {
	const process = holder ? ` (process ${holder.pid})` : '';
	if (holder?.url)
		return `Trammel already runs from ${root}: ${holder.url}${process}. Stop that one first to start anew.`;
	return `Trammel is already being started from ${root}${process}. Wait for it, or stop it first.`;
}
