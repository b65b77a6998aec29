import { mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { copyProject } from '../../support/copy';
import { processesNaming, startScript, until } from '../../support/processes';

let copy: string;
let parent: string;

beforeAll(() => {
	({ copy, parent } = copyProject());
	mkdirSync(path.join(copy, 'tests', 'unit'), { recursive: true });
});

afterAll(() => rmSync(parent, { recursive: true, force: true }));

function write(name: string, body: string): void {
	writeFileSync(
		path.join(copy, 'tests', 'unit', `${name}.test.ts`),
		`import { expect, test } from 'vitest';\n${body}\n`
	);
}

function runsLeft(): string[] {
	return readdirSync(path.join(copy, '.test')).filter((name) => name.startsWith('run-'));
}

describe('npm test', () => {
	test('adds everything up in its last line, a file that does not load included', { timeout: 120_000 }, async () => {
		write('good', "test('holds', () => expect(1).toBe(1));\ntest.skip('later', () => {});");
		write('bad', "test('does not hold', () => expect(1).toBe(2));");
		write('broken', "import './no-such-file';\ntest('never runs', () => {});");
		const command = startScript('scripts/test.mjs', ['--only=unit'], { cwd: copy });
		expect(await command.ended).toBe(1);
		expect(command.output().trimEnd().split('\n').at(-1)).toBe('1 passed, 2 failed, 1 skipped');
		expect(runsLeft()).toEqual([]);
	});

	test('stopped by Ctrl-C, leaves nothing running and no folder', { timeout: 120_000 }, async () => {
		write('hangs', "test('hangs', async () => {\n\tconsole.log('it hangs now');\n\tawait new Promise(() => {});\n});");
		const command = startScript('scripts/test.mjs', ['--only=unit', 'hangs'], { cwd: copy });
		expect(await until(() => command.output().includes('it hangs now'), 90_000), command.output()).toBe(true);
		expect(runsLeft()).toHaveLength(1);
		command.signal('SIGINT');
		expect(await command.ended).toBe(130);
		expect(processesNaming(parent)).toEqual([]);
		expect(runsLeft()).toEqual([]);
	});

	test('refuses a kind of test it does not know', async () => {
		const command = startScript('scripts/test.mjs', ['--only=everything'], { cwd: copy });
		expect(await command.ended).toBe(1);
		expect(command.output()).toContain('--only=everything is no kind of test');
	});
});
