import {
	chownSync,
	existsSync,
	mkdirSync,
	mkdtempSync,
	readFileSync,
	readdirSync,
	realpathSync,
	rmSync,
	writeFileSync
} from 'node:fs';
import net from 'node:net';
import os from 'node:os';
import path from 'node:path';
import * as mariadb from 'mariadb';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { startMariadb } from '../../../scripts/lib/mariadb.mjs';
import { processesNaming, startScript, until } from '../../support/processes';

let parent: string;
let dir: string;
let running: { stop(): Promise<void> }[] = [];

beforeEach(() => {
	parent = realpathSync(mkdtempSync(path.join(os.tmpdir(), 'trammel data ')));
	dir = path.join(parent, 'mariadb');
});

afterEach(async () => {
	for (const server of running) await server.stop();
	running = [];
	rmSync(parent, { recursive: true, force: true });
});

async function start(options: { port?: number; fast?: boolean } = {}) {
	const server = await startMariadb({ dir, fast: true, ...options });
	running.push(server);
	return server;
}

async function ask(url: string, sql: string): Promise<unknown[]> {
	const connection = await mariadb.createConnection(url);
	try {
		return await connection.query(sql);
	} finally {
		await connection.end();
	}
}

describe('a private server', () => {
	test('keeps its data between starts, on loopback only, with a user for the application alone', async () => {
		const first = await start({ fast: false });
		await ask(first.url, 'CREATE TABLE kept (id INT PRIMARY KEY)');
		await ask(first.url, 'INSERT INTO kept VALUES (7)');
		expect(await ask(first.rootUrl, 'SELECT @@bind_address AS address, @@character_set_server AS letters')).toEqual([
			{ address: '127.0.0.1', letters: 'utf8mb4' }
		]);
		await expect(ask(first.url, 'CREATE DATABASE elsewhere')).rejects.toThrow(/denied/i);
		await first.stop();
		expect(processesNaming(parent)).toEqual([]);
		const second = await start({ fast: false });
		expect(await ask(second.url, 'SELECT id FROM kept')).toEqual([{ id: 7 }]);
	});

	test('a first start that was killed half-way leaves a leftover that the next one clears', async () => {
		const leftover = `${dir}.making-999999`;
		mkdirSync(path.join(leftover, 'data'), { recursive: true });
		await start();
		expect(readdirSync(parent)).toEqual(['mariadb']);
	});

	test('an incomplete data folder is kept under another name and a new one is made', async () => {
		mkdirSync(path.join(dir, 'data', 'mysql'), { recursive: true });
		writeFileSync(path.join(dir, 'data', 'aria_log_control'), 'half');
		const server = await start();
		expect(await ask(server.url, 'SELECT 1 AS one')).toEqual([{ one: 1 }]);
		const aside = readdirSync(parent).filter((name) => name.startsWith('mariadb.incomplete-'));
		expect(aside).toHaveLength(1);
		expect(readFileSync(path.join(parent, aside[0] ?? '', 'data', 'aria_log_control'), 'utf8')).toBe('half');
	});

	test('data of another MariaDB series is refused by both names and left as it is', async () => {
		await (await start()).stop();
		const note = path.join(dir, 'server.json');
		const made = JSON.parse(readFileSync(note, 'utf8')) as { series: string };
		writeFileSync(note, JSON.stringify({ ...made, series: '9.9' }));
		await expect(start()).rejects.toThrow(
			new RegExp(`written by MariaDB 9\\.9; this machine has ${made.series.replace('.', '\\.')}`)
		);
		expect(existsSync(path.join(dir, 'data', 'ibdata1'))).toBe(true);
	});

	test('a taken port is refused before anything is started', async () => {
		const other = net.createServer();
		const port = await new Promise<number>((resolve) => {
			other.listen(0, '127.0.0.1', () => resolve((other.address() as net.AddressInfo).port));
		});
		try {
			await expect(start({ port })).rejects.toThrow(`Port ${port} is taken`);
			expect(processesNaming(parent)).toEqual([]);
		} finally {
			other.close();
		}
	});

	test.skipIf(process.getuid?.() !== 0)(
		"a folder of another user's is refused with the command that would do",
		async () => {
			mkdirSync(dir);
			chownSync(dir, 65534, 65534);
			await expect(start()).rejects.toThrow(/belongs to another user \(uid 65534\).*chown/);
			expect(readdirSync(dir)).toEqual([]);
		}
	);

	test('ends with the process that started it, also when that one is killed', async () => {
		const command = startScript(path.resolve('scripts/database.mjs'), ['start', '--dir', dir], { cwd: parent });
		expect(await until(() => command.output().includes('Ctrl-C stops it'), 30_000), command.output()).toBe(true);
		const url = /^DATABASE_URL=(.*)$/m.exec(command.output())?.[1] ?? '';
		await ask(url, 'CREATE TABLE kept (id INT PRIMARY KEY)');
		command.signal('SIGKILL');
		await command.ended;
		const next = await start();
		expect(await ask(next.url, 'SHOW TABLES')).toHaveLength(1);
		await next.stop();
		expect(processesNaming(parent)).toEqual([]);
	});
});
