import { randomBytes } from 'node:crypto';
import {
	existsSync,
	mkdirSync,
	readFileSync,
	readdirSync,
	renameSync,
	rmSync,
	statSync,
	statfsSync,
	writeFileSync
} from 'node:fs';
import { userInfo } from 'node:os';
import path from 'node:path';
import { HouseError, diskFull, lastLines, saysDiskFull, say } from './house.mjs';
import { findProgram, run } from './processes.mjs';

const roomNeeded = 300 * 1024 * 1024; // bytes: a fresh server takes about half of it

/** The installed server's series, such as "10.11"; data folders move between releases of one series only. */
export async function installedSeries(mariadbd) {
	const { output } = await run(mariadbd, ['--no-defaults', '--version']);
	const series = /Ver (\d+\.\d+)/.exec(output)?.[1];
	if (!series)
		throw new HouseError(
			`${mariadbd} does not say its version. Reinstall it: apt-get install --reinstall mariadb-server-core`
		);
	return series;
}

/** The program, or a message that names the package it comes in. */
export function requireProgram(name, debianPackage) {
	const found = findProgram(name);
	if (!found) throw new HouseError(`${name} is not installed. Install it with: apt-get install ${debianPackage}`);
	return found;
}

/** Refuses a folder that belongs to another user: files of two owners in one data folder lock both out. */
export function checkOwner(folder) {
	if (!existsSync(folder)) return;
	const owner = statSync(folder).uid;
	const { uid, username } = userInfo();
	if (owner === uid) return;
	throw new HouseError(
		`${folder} belongs to another user (uid ${owner}); you are ${username} (uid ${uid}). ` +
			`Run this as that user, or give the folder to yourself: sudo chown -R ${username} '${folder}'`
	);
}

/**
 * Makes sure `dir` holds a complete data folder: `{ data, series, credentials }`. A new one is made beside and
 * renamed when complete, so a killed first start leaves only a leftover that the next one clears.
 */
export async function prepareFolder(dir, mariadbd) {
	const series = await installedSeries(mariadbd);
	checkOwner(path.dirname(dir));
	checkOwner(dir);
	clearLeftovers(dir);
	if (existsSync(dir) && !isComplete(dir)) setAside(dir);
	if (!existsSync(dir)) await initialise(dir, series);
	const made = JSON.parse(readFileSync(path.join(dir, 'server.json'), 'utf8'));
	if (made.series !== series) {
		throw new HouseError(
			`The data in ${dir} was written by MariaDB ${made.series}; this machine has ${series}. ` +
				`Install MariaDB ${made.series}, or rename that folder to start with fresh data.`
		);
	}
	return { data: path.join(dir, 'data'), series, credentials: made };
}

function isComplete(dir) {
	try {
		const made = JSON.parse(readFileSync(path.join(dir, 'server.json'), 'utf8'));
		return (
			typeof made.series === 'string' &&
			existsSync(path.join(dir, 'data', 'ibdata1')) &&
			existsSync(path.join(dir, 'data', 'mysql'))
		);
	} catch {
		return false;
	}
}

function clearLeftovers(dir) {
	const parent = path.dirname(dir);
	if (!existsSync(parent)) return;
	const prefix = `${path.basename(dir)}.making-`;
	for (const name of readdirSync(parent))
		if (name.startsWith(prefix)) rmSync(path.join(parent, name), { recursive: true, force: true });
}

/** An unusable folder is kept under another name: there may be something in it worth having. */
function setAside(dir) {
	const aside = `${dir}.incomplete-${new Date().toISOString().replace(/[:.]/g, '-')}`;
	renameSync(dir, aside);
	say(`${dir} was not a complete data folder; it is kept as ${path.basename(aside)} and a new one is made.`);
}

async function initialise(dir, series) {
	const installer = requireProgram('mariadb-install-db', 'mariadb-server-core');
	const parent = path.dirname(dir);
	mkdirSync(parent, { recursive: true, mode: 0o700 });
	const { bavail, bsize } = statfsSync(parent);
	if (bavail * bsize < roomNeeded) throw new HouseError(diskFull(parent));
	const making = `${dir}.making-${process.pid}`;
	mkdirSync(path.join(making, 'tmp'), { recursive: true, mode: 0o700 });
	say('Preparing a private database server (first time only).');
	// "./data" and not the full path: the installer is a shell script that trips over spaces.
	const args = [
		'--no-defaults',
		'--datadir=./data',
		'--auth-root-authentication-method=socket',
		'--skip-test-db',
		...asRoot()
	];
	const { code, output } = await run(
		installer,
		[...args, '--character-set-server=utf8mb4', '--innodb-log-file-size=16M'],
		{
			cwd: making
		}
	);
	if (code !== 0) {
		rmSync(making, { recursive: true, force: true });
		throw new HouseError(describeFailure(output, `mariadb-install-db failed:\n${lastLines(output)}`));
	}
	const secret = () => randomBytes(24).toString('hex');
	writeFileSync(
		path.join(making, 'server.json'),
		JSON.stringify({ series, password: secret(), adminPassword: secret() }),
		{ mode: 0o600 }
	);
	renameSync(making, dir);
}

/** mariadbd refuses to run as root unless told so. */
export function asRoot() {
	return process.getuid() === 0 ? ['--user=root'] : [];
}

/** A known cause found in a server's output, in words; otherwise the given text. */
export function describeFailure(output, otherwise) {
	if (saysDiskFull(output)) return diskFull();
	if (/Unable to lock \.\/ibdata1|Can't lock aria control file/.test(output))
		return 'Another database server uses this data folder (perhaps one in a container). Stop it, then try again.';
	return otherwise;
}
