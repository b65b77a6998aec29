import { sveltekit } from '@sveltejs/kit/vite';
import { svelteTesting } from '@testing-library/svelte/vite';
import { defineConfig } from 'vitest/config';

/** Three kinds of test beside the browser's; each is run alone with `vitest run --project <name> [file]`. */
export default defineConfig({
	test: {
		projects: [
			{
				plugins: [sveltekit()],
				test: {
					name: 'unit',
					include: ['tests/unit/**/*.test.ts'],
					environment: 'node',
					testTimeout: 60_000
				}
			},
			{
				plugins: [sveltekit(), svelteTesting()],
				test: {
					name: 'component',
					include: ['tests/component/**/*.test.ts'],
					environment: 'jsdom',
					setupFiles: ['tests/support/component.ts'],
					testTimeout: 20_000
				}
			},
			{
				plugins: [sveltekit()],
				test: {
					name: 'server',
					include: ['tests/server/**/*.test.ts'],
					environment: 'node',
					// One real MariaDB serves every file, each in a database of its own; one file at a time keeps timings honest.
					globalSetup: ['scripts/lib/vitest-database.mjs'],
					pool: 'forks',
					fileParallelism: false,
					testTimeout: 30_000,
					hookTimeout: 60_000
				}
			}
		]
	}
});
