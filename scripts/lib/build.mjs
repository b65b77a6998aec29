import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { HouseError, dataFolder, diskFull, lastLines, root, say, saysDiskFull } from './house.mjs';
import { withLock } from './lock.mjs';
import { run } from './processes.mjs';

const sources = [
	'src',
	'static',
	'package-lock.json',
	'package.json',
	'svelte.config.js',
	'vite.config.ts',
	'tailwind.config.ts',
	'tsconfig.json'
];

/** SHA-256 over names and bytes of the given files and folders (paths from the project's folder). */
export function hashOf(entries, folder = root) {
	const hash = createHash('sha256').update(process.version);
	const visit = (entry) => {
		const full = path.join(folder, entry);
		if (!existsSync(full)) return;
		const list = readdirOrNull(full);
		if (list) return list.sort().forEach((name) => visit(`${entry}/${name}`));
		const bytes = readFileSync(full);
		hash.update(`${entry}\0${bytes.length}\0`).update(bytes);
	};
	entries.forEach(visit);
	return hash.digest('hex');
}

function readdirOrNull(full) {
	try {
		return readdirSync(full);
	} catch (error) {
		if (error.code === 'ENOTDIR') return null;
		throw error;
	}
}

/** Builds the application into build/ when its sources differ from those of the last build. */
export async function ensureBuild() {
	await withLock('build', async () => {
		const target = path.join(root, 'build');
		const hash = hashOf(sources);
		if (stampOf(target) === hash) return;
		say('Building.');
		const making = path.join(dataFolder, 'build-making');
		rmSync(making, { recursive: true, force: true });
		mkdirSync(dataFolder, { recursive: true, mode: 0o700 });
		await buildInto(path.relative(root, making));
		writeFileSync(path.join(making, '.sources'), hash);
		// Beside, then renamed: a killed build never looks like a finished one.
		rmSync(target, { recursive: true, force: true });
		renameSync(making, target);
	});
}

function stampOf(target) {
	try {
		return readFileSync(path.join(target, '.sources'), 'utf8');
	} catch {
		return null;
	}
}

/** Builds into the given folder (relative to the project's), with SvelteKit's working folder beside when given. */
export async function buildInto(folder, kitFolder) {
	const env = {
		...process.env,
		NODE_ENV: 'production',
		NO_COLOR: '1',
		FORCE_COLOR: '0',
		TRAMMEL_BUILD_DIR: folder,
		...(kitFolder ? { TRAMMEL_KIT_DIR: kitFolder } : {})
	};
	const vite = path.join(root, 'node_modules', 'vite', 'bin', 'vite.js');
	const { code, output } = await run(process.execPath, [vite, 'build', '--logLevel', 'warn'], { cwd: root, env });
	if (code === 0) return;
	throw new HouseError(saysDiskFull(output) ? diskFull() : `The build failed:\n${lastLines(output, 40)}`);
}
