/** A drawing taken off the page so that it stands by itself: everything the stylesheet said is written on its own elements. */

/** Properties carried over, with the value that need not be written. */
const SHAPE: Readonly<Record<string, string>> = {
	fill: 'rgb(0, 0, 0)',
	'fill-opacity': '1',
	stroke: 'none',
	'stroke-width': '1px',
	'stroke-dasharray': 'none',
	'stroke-linecap': 'butt',
	'stroke-linejoin': 'miter',
	'stroke-opacity': '1',
	opacity: '1'
};
const TEXT: Readonly<Record<string, string>> = {
	...SHAPE,
	'font-size': '',
	'font-weight': '400',
	'text-anchor': 'start'
};
const DRAWN = new Set(['path', 'line', 'rect', 'circle', 'ellipse', 'polyline', 'polygon', 'text', 'tspan']);
const TEXTS = new Set(['text', 'tspan']);
/** Attributes that speak to a browser page, not to a drawing. */
const PAGE_ONLY = /^(class|style|role|tabindex|aria-.*|data-.*|on.*)$/;
const UNSEEN = /^(none|transparent|rgba\(0, 0, 0, 0\))$/;

export type StyleReader = (element: Element) => { getPropertyValue(name: string): string };

export interface StandaloneOptions {
	/** What the drawing is: its title, for whoever opens it or hears it read. */
	title: string;
	/** Colour of the sheet. */
	ground: string;
	/** Family named in the file; a reader without it falls back to another of fixed pitch. */
	fontFamily?: string;
	/** Rules set into the file, such as a font face that carries its font. */
	css?: string;
	/** Reads an element's computed style; the browser's own unless said. */
	styleOf?: StyleReader;
}

const NAMESPACE = 'http://www.w3.org/2000/svg';
const FAMILY = "'JetBrains Mono', ui-monospace, monospace";

function plain(name: string, value: string): string {
	return /width|dasharray|size/.test(name) ? value.replaceAll('px', '') : value;
}

/** Writes the look of one element onto its copy; false where nothing of it is seen. */
function dress(original: Element, copy: Element, styleOf: StyleReader): boolean {
	const style = styleOf(original);
	if (style.getPropertyValue('display') === 'none' || style.getPropertyValue('visibility') === 'hidden') return false;
	const name = original.localName;
	if (!DRAWN.has(name)) {
		const opacity = style.getPropertyValue('opacity');
		if (opacity !== '' && opacity !== '1') copy.setAttribute('opacity', opacity);
		return true;
	}
	const bare = (property: string) => UNSEEN.test(style.getPropertyValue(property));
	if (!TEXTS.has(name) && bare('fill') && bare('stroke')) return false;
	for (const [property, usual] of Object.entries(TEXTS.has(name) ? TEXT : SHAPE)) {
		const value = style.getPropertyValue(property);
		if (value === '' || value === usual) copy.removeAttribute(property);
		else copy.setAttribute(property, plain(property, value));
	}
	return true;
}

function strip(copy: Element): void {
	for (const { name } of [...copy.attributes]) if (PAGE_ONLY.test(name)) copy.removeAttribute(name);
}

/** Copies what is seen of an element and what is in it; null where nothing is. */
function taken(original: Element, styleOf: StyleReader): Element | null {
	const copy = original.cloneNode(false) as Element;
	strip(copy);
	// A clipping window is a shape without a look.
	const within = original.localName === 'clipPath';
	if (!within && !dress(original, copy, styleOf)) return null;
	for (const child of original.childNodes) {
		if (child.nodeType === 3) copy.append(child.cloneNode());
		else if (child.nodeType === 1) {
			const element = within ? bareCopy(child as Element) : taken(child as Element, styleOf);
			if (element) copy.append(element);
		}
	}
	const group = original.localName === 'g' || original.localName === 'clipPath';
	return group && copy.childNodes.length === 0 ? null : copy;
}

function bareCopy(original: Element): Element {
	const copy = original.cloneNode(true) as Element;
	strip(copy);
	return copy;
}

/**
 * A drawing as a file of its own. A pixel of a sheet is a printer's point, so its size is written in points and the stated
 * scale is true on paper.
 */
export function standaloneSvg(svg: SVGSVGElement, options: StandaloneOptions): string {
	const { title, ground, css, fontFamily = FAMILY, styleOf = (element) => getComputedStyle(element) } = options;
	const box = svg.viewBox.baseVal;
	const [width, height] = [box.width, box.height];
	const root = document.createElementNS(NAMESPACE, 'svg');
	const set = (element: Element, attributes: Record<string, string | number>) => {
		for (const [name, value] of Object.entries(attributes)) element.setAttribute(name, String(value));
		return element;
	};
	const made = (name: string, attributes: Record<string, string | number>, text = '') => {
		const element = set(document.createElementNS(NAMESPACE, name), attributes);
		element.textContent = text;
		return element;
	};
	set(root, { width: `${width}pt`, height: `${height}pt`, viewBox: `0 0 ${width} ${height}`, role: 'img' });
	set(root, { 'font-family': fontFamily, 'font-variant-ligatures': 'none' });
	root.append(made('title', {}, title));
	if (css) root.append(made('style', {}, css));
	root.append(made('rect', { width, height, fill: ground }));
	for (const child of svg.children) {
		const copy = taken(child, styleOf);
		if (copy) root.append(copy);
	}
	return `<?xml version="1.0" encoding="UTF-8"?>\n${new XMLSerializer().serializeToString(root)}\n`;
}
