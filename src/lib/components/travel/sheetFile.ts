import { mount, unmount, type Component } from 'svelte';
import { carriedFonts, pngOf } from './picture';
import { standaloneSvg } from './standalone';

/** Width of every exported sheet, px or points: A3 across, less its margins, whatever screen it is asked for on. */
export const FILE_WIDTH = 1168;

interface Sheet {
	svg: SVGSVGElement;
	ground: string;
}

/** Draws a sheet out of sight, hands it over while it stands in the page, and takes it away again. */
function drawn<Props extends Record<string, unknown>, Result>(
	part: Component<Props>,
	props: Props,
	use: (sheet: Sheet) => Result
): Result {
	const stage = document.createElement('div');
	stage.style.cssText = `position:absolute;left:-10000px;top:0;width:${FILE_WIDTH}px`;
	stage.inert = true;
	document.body.append(stage);
	const sheet = mount(part, { target: stage, props });
	try {
		const svg = stage.querySelector('svg');
		if (!svg) throw new Error('The sheet drew nothing.');
		const ground = getComputedStyle(svg.closest('.dye') ?? svg).backgroundColor;
		return use({ svg, ground });
	} finally {
		void unmount(sheet);
		stage.remove();
	}
}

/** A sheet as an SVG file, in the colours of the screen. */
export function sheetSvg<Props extends Record<string, unknown>>(
	part: Component<Props>,
	props: Props,
	title: string
): string {
	return drawn(part, props, ({ svg, ground }) => standaloneSvg(svg, { title, ground }));
}

/** A sheet as a PNG file at twice its size. */
export async function sheetPng<Props extends Record<string, unknown>>(
	part: Component<Props>,
	props: Props,
	title: string
): Promise<Blob> {
	const css = await carriedFonts();
	const { text, width, height } = drawn(part, props, ({ svg, ground }) => {
		const { width, height } = svg.viewBox.baseVal;
		return { text: standaloneSvg(svg, { title, ground, css }), width, height };
	});
	return pngOf(text, width, height);
}
