import path from 'node:path';
import { HouseError, lastLines, root } from './house.mjs';
import { ended, pause, spawnTied } from './processes.mjs';

const readyDeadline = 60_000; // ms

/** What the application reads from its environment, for a given address and database. */
export function webEnvironment({ port, host = '127.0.0.1', origin, databaseUrl, demo }) {
	const env = {
		...process.env,
		HOST: host,
		PORT: String(port),
		ORIGIN: origin ?? `http://localhost:${port}`,
		DATABASE_URL: databaseUrl,
		BODY_SIZE_LIMIT: process.env.BODY_SIZE_LIMIT || '2M',
		SHUTDOWN_TIMEOUT: process.env.SHUTDOWN_TIMEOUT || '5'
	};
	delete env.TRAMMEL_PRIVATE_DATABASE;
	// Published sign-ins exist only on the server that this very command made.
	if (demo) env.TRAMMEL_PRIVATE_DATABASE = '1';
	return env;
}

/** Serves a finished build, its log going to `logTo`; resolves with the child once it listens. */
export async function serveBuild({ folder = 'build', env, logTo = process.stdout }) {
	const child = spawnTied(process.execPath, [path.join(root, folder, 'index.js')], {
		cwd: root,
		env: { ...env, NODE_ENV: 'production' },
		stdio: ['ignore', 'pipe', 'pipe']
	});
	let early = '';
	let listening = false;
	const pass = (chunk) => {
		if (listening) return void logTo.write(chunk);
		early += chunk;
		if (/^Listening on /m.test(early)) listening = true;
	};
	child.stdout.on('data', pass);
	child.stderr.on('data', pass);
	await untilListening(
		child,
		() => listening,
		() => early
	);
	return child;
}

/** Serves from the sources with Vite's development server; resolves with the child once it answers. */
export async function serveSources({ env, port, host }) {
	const vite = path.join(root, 'node_modules', 'vite', 'bin', 'vite.js');
	const args = [vite, 'dev', '--port', String(port), '--strictPort', '--host', host, '--clearScreen', 'false'];
	const child = spawnTied(process.execPath, args, { cwd: root, env, stdio: ['ignore', 'inherit', 'inherit'] });
	let answered = false;
	const ask = async () => {
		while (!answered && child.exitCode === null) {
			await pause(100);
			answered = await fetch(`http://${host}:${port}/favicon.svg`).then(
				() => true,
				() => false
			);
		}
	};
	void ask();
	await untilListening(
		child,
		() => answered,
		() => ''
	);
	return child;
}

async function untilListening(child, listening, output) {
	let code = null;
	void ended(child).then((value) => (code = value));
	const end = Date.now() + readyDeadline;
	while (!listening()) {
		if (code !== null) throw new HouseError(`The application did not start:\n${lastLines(output(), 25)}`);
		if (Date.now() > end)
			throw new HouseError(
				`The application was not ready after ${readyDeadline / 1000} s.\n${lastLines(output(), 25)}`
			);
		await pause(20);
	}
}
