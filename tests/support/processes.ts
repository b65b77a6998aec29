import { spawn } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';

/** Waits until `condition` holds; false when it still does not after `deadline` ms. */
export async function until(condition: () => boolean, deadline = 15_000): Promise<boolean> {
	const end = Date.now() + deadline;
	while (!condition()) {
		if (Date.now() > end) return false;
		await new Promise((resolve) => setTimeout(resolve, 50));
	}
	return true;
}

/** Command lines of the running processes that name `text` among their arguments; those of ended ones are empty. */
export function processesNaming(text: string): string[] {
	return readdirSync('/proc')
		.filter((name) => /^\d+$/.test(name))
		.map((pid) => {
			const file = `/proc/${pid}/cmdline`;
			try {
				return existsSync(file) ? readFileSync(file, 'utf8').replaceAll('\0', ' ') : '';
			} catch {
				return '';
			}
		})
		.filter((line) => line.includes(text));
}

/** A command that runs: what it has printed so far, and its end. */
export interface Running {
	pid: number;
	output(): string;
	/** The exit code, or null when a signal ended it. */
	ended: Promise<number | null>;
	signal(name: NodeJS.Signals): void;
}

/** Starts a Node script in a session of its own, so that a signal to it reaches nobody else. */
export function startScript(
	script: string,
	args: string[],
	options: { cwd: string; env?: NodeJS.ProcessEnv }
): Running {
	const env = { ...process.env, ...options.env };
	// What this test run set for itself is not for the command under test.
	if (!options.env?.DATABASE_URL) delete env.DATABASE_URL;
	for (const name of ['PORT', 'HOST', 'ORIGIN', 'NODE_ENV', 'VITEST', 'TRAMMEL_BUILD_DIR', 'TRAMMEL_KIT_DIR']) {
		if (!options.env?.[name]) delete env[name];
	}
	const child = spawn(process.execPath, [script, ...args], {
		cwd: options.cwd,
		env,
		detached: true,
		stdio: ['ignore', 'pipe', 'pipe']
	});
	let text = '';
	child.stdout.on('data', (chunk: Buffer) => (text += chunk.toString()));
	child.stderr.on('data', (chunk: Buffer) => (text += chunk.toString()));
	const pid = child.pid;
	if (pid === undefined) throw new Error(`${script} could not be started`);
	return {
		pid,
		output: () => text,
		ended: new Promise((resolve) => child.once('close', (code) => resolve(code))),
		signal: (name) => process.kill(pid, name)
	};
}
