import { cpSync, mkdirSync, mkdtempSync, realpathSync, symlinkSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';

const wanted = [
	'migrations',
	'seeders',
	'scripts',
	'src',
	'static',
	'package.json',
	'package-lock.json',
	'svelte.config.js',
	'vite.config.ts',
	'vitest.config.ts',
	'tailwind.config.ts',
	'tsconfig.json'
];

/**
 * Copies the project (its packages linked) into a temporary folder whose path has spaces and well over 100 characters:
 * longer than a Unix socket's path may be. Gives `{ copy, parent }`; removing `parent` removes everything.
 */
export function copyProject(): { copy: string; parent: string } {
	const parent = realpathSync(mkdtempSync(path.join(os.tmpdir(), 'trammel house ')));
	const copy = path.join(
		parent,
		'a folder whose name is long and has spaces in it, as the folders of people do',
		'and another one'
	);
	mkdirSync(copy, { recursive: true });
	for (const name of wanted) cpSync(path.resolve(name), path.join(copy, name), { recursive: true });
	symlinkSync(path.resolve('node_modules'), path.join(copy, 'node_modules'));
	return { copy, parent };
}
