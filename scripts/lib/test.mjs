import { createWriteStream, mkdirSync, readdirSync, rmSync } from 'node:fs';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { buildInto } from './build.mjs';
import { closingLine, add, countReport, none, readPlaywright, readVitest } from './counts.mjs';
import { HouseError, inWords, root, say } from './house.mjs';
import { askLock } from './lock.mjs';
import { startMariadb } from './mariadb.mjs';
import { databasePrograms, ensurePackages, ensurePrograms, packagesCurrent } from './packages.mjs';
import { firstFreePort } from './ports.mjs';
import { ended, run, spawnTied, startTicks, stopProcess } from './processes.mjs';
import { migrationSteps } from './schema.mjs';
import { serveBuild, webEnvironment } from './web.mjs';

const vitestProjects = ['unit', 'component', 'server'];
const kinds = [...vitestProjects, 'e2e'];
const runnerDeadline = 25 * 60_000; // ms; a runner that hangs counts as crashed

const usage = `npm test [-- --only=${kinds.join('|')}[,…]] [file …]
npm run screens [-- file …]`;

/** `npm test` and `npm run screens`: sets up, runs every runner, prints the sum as the last line; gives the exit code. */
export async function test(args, { atEnd }) {
	const { only, screens, files } = readArguments(args);
	const browser = screens || only.includes('e2e');
	const projects = only.filter((kind) => vitestProjects.includes(kind));
	await setUp({ browser, database: browser || only.includes('server') });
	const folder = runFolder(atEnd);
	const kitFolder = path.relative(root, path.join(folder, 'kit'));
	const server =
		browser || only.includes('server') ? await startMariadb({ dir: path.join(folder, 'mariadb'), fast: true }) : null;
	const building = browser ? settled(buildInto(path.relative(root, path.join(folder, 'build')), kitFolder)) : null;
	let counts = projects.length > 0 ? await runVitest({ projects, files, folder, server }) : none;
	if (browser)
		counts = add(
			counts,
			await runBrowserTests({ building, folder, server, files, project: screens ? 'screens' : 'e2e' })
		);
	say(`\n${closingLine(counts)}`);
	return counts.failed > 0 || counts.passed === 0 ? 1 : 0;
}

function readArguments(args) {
	let parsed;
	try {
		parsed = parseArgs({
			args,
			allowPositionals: true,
			options: { only: { type: 'string' }, screens: { type: 'boolean' } }
		});
	} catch (error) {
		throw new HouseError(`${error.message}\n${usage}`);
	}
	const { only, screens = false } = parsed.values;
	const chosen = screens ? [] : (only?.split(',') ?? kinds);
	const unknown = chosen.find((kind) => !kinds.includes(kind));
	if (unknown !== undefined) throw new HouseError(`--only=${unknown} is no kind of test.\n${usage}`);
	return { only: chosen, screens, files: parsed.positionals };
}

async function setUp({ browser, database }) {
	await ensurePrograms([...(database ? databasePrograms : []), ...(browser ? ['chromium'] : [])]);
	if (!packagesCurrent() && (await askLock('start')) !== null)
		throw new HouseError(
			'The packages have to be installed anew, and Trammel is running on them. Stop it (Ctrl-C), then try again.'
		);
	await ensurePackages();
	// tsconfig.json extends a file that SvelteKit writes.
	const sync = await run(
		process.execPath,
		[path.join(root, 'node_modules', '@sveltejs', 'kit', 'svelte-kit.js'), 'sync'],
		{ cwd: root }
	);
	if (sync.code !== 0) throw new HouseError(`svelte-kit sync failed:\n${sync.output}`);
}

/** A folder of this run alone under .test/, gone at its end; those of killed runs are cleared. */
function runFolder(atEnd) {
	const parent = path.join(root, '.test');
	mkdirSync(parent, { recursive: true });
	for (const name of readdirSync(parent)) {
		const match = /^run-(\d+)-(\d+)$/.exec(name);
		if (match && startTicks(Number(match[1])) !== match[2])
			rmSync(path.join(parent, name), { recursive: true, force: true });
	}
	const folder = path.join(parent, `run-${process.pid}-${startTicks(process.pid)}`);
	mkdirSync(folder);
	atEnd(() => rmSync(folder, { recursive: true, force: true, maxRetries: 3 }));
	return folder;
}

async function runVitest({ projects, files, folder, server }) {
	const report = path.join(folder, 'vitest.json');
	const args = [
		path.join(root, 'node_modules', 'vitest', 'vitest.mjs'),
		'run',
		...projects.flatMap((name) => ['--project', name]),
		'--reporter=default',
		'--reporter=json',
		`--outputFile.json=${report}`,
		...files
	];
	const code = await runRunner(args, server ? { TEST_DATABASE_URL: server.rootUrl } : {});
	return countReport(report, readVitest, code);
}

async function runBrowserTests({ building, folder, server, files, project }) {
	const report = path.join(folder, 'playwright.json');
	try {
		await building;
		const { url, child } = await serveForTests(folder, server);
		const args = [
			path.join(root, 'node_modules', '@playwright', 'test', 'cli.js'),
			'test',
			`--project=${project}`,
			...files
		];
		const env = {
			TRAMMEL_URL: url,
			TRAMMEL_REPORT: report,
			TEST_DATABASE_URL: server.rootUrl,
			DATABASE_URL: server.url
		};
		const code = await runRunner(args, env);
		const crashed = child.exitCode !== null || child.signalCode !== null;
		if (crashed) say('\nThe application ended during the browser tests.');
		return add(countReport(report, readPlaywright, code), { ...none, failed: crashed ? 1 : 0 });
	} catch (error) {
		say(`\nThe browser tests could not run.\n${inWords(error)}`);
		return { ...none, failed: 1 };
	}
}

/** The application as `npm start` serves it, demo included, on a database and a port of this run. */
async function serveForTests(folder, server) {
	await migrationSteps(server.url, 'up', 'seed');
	const port = await firstFreePort(4300);
	const env = webEnvironment({ port, databaseUrl: server.url, origin: `http://localhost:${port}`, demo: true });
	// Kept after the run, out of the way of the runner's own lines.
	const logTo = createWriteStream(path.join(root, '.test', 'application.log'));
	const child = await serveBuild({ folder: path.relative(root, path.join(folder, 'build')), env, logTo });
	return { url: `http://localhost:${port}`, child };
}

async function runRunner(args, env) {
	const child = spawnTied(process.execPath, args, {
		cwd: root,
		env: { ...process.env, ...env },
		stdio: ['ignore', 'inherit', 'inherit']
	});
	const timer = setTimeout(() => {
		say(`\nNo end after ${runnerDeadline / 60_000} minutes; stopping this runner.`);
		void stopProcess(child.pid, { group: true });
	}, runnerDeadline);
	const code = await ended(child);
	clearTimeout(timer);
	return code;
}

/** Keeps a failure until it is asked for: the build may fail while other tests still run. */
function settled(promise) {
	promise.catch(() => {});
	return promise;
}
