import { signIn, signUp } from './support/people';
import { expect, expectSound, test } from './support/test';
import type { Page } from '@playwright/test';

interface Listed {
	id: string;
	name: string;
}

const builds = (page: Page) =>
	page.evaluate(async () => {
		const shop = location.pathname.split('/')[1];
		const answer = await fetch(`/api/v1/shops/${shop}/builds`);
		return ((await answer.json()) as { items: Listed[] }).items;
	});

test('a client sees their own build only, and no draft', async ({ page, expected }) => {
	expected.allow(/404/);
	await signIn(page, 'owner');
	const all = await builds(page);
	await page.context().clearCookies();
	await signIn(page, 'client');
	const theirs = await builds(page);
	expect(theirs.length).toBeGreaterThan(0);
	expect(theirs.length).toBeLessThan(all.length);
	const hidden = all.find((build) => !theirs.some((one) => one.id === build.id)) as Listed;
	await expect(page.getByRole('link', { name: hidden.name })).toHaveCount(0);
	const answer = await page.goto(`/quill-chassis/builds/${hidden.id}`);
	expect(answer?.status()).toBe(404);
	await expect(page.getByRole('heading', { name: 'Nothing here for you' })).toBeVisible();
	await expectSound(page);
	const own = theirs[0] as Listed;
	const draft = await page.request.get(`/api/v1/shops/quill-chassis/builds/${own.id}/draft`);
	expect(draft.status()).toBe(404);
	await page.goto(`/quill-chassis/builds/${own.id}`);
	await expect(page.getByRole('button', { name: 'Keep revision' })).toHaveCount(0);
});

test('a technician reads released revisions and changes no geometry', async ({ page, expected }) => {
	expected.allow(/404|403/);
	await signIn(page, 'technician');
	const [build] = (await builds(page)) as [Listed];
	await page.goto(`/quill-chassis/builds/${build.id}/points`);
	await expect(page.getByText('a revision never changes')).toBeVisible();
	await expect(page.getByRole('button', { name: 'Keep revision' })).toHaveCount(0);
	await expect(page.getByRole('button', { name: /start the draft/i })).toHaveCount(0);
	const base = `/api/v1/shops/quill-chassis/builds/${build.id}`;
	const tried = await page.evaluate(async (url) => {
		const headers = { 'content-type': 'application/json', 'if-match': '"1"' };
		const write = await fetch(`${url}/draft`, { method: 'PUT', headers, body: '{"document":{}}' });
		const keep = await fetch(`${url}/revisions`, { method: 'POST', headers, body: '{}' });
		return [write.status, keep.status];
	}, base);
	expect(tried).toEqual([404, 403]);
});

test('another shop’s address is a 404, its API too', async ({ page, expected }) => {
	expected.allow(/404/);
	await signUp(page);
	const answer = await page.goto('/quill-chassis/builds');
	expect(answer?.status()).toBe(404);
	const api = await page.request.get('/api/v1/shops/quill-chassis/builds');
	expect(api.status()).toBe(404);
});
