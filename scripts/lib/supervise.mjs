import { inWords, say } from './house.mjs';
import { killChildren, stopChildren } from './processes.mjs';

/**
 * Runs a command: `work()` gives the exit code. Ctrl-C, SIGTERM and a closed terminal end it at any moment; whatever
 * way it ends, every child is stopped and every cleanup registered with `atEnd` has run before the process is gone.
 */
export async function supervise(work, { interrupted = 130 } = {}) {
	let signals = 0;
	const asked = new Promise((resolve) => {
		for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
			process.on(signal, () => {
				if (++signals > 1) killChildren();
				else resolve(signal);
			});
		}
	});
	// A reader that went away (a closed pipe or terminal) must not keep the children from being stopped.
	for (const stream of [process.stdout, process.stderr]) stream.on('error', () => {});
	const cleanups = [];
	const atEnd = (cleanup) => cleanups.push(cleanup);
	const stopped = asked.then((signal) => {
		say(`\nStopping (${signal}).`);
		return typeof interrupted === 'function' ? interrupted() : interrupted;
	});
	let code = 1;
	try {
		code = await Promise.race([work({ atEnd }), stopped]);
	} catch (error) {
		process.stderr.write(`\n${inWords(error)}\n`);
	}
	await stopChildren();
	for (const cleanup of cleanups.reverse()) await cleanup();
	process.exit(code);
}
