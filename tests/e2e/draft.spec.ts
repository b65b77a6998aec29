import type { Page } from '@playwright/test';
import { cell, expect, openPoints, openTable, send, started, test, typeCell, type BenchBuild } from './support/bench';
import { untilKept } from './support/builds';
import { expectSound } from './support/test';
import { centreOf, markOf } from './support/sheet';

async function openWithTable(page: Page, build: BenchBuild): Promise<void> {
	await openPoints(page, build);
	await openTable(page);
}

test('an edit that no server has taken survives the page being closed and reloaded, and is kept once there is one', async ({
	page,
	context,
	bench,
	expected
}) => {
	expected.allow(/\/draft|ERR_FAILED|ERR_INTERNET_DISCONNECTED/);
	const build = await bench();
	await openWithTable(page, build);
	await context.setOffline(true);
	await typeCell(page, 'upper ball joint, up', '291.5');
	await expect(page.getByText('kept on this device, 1 edit waiting')).toBeVisible();
	await page.close();

	// The page comes, from the server or a cache; the draft's address still does not answer.
	await context.setOffline(false);
	await context.route(`**${build.api('/draft')}`, (route) => route.abort());
	const again = await context.newPage();
	await openWithTable(again, build);
	await expect(cell(again, 'upper ball joint, up')).toHaveText('291.5');
	await expect(again.getByText('kept on this device, 1 edit waiting')).toBeVisible();
	expect((await build.point('upperBall'))[2]).toBe(305);

	await context.unrouteAll();
	await again.getByRole('button', { name: 'send now' }).click();
	await untilKept(again);
	expect((await build.point('upperBall'))[2]).toBe(291.5);
	await again.reload();
	await started(again);
	await openTable(again);
	await expect(cell(again, 'upper ball joint, up')).toHaveText('291.5');
	await untilKept(again);
});

test('two windows that edit different points: both edits are in both', async ({ page, context, bench, expected }) => {
	expected.allow(/409/);
	const build = await bench();
	const other = await context.newPage();
	await openWithTable(page, build);
	await openWithTable(other, build);

	await typeCell(other, 'upper ball joint, up', '300');
	await untilKept(other);
	await typeCell(page, 'lower ball joint, out', '650');
	await untilKept(page);

	const { left } = (await build.draft()).document;
	expect(left.points.upperBall).toEqual([-14, 617, 300]);
	expect(left.points.lowerBall).toEqual([8, 650, 65]);
	await expect(cell(page, 'upper ball joint, up')).toHaveText('300.0');
	await expect(page.getByText(/changed upper ball joint on/)).toBeVisible();
	await page.getByRole('button', { name: 'show both' }).click();
	await expect(page.getByRole('dialog')).toContainText('305.0 up');
	await expect(page.getByRole('dialog')).toContainText('300.0 up');
	await expectSound(page);
	await page.getByRole('dialog').getByRole('button', { name: 'Close' }).click();

	// The other window has it once it is looked at again.
	await other.evaluate(() => document.dispatchEvent(new Event('visibilitychange')));
	await expect(cell(other, 'lower ball joint, out')).toHaveText('650.0');
});

test('two windows that edit one coordinate: both values are shown, one is chosen, the other comes back by undo', async ({
	page,
	context,
	bench,
	expected
}) => {
	expected.allow(/409/);
	const build = await bench();
	const other = await context.newPage();
	await openWithTable(page, build);
	await openWithTable(other, build);

	await typeCell(other, 'upper ball joint, up', '300');
	await untilKept(other);
	await typeCell(page, 'upper ball joint, up', '280');
	// An edit elsewhere, made beside the one in question, must not be lost either.
	await typeCell(page, 'upper arm, front pivot, out', '370');
	await expect(page.getByText(/and so did you/)).toBeVisible();
	await page.getByRole('button', { name: 'Show both', exact: true }).click();
	const dialog = page.getByRole('dialog', { name: 'Changed by two people' });
	const choice = dialog.getByRole('radiogroup', { name: 'Upper ball joint' });
	await expect(choice).toContainText('305.0 up');
	await expect(choice.getByRole('radio', { name: /280\.0 up/ })).toBeChecked();
	await expect(choice.getByRole('radio', { name: /300\.0 up/ })).toBeVisible();
	await expectSound(page);
	await choice.getByText('300.0 up').click();
	await dialog.getByRole('button', { name: 'Keep these choices' }).click();
	await untilKept(page);
	await expect(cell(page, 'upper ball joint, up')).toHaveText('300.0');
	const { document } = await build.draft();
	expect(document.left.points.upperBall[2]).toBe(300);
	expect(document.left.points.upperFront[1]).toBe(370);

	await page.getByRole('button', { name: 'undo', exact: true }).click();
	await expect(cell(page, 'upper ball joint, up')).toHaveText('280.0');
	await untilKept(page);
	expect((await build.point('upperBall'))[2]).toBe(280);
});

test('a session that ends in the middle of an edit: signed in again, the edit is still there', async ({
	page,
	context,
	bench,
	shop,
	expected
}) => {
	expected.allow(/401/);
	const build = await bench();
	await openWithTable(page, build);
	await context.clearCookies();
	await typeCell(page, 'lower ball joint, up', '71.25');
	await expect(page.getByText('signed out, 1 edit kept on this device')).toBeVisible();
	await expect(cell(page, 'lower ball joint, up')).toHaveText(/71\.[23]/);
	await page.getByRole('link', { name: 'sign in' }).click();
	await page.getByLabel('Email').fill(shop.owner.email);
	await page.getByLabel('Password').fill(shop.owner.password);
	await page.getByRole('button', { name: 'Sign in', exact: true }).click();
	await expect(page).toHaveURL(new RegExp(`${build.id}/points$`));
	await untilKept(page);
	expect((await build.point('lowerBall'))[2]).toBe(71.25);
});

test('undo and redo walk typed cells, nudges and a drag, each one step', async ({ page, bench }) => {
	const build = await bench();
	await openWithTable(page, build);
	const up = cell(page, 'upper ball joint, up');
	await typeCell(page, 'upper ball joint, up', '300');
	const { x, y } = await centreOf(markOf(page, 'Front view', 'upperBall'));
	await page.mouse.move(x, y);
	await page.mouse.down();
	await page.mouse.move(x, y - 30, { steps: 8 });
	await page.mouse.up();
	await expect(up).not.toHaveText('300.0');
	const dragged = await up.innerText();
	// A held arrow key is one step however often it repeats.
	for (let k = 0; k < 5; k += 1) await page.keyboard.press('ArrowDown');
	const nudged = await up.innerText();
	expect(Number(nudged)).toBeCloseTo(Number(dragged) - 5, 6);

	for (const text of [dragged, '300.0', '305.0']) {
		await page.keyboard.press('ControlOrMeta+z');
		await expect(up).toHaveText(text);
	}
	await expect(page.getByRole('button', { name: 'undo', exact: true })).toBeDisabled();
	for (const text of ['300.0', dragged, nudged]) {
		await page.keyboard.press('ControlOrMeta+Shift+z');
		await expect(up).toHaveText(text);
	}
	await expect(page.getByRole('button', { name: 'redo', exact: true })).toBeDisabled();
	await untilKept(page);
	expect((await build.point('upperBall'))[2]).toBeCloseTo(Number(nudged), 6);
});

test('a double click on keep makes one revision, of what stands on the page', async ({ page, bench }) => {
	const build = await bench();
	await openWithTable(page, build);
	await typeCell(page, 'upper ball joint, up', '303');
	await page.getByRole('button', { name: 'Keep revision' }).click();
	const dialog = page.getByRole('dialog');
	await dialog.getByLabel('Note to revision A').fill('Kept by a nervous hand.');
	await dialog.getByRole('button', { name: 'Keep as A' }).dblclick();
	await expect(page.getByRole('heading', { name: 'Revision A is kept' })).toBeVisible();
	expect(await build.letters()).toEqual(['A']);
	const kept = await page.request.get(build.api('/revisions/A'));
	const { document } = (await kept.json()) as { document: { left: { points: { upperBall: number[] } } } };
	expect(document.left.points.upperBall).toEqual([-14, 617, 303]);
});

test('a note is asked for, and what was typed stays when it is refused', async ({ page, bench }) => {
	await openPoints(page, await bench());
	await page.getByRole('button', { name: 'Keep revision' }).click();
	const dialog = page.getByRole('dialog');
	await dialog.getByRole('button', { name: 'Keep as A' }).click();
	await expect(dialog.getByRole('alert')).toContainText('say in a few words what changed');
	await expect(dialog.getByRole('heading', { name: 'Keep revision' })).toBeVisible();
});

test('a write against a stale version is answered with what stands there, and one without a version is refused', async ({
	page,
	bench
}) => {
	const build = await bench();
	const { version, document } = await build.draft();
	expect((await build.write((axle) => void (axle.left.points.upperBall[2] = 301))).status()).toBe(200);
	const stale = await send(page.context(), 'PUT', build.api('/draft'), { document }, version);
	expect(stale.status()).toBe(409);
	expect(stale.headers()['content-type']).toContain('application/problem+json');
	const problem = (await stale.json()) as {
		current: { version: number; document: typeof document; updatedBy: string };
	};
	expect(problem.current.version).toBe(version + 1);
	expect(problem.current.document.left.points.upperBall[2]).toBe(301);
	expect((await send(page.context(), 'PUT', build.api('/draft'), { document })).status()).toBe(428);
	const wrong = structuredClone(document);
	wrong.left.points.upperBall[2] = 1e9;
	const refused = await send(page.context(), 'PUT', build.api('/draft'), { document: wrong }, version + 1);
	expect(refused.status()).toBe(422);
	expect(await refused.text()).toContain('upperBall');
});

test('a revision is read only; the draft is started from it and undo gives back what it held', async ({
	page,
	bench
}) => {
	const build = await bench();
	expect(await build.keep('First layout.')).toBe('A');
	expect((await build.write((axle) => void (axle.left.points.upperBall[2] = 290))).ok()).toBe(true);

	await page.goto(build.page());
	await page.getByRole('link', { name: 'A', exact: true }).click();
	await expect(page.getByText('Revision A: a revision never changes.')).toBeVisible();
	await openTable(page);
	const up = cell(page, 'upper ball joint, up');
	await expect(up).toHaveText('305.0');
	await expect(up).toHaveAttribute('aria-readonly', 'true');
	await up.click();
	await page.keyboard.type('1');
	await expect(page.getByRole('grid').getByRole('textbox')).toHaveCount(0);
	await markOf(page, 'Front view', 'upperBall').focus();
	await page.keyboard.press('ArrowUp');
	await expect(up).toHaveText('305.0');
	await expectSound(page);

	await page.getByRole('button', { name: 'Start the draft from it' }).click();
	await page.getByRole('button', { name: 'Replace the draft by A' }).click();
	await expect(page).toHaveURL(new RegExp(`${build.id}/points$`));
	await expect(page.getByText('a revision never changes')).toHaveCount(0);
	await expect.poll(() => build.point('upperBall')).toEqual([-14, 617, 305]);
	await openTable(page);
	await expect(up).toHaveText('305.0');
	await page.getByRole('button', { name: 'undo', exact: true }).click();
	await expect(up).toHaveText('290.0');
	await untilKept(page);
	expect((await build.point('upperBall'))[2]).toBe(290);
});

test('a revision is released once, with a date and a name', async ({ page, bench, shop }) => {
	const build = await bench();
	await build.keep('For the jig.');
	await page.goto(build.page());
	await page.getByRole('button', { name: 'Release A' }).click();
	const dialog = page.getByRole('dialog', { name: 'Release A for fabrication?' });
	await expect(dialog).toContainText('geometry, not strength');
	await expectSound(page);
	await dialog.getByRole('button', { name: 'Release A' }).click();
	const row = page.getByRole('row').filter({ hasText: 'For the jig.' });
	await expect(row.getByText('✓')).toBeVisible();
	await expect(row).toContainText(shop.owner.name);
	await expect(page.getByRole('button', { name: 'Release A' })).toHaveCount(0);
	const kept = await page.request.get(build.api('/revisions/A'));
	expect(((await kept.json()) as { releasedAt: string | null }).releasedAt).not.toBeNull();
});
