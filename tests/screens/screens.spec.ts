import { test } from '@playwright/test';
import { mkdirSync } from 'node:fs';
import type { Role } from '../../src/lib/schemas/auth';
import { signIn } from '../e2e/support/people';

/** Pictures to look at, not to compare: every screen at three widths in both themes, into .screens/. */
const WIDTHS = [
	[1440, 900],
	[768, 1024],
	[390, 844]
] as const;
const THEMES = ['light', 'dark'] as const;
const AREAS = ['', '/points', '/travel', '/compare', '/alignment'];

mkdirSync('.screens', { recursive: true });

for (const [width, height] of WIDTHS) {
	for (const theme of THEMES) {
		for (const role of ['owner', 'technician'] satisfies Role[]) {
			test(`${role}, ${width} px, ${theme}`, async ({ page }) => {
				test.setTimeout(180_000);
				await page.setViewportSize({ width, height });
				await page.emulateMedia({ colorScheme: theme });
				const shoot = (name: string) =>
					page.screenshot({ path: `.screens/${role}-${name}-${width}-${theme}.png`, fullPage: true });
				if (role === 'owner') {
					for (const name of ['sign-in', 'sign-up']) {
						await page.goto(`/${name}`);
						await shoot(name);
					}
				}
				await signIn(page, role);
				await shoot('builds');
				const shop = new URL(page.url()).pathname.split('/')[1] ?? '';
				const build = await page.evaluate(async (slug) => {
					const answer = await fetch(`/api/v1/shops/${slug}/builds`);
					return ((await answer.json()) as { items: { id: string }[] }).items[0]?.id ?? '';
				}, shop);
				for (const area of AREAS) {
					await page.goto(`/${shop}/builds/${build}${area}`);
					await page.waitForLoadState('networkidle');
					await shoot(area.slice(1) || 'job-card');
				}
				if (role === 'owner') {
					await page.goto(`/${shop}/stock`);
					await shoot('stock');
					await page.goto(`/${shop}/builds/new`);
					await shoot('new-build');
				}
			});
		}
	}
}
