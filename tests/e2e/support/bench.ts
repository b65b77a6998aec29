import type { APIResponse, BrowserContext, Page } from '@playwright/test';
import { emptyAxle } from '../../../src/lib/domain/axle';
import type { Datum } from '../../../src/lib/domain/datum';
import { DEFAULT_PREFERENCES, type Preferences } from '../../../src/lib/schemas/preferences';
import type { AxleDocument, PointEntry } from '../../../src/lib/schemas/axle';
import type { PointName } from '../../../src/lib/kinematics';
import { signUp, type NewShop } from './people';
import { expect, test as base } from './test';

/** The corner of `PASTED_POINTS` in the stored axes, mm: x forward, y left, z up from the ground. Invented. */
export const BENCH_POINTS: Readonly<Record<PointName, Readonly<PointEntry>>> = {
	upperFront: [90, 372, 287],
	upperRear: [-130, 372, 271],
	upperBall: [-14, 617, 305],
	lowerFront: [150, 332, 63],
	lowerRear: [-170, 332, 61],
	lowerBall: [8, 655, 65],
	tieRodInner: [-120, 341, 104.5],
	tieRodOuter: [-125, 640, 113]
};

/** The bench corner as a whole document, with the facts every figure needs. */
export function benchAxle(): AxleDocument {
	const axle = emptyAxle();
	for (const [name, point] of Object.entries(BENCH_POINTS)) axle.left.points[name as PointName] = [...point];
	axle.left.wheel = { track: 1420, x: 0, loadedRadius: 300, camber: 0, toe: 0 };
	axle.vehicle = { ...axle.vehicle, wheelbase: 2600, cgHeight: 480, frontBrakeShare: 0.62 };
	return axle;
}

export interface Draft {
	version: number;
	document: AxleDocument;
}

/** A build of the worker's own shop, spoken to through the API as that shop's owner. */
export class BenchBuild {
	constructor(
		readonly context: BrowserContext,
		readonly shop: string,
		readonly id: string,
		readonly name: string
	) {}

	/** Address of an area: '' for the job card, '/points', '/travel' … */
	page(area = ''): string {
		return `/${this.shop}/builds/${this.id}${area}`;
	}

	api(rest = ''): string {
		return `/api/v1/shops/${this.shop}/builds/${this.id}${rest}`;
	}

	async draft(): Promise<Draft> {
		const answer = await this.context.request.get(this.api('/draft'));
		expect(answer.ok(), `draft of ${this.name}: ${answer.status()}`).toBe(true);
		return (await answer.json()) as Draft;
	}

	/** The stored coordinates of a point of the left corner, as the server holds them. */
	async point(name: PointName): Promise<PointEntry> {
		return (await this.draft()).document.left.points[name];
	}

	/** Writes the draft as another window would, against the version the server holds (or against `version`). */
	async write(change: (document: AxleDocument) => void, version?: number): Promise<APIResponse> {
		const draft = await this.draft();
		change(draft.document);
		return send(this.context, 'PUT', this.api('/draft'), { document: draft.document }, version ?? draft.version);
	}

	/** Keeps the draft as the next revision; gives its letter. */
	async keep(note: string): Promise<string> {
		const { version } = await this.draft();
		const body = { note, requestId: crypto.randomUUID(), draftVersion: version };
		const answer = await send(this.context, 'POST', this.api('/revisions'), body);
		expect(answer.status(), await answer.text()).toBe(201);
		return ((await answer.json()) as { letter: string }).letter;
	}

	async letters(): Promise<string[]> {
		const answer = await this.context.request.get(this.api('/revisions'));
		const listed = (await answer.json()) as { items: { letter: string }[] } | { letter: string }[];
		return (Array.isArray(listed) ? listed : listed.items).map(({ letter }) => letter);
	}
}

/** A write as the application's own pages send it: JSON, with their Origin. */
export async function send(
	context: BrowserContext,
	method: 'POST' | 'PUT' | 'PATCH',
	url: string,
	body: unknown,
	version?: number
): Promise<APIResponse> {
	const origin = new URL(base.info().project.use.baseURL ?? '').origin;
	const headers = { origin, ...(version === undefined ? {} : { 'if-match': `"${version}"` }) };
	return context.request.fetch(url, { method, headers, data: body });
}

interface Shop {
	slug: string;
	/** Its owner, who is signed in. */
	owner: NewShop;
	cookies: Awaited<ReturnType<BrowserContext['cookies']>>;
}

interface BuildWanted {
	datum?: Datum;
	/** What the draft holds; null: nothing typed yet. */
	document?: AxleDocument | null;
}

interface Fixtures {
	/** Signs the worker's owner in and makes a build; every call another one. */
	bench: (wanted?: BuildWanted) => Promise<BenchBuild>;
	/** Sets units, number format, theme of the worker's owner; they are the usual ones again after the test. */
	prefer: (part: Partial<Preferences>) => Promise<void>;
}

/** Tests that write: each in a build of its own, in a shop that only this worker has. */
export const test = base.extend<Fixtures, { shop: Shop }>({
	shop: [
		async ({ browser }, use, info) => {
			const context = await browser.newContext({ baseURL: info.project.use.baseURL });
			const page = await context.newPage();
			const owner = await signUp(page);
			const slug = new URL(page.url()).pathname.split('/')[1] ?? '';
			const shop = { slug, owner, cookies: await context.cookies() };
			await context.close();
			await use(shop);
		},
		{ scope: 'worker' }
	],
	bench: async ({ context, shop }, use) => {
		let made = 0;
		await use(async ({ datum, document = benchAxle() } = {}) => {
			await context.addCookies(shop.cookies);
			const name = `Bench ${base.info().testId.slice(-6)}-${(made += 1)}`;
			const facts = { name, wheelbase: 2600, track: 1420, loadedRadius: 300, cgHeight: 480, frontBrakeShare: 0.62 };
			const answer = await send(context, 'POST', `/api/v1/shops/${shop.slug}/builds`, { ...facts, datum });
			expect(answer.status(), await answer.text()).toBe(201);
			const { id } = (await answer.json()) as { id: string };
			const build = new BenchBuild(context, shop.slug, id, name);
			if (document) {
				const { version } = await build.draft();
				const wrote = await send(context, 'PUT', build.api('/draft'), { document }, version);
				expect(wrote.ok(), await wrote.text()).toBe(true);
			}
			return build;
		});
	},
	prefer: async ({ context, shop }, use) => {
		const set = async (part: Partial<Preferences>) => {
			await context.addCookies(shop.cookies);
			const answer = await send(context, 'PATCH', '/api/v1/me/preferences', part);
			expect(answer.ok(), await answer.text()).toBe(true);
		};
		await use(set);
		await set(DEFAULT_PREFERENCES);
	}
});

export { expect };

/** Opens the Points page of a build and waits until it is drawn and alive. */
export async function openPoints(page: Page, build: BenchBuild, query = ''): Promise<void> {
	await page.goto(build.page(`/points${query}`));
	await started(page);
	await expect(page.getByRole('group', { name: 'Front view' })).toBeVisible();
}

/** Waits until the page's scripts have taken over what the server sent. */
export async function started(page: Page): Promise<void> {
	await page.locator('html[data-started]').waitFor({ state: 'attached' });
}

/** Unfolds the point table beside the sheet. */
export async function openTable(page: Page): Promise<void> {
	await page.getByRole('button', { name: 'point table (P)' }).click();
	await expect(page.getByRole('grid')).toBeVisible();
}

/** The cell of a point and axis, by the name a screen reader says: "upper ball joint, up". */
export function cell(page: Page, label: string) {
	return page.getByRole('gridcell', { name: `${label}:` });
}

/** Types into a cell as a person does: choose it, type, Enter. */
export async function typeCell(page: Page, label: string, text: string): Promise<void> {
	await cell(page, label).click();
	await page.keyboard.type(text);
	await page.keyboard.press('Enter');
}
