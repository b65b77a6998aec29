import { expect, test as base, type Page } from '@playwright/test';
import type axeCore from 'axe-core';
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';

const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

/** Answers a test provokes on purpose; everything else that a browser reports fails the test. */
interface Expected {
	/** Allow failed requests and the console lines of them whose text or address matches. */
	allow(pattern: RegExp): void;
}

export const test = base.extend<{ expected: Expected; watched: void }>({
	expected: async ({ browserName: _ }, use) => {
		const patterns: RegExp[] = [];
		await use(Object.assign({ allow: (pattern: RegExp) => void patterns.push(pattern) }, { patterns }));
	},
	watched: [
		async ({ context, expected }, use) => {
			const seen: string[] = [];
			const allowed = (text: string) =>
				(expected as Expected & { patterns: RegExp[] }).patterns.some((pattern) => pattern.test(text));
			const note = (text: string) => void (allowed(text) || seen.push(text));
			const watch = (page: Page) => {
				page.on('pageerror', (error) => note(`page error: ${error.message}`));
				page.on('console', (message) => {
					if (message.type() === 'error' || message.type() === 'warning')
						note(`console ${message.type()}: ${message.text()} ${message.location().url}`);
				});
				page.on('requestfailed', (request) => {
					const why = request.failure()?.errorText ?? '';
					// A navigation that starts before a preload ends cancels it; nothing is missing.
					if (why !== 'net::ERR_ABORTED') note(`failed request: ${request.url()} ${why}`);
				});
				page.on('response', (response) => {
					if (response.status() >= 400) note(`answer ${response.status()}: ${response.url()}`);
				});
			};
			context.on('page', watch);
			context.pages().forEach(watch);
			await use();
			expect(seen, 'console errors, page errors and failed requests').toEqual([]);
		},
		{ auto: true }
	]
});

export { expect };

/** The page has no sideways scroll and axe finds nothing (WCAG 2.2 A and AA rules). */
export async function expectSound(page: Page): Promise<void> {
	const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
	expect(overflow, 'sideways scroll, px').toBeLessThanOrEqual(0);
	// The page's own policy allows no inline script: the source is evaluated from outside, not by the page.
	await page.evaluate(axeSource);
	const found = await page.evaluate(async () => {
		const axe = (window as unknown as { axe: typeof axeCore }).axe;
		const { violations } = await axe.run(document, {
			runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice']
		});
		return violations.map((one) => `${one.id}: ${one.nodes.map((node) => node.html).join(' | ')}`);
	});
	expect(found, 'axe violations').toEqual([]);
}

/** Everything a finger should hit is at least 44 px high or wide enough around its centre (at most 768 px wide screens). */
export async function expectTouchable(page: Page): Promise<void> {
	const small = await page.evaluate(() =>
		[
			...document.querySelectorAll<HTMLElement>(
				'button, a[href], input:not([type=hidden]), select, [role=button], [role=slider]'
			)
		]
			.filter((element) => element.checkVisibility({ checkOpacity: true, checkVisibilityCSS: true }))
			.filter((element) => !element.closest('.sr-only') && !element.classList.contains('sr-only'))
			.map((element) => ({ element, box: element.getBoundingClientRect() }))
			.filter(({ box }) => box.width > 0 && box.bottom > 0 && box.height < 43.5)
			.map(({ element, box }) => `${element.outerHTML.slice(0, 120)} is ${Math.round(box.height)} px high`)
	);
	expect(small, 'targets lower than 44 px').toEqual([]);
}
