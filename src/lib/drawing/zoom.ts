import { select, zoom as d3zoom, zoomIdentity, type D3ZoomEvent } from 'd3';
import type { Attachment } from 'svelte/attachments';
import type { Box } from './layout';
import { ZOOM_RANGE, type Zoom } from './sheet.svelte';

export interface ZoomSpec {
	/** The window in sheet pixels. */
	box: () => Box;
	zoom: () => Zoom;
	onzoom: (zoom: Zoom) => void;
	/** True where a press belongs to a point, not to the sheet under it. */
	taken: (x: number, y: number) => boolean;
	/** Where the page itself scrolls, the wheel zooms only with Ctrl, and one finger scrolls. */
	scrolls: () => boolean;
}

const SHEET = { k: 1, x: 0, y: 0 };

/** Zoom and pan of one view by wheel, drag on the empty sheet, and two fingers. */
export function zoomable(spec: ZoomSpec): Attachment<SVGGElement> {
	return (node) => {
		const behaviour = d3zoom<SVGGElement, unknown>()
			.scaleExtent([...ZOOM_RANGE])
			.extent(() => {
				const { x, y, w, h } = spec.box();
				return [
					[x, y],
					[x + w, y + h]
				];
			})
			.filter((event: MouseEvent | WheelEvent | TouchEvent) => allowed(event, node, spec))
			.on('zoom', ({ transform, sourceEvent }: D3ZoomEvent<SVGGElement, unknown>) => {
				if (sourceEvent) spec.onzoom({ k: transform.k, x: transform.x, y: transform.y });
			});
		const chosen = select(node);
		chosen.call(behaviour).on('dblclick.zoom', null);
		return () => {
			chosen.on('.zoom', null);
		};
	};
}

/** d3 keeps the transform on the node; before each gesture it is set to ours, which buttons may have changed. */
function hold(node: SVGGElement & { __zoom?: unknown }, { k, x, y }: Zoom): void {
	node.__zoom = zoomIdentity.translate(x, y).scale(k);
}

function allowed(event: MouseEvent | WheelEvent | TouchEvent, node: SVGGElement, spec: ZoomSpec): boolean {
	if (event.type === 'wheel') {
		hold(node, spec.zoom());
		return !spec.scrolls() || (event as WheelEvent).ctrlKey;
	}
	if ('touches' in event) return event.touches.length > 1 || !spec.scrolls();
	const { button, clientX, clientY } = event as MouseEvent;
	// A figure that is pressed to be typed is no place to pan from.
	if (button !== 0 || (event.target as Element).closest('.editable')) return false;
	const matrix = node.ownerSVGElement?.getScreenCTM()?.inverse();
	const at = matrix ? new DOMPoint(clientX, clientY).matrixTransform(matrix) : SHEET;
	hold(node, spec.zoom());
	return !spec.taken(at.x, at.y);
}
