import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import { IMPORT_RULES, layerOf } from '../../support/importRules.js';

const root = path.resolve(import.meta.dirname, '../../..');

function sources(folder: string): string[] {
	return readdirSync(path.join(root, folder), { recursive: true, encoding: 'utf8' })
		.filter((name) => /\.(ts|svelte)$/.test(name))
		.map((name) => path.join(folder, name));
}

/** Every module a file names, type-only and dynamic imports included. */
function importsOf(file: string): string[] {
	const text = readFileSync(path.join(root, file), 'utf8');
	const scripts = file.endsWith('.svelte')
		? [...text.matchAll(/<script[^>]*>([\s\S]*?)<\/script>/g)].map((match) => match[1] ?? '')
		: [text];
	return scripts.flatMap((script) => ts.preProcessFile(script, true, true).importedFiles.map((one) => one.fileName));
}

/** `$lib/…` and relative imports as a path below src/lib; null for packages and framework modules. */
function insideLib(file: string, name: string): string | null {
	if (name.startsWith('$lib/')) return name.slice('$lib/'.length);
	if (!name.startsWith('.')) return null;
	const below = path.relative('src/lib', path.join(path.dirname(file), name));
	return below.startsWith('..') ? `../${below}` : below;
}

const packageOf = (name: string) =>
	name
		.split('/')
		.slice(0, name.startsWith('@') ? 2 : 1)
		.join('/');

describe('who may import whom', () => {
	for (const [layer, rule] of Object.entries(IMPORT_RULES)) {
		it(`${layer} imports only ${[...rule.layers, ...(rule.packages ?? ['any package'])].join(', ') || 'itself'}`, () => {
			const files = sources(rule.folder).filter((file) => layerOf(path.relative('src/lib', file)) === layer);
			expect(files.length).toBeGreaterThan(0);
			const wrong = files.flatMap((file) =>
				importsOf(file)
					.filter((name) => {
						const inside = insideLib(file, name);
						if (inside !== null) return layerOf(inside) !== layer && !rule.layers.includes(layerOf(inside));
						if (rule.packages === null) return name === 'sequelize' && layer !== 'server';
						return !rule.packages.includes(packageOf(name));
					})
					.map((name) => `${file} imports ${name}`)
			);
			expect(wrong).toEqual([]);
		});
	}

	it('routes reach the database through query modules only', () => {
		const wrong = sources('src/routes').flatMap((file) =>
			importsOf(file)
				.filter((name) => name.includes('server/db') || packageOf(name) === 'sequelize')
				.map((name) => `${file} imports ${name}`)
		);
		expect(wrong).toEqual([]);
	});
});
