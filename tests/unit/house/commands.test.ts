import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { add, closingLine, countReport, readPlaywright, readVitest } from '../../../scripts/lib/counts.mjs';
import { satisfies } from '../../../scripts/lib/node-version.mjs';
import { aptFailure, npmFailure, packagesCurrent } from '../../../scripts/lib/packages.mjs';
import { readSettings } from '../../../scripts/lib/settings.mjs';

const folder = mkdtempSync(path.join(os.tmpdir(), 'trammel-commands-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function file(name: string, content: unknown): string {
	const full = path.join(folder, name);
	mkdirSync(path.dirname(full), { recursive: true });
	writeFileSync(full, typeof content === 'string' ? content : JSON.stringify(content));
	return full;
}

describe('the closing line of npm test', () => {
	const vitest = {
		testResults: [
			{ status: 'passed', assertionResults: [{ status: 'passed' }, { status: 'skipped' }] },
			{ status: 'failed', assertionResults: [{ status: 'failed' }, { status: 'passed' }] },
			// A file that did not load has no tests to speak for it.
			{ status: 'failed', assertionResults: [] }
		]
	};
	const playwright = {
		stats: { expected: 4, unexpected: 1, flaky: 0, skipped: 0 },
		errors: [{ message: 'a file did not load' }]
	};

	test('adds up runners', () => {
		const counts = add(
			countReport(file('vitest.json', vitest), readVitest, 1),
			countReport(file('playwright.json', playwright), readPlaywright, 1)
		);
		expect(closingLine(counts)).toBe('6 passed, 4 failed, 1 skipped');
		expect(closingLine({ passed: 3, failed: 0, skipped: 0 })).toBe('3 passed, 0 failed');
	});

	test('counts a crash as a failure: no report, half a report, or an exit code nothing explains', () => {
		const passing = { testResults: [{ status: 'passed', assertionResults: [{ status: 'passed' }] }] };
		expect(countReport(path.join(folder, 'absent.json'), readVitest, 1)).toEqual({ passed: 0, failed: 1, skipped: 0 });
		expect(countReport(file('half.json', '{"testResults":['), readVitest, 0).failed).toBe(1);
		expect(countReport(file('passing.json', passing), readVitest, 1)).toEqual({ passed: 1, failed: 1, skipped: 0 });
		expect(countReport(file('passing.json', passing), readVitest, 0)).toEqual({ passed: 1, failed: 0, skipped: 0 });
	});
});

describe('the check of Node', () => {
	const range = '>=20.19 <21 || >=22.12';
	test.each([
		['20.18.3', false],
		['20.19.0', true],
		['20.20.2', true],
		['21.7.0', false],
		['22.11.0', false],
		['22.12.0', true],
		['24.0.0', true]
	])('%s in %s', (version, expected) => {
		expect(satisfies(version, range)).toBe(expected);
	});
});

// The texts are what apt-get 2.6 and npm 10 print in these cases (seen on Debian 12), shortened.
describe('why packages could not be installed', () => {
	const byHand = 'sudo apt-get install --no-install-recommends chromium';
	test.each([
		[
			'E: Unable to acquire the dpkg frontend lock (/var/lib/dpkg/lock-frontend), is another process using it?',
			/apt is locked/
		],
		[
			"W: Failed to fetch http://deb.debian.org/debian/dists/bookworm/InRelease  Could not resolve 'deb.debian.org'",
			/cannot be reached/
		],
		[
			'E: Failed to fetch http://deb.debian.org/x.deb  Could not connect to 127.0.0.1:9 (127.0.0.1). - connect (111: Connection refused)',
			/cannot be reached/
		],
		["E: You don't have enough free space in /var/cache/apt/archives/.", /disk is full/],
		['dpkg: error: failed to write status database: No space left on device', /disk is full/],
		[
			"E: dpkg was interrupted, you must manually run 'dpkg --configure -a' to correct the problem.",
			/dpkg --configure -a/
		],
		['E: Unable to locate package chromium', /Unable to locate package chromium[^]*sudo apt-get install/]
	])('%s', (output, message) => {
		expect(aptFailure(output, byHand)).toMatch(message);
	});

	test.each([
		[
			'npm error code ENOTFOUND\nnpm error network request to https://registry.npmjs.org/zod failed',
			/registry cannot be reached/
		],
		['npm error code ENOSPC\nnpm error syscall write', /disk is full/],
		['npm error code EACCES\nnpm error path /x/node_modules', /may not write/],
		[
			'npm error code EUSAGE\nnpm error `npm ci` can only install packages when your package.json and package-lock.json are in sync.',
			/in sync/
		]
	])('%s', (output, message) => {
		expect(npmFailure(output)).toMatch(message);
	});

	test('npm ci is due when the lock file and what is installed differ, not for builds of other systems', () => {
		const entry = { version: '1.0.0', integrity: 'sha512-a' };
		const wanted = {
			packages: { '': { name: 'x' }, 'node_modules/a': entry, 'node_modules/b-win32': { ...entry, optional: true } }
		};
		file('p/package-lock.json', wanted);
		expect(packagesCurrent(path.join(folder, 'p'))).toBe(false);
		file('p/node_modules/.package-lock.json', { packages: { 'node_modules/a': entry } });
		expect(packagesCurrent(path.join(folder, 'p'))).toBe(true);
		file('p/node_modules/.package-lock.json', { packages: { 'node_modules/a': { ...entry, integrity: 'sha512-b' } } });
		expect(packagesCurrent(path.join(folder, 'p'))).toBe(false);
		file('p/node_modules/.package-lock.json', { packages: {} });
		expect(packagesCurrent(path.join(folder, 'p'))).toBe(false);
	});
});

describe('the settings of the commands', () => {
	test('are optional, and loopback alone without a database of one’s own', () => {
		expect(readSettings({})).toEqual({ databaseUrl: null, port: null, host: '127.0.0.1', origin: null });
		expect(() => readSettings({ HOST: '0.0.0.0' })).toThrow(/HOST=0\.0\.0\.0.*DATABASE_URL/);
		expect(readSettings({ HOST: '0.0.0.0', DATABASE_URL: 'mariadb://a:b@db.example:3306/t' }).host).toBe('0.0.0.0');
	});

	test.each([
		[{ PORT: '80a' }, /PORT=80a.*1 to 65535/],
		[{ PORT: '70000' }, /PORT=70000/],
		[{ DATABASE_URL: 'postgres://a@b/c' }, /DATABASE_URL must look like mariadb:/],
		[{ DATABASE_URL: 'mariadb://a:b@host' }, /DATABASE_URL must look like mariadb:/],
		[{ ORIGIN: 'https://shop.example/' }, /ORIGIN=https:\/\/shop\.example\//],
		[{ ORIGIN: 'shop.example' }, /ORIGIN=shop\.example/]
	])('%o is refused by name', (env, message) => {
		expect(() => readSettings(env)).toThrow(message);
	});
});
