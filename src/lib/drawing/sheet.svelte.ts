import { type DimensionText, type DimensionKey, type PlacedDimension, viewDimensions } from './figures';
import {
	extentsOf,
	layoutSheet,
	orbitCentre,
	type Extents,
	type SheetLayout,
	type SheetMode,
	type SheetSpec
} from './layout';
import type { MarkKey, PlacedMark } from './linkage';
import {
	ORBIT_HOME,
	orbitFrame,
	zoomed,
	type Frame,
	type Hand,
	type Placement,
	type ProjectionAngle,
	type ViewKey
} from './projection';
import { viewScene, type DrawnCorner, type Eye, type ViewScene } from './scene';

/** A zoom of one view: k times as large, moved by (x, y) px of the sheet. */
export interface Zoom {
	k: number;
	x: number;
	y: number;
}

export const NO_ZOOM: Zoom = { k: 1, x: 0, y: 0 };

/** What the sheet is drawn from; read anew whenever it changes. */
export interface SheetSource {
	readonly width: number;
	readonly height: number;
	readonly mode: SheetMode;
	readonly hand: Hand;
	readonly cell: SheetSpec['cell'];
	/** The corner in hand, moved by the travel slide. */
	readonly corner: DrawnCorner;
	/** The corner at ride height: it decides the room, so that the sheet keeps still while it moves. */
	readonly atRide: DrawnCorner;
	/** Corners that lie under it. */
	readonly ghosts: readonly DrawnCorner[];
	readonly dimensions: Partial<Record<DimensionKey, DimensionText>>;
	/** While true the room given to the corner does not change. */
	readonly holdStill: boolean;
}

/** One view ready to be drawn. */
export interface SheetView {
	key: ViewKey;
	box: { x: number; y: number; w: number; h: number };
	at: Placement;
	eye: Eye;
	scene: ViewScene;
	ghosts: ViewScene[];
	dimensions: PlacedDimension[];
	moved: boolean;
}

const VIEW_ORDER: readonly ViewKey[] = ['front', 'side', 'top', 'orbit'];
const FALLBACK_WHEEL = { centre: [0, 700, 300] as const, tyre: { radius: 300, width: 190, shoulder: 30 } };

/** The sheet of one corner: where everything lies, from what it is drawn from. Holds only how it is looked at. */
export class SheetModel {
	angle = $state<ProjectionAngle>('third');
	orbit = $state.raw(ORBIT_HOME);
	zooms = $state.raw<Record<ViewKey, Zoom>>({ front: NO_ZOOM, top: NO_ZOOM, side: NO_ZOOM, orbit: NO_ZOOM });
	readonly #source: SheetSource;
	#held: Extents | null = null;

	constructor(source: SheetSource) {
		this.#source = source;
	}

	readonly extents: Extents = $derived.by(() => {
		const { atRide, hand, holdStill } = this.#source;
		if (holdStill && this.#held) return this.#held;
		const wheel = atRide.wheel ?? { ...FALLBACK_WHEEL, centre: [0, hand === 'left' ? 700 : -700, 300] as const };
		const found = extentsOf(atRide.places, wheel);
		// The same room as before is the same object: nothing that hangs on it is worked out again.
		if (this.#held && JSON.stringify(this.#held) === JSON.stringify(found)) return this.#held;
		this.#held = found;
		return found;
	});

	readonly layout: SheetLayout = $derived.by(() => {
		const { width, height, mode, hand, cell } = this.#source;
		return layoutSheet({ width, height, mode, hand, cell, angle: this.angle, extents: this.extents });
	});

	readonly views: SheetView[] = $derived.by(() => {
		const { corner, ghosts, dimensions, hand } = this.#source;
		const outward = hand === 'left' ? 1 : -1;
		const views: SheetView[] = [];
		for (const key of VIEW_ORDER) {
			const window = this.layout.views[key];
			if (!window) continue;
			const zoom = this.zooms[key];
			const at = zoomed(window.at, zoom);
			const eye: Eye =
				key === 'orbit'
					? { key, frame: orbitFrame(this.orbit), about: orbitCentre(this.extents, hand) }
					: { key, frame: window.frame };
			const scene = viewScene(eye, at, corner);
			views.push({
				key,
				box: window.box,
				at,
				eye,
				scene,
				ghosts: ghosts.map((ghost) => viewScene(eye, at, ghost)),
				dimensions: viewDimensions(key, scene, window.box, dimensions, outward),
				moved: zoom !== NO_ZOOM
			});
		}
		return views;
	});

	view(key: ViewKey): SheetView | null {
		return this.views.find((view) => view.key === key) ?? null;
	}

	frame(key: ViewKey): Frame | null {
		return this.view(key)?.eye.frame ?? null;
	}

	mark(view: ViewKey, key: MarkKey): PlacedMark | null {
		return this.view(view)?.scene.marks.find((mark) => mark.key === key) ?? null;
	}

	zoom(key: ViewKey, zoom: Zoom): void {
		this.zooms = { ...this.zooms, [key]: zoom };
	}

	/** Zooms about the middle of a view's window. */
	zoomBy(key: ViewKey, factor: number): void {
		const window = this.layout.views[key];
		if (!window) return;
		const { k, x, y } = this.zooms[key];
		const to = Math.max(ZOOM_RANGE[0], Math.min(ZOOM_RANGE[1], k * factor));
		const [cx, cy] = [window.box.x + window.box.w / 2, window.box.y + window.box.h / 2];
		this.zoom(key, { k: to, x: cx - ((cx - x) * to) / k, y: cy - ((cy - y) * to) / k });
	}

	fit(key: ViewKey): void {
		this.zoom(key, NO_ZOOM);
		if (key === 'orbit') this.orbit = ORBIT_HOME;
	}
}

export const ZOOM_RANGE: readonly [number, number] = [0.5, 12];
