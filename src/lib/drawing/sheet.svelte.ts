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
import type { Box } from './layout';
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
import { reuse } from './reuse';
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

/** One view's window: where it is, how it looks, and whether it shows another part than the sheet laid out. */
interface SheetWindow {
	key: ViewKey;
	box: Box;
	at: Placement;
	eye: Eye;
	moved: boolean;
}

/** One view ready to be drawn. */
export interface SheetView extends SheetWindow {
	scene: ViewScene;
	ghosts: ViewScene[];
	dimensions: PlacedDimension[];
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
	/** What was drawn last: parts that did not change keep their identity, so that nothing is drawn twice. */
	#drawn: SheetView[] | undefined;

	constructor(source: SheetSource) {
		this.#source = source;
	}

	readonly extents: Extents = $derived.by(() => {
		// Asked first: while the sheet is held still a moving corner is not even looked at.
		if (this.#source.holdStill && this.#held) return this.#held;
		const { atRide, hand } = this.#source;
		const wheel = atRide.wheel ?? { ...FALLBACK_WHEEL, centre: [0, hand === 'left' ? 700 : -700, 300] as const };
		this.#held = reuse(this.#held ?? undefined, extentsOf(atRide.places, wheel));
		return this.#held;
	});

	readonly layout: SheetLayout = $derived.by(() => {
		const { width, height, mode, hand, cell } = this.#source;
		return layoutSheet({ width, height, mode, hand, cell, angle: this.angle, extents: this.extents });
	});

	/** The views' windows after zoom and turn, without what is drawn in them. */
	readonly #windows: SheetWindow[] = $derived.by(() => {
		const { hand } = this.#source;
		return VIEW_ORDER.flatMap((key) => {
			const window = this.layout.views[key];
			if (!window) return [];
			const zoom = this.zooms[key];
			const turned = key === 'orbit';
			const frame = turned ? orbitFrame(this.orbit) : window.frame;
			const eye: Eye = turned ? { key, frame, about: orbitCentre(this.extents, hand) } : { key, frame };
			return [{ key, box: window.box, at: zoomed(window.at, zoom), eye, moved: zoom !== NO_ZOOM }];
		});
	});

	/** Corners under the one in hand, per window: a drag leaves them as they are. */
	readonly #ghosts: ViewScene[][] = $derived.by(() => {
		const { ghosts } = this.#source;
		return this.#windows.map(({ eye, at }) => ghosts.map((ghost) => viewScene(eye, at, ghost)));
	});

	readonly views: SheetView[] = $derived.by(() => {
		const { corner, dimensions, hand } = this.#source;
		const outward = hand === 'left' ? 1 : -1;
		const views = this.#windows.map((window, k) => {
			const scene = viewScene(window.eye, window.at, corner);
			return {
				...window,
				scene,
				ghosts: this.#ghosts[k] ?? [],
				dimensions: viewDimensions(window.key, scene, window.box, dimensions, outward)
			};
		});
		this.#drawn = reuse(this.#drawn, views);
		return this.#drawn;
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
