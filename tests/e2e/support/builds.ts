import { expect, type Page } from '@playwright/test';

/** An invented corner as a builder would paste it from a spreadsheet: out, up, fore in mm from the ground. */
export const PASTED_POINTS = [
	'point\tout\tup\tfore',
	'upper arm, front pivot\t372\t287\t90',
	'upper arm, rear pivot\t372\t271\t-130',
	'upper ball joint\t617\t305\t-14',
	'lower arm, front pivot\t332\t63\t150',
	'lower arm, rear pivot\t332\t61\t-170',
	'lower ball joint\t655\t65\t8',
	'inner tie-rod joint\t341\t104.5\t-120',
	'outer tie-rod joint\t640\t113\t-125'
].join('\n');

/** Enters a build with the facts the figures need; ends on its job card. */
export async function enterBuild(page: Page, name: string): Promise<void> {
	await page
		.getByRole('link', { name: /New build|Enter the first build/ })
		.first()
		.click();
	await page.getByLabel('Name of the build').fill(name);
	await page.getByLabel('Wheelbase').fill('2600');
	await page.getByLabel('Track, between the contact points').fill('1420');
	await page.getByLabel('Loaded radius').fill('300');
	await page.getByLabel('Height of the centre of gravity').fill('480');
	await page.getByLabel('Front share of braking').fill('62');
	await page.getByRole('button', { name: 'Enter the build' }).click();
	await expect(page.getByRole('heading', { name, level: 1 })).toBeVisible();
}

/** Goes to an area by the rail. */
export async function openArea(page: Page, area: string): Promise<void> {
	await page.getByRole('navigation', { name: 'Areas of the build' }).getByRole('link', { name: area }).click();
	await expect(
		page.getByRole('navigation', { name: 'Areas of the build' }).getByRole('link', { name: area })
	).toHaveAttribute('aria-current', 'page');
}

/** Pastes the block through the dialog and accepts it. */
export async function pastePoints(page: Page, block = PASTED_POINTS): Promise<void> {
	await page.getByRole('button', { name: 'paste points' }).click();
	await page.getByRole('dialog').getByLabel('Points', { exact: true }).fill(block);
	await page
		.getByRole('dialog')
		.getByRole('button', { name: /^Put in/ })
		.click();
	await expect(page.getByRole('dialog')).toHaveCount(0);
}

/** Waits until the server holds every edit. */
export async function untilKept(page: Page): Promise<void> {
	await expect(page.getByText('kept on the server')).toBeVisible();
}

/** Keeps the draft as the next revision and gives its letter. */
export async function keepRevision(page: Page, note: string): Promise<string> {
	await page.getByRole('button', { name: 'Keep revision' }).click();
	const dialog = page.getByRole('dialog');
	await dialog.getByLabel(/^Note to revision/).fill(note);
	await dialog.getByRole('button', { name: /^Keep as/ }).click();
	const heading = dialog.getByRole('heading', { name: /is kept/ });
	await expect(heading).toBeVisible();
	const letter = /Revision ([A-Z]+) is kept/.exec(await heading.innerText())?.[1] ?? '';
	await dialog.getByRole('button', { name: 'Close' }).click();
	return letter;
}
