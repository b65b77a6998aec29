import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import svelte from 'eslint-plugin-svelte';
import globals from 'globals';
import ts from 'typescript-eslint';
import svelteConfig from './svelte.config.js';
import { IMPORT_RULES, LAYERS } from './tests/support/importRules.js';

/** tests/unit/house/imports.test.ts reads the same map and catches what a pattern on the import's text cannot. */
const importRules = Object.entries(IMPORT_RULES).map(([layer, rule]) => {
	const refused = [...LAYERS, 'text'].filter((other) => other !== layer && !rule.layers.includes(other));
	const patterns = [
		{
			regex: `^(\\$lib|(\\.\\./)+)/?(${refused.join('|')})(/|$)`,
			message: `${layer} may import ${rule.layers.join(', ') || 'itself only'}.`
		}
	];
	if (rule.packages)
		patterns.push({
			regex: `^(?!\\.|\\$lib|(${rule.packages.map(escape).join('|')})(/|$))`,
			message: `${layer} may use these packages: ${rule.packages.join(', ')}.`
		});
	const files = layer === 'text' ? ['src/lib/*.ts'] : [`${rule.folder}/**`];
	return { files, rules: { 'no-restricted-imports': ['error', { patterns }] } };
});

/** @param {string} name */
function escape(name) {
	return name.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');
}

export default ts.config(
	js.configs.recommended,
	...ts.configs.recommended,
	...svelte.configs.recommended,
	prettier,
	...svelte.configs.prettier,
	{
		languageOptions: { globals: { ...globals.browser, ...globals.node } },
		rules: {
			'no-undef': 'off',
			'no-console': ['error', { allow: ['warn', 'error'] }],
			'@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
			'@typescript-eslint/consistent-type-imports': 'error'
		}
	},
	{
		files: ['**/*.svelte', '**/*.svelte.ts', '**/*.svelte.js'],
		languageOptions: {
			parserOptions: { extraFileExtensions: ['.svelte'], parser: ts.parser, svelteConfig }
		},
		rules: { 'svelte/no-at-html-tags': 'error' }
	},
	{
		files: ['scripts/**', 'tests/**', '*.config.{js,ts}'],
		rules: { 'no-console': 'off' }
	},
	...importRules,
	{
		files: ['src/routes/**'],
		rules: {
			'no-restricted-imports': [
				'error',
				{ patterns: [{ regex: 'server/db|^sequelize$', message: 'Routes speak to query modules, never to models.' }] }
			]
		}
	},
	{
		ignores: [
			'build/',
			'.svelte-kit/',
			'.svelte-kit-*/',
			'.data/',
			'.test/',
			'.screens/',
			'node_modules/',
			'test-results/',
			'coverage/'
		]
	}
);
