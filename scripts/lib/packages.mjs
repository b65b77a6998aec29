import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { HouseError, diskFull, lastLines, root, say, saysDiskFull } from './house.mjs';
import { findProgram, run } from './processes.mjs';

/** Programs by the Debian package they come in (the installer calls my_print_defaults). `-core` brings no system service. */
const debianPackages = {
	mariadbd: 'mariadb-server-core',
	'mariadb-install-db': 'mariadb-server-core',
	my_print_defaults: 'mariadb-client-core',
	chromium: 'chromium'
};
export const databasePrograms = ['mariadbd', 'mariadb-install-db', 'my_print_defaults'];

/** Installs the Debian packages of the programs that are missing; touches neither apt nor sudo when none is. */
export async function ensurePrograms(programs) {
	const missing = programs.filter((name) => !findProgram(name));
	if (missing.length === 0) return;
	const packages = [...new Set(missing.map((name) => debianPackages[name]))];
	const byHand = `sudo apt-get install --no-install-recommends ${packages.join(' ')}`;
	const apt = findProgram('apt-get');
	if (!apt)
		throw new HouseError(
			`Missing: ${missing.join(', ')}. This is no Debian system; install them your system's way, then try again.`
		);
	const command = await asAdministrator(apt, byHand);
	say(`Installing ${packages.join(', ')} (Debian).`);
	const install = [
		'install',
		'-y',
		'--no-install-recommends',
		'--no-remove',
		'-o',
		'DPkg::Lock::Timeout=60',
		...packages
	];
	let result = await run(command[0], [...command.slice(1), ...install]);
	if (
		result.code !== 0 &&
		/Unable to locate package|has no installation candidate|404 +Not Found/.test(result.output)
	) {
		// A fresh image has no package lists, an old one stale ones. An update that reaches no server still ends with 0.
		const update = await run(command[0], [...command.slice(1), 'update', '-o', 'DPkg::Lock::Timeout=60']);
		const again = await run(command[0], [...command.slice(1), ...install]);
		result = { code: again.code, output: update.output + again.output };
	}
	if (result.code !== 0) throw new HouseError(aptFailure(result.output, byHand));
	const still = missing.filter((name) => !findProgram(name));
	if (still.length > 0) throw new HouseError(`Installed, yet not found: ${still.join(', ')}. Check with: ${byHand}`);
}

async function asAdministrator(apt, byHand) {
	const quiet = ['env', 'DEBIAN_FRONTEND=noninteractive', 'LC_ALL=C', apt];
	if (process.getuid() === 0) return quiet;
	const sudo = findProgram('sudo');
	if (sudo && (await run(sudo, ['-n', 'true'])).code === 0) return [sudo, '-n', ...quiet];
	throw new HouseError(
		`Some Debian packages are missing and installing them needs your password. Run this, then try again:\n\n  ${byHand}`
	);
}

/** What went wrong with apt, in words. */
export function aptFailure(output, byHand) {
	if (saysDiskFull(output)) return diskFull();
	if (/Could not get lock|Unable to acquire the dpkg|Unable to lock/.test(output))
		return 'Another program is installing packages right now (apt is locked). Wait until it has finished, then try again.';
	if (
		/Temporary failure resolving|Could not resolve|Could not connect|Cannot initiate the connection|Connection failed|Connection timed out|Unable to connect|Failed to fetch/.test(
			output
		)
	)
		return `The Debian package servers cannot be reached. Check the network, then try again, or run:\n\n  ${byHand}`;
	if (/dpkg was interrupted/.test(output))
		return 'An earlier installation was interrupted. Run: sudo dpkg --configure -a, then try again.';
	return `apt-get did not succeed:\n${lastLines(output)}\n\nTry it by hand:\n\n  ${byHand}`;
}

/** True when node_modules holds what package-lock.json asks for (npm keeps its own record of what it put there). */
export function packagesCurrent(folder = root) {
	const read = (file) => JSON.parse(readFileSync(path.join(folder, file), 'utf8')).packages;
	try {
		const wanted = read('package-lock.json');
		const present = read('node_modules/.package-lock.json');
		return Object.entries(wanted).every(([name, entry]) => {
			if (name === '') return true;
			// Builds for other systems are left out by npm.
			if (!present[name]) return entry.optional === true || entry.devOptional === true;
			return present[name].version === entry.version && present[name].integrity === entry.integrity;
		});
	} catch (error) {
		if (error.code === 'ENOENT' && !existsSync(path.join(folder, 'package-lock.json')))
			throw new HouseError(
				`package-lock.json is missing in ${folder}; get it back with: git checkout package-lock.json`
			);
		return false;
	}
}

/** `npm ci` when the lock file and node_modules differ; tells whether it ran. */
export async function ensurePackages() {
	if (packagesCurrent()) return false;
	const npm = findProgram('npm');
	if (!npm) throw new HouseError('npm is not in PATH; it comes with Node. Check the Node installation.');
	say('Installing packages (npm ci).');
	const { code, output } = await run(npm, ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'], {
		cwd: root,
		// It undoes its work when asked to stop, which takes long and serves nothing: the next npm ci starts from nothing.
		patience: 1_000
	});
	if (code !== 0) throw new HouseError(npmFailure(output));
	return true;
}

/** What went wrong with npm, in words. */
export function npmFailure(output) {
	if (saysDiskFull(output)) return diskFull();
	if (/ENOTFOUND|EAI_AGAIN|ECONNREFUSED|ECONNRESET|ETIMEDOUT|ENETUNREACH|network/i.test(output))
		return `The npm registry cannot be reached. Check the network, then try again.\n${lastLines(output, 3)}`;
	if (/EACCES|EPERM/.test(output))
		return `npm may not write in ${root}. Run this as the user who owns the project folder.`;
	return `npm ci did not succeed:\n${lastLines(output)}`;
}
