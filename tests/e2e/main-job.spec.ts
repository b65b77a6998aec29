import { enterBuild, keepRevision, openArea, pastePoints, untilKept } from './support/builds';
import { signOut, signUp } from './support/people';
import { expect, expectSound, test } from './support/test';

test('the main job: from sign-up to the shim pack and what was found', async ({ page }) => {
	test.slow();
	const person = await signUp(page);
	await enterBuild(page, 'Bench coupe');
	await openArea(page, 'Points');
	await expect(page.getByRole('button', { name: 'paste points' })).toBeVisible();
	await pastePoints(page);
	await untilKept(page);

	// The four surfaces speak of the same edit.
	const surfaces = page.locator('[data-edit]');
	await expect
		.poll(
			async () => new Set(await surfaces.evaluateAll((all) => all.map((one) => one.getAttribute('data-edit')))).size
		)
		.toBe(1);
	await expectSound(page);

	// Drag the upper ball joint in the front view; its plate and the curves follow.
	const ball = page.getByLabel('Front view').locator('[data-mark="upperBall"]');
	const before = await ball.boundingBox();
	if (!before) throw new Error('The upper ball joint is not drawn.');
	const [x, y] = [before.x + before.width / 2, before.y + before.height / 2];
	const edit = Number(await surfaces.first().getAttribute('data-edit'));
	await page.mouse.move(x, y);
	await page.mouse.down();
	await page.mouse.move(x - 4, y - 10, { steps: 6 });
	await page.mouse.up();
	await expect.poll(async () => Number(await surfaces.first().getAttribute('data-edit'))).toBeGreaterThan(edit);
	await untilKept(page);
	expect(await keepRevision(page, 'First layout, upper ball joint raised.')).toBe('A');

	// Move a pivot by keys and keep B.
	await page.getByLabel('Front view').locator('[data-mark="upperFront"]').focus();
	for (let press = 0; press < 6; press += 1) await page.keyboard.press('ArrowDown');
	await untilKept(page);
	expect(await keepRevision(page, 'Upper front pivot 6 lower.')).toBe('B');

	await openArea(page, 'Travel');
	await expectSound(page);

	await openArea(page, 'Compare');
	await expect(page.getByText('upper arm, front pivot').first()).toBeVisible();
	await expectSound(page);

	await openArea(page, 'Alignment');
	await expectSound(page);

	await signOut(page, person.name);
});
