import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import boundaries from 'eslint-plugin-boundaries';
import svelte from 'eslint-plugin-svelte';
import globals from 'globals';
import ts from 'typescript-eslint';
import svelteConfig from './svelte.config.js';

/** Who may import whom; tests/unit/house/imports.test.ts holds the same map for type-only imports. */
const elements = [
	{ type: 'kinematics', pattern: 'src/lib/kinematics/**' },
	{ type: 'domain', pattern: 'src/lib/domain/**' },
	{ type: 'schemas', pattern: 'src/lib/schemas/**' },
	{ type: 'charts', pattern: 'src/lib/charts/**' },
	{ type: 'drawing', pattern: 'src/lib/drawing/**' },
	{ type: 'components', pattern: 'src/lib/components/**' },
	{ type: 'state', pattern: 'src/lib/state/**' },
	{ type: 'client', pattern: 'src/lib/client/**' },
	{ type: 'server', pattern: 'src/lib/server/**' },
	{ type: 'text', pattern: 'src/lib/*.ts', mode: 'full' },
	{ type: 'routes', pattern: 'src/routes/**' }
];

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
			parserOptions: { projectService: true, extraFileExtensions: ['.svelte'], parser: ts.parser, svelteConfig }
		},
		rules: { 'svelte/no-at-html-tags': 'error' }
	},
	{
		files: ['scripts/**', 'tests/**', '*.config.{js,ts}'],
		rules: { 'no-console': 'off' }
	},
	{
		files: ['src/lib/**/*.ts', 'src/lib/**/*.svelte', 'src/routes/**/*.ts', 'src/routes/**/*.svelte'],
		plugins: { boundaries },
		settings: { 'boundaries/elements': elements, 'import/resolver': { node: { extensions: ['.ts', '.js', '.svelte'] } } },
		rules: {}
	},
	{
		files: ['src/lib/kinematics/**'],
		rules: {
			'no-restricted-imports': [
				'error',
				{ patterns: [{ regex: '^(?!\\./|gl-matrix$)', message: 'The kernel imports gl-matrix and its own folder only.' }] }
			]
		}
	},
	{
		files: ['src/lib/components/**', 'src/lib/state/**', 'src/lib/charts/**', 'src/lib/drawing/**', 'src/lib/domain/**', 'src/lib/schemas/**', 'src/lib/client/**'],
		rules: {
			'no-restricted-imports': [
				'error',
				{ patterns: [{ regex: '(^|/)server(/|$)|^sequelize$|^\\$env/', message: 'Server modules stay behind load functions and endpoints.' }] }
			]
		}
	},
	{
		files: ['src/routes/**'],
		rules: {
			'no-restricted-imports': [
				'error',
				{ patterns: [{ regex: 'server/db|^sequelize$', message: 'Routes speak to query modules, never to models.' }] }
			]
		}
	},
	{ ignores: ['build/', '.svelte-kit/', '.data/', '.test/', '.screens/', 'node_modules/', 'test-results/', 'coverage/'] }
);
