import { existsSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import net from 'node:net';
import os from 'node:os';
import path from 'node:path';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { copyProject } from '../../support/copy';
import { createTestDatabase } from '../../support/db';
import { processesNaming, startScript, until, type Running } from '../../support/processes';

// One copy of the project, started again and again: each test goes on where the one before it stopped.
let copy: string;
let parent: string;
let neighbour: net.Server;
let running: Running | null = null;

beforeAll(async () => {
	({ copy, parent } = copyProject());
	// The usual port is taken, by this listener or by whatever had it already.
	neighbour = net.createServer();
	await new Promise<void>((resolve) => {
		neighbour.once('error', () => resolve());
		neighbour.listen(4173, '127.0.0.1', resolve);
	});
});

afterEach(async () => {
	if (!running) return;
	running.signal('SIGTERM');
	await running.ended;
	running = null;
});

afterAll(() => {
	neighbour.close();
	rmSync(parent, { recursive: true, force: true });
});

function run(env: NodeJS.ProcessEnv = {}): Running {
	return startScript('scripts/start.mjs', [], { cwd: copy, env });
}

/** Starts and waits for the address it prints. */
async function address(): Promise<string> {
	const command = run();
	running = command;
	let code: number | null | undefined;
	void command.ended.then((value) => (code = value));
	const found = () => /Trammel is at (http:\/\/localhost:\d+)/.exec(command.output())?.[1];
	await until(() => found() !== undefined || code !== undefined, 270_000);
	const url = found();
	if (url === undefined) throw new Error(`No address was printed:\n${command.output()}`);
	return url;
}

async function stop(signal: NodeJS.Signals): Promise<number | null> {
	const command = running;
	if (!command) throw new Error('Nothing runs');
	running = null;
	command.signal(signal);
	return await command.ended;
}

describe('npm start', () => {
	test(
		'goes from a fresh copy to a served page, on the next free port, on loopback only',
		{ timeout: 300_000 },
		async () => {
			const url = await address();
			expect(Number(new URL(url).port)).toBeGreaterThan(4173);
			const answer = await fetch(url, { redirect: 'follow' });
			expect(answer.status).toBe(200);
			expect(await answer.text()).toContain('Trammel');
			for (const { address: own, internal, family } of Object.values(os.networkInterfaces()).flatMap(
				(list) => list ?? []
			)) {
				if (internal || family !== 'IPv4') continue;
				await expect(fetch(`http://${own}:${new URL(url).port}`)).rejects.toThrow();
			}
		}
	);

	test(
		'started twice, says where the first one is; killed outright, leaves nothing running',
		{ timeout: 60_000 },
		async () => {
			const url = await address();
			const second = run();
			expect(await second.ended).toBe(1);
			expect(second.output()).toContain(`already runs from ${copy}: ${url} (process ${running?.pid})`);
			expect(await stop('SIGKILL')).toBeNull();
			expect(await until(() => processesNaming(parent).length === 0), processesNaming(parent).join('\n')).toBe(true);
		}
	);

	test(
		'starts again at once after that, building nothing, and stops everything on SIGTERM',
		{ timeout: 60_000 },
		async () => {
			const began = Date.now();
			await address();
			// About 1 s on an idle machine; other tests and a build share this one.
			expect(Date.now() - began).toBeLessThan(15_000);
			expect(running?.output()).not.toMatch(/Building|Installing|Preparing|Migrating/);
			expect(await stop('SIGTERM')).toBe(0);
			expect(processesNaming(parent)).toEqual([]);
		}
	);

	test('stops in the middle of its work, without a trace', { timeout: 60_000 }, async () => {
		writeFileSync(path.join(copy, 'static', 'changed.txt'), 'a source that changed');
		const command = run();
		expect(await until(() => command.output().includes('Building')), command.output()).toBe(true);
		command.signal('SIGINT');
		expect(await command.ended).toBe(0);
		expect(processesNaming(parent)).toEqual([]);
		rmSync(path.join(copy, 'static', 'changed.txt'));
	});

	test('keeps a copy of the data before it migrates', { timeout: 60_000 }, async () => {
		const added = path.join(copy, 'migrations', '20990101000000-add-nothing.ts');
		writeFileSync(
			added,
			'export async function up(): Promise<void> {}\nexport async function down(): Promise<void> {}\n'
		);
		await address();
		expect(running?.output()).toContain('A copy from before is kept in .data/copies/');
		const [kept] = readdirSync(path.join(copy, '.data', 'copies'));
		expect(existsSync(path.join(copy, '.data', 'copies', kept ?? '', 'data', 'ibdata1'))).toBe(true);
		rmSync(added);
	});

	test(
		'with DATABASE_URL starts no server, migrates nothing and asks for npm run migrate',
		{ timeout: 60_000 },
		async () => {
			const database = await createTestDatabase({ migrate: false });
			try {
				const command = run({ DATABASE_URL: database.url });
				expect(await command.ended).toBe(1);
				expect(command.output()).toMatch(/lacks \d+ migrations.*npm run migrate/);
				// Asking what is pending writes nothing but the list of migrations itself.
				expect((await database.query('SHOW TABLES')).length).toBeLessThanOrEqual(1);
			} finally {
				await database.drop();
			}
		}
	);
});
