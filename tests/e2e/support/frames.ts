import { expect, type Page } from '@playwright/test';

/** What one frame showed of an edit: the counter each surface carries, and what stands on it. */
export interface Shown {
	counters: Record<string, string[]>;
	prints: Record<string, string>;
}

declare global {
	interface Window {
		frameWatch?: { frames: Shown[]; stop: boolean };
	}
}

/**
 * Notes after every frame what the four surfaces carry and show, until `watched` is read. The note is taken in a task
 * of its own after the frame's callbacks, so that it says what was painted and not what one callback saw of another.
 */
export async function watchFrames(page: Page): Promise<void> {
	await page.evaluate(() => {
		const surfaces: Record<string, string> = {
			table: '[role=grid][data-edit]',
			views: '[data-view][data-edit]',
			figures: '[data-figures][data-edit]',
			curves: '[aria-label="Curves over travel"][data-edit]'
		};
		const printOf: Record<string, (root: Element) => string> = {
			table: (root) => [...root.querySelectorAll('[data-cell]')].map((cell) => cell.getAttribute('aria-label')).join(),
			views: (root) => [...root.querySelectorAll('[data-mark]')].map((mark) => mark.innerHTML).join(),
			figures: (root) => root.querySelector('tbody')?.textContent ?? '',
			curves: (root) => [...root.querySelectorAll('path')].map((path) => path.getAttribute('d')).join()
		};
		const watch = (window.frameWatch = { frames: [] as Shown[], stop: false });
		const note = () => {
			const shown: Shown = { counters: {}, prints: {} };
			for (const [name, selector] of Object.entries(surfaces)) {
				const roots = [...document.querySelectorAll(selector)];
				shown.counters[name] = roots.map((root) => root.getAttribute('data-edit') ?? '');
				shown.prints[name] = roots.map((root) => printOf[name]?.(root)).join('|');
			}
			watch.frames.push(shown);
		};
		const painted = new MessageChannel();
		painted.port1.onmessage = note;
		const frame = () => {
			if (watch.stop) return;
			painted.port2.postMessage(null);
			requestAnimationFrame(frame);
		};
		requestAnimationFrame(frame);
	});
}

/** Ends the watch and gives its frames. */
export async function watchedFrames(page: Page): Promise<Shown[]> {
	return page.evaluate(() => {
		const watch = window.frameWatch;
		if (!watch) throw new Error('No frames are watched.');
		watch.stop = true;
		return watch.frames;
	});
}

/** No frame showed two edits at once, and each frame that showed a new edit showed it on every surface. */
export function expectOneEditAFrame(frames: Shown[]): number {
	let edits = 0;
	frames.forEach((shown, k) => {
		for (const [surface, counters] of Object.entries(shown.counters)) {
			expect(counters.length, `frame ${k}: the ${surface} carry no edit`).toBeGreaterThan(0);
		}
		const seen = new Set(Object.values(shown.counters).flat());
		expect([...seen], `frame ${k} shows more than one edit: ${JSON.stringify(shown.counters)}`).toHaveLength(1);
		const before = frames[k - 1];
		if (!before || before.counters.table?.[0] === shown.counters.table?.[0]) return;
		edits += 1;
		const still = Object.keys(shown.prints).filter((surface) => shown.prints[surface] === before.prints[surface]);
		expect(still, `frame ${k}: surfaces that show nothing of the new edit`).toEqual([]);
	});
	return edits;
}
