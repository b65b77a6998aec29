import { cell, expect, openPoints, openTable, test, typeCell } from './support/bench';
import { expectOneEditAFrame, watchedFrames, watchFrames } from './support/frames';
import { centreOf, markOf } from './support/sheet';

test('an edit shows in table, views, figures and curves within one frame: typed, and dragged', async ({
	page,
	bench
}) => {
	await openPoints(page, await bench());
	await openTable(page);

	await watchFrames(page);
	await typeCell(page, 'upper ball joint, up', '290');
	await expect(cell(page, 'upper ball joint, up')).toHaveText('290.0');
	expect(expectOneEditAFrame(await watchedFrames(page))).toBe(1);

	const { x, y } = await centreOf(markOf(page, 'Front view', 'upperBall'));
	await page.mouse.move(x, y);
	await page.mouse.down();
	await watchFrames(page);
	for (let k = 1; k <= 12; k += 1) await page.mouse.move(x - 2 * k, y - 4 * k);
	await page.mouse.up();
	await expect(cell(page, 'upper ball joint, up')).not.toHaveText('290.0');
	expect(expectOneEditAFrame(await watchedFrames(page))).toBeGreaterThan(1);
});

test('text that is no length stays in its cell, and what is accepted stands under it', async ({ page, bench }) => {
	const build = await bench();
	await openPoints(page, build);
	await openTable(page);
	await typeCell(page, 'upper ball joint, out', '6l7');
	const entry = page.getByRole('textbox', { name: 'upper ball joint, out' });
	await expect(entry).toHaveValue('6l7');
	await expect(entry).toHaveAttribute('aria-invalid', 'true');
	const said = page.getByRole('grid').getByRole('alert');
	await expect(said).toContainText('upper ball joint, out');
	await expect(said).toContainText('Write mm such as 314.5');

	// Going elsewhere neither loses the text nor takes it.
	await cell(page, 'lower ball joint, up').click();
	await expect(cell(page, 'upper ball joint, out')).toHaveText('6l7');
	await expect(cell(page, 'upper ball joint, out')).toHaveAttribute('aria-invalid', 'true');
	expect((await build.point('upperBall'))[1]).toBe(617);

	// Out of range is told with the range; Escape gives the number back.
	await typeCell(page, 'upper ball joint, out', '99999');
	await expect(said).toContainText('at most 10 m (10,000 mm');
	await page.keyboard.press('Escape');
	await expect(cell(page, 'upper ball joint, out')).toHaveText('617.0');
	await expect(page.getByRole('grid').getByRole('alert')).toHaveCount(0);
});

test('a pasted block with a wrong cell names its row and column and puts in the rest', async ({ page, bench }) => {
	await page.context().grantPermissions(['clipboard-read', 'clipboard-write']);
	const build = await bench();
	await openPoints(page, build);
	await openTable(page);
	const block = ['point\tout\tup\tfore', 'upper ball joint\t620\t3o5\t-14', 'lower ball joint\t650\t66\t9'].join('\n');
	await page.evaluate((text) => navigator.clipboard.writeText(text), block);
	await cell(page, 'upper arm, front pivot, out').click();
	await page.keyboard.press('ControlOrMeta+v');

	const dialog = page.getByRole('dialog', { name: 'Paste points' });
	await expect(dialog.getByLabel('Points', { exact: true })).toHaveValue(block);
	const left = dialog.getByRole('alert');
	await expect(left).toContainText('row 2');
	await expect(left).toContainText('up');
	await expect(left).toContainText('3o5');
	await dialog.getByRole('button', { name: 'Put in 1 point' }).click();
	await expect(cell(page, 'lower ball joint, out')).toHaveText('650.0');
	await expect(cell(page, 'upper ball joint, out')).toHaveText('617.0');
	await expect.poll(() => build.point('lowerBall')).toEqual([9, 650, 66]);
});

test('a block copied from a spreadsheet goes in from the chosen cell as one step', async ({ page, bench }) => {
	await page.context().grantPermissions(['clipboard-read', 'clipboard-write']);
	const build = await bench();
	await openPoints(page, build);
	await openTable(page);
	await page.evaluate((text) => navigator.clipboard.writeText(text), '373\t288\n374\t272');
	await cell(page, 'upper arm, front pivot, out').click();
	await page.keyboard.press('ControlOrMeta+v');
	await expect(cell(page, 'upper arm, front pivot, out')).toHaveText('373.0');
	await expect(cell(page, 'upper arm, rear pivot, up')).toHaveText('272.0');
	await page.keyboard.press('ControlOrMeta+z');
	await expect(cell(page, 'upper arm, front pivot, out')).toHaveText('372.0');
	await expect(cell(page, 'upper arm, rear pivot, up')).toHaveText('271.0');
});

test('inches as a builder writes them, once the header says inches', async ({ page, bench, prefer }) => {
	await prefer({ length: 'mm' });
	const build = await bench();
	await openPoints(page, build);
	await openTable(page);
	await page.getByRole('button', { name: /^Units and theme/ }).click();
	await page.getByText('inches', { exact: true }).click();
	await page.getByText('12 3/8', { exact: true }).click();
	await page.keyboard.press('Escape');
	// 372 mm is 14.6457 in; the nearest of the fractions shown.
	await expect(cell(page, 'upper arm, front pivot, out')).toContainText('14 ');

	// One inch is 25.4 mm by definition (international yard and pound agreement, 1959).
	for (const [text, inches] of [
		['12 3/8', 12.375],
		['12-3/8', 12.375],
		[`1' 2 3/8"`, 14.375],
		['12.375', 12.375],
		['314.325 mm', 12.375]
	] as const) {
		await typeCell(page, 'upper arm, front pivot, out', '0');
		await typeCell(page, 'upper arm, front pivot, out', text);
		await expect(cell(page, 'upper arm, front pivot, out')).toHaveText(inches === 12.375 ? '12 3/8' : '14 3/8');
		await expect
			.poll(async () => (await build.point('upperFront'))[1], { message: text })
			.toBeCloseTo(inches * 25.4, 9);
	}
	await typeCell(page, 'upper arm, front pivot, out', '12 9/8');
	await expect(page.getByRole('grid').getByRole('alert')).toContainText('the fraction is under 1');
	await page.keyboard.press('Escape');

	// One press of an arrow key is now 1/16 in.
	await markOf(page, 'Front view', 'upperFront').focus();
	await page.keyboard.press('ArrowUp');
	await expect.poll(async () => (await build.point('upperFront'))[2]).toBeCloseTo(287 + 25.4 / 16, 6);
});

test('geometry that cannot be is named at its point, and the last drawing stays under it', async ({ page, bench }) => {
	const build = await bench();
	await openPoints(page, build);
	await openTable(page);
	const caster = page.locator('[data-figure=caster] td').first();
	const before = await caster.innerText();

	// The upper ball joint laid into the lower one.
	await typeCell(page, 'upper ball joint, out', '655');
	await typeCell(page, 'upper ball joint, fore', '8');
	const good = await caster.innerText();
	await typeCell(page, 'upper ball joint, up', '65');
	const sheet = page.locator('[data-sheet]');
	const alert = sheet.getByRole('alert');
	await expect(alert).toBeVisible();
	expect(await alert.getAttribute('aria-label')).toMatch(/ball joint/);
	await expect(page.getByRole('group', { name: 'Front view' }).locator('[data-ghost] path').first()).toBeAttached();
	await expect(page.getByText('last good')).toBeVisible();
	expect(await caster.innerText()).toBe(good);
	expect(good).not.toBe(before);

	// Nothing typed is lost, and the way back is one step.
	await expect(cell(page, 'upper ball joint, up')).toHaveText('65.0');
	await page.keyboard.press('ControlOrMeta+z');
	await expect(alert).toHaveCount(0);
	await expect(cell(page, 'upper ball joint, up')).toHaveText('305.0');
});

test('the trammel reads the distance of two points, and the diagonals across the car', async ({ page, bench }) => {
	await openPoints(page, await bench());
	await page.keyboard.press('m');
	for (const key of ['upperBall', 'lowerBall'] as const) {
		const { x, y } = await centreOf(markOf(page, 'Front view', key));
		await page.mouse.click(x, y);
	}
	const reading = page.locator('[data-sheet]').getByRole('status', { name: /^Trammel/ });
	// √(38² + 240² + 22²) on one side; √((617 + 655)² + 240² + 22²) across to the mirrored side.
	await expect(reading).toHaveAccessibleName(/upper ball joint to lower ball joint/);
	await expect(reading).toHaveAccessibleName(/this side 244\.0 mm/);
	await expect(reading).toHaveAccessibleName(/diagonal 1,?294\.6, diagonal 1,?294\.6, difference .?0\.0/);
	await page.keyboard.press('m');
	await expect(reading).toHaveCount(0);
});

for (const { origin, height, foreAft, foreOrigin } of [
	{ origin: 'table', height: 125, foreAft: 'fore', foreOrigin: 0 },
	{ origin: 'rail', height: 260, foreAft: 'aft', foreOrigin: -1000 }
] as const) {
	test(`points are shown and typed from the ${origin}, ${foreAft} positive`, async ({ page, bench }) => {
		const build = await bench({ datum: { origin, height, foreAft, foreOrigin } });
		await openPoints(page, build);
		await openTable(page);
		const along = foreAft === 'fore' ? 1 : -1;
		const [x, , z] = [-14, 617, 305];
		const said = (mm: number) => mm.toFixed(1).replace('-', '−');
		await expect(page.getByRole('complementary', { name: 'Point table' })).toContainText(
			origin === 'table' ? 'from the table' : 'rail'
		);
		await expect(page.getByRole('columnheader', { name: new RegExp(`^${foreAft}`) })).toBeVisible();
		await expect(cell(page, 'upper ball joint, up')).toHaveText(said(z - height));
		await expect(cell(page, `upper ball joint, ${foreAft}`)).toHaveText(said(along * (x - foreOrigin)));

		await typeCell(page, 'upper ball joint, up', '50');
		await typeCell(page, `upper ball joint, ${foreAft}`, '12.5');
		await expect.poll(() => build.point('upperBall')).toEqual([along * 12.5 + foreOrigin, 617, 50 + height]);
	});
}

test('the travel slide moves by keys, and linkage, curves and figures move with it', async ({ page, bench }) => {
	await openPoints(page, await bench());
	const slide = page.getByRole('slider', { name: 'travel' });
	const wheel = markOf(page, 'Front view', 'lowerBall');
	const start = await centreOf(wheel);
	await slide.focus();
	await expect(slide).toHaveAttribute('aria-valuenow', '0');
	await page.keyboard.press('PageUp');
	await expect(slide).not.toHaveAttribute('aria-valuenow', '0');
	const now = Number(await slide.getAttribute('aria-valuenow'));
	expect(now).toBeGreaterThan(0);
	await expect(slide).toHaveAttribute('aria-valuetext', /bump/);
	await expect(page.locator('[data-figures] thead')).toContainText(`at +${now}`);
	expect((await centreOf(wheel)).y).toBeLessThan(start.y - 1);

	await page.keyboard.press('Home');
	await expect(slide).toHaveAttribute('aria-valuetext', /droop/);
	expect((await centreOf(wheel)).y).toBeGreaterThan(start.y + 1);
	await page.keyboard.press('0');
	await expect(slide).toHaveAttribute('aria-valuenow', '0');
	await expect(page.locator('[data-figures] thead')).not.toContainText('at +');
});
