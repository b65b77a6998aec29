import { describe, expect, it } from 'vitest';
import { standaloneSvg } from '$lib/components/travel/standalone';

/** jsdom knows no stylesheet of ours: the look of each class stands here. */
const LOOKS: Record<string, Record<string, string>> = {
	line: { fill: 'none', stroke: 'rgb(1, 2, 3)', 'stroke-width': '1.25px', 'stroke-dasharray': '12px, 3px' },
	word: { fill: 'rgb(9, 9, 9)', 'font-size': '11px', 'font-weight': '500', 'text-anchor': 'end' },
	hit: { fill: 'rgba(0, 0, 0, 0)', stroke: 'none' },
	gone: { display: 'none' },
	dim: { opacity: '0.8' }
};
const styleOf = (element: Element) => ({
	getPropertyValue: (name: string) => LOOKS[element.getAttribute('class') ?? '']?.[name] ?? ''
});

function drawing(inner: string): SVGSVGElement {
	document.body.innerHTML = `<svg viewBox="0 0 200 100" class="block">${inner}</svg>`;
	const svg = document.querySelector('svg');
	if (!svg) throw new Error('no drawing');
	// jsdom leaves the geometry of SVG out.
	Object.defineProperty(svg, 'viewBox', { value: { baseVal: { width: 200, height: 100 } } });
	return svg;
}

function taken(inner: string, options = {}): Document {
	const text = standaloneSvg(drawing(inner), {
		title: 'Grey <roadster> & more',
		ground: 'rgb(28, 38, 105)',
		styleOf,
		...options
	});
	const read = new DOMParser().parseFromString(text, 'image/svg+xml');
	expect(read.querySelector('parsererror')).toBeNull();
	return read;
}

describe('a drawing that stands by itself', () => {
	it('has its size in points, its ground, its title and its face', () => {
		const root = taken('').documentElement;
		expect(root.getAttribute('width')).toBe('200pt');
		expect(root.getAttribute('height')).toBe('100pt');
		expect(root.getAttribute('viewBox')).toBe('0 0 200 100');
		expect(root.getAttribute('font-family')).toContain('JetBrains Mono');
		expect(root.querySelector('title')?.textContent).toBe('Grey <roadster> & more');
		expect(root.querySelector('rect')?.getAttribute('fill')).toBe('rgb(28, 38, 105)');
	});

	it('writes every look on its own element, in plain numbers', () => {
		const path = taken('<path class="line" d="M0 0L9 9"/>').querySelector('path');
		expect(path?.getAttribute('stroke')).toBe('rgb(1, 2, 3)');
		expect(path?.getAttribute('fill')).toBe('none');
		expect(path?.getAttribute('stroke-width')).toBe('1.25');
		expect(path?.getAttribute('stroke-dasharray')).toBe('12, 3');
		expect(path?.getAttribute('d')).toBe('M0 0L9 9');
		const text = taken('<text class="word" x="5" dy="0.35em">draft</text>').querySelector('text');
		expect(text?.getAttribute('font-size')).toBe('11');
		expect(text?.getAttribute('font-weight')).toBe('500');
		expect(text?.getAttribute('text-anchor')).toBe('end');
		expect(text?.textContent).toBe('draft');
	});

	it('leaves out what is not seen and what speaks to a page', () => {
		const read = taken(
			'<g role="slider" tabindex="0" aria-label="travel" data-view="front" onclick="alert(1)"><rect class="hit"/><path class="line" style="color:red"/></g><text class="gone">no</text><!-- mark -->'
		);
		expect(read.querySelectorAll('rect')).toHaveLength(1);
		expect(read.querySelector('text')).toBeNull();
		const attributes = [...read.querySelectorAll('g, path')].flatMap((one) => one.getAttributeNames());
		expect(attributes.filter((name) => /^(class|style|role|tabindex|aria|data|on)/.test(name))).toEqual([]);
	});

	it('keeps clipping windows and groups that are dimmed', () => {
		const read = taken(
			'<clipPath id="w"><rect width="5" height="5" class="hit"/></clipPath><g class="dim" clip-path="url(#w)"><path class="line"/></g>'
		);
		expect(read.querySelector('clipPath rect')?.getAttribute('width')).toBe('5');
		expect(read.querySelector('g')?.getAttribute('opacity')).toBe('0.8');
		expect(read.querySelector('g')?.getAttribute('clip-path')).toBe('url(#w)');
	});

	it('carries rules where it is given them', () => {
		expect(taken('', { css: '@font-face{}' }).querySelector('style')?.textContent).toBe('@font-face{}');
		expect(taken('').querySelector('style')).toBeNull();
	});
});
