import { readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';

const css = readFileSync(path.resolve(import.meta.dirname, '../../../src/app.css'), 'utf8');

/** Custom properties of one theme block of src/app.css. */
function tokens(selector: string): Record<string, string> {
	const start = css.indexOf(`${selector} {`);
	const block = css.slice(start, css.indexOf('}', start));
	return Object.fromEntries([...block.matchAll(/--([\w-]+):\s*(#[0-9a-f]{6})/g)].map(([, key, value]) => [key, value]));
}

/** WCAG 2.2, "relative luminance" and "contrast ratio". */
function luminance(hex: string): number {
	const [r, g, b] = [1, 3, 5].map((at) => {
		const channel = parseInt(hex.slice(at, at + 2), 16) / 255;
		return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
	}) as [number, number, number];
	return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
	const [light, dark] = [luminance(a), luminance(b)].sort((x, y) => y - x) as [number, number];
	return (light + 0.05) / (dark + 0.05);
}

const light = tokens(':root');
const themes = {
	light,
	dark: { ...light, ...tokens(":root[data-theme='dark']") },
	daylight: { ...light, ...tokens(":root[data-theme='daylight']") }
};

const PAPER_TEXT = ['ink', 'ink-2', 'ink-3', 'action', 'pass', 'near', 'miss'];
const DYE_TEXT = ['steel', 'steel-2', 'steel-3', 'brass', 'dye-pass', 'dye-near', 'dye-miss'];
const SERIES = ['series-1', 'series-2', 'series-3', 'series-4', 'series-5', 'series-6'];

describe.each(Object.entries(themes))('contrast in %s', (_name, theme) => {
	const of = (token: string) => theme[token] ?? expect.fail(`no token ${token}`);

	it.each(PAPER_TEXT)('%s is text on ground and field: at least 4.5', (token) => {
		expect(contrast(of(token), of('ground'))).toBeGreaterThanOrEqual(4.5);
		expect(contrast(of(token), of('field'))).toBeGreaterThanOrEqual(4.5);
	});

	it.each(DYE_TEXT)('%s is text on dye and plate: at least 4.5', (token) => {
		expect(contrast(of(token), of('dye'))).toBeGreaterThanOrEqual(4.5);
		expect(contrast(of(token), of('plate'))).toBeGreaterThanOrEqual(4.5);
	});

	it.each(SERIES)('%s is a line on dye: at least 3', (token) => {
		expect(contrast(of(token), of('dye'))).toBeGreaterThanOrEqual(3);
	});

	it('edges and axes are marks: at least 3', () => {
		expect(contrast(of('edge'), of('field'))).toBeGreaterThanOrEqual(3);
		expect(contrast(of('axis'), of('dye'))).toBeGreaterThanOrEqual(3);
	});

	it('text on a filled button: at least 4.5', () => {
		expect(contrast(of('on-action'), of('action'))).toBeGreaterThanOrEqual(4.5);
	});
});
