import net from 'node:net';
import { HouseError } from './house.mjs';

/** Opens and closes a listener; gives the port it got, or null when the port is taken. */
function probe(port, host) {
	return new Promise((resolve) => {
		const listener = net.createServer();
		listener.once('error', () => resolve(null));
		listener.listen({ port, host, exclusive: true }, () => {
			const got = listener.address().port;
			listener.close(() => resolve(got));
		});
	});
}

/** True when nothing listens on this loopback port. A program on the wildcard address or on ::1 counts as taken. */
export async function isFree(port) {
	const heard = await Promise.all(['127.0.0.1', '::1'].map((host) => answers(port, host)));
	return !heard.includes(true) && (await probe(port, '127.0.0.1')) !== null;
}

function answers(port, host) {
	return new Promise((resolve) => {
		const socket = net.connect({ port, host });
		socket.setTimeout(500, () => done(true));
		socket.once('connect', () => done(true));
		socket.once('error', () => done(false));
		function done(result) {
			socket.destroy();
			resolve(result);
		}
	});
}

/** A free loopback port chosen by the system. */
export async function anyFreePort() {
	return await probe(0, '127.0.0.1');
}

/** The first free port from `wanted` on. */
export async function firstFreePort(wanted, tries = 50) {
	for (let port = wanted; port < wanted + tries; port++) if (await isFree(port)) return port;
	throw new HouseError(`Ports ${wanted} to ${wanted + tries - 1} are all taken. Set PORT to a free one.`);
}
