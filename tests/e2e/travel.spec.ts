import { readFile } from 'node:fs/promises';
import type { Download, Page } from '@playwright/test';
import { expect, started, test, type BenchBuild } from './support/bench';
import { expectSound } from './support/test';

async function openArea(page: Page, build: BenchBuild, area: string): Promise<void> {
	await page.goto(build.page(area));
	await started(page);
}

/** The travel table's row heads, bump first. */
const heads = (page: Page) => page.getByRole('region', { name: 'Figures over travel' }).locator('tbody th');

/** The figures at the slide that the sheet lists, by name. */
const listed = (page: Page, name: string) =>
	page
		.locator('[data-sheet]')
		.first()
		.getByRole('row', { name: new RegExp(`^${name}`) });

async function fileOf(page: Page, label: string): Promise<{ name: string; bytes: Buffer }> {
	const [download] = await Promise.all([
		page.waitForEvent('download') as Promise<Download>,
		page
			.getByRole('button', { name: `Export as ${label}` })
			.first()
			.click()
	]);
	return { name: download.suggestedFilename(), bytes: await readFile(await download.path()) };
}

test('one slide moves the linkage, the cursors, the figures and the marked row together', async ({ page, bench }) => {
	await openArea(page, await bench(), '/travel');
	await expectSound(page);
	const slide = page.getByRole('slider', { name: 'travel', exact: true }).first();
	const wheel = page.locator('[data-view="front"] path').nth(3);
	const drawn = () => page.locator('[data-view="front"]').innerHTML();
	await expect(wheel).toBeAttached();
	const before = await drawn();
	const camber = await listed(page, 'camber').innerText();

	await slide.focus();
	for (let press = 0; press < 3; press += 1) await page.keyboard.press('PageUp');
	await expect(slide).toHaveAttribute('aria-valuetext', '+30 mm bump');
	expect(await drawn()).not.toBe(before);
	await expect(listed(page, 'camber')).not.toHaveText(camber);
	await expect(page.getByRole('img', { name: /^camber: .* at \+30 mm$/ })).toBeAttached();
	await expect(page.locator('tr[aria-current="true"] th')).toHaveText('+30.0');

	// The slides of the other rows are the same slide.
	await page.getByRole('slider', { name: 'travel, row 3' }).focus();
	await page.keyboard.press('0');
	await expect(slide).toHaveAttribute('aria-valuenow', '0');
	expect(await drawn()).toBe(before);
});

test('range and step are typed, checked in words, and stay in the address', async ({ page, bench }) => {
	await openArea(page, await bench(), '/travel');
	await page.getByLabel('Bump to').fill('40');
	await page.getByLabel('Step').fill('20');
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(/from=-75&to=40&step=20/);
	await expect(heads(page)).toHaveText(
		['+40.0', '+25.0', '+5.0', '-15.0', '-35.0', '-55.0', '-75.0'].map((text) => text.replace('-', '−'))
	);

	await page.getByLabel('Step').fill('0.1');
	await page.keyboard.press('Enter');
	await expect(page.getByRole('alert')).toContainText('1151 positions are too many');
	await expect(page.getByLabel('Step')).toHaveValue('0.1');
	await expect(heads(page)).toHaveCount(7);

	await page.getByLabel('Step').fill('10');
	await page.keyboard.press('Enter');
	await expect(page.getByRole('alert')).toHaveCount(0);
	await page.reload();
	await expect(page.getByLabel('Bump to')).toHaveValue('40');
	await expect(heads(page)).toHaveCount(13);
});

test('in inches the range opens in inches and reads fractions', async ({ page, bench, prefer }) => {
	await prefer({ length: 'in', inches: 'fraction', numbers: 'comma' });
	await openArea(page, await bench(), '/travel');
	await expect(page.getByLabel('Droop to')).toHaveValue('−3');
	await page.getByLabel('Bump to').fill('2 1/2');
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(/to=63\.5/);
	await expect(heads(page).first()).toHaveText('+2 1/2');
	const { bytes } = await fileOf(page, 'CSV');
	const text = bytes.toString('utf8');
	expect(text).toContain('Travel, in;');
	expect(text.split('\r\n')[1]).toMatch(/^-3;-?\d+,\d+;/);
});

test('a bind ends the curves with its reason, and in the table', async ({ page, bench }) => {
	await openArea(page, await bench(), '/travel?from=-400&to=400&step=20');
	await expect(heads(page).first()).toContainText(/binds$/);
	await expect(
		page
			.locator('[data-sheet]')
			.getByText(/(upper arm|lower arm|tie rod) binds at \+\d/)
			.first()
	).toBeVisible();
	await page.getByRole('slider', { name: 'travel', exact: true }).first().focus();
	await page.keyboard.press('End');
	const reached = await page.getByRole('slider', { name: 'travel', exact: true }).first().getAttribute('aria-valuenow');
	expect(Number(reached)).toBeLessThan(400);
	await expect(page.locator('tr[aria-current="true"]')).toContainText('binds');
	await expectSound(page);
});

test('the files: neutralised numbers with units, a drawing of its own, a picture at twice its size', async ({
	page,
	bench
}) => {
	const build = await bench();
	await openArea(page, build, '/travel?from=-50&to=50&step=25&show=camber,toe,motionRatio');
	const csv = await fileOf(page, 'CSV');
	expect(csv.name).toMatch(/^bench-[a-z0-9-]+-draft-travel\.csv$/);
	const lines = csv.bytes.toString('utf8').replace('\ufeff', '').split('\r\n');
	expect(lines[0]).toBe('"Travel, mm","Camber, °","Toe per wheel, °",Motion ratio');
	expect(lines).toHaveLength(1 + 5 + 4);
	// The bench corner has no coil-over: an empty cell, never NaN.
	for (const line of lines.slice(1, 6)) expect(line).toMatch(/^-?\d+(,-?\d+(\.\d+)?){2},$/);
	expect(lines.at(-1)).toContain('12 decimals');

	const svg = await fileOf(page, 'SVG');
	const text = svg.bytes.toString('utf8');
	expect(text).toMatch(/^<\?xml version="1\.0" encoding="UTF-8"\?>\n<svg [^>]*width="1168pt"/);
	expect(text).toContain('JetBrains Mono');
	expect(text).toContain('geometry, not strength');
	expect(text).toContain(build.name);
	expect(text).not.toMatch(/var\(|class=|NaN|undefined|tabindex/);
	const wrong = await page.evaluate(
		(source) =>
			new DOMParser().parseFromString(source, 'image/svg+xml').querySelector('parsererror')?.textContent ?? null,
		text
	);
	expect(wrong).toBeNull();

	const png = await fileOf(page, 'PNG');
	expect(png.bytes.subarray(1, 4).toString('latin1')).toBe('PNG');
	const height = Number(/height="([\d.]+)pt"/.exec(text)?.[1]);
	expect([png.bytes.readUInt32BE(16), png.bytes.readUInt32BE(20)]).toEqual([2336, 2 * height]);
	// Nothing is left of the sheet that was drawn out of sight.
	await expect(page.locator('[data-sheet]')).toHaveCount(1);
});

test('figures are chosen by words, and the previous revision lies under them', async ({ page, bench }) => {
	const build = await bench();
	await build.keep('As taped.');
	await build.write((document) => (document.left.points.upperFront = [90, 372, 300]));
	await openArea(page, build, '/travel');
	await expect(page.getByText('A, the revision before')).toBeVisible();
	await expect(page.locator('[data-series="A"]').first()).toBeAttached();
	await page.getByLabel('A under it').uncheck();
	await expect(page).toHaveURL(/under=none/);
	await expect(page.locator('[data-series="A"]')).toHaveCount(0);

	await page.getByRole('button', { name: /^Figures: 9 of/ }).click();
	await page.getByLabel('Kingpin inclination').uncheck();
	await page.getByLabel('Anti-dive').check();
	await page.keyboard.press('Escape');
	await expect(page).toHaveURL(/show=[a-zA-Z,]*antiDive/);
	await expect(page.getByRole('img', { name: /^anti-dive: / })).toBeAttached();
	await expect(page.getByRole('img', { name: /^KPI: / })).toHaveCount(0);

	await page.getByLabel('Geometry').selectOption('A');
	await expect(page).toHaveURL(/rev=A/);
	await expect(page.locator('[data-sheet]').getByText('revision A')).toBeVisible();
});

test('compare: what moved in the builder’s words, signed differences, verdicts, and the rest beside one that fails', async ({
	page,
	bench
}) => {
	const build = await bench({ datum: { origin: 'table', height: 125, foreAft: 'aft', foreOrigin: 0 } });
	await build.keep('As taped.');
	await build.write((document) => {
		document.left.points.upperBall = [-20, 620, 305];
		document.left.wheel.camber = -0.75;
		document.targets = [{ figure: 'camber', at: 'ride', low: -1, high: -0.5 }];
	});
	await build.keep('Ball joint 6 back and 3 out.');
	await build.write((document) => (document.left.points.upperBall = [null, 620, 305]));

	await openArea(page, build, '/compare?revs=A,B,draft');
	const moved = page.getByRole('region', { name: 'Points that moved, B against A' });
	await expect(moved.getByRole('row', { name: /^upper ball joint/ })).toHaveText(/\+3\.0.*–.*\+6\.0.*6\.7/);
	await expect(moved.getByRole('columnheader', { name: /Δ aft/ })).toBeVisible();
	await expect(page.getByText('Static camber: 0.00 → −0.75°').first()).toBeVisible();
	await expect(page.getByText(/The draft is not complete/).first()).toBeVisible();
	const figures = page.getByRole('region', { name: 'Figures side by side' });
	await expect(figures.getByRole('row', { name: /^Camber, °/ })).toContainText('−0.75');
	const aims = page.getByRole('region', { name: 'Table of targets' });
	await expect(aims.getByRole('row', { name: /^Camber/ })).toContainText(/miss.*pass.*not known/s);
	await expect(page.locator('[data-view="top"] [data-series="A"], [data-view="side"] [data-series="B"]')).toHaveCount(
		2
	);
	await expectSound(page);

	// The slide moves the table too; which geometries are compared is chosen by words and stays in the address.
	await page.getByRole('slider', { name: 'travel', exact: true }).first().focus();
	await page.keyboard.press('PageUp');
	await expect(page.getByRole('heading', { name: 'Figures at +10 mm' })).toBeVisible();
	await page.getByLabel('and to').selectOption('leave out');
	await expect(page).toHaveURL(/revs=A,B$/);
	await expect(page.getByText(/is not complete/)).toHaveCount(0);
	await page.getByLabel('Differences count from').selectOption('draft');
	await expect(page).toHaveURL(/revs=draft,B/);
});
