import { createHash } from 'node:crypto';
import net from 'node:net';
import { root } from './house.mjs';
import { pause } from './processes.mjs';

/**
 * A lock that cannot go stale: a listener on a name the kernel frees with the process. One a checkout and purpose.
 * Gives `{ state }`, whose fields are told to whoever asks, or null when someone else holds it.
 */
export function takeLock(purpose) {
	const state = { pid: process.pid };
	return new Promise((resolve, reject) => {
		const listener = net.createServer((socket) => {
			socket.on('error', () => {});
			socket.end(JSON.stringify(state));
		});
		listener.once('error', (error) => (error.code === 'EADDRINUSE' ? resolve(null) : reject(error)));
		listener.listen(lockName(purpose), () => {
			listener.unref();
			resolve({ state, release: () => listener.close() });
		});
	});
}

/** What the holder of a lock tells about itself, or null when nobody holds it. */
export function askLock(purpose) {
	return new Promise((resolve) => {
		const socket = net.connect(lockName(purpose));
		let text = '';
		socket.setTimeout(2000, () => socket.destroy());
		socket.on('data', (chunk) => (text += chunk));
		socket.on('error', () => {});
		socket.on('close', () => {
			try {
				resolve(JSON.parse(text));
			} catch {
				resolve(null);
			}
		});
	});
}

/** Runs `work` while holding a lock, waiting for another holder to finish first. */
export async function withLock(purpose, work) {
	let lock = await takeLock(purpose);
	while (lock === null) {
		await pause(200);
		lock = await takeLock(purpose);
	}
	try {
		return await work();
	} finally {
		lock.release();
	}
}

function lockName(purpose) {
	return `\0trammel-${createHash('sha256').update(`${root}\0${purpose}`).digest('hex').slice(0, 40)}`;
}
