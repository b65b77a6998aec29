import { spawn } from 'node:child_process';
import { accessSync, constants, readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';

// A normal user's PATH on Debian leaves out the folders of system programs.
const systemFolders = ['/usr/local/sbin', '/usr/sbin', '/sbin', '/usr/bin', '/bin'];

/** Full path of a program, or null when it is not installed. */
export function findProgram(name) {
	for (const folder of [...(process.env.PATH ?? '').split(path.delimiter), ...systemFolders]) {
		if (!folder) continue;
		const candidate = path.join(folder, name);
		try {
			accessSync(candidate, constants.X_OK);
			return candidate;
		} catch {
			// Not in this folder.
		}
	}
	return null;
}

/**
 * Starts a child that ends with us: own session, so Ctrl-C reaches only us and we stop things in order; and a
 * SIGTERM from the kernel if we are killed outright, so nothing is left running.
 */
export function spawnTied(program, args, options = {}) {
	const setpriv = findProgram('setpriv');
	const [command, rest] = setpriv ? [setpriv, ['--pdeathsig', 'TERM', '--', program, ...args]] : [program, args];
	return spawn(command, rest, { detached: true, ...options });
}

/** Runs a program to its end: `{ code, output }`, both streams together. A signal counts as code 1. */
export function run(program, args, { tee = false, tied = spawnTied, ...options } = {}) {
	return new Promise((resolve, reject) => {
		const child = tied(program, args, { stdio: ['ignore', 'pipe', 'pipe'], ...options });
		let output = '';
		const keep = (chunk) => {
			output += chunk;
			if (tee) process.stdout.write(chunk);
		};
		child.stdout.on('data', keep);
		child.stderr.on('data', keep);
		child.on('error', reject);
		child.on('close', (code) => resolve({ code: code ?? 1, output }));
	});
}

/** The command line of a process as a list, or null when it is gone (or belongs to no program). */
export function commandLine(pid) {
	try {
		const words = readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').slice(0, -1);
		return words.length > 0 ? words : null;
	} catch {
		return null;
	}
}

/** When a process was started, in clock ticks since boot: with the pid it names a process for good. */
export function startTicks(pid) {
	try {
		const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
		const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
		return fields[0] === 'Z' ? null : fields[19];
	} catch {
		return null;
	}
}

/** Pids of running processes whose command line satisfies the test. */
export function findProcesses(matches) {
	return readdirSync('/proc')
		.filter((name) => /^\d+$/.test(name))
		.map(Number)
		.filter((pid) => {
			const words = commandLine(pid);
			return words !== null && matches(words);
		});
}

/** Waits. */
export const pause = (ms) => new Promise((resolve) => setTimeout(resolve, ms));

/** Asks a process to end, waits, and ends it by force past the deadline. */
export async function stopProcess(pid, { signal = 'SIGTERM', deadline = 20_000 } = {}) {
	const born = startTicks(pid);
	if (born === null) return;
	const alive = () => startTicks(pid) === born;
	try {
		process.kill(pid, signal);
		const end = Date.now() + deadline;
		while (alive() && Date.now() < end) await pause(20);
		if (alive()) process.kill(pid, 'SIGKILL');
		while (alive()) await pause(20);
	} catch (error) {
		if (error.code !== 'ESRCH') throw error;
	}
}
