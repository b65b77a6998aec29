import { defineConfig, devices } from '@playwright/test';
import { findProgram } from './scripts/lib/processes.mjs';

const report = process.env.TRAMMEL_REPORT;

/**
 * Browser tests, on Debian's Chromium. `npm test` serves a build of its own and names it in TRAMMEL_URL; run by hand,
 * they use what `npm start` serves. Screens are pictures to look at, taken by `npm run screens`.
 */
export default defineConfig({
	outputDir: 'test-results',
	// Frame times are measured: nothing else may run beside a test on a small machine.
	workers: 1,
	forbidOnly: process.env.CI !== undefined,
	timeout: 60_000,
	expect: { timeout: 10_000 },
	reporter: report ? [['list'], ['json', { outputFile: report }]] : [['list']],
	use: {
		...devices['Desktop Chrome'],
		viewport: { width: 1440, height: 900 },
		baseURL: process.env.TRAMMEL_URL ?? 'http://localhost:4173',
		locale: 'en-US',
		timezoneId: 'UTC',
		trace: 'retain-on-failure',
		screenshot: 'only-on-failure',
		launchOptions: { executablePath: findProgram('chromium') ?? '/usr/bin/chromium' }
	},
	projects: [
		{ name: 'e2e', testDir: 'tests/e2e', testMatch: '**/*.spec.ts' },
		{ name: 'screens', testDir: 'tests/screens', testMatch: '**/*.spec.ts' }
	]
});
