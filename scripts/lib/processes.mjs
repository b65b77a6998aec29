import { spawn } from 'node:child_process';
import { accessSync, constants, readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { HouseError } from './house.mjs';

// A normal user's PATH on Debian leaves out the folders of system programs.
const systemFolders = ['/usr/local/sbin', '/usr/sbin', '/sbin', '/usr/bin', '/bin'];

/** Children that still run, oldest first, with the time each gets to end when asked. */
const children = [];
let stopping = false;

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
 * Starts a child that ends with us. It has a session of its own, so Ctrl-C reaches us alone and things are stopped in
 * order; and the kernel sends it SIGTERM should we be killed outright, so nothing is left running. `patience` (ms) is
 * how long it may take to end when asked, before it is ended by force.
 */
export function spawnTied(program, args, { patience = 8_000, ...options } = {}) {
	if (stopping) throw new HouseError('Stopping.');
	const setpriv = findProgram('setpriv');
	const [command, rest] = setpriv ? [setpriv, ['--pdeathsig', 'TERM', '--', program, ...args]] : [program, args];
	const child = spawn(command, rest, { detached: true, ...options });
	children.push({ child, patience });
	child.once('exit', () => forget(child));
	child.once('error', () => forget(child));
	return child;
}

function forget(child) {
	const index = children.findIndex((entry) => entry.child === child);
	if (index >= 0) children.splice(index, 1);
}

/** Runs a program to its end: `{ code, output }`, both streams together. A signal counts as code 1. */
export function run(program, args, { tee = false, ...options } = {}) {
	return new Promise((resolve, reject) => {
		const child = spawnTied(program, args, { stdio: ['ignore', 'pipe', 'pipe'], ...options });
		let output = '';
		const keep = (chunk) => {
			output += chunk;
			if (tee) process.stdout.write(chunk);
		};
		child.stdout.on('data', keep);
		child.stderr.on('data', keep);
		child.once('error', reject);
		child.once('close', (code) => resolve({ code: code ?? 1, output }));
	});
}

/** Resolves with the exit code of a child (1 for a signal), also when it has ended already. */
export function ended(child) {
	if (child.exitCode !== null || child.signalCode !== null) return Promise.resolve(child.exitCode ?? 1);
	return new Promise((resolve) => {
		child.once('exit', (code) => resolve(code ?? 1));
		child.once('error', () => resolve(1));
	});
}

/** The command line of a process as a list, or null when it is gone. */
export function commandLine(pid) {
	try {
		const words = readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').slice(0, -1);
		return words.length > 0 ? words : null;
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

/** When a process was started, in clock ticks since boot; with the pid it names a process for good. Null when gone. */
export function startTicks(pid) {
	try {
		const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
		const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
		return fields[0] === 'Z' ? null : fields[19];
	} catch {
		return null;
	}
}

/** Waits. */
export const pause = (ms) => new Promise((resolve) => setTimeout(resolve, ms));

/** Asks a process (or, with `group`, it and its own children) to end; past the deadline, by force. */
export async function stopProcess(pid, { signal = 'SIGTERM', deadline = 20_000, group = false } = {}) {
	const born = startTicks(pid);
	if (born === null) return;
	const alive = () => startTicks(pid) === born;
	const send = (what) => {
		try {
			process.kill(group ? -pid : pid, what);
		} catch (error) {
			if (error.code !== 'ESRCH') throw error;
		}
	};
	send(signal);
	const end = Date.now() + deadline;
	while (alive() && Date.now() < end) await pause(20);
	// With a group also once the leader is gone: what it started goes too.
	if (alive() || group) send('SIGKILL');
	while (alive()) await pause(20);
}

/** Stops every child, youngest first, and lets none be started afterwards. */
export async function stopChildren() {
	stopping = true;
	for (const { child, patience } of [...children].reverse()) {
		if (child.pid) await stopProcess(child.pid, { group: true, deadline: patience });
	}
}

/** The impatient second Ctrl-C: everything goes at once. The database recovers at its next start. */
export function killChildren() {
	stopping = true;
	for (const { child } of children) {
		try {
			if (child.pid) process.kill(-child.pid, 'SIGKILL');
		} catch {
			// It has just gone by itself.
		}
	}
}
