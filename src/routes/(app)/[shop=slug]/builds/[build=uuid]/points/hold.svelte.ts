import { markUnder, type MarkKey } from '$lib/drawing/linkage';
import { turnOrbit, unprojectMove, type ViewKey } from '$lib/drawing/projection';
import { POINT_ORDER } from '$lib/domain/points';
import type { Vec3 } from '$lib/kinematics';
import type { BuildFacts } from '$lib/schemas/build';
import type { Preferences } from '$lib/schemas/preferences';
import type { DraftEditor } from '$lib/state/draft.svelte';
import type { Selection } from '$lib/state/selection.svelte';
import { MARK_NAMES, type PointsModel } from './model.svelte';
import { movedTo, nudged, writePlace } from './place';
import { stepMm } from '$lib/charts/travel';

export interface HoldSource {
	readonly model: PointsModel;
	readonly editor: DraftEditor;
	readonly selection: Selection;
	readonly preferences: Preferences;
	readonly build: BuildFacts;
}

interface Held {
	view: ViewKey;
	key: MarkKey | null;
	pointer: number;
	/** Where it was pressed, sheet px. */
	x: number;
	y: number;
	start: Vec3 | null;
	dragging: boolean;
}

/** A press becomes a drag after this many px. */
const SLACK = 3;
const TURN = 5;

/** What the pointer and the keys do to points: choose, drag, nudge, measure; in the orbit view turn the eye. */
export class Hold {
	readonly #source: HoldSource;
	#held: Held | null = null;
	#frame = 0;
	#latest: { x: number; y: number; fine: boolean; level: boolean } | null = null;
	#lastPress: { key: MarkKey | null; x: number; y: number } = { key: null, x: 0, y: 0 };

	constructor(source: HoldSource) {
		this.#source = source;
	}

	/** The mark under a sheet place in a view, for hover and for telling a press on a point from one on the ground. */
	under(view: ViewKey, x: number, y: number, reach: number, next = false): MarkKey | null {
		const { model, selection } = this.#source;
		if (model.empty) return null;
		return markUnder(model.sheet.view(view)?.scene.marks ?? [], x, y, reach, selection.point, next);
	}

	/** A press in a view. True when it is ours: on a point, or anywhere in the orbit view. */
	press(view: ViewKey, x: number, y: number, pointer: number, reach: number): boolean {
		const { model, selection } = this.#source;
		const again =
			Math.hypot(x - this.#lastPress.x, y - this.#lastPress.y) < 4 && selection.point === this.#lastPress.key;
		const key = this.under(view, x, y, reach, again);
		this.#lastPress = { key, x, y };
		if (key !== null && model.measuring) {
			selection.setTrammel(key);
			return true;
		}
		if (key !== null) selection.choose(key);
		if (key === null && view !== 'orbit') return false;
		this.#held = {
			view,
			key,
			pointer,
			x,
			y,
			start: key && view !== 'orbit' ? model.entry(key) : null,
			dragging: false
		};
		return true;
	}

	/** The pointer moved; the document follows once a frame. */
	move(x: number, y: number, pointer: number, fine: boolean, level: boolean): void {
		const held = this.#held;
		if (!held || held.pointer !== pointer) return;
		if (!held.dragging && Math.hypot(x - held.x, y - held.y) < SLACK) return;
		if (!held.dragging) this.#begin(held);
		this.#latest = { x, y, fine, level };
		if (this.#frame === 0) this.#frame = requestAnimationFrame(() => this.#follow());
	}

	release(pointer: number): void {
		const held = this.#held;
		if (!held || held.pointer !== pointer) return;
		if (this.#frame !== 0) this.#follow();
		this.#held = null;
		this.#source.model.from = null;
		if (held.dragging && held.start) this.#source.editor.commitDrag();
	}

	/** Lets go and puts everything back. */
	cancel(): void {
		if (this.#frame !== 0) cancelAnimationFrame(this.#frame);
		this.#frame = 0;
		this.#held = null;
		this.#source.model.from = null;
		this.#source.editor.cancelDrag();
	}

	#begin(held: Held): void {
		held.dragging = true;
		const { editor, model } = this.#source;
		if (!held.start || !held.key || editor.readOnly) return;
		const shown = model.corner.places[held.key] ?? held.start;
		model.from = { key: held.key, place: shown };
		editor.beginDrag(`moving ${MARK_NAMES[held.key]}`);
	}

	#follow(): void {
		if (this.#frame !== 0) cancelAnimationFrame(this.#frame);
		this.#frame = 0;
		const [held, latest] = [this.#held, this.#latest];
		if (!held || !latest) return;
		const { model, editor, preferences, build } = this.#source;
		if (held.view === 'orbit') {
			model.sheet.orbit = turnOrbit(model.sheet.orbit, latest.x - held.x, latest.y - held.y);
			[held.x, held.y] = [latest.x, latest.y];
			return;
		}
		const view = model.sheet.view(held.view);
		if (!view || !held.start || !held.key) return;
		let [du, dv] = [(latest.x - held.x) / view.at.pxPerMm, (held.y - latest.y) / view.at.pxPerMm];
		if (latest.level) [du, dv] = Math.abs(du) > Math.abs(dv) ? [du, 0] : [0, dv];
		const to = movedTo(
			held.start,
			unprojectMove(view.eye.frame, [du, dv]),
			stepMm(latest.fine, preferences),
			build.datum,
			model.hand
		);
		const { key } = held;
		editor.dragTo((document) => writePlace(document, model.hand, key, to));
	}

	/** A key pressed in a view. True when it was one of ours. */
	key(view: ViewKey, event: KeyboardEvent): boolean {
		const { model, selection, editor } = this.#source;
		if (event.ctrlKey || event.metaKey || model.empty) return false;
		const arrow = ARROWS[event.key];
		if (arrow) return this.#arrow(view, arrow, event.shiftKey || event.altKey);
		if (event.key === ']' || event.key === '[') {
			const keys = POINT_ORDER.filter((key) => model.corner.places[key]);
			const at = selection.point ? keys.indexOf(selection.point) : -1;
			const next = event.key === ']' ? at + 1 : at < 0 ? keys.length - 1 : at - 1 + keys.length;
			selection.choose(keys[next % keys.length] ?? null);
			return true;
		}
		if ((event.key === 'Enter' || event.key === ' ') && event.target instanceof Element) {
			const key = (event.target.closest('[data-mark]')?.getAttribute('data-mark') ?? null) as MarkKey | null;
			if (!key) return false;
			if (model.measuring) selection.setTrammel(key);
			else selection.choose(key);
			return true;
		}
		if (event.key !== 'Escape') return false;
		if (editor.dragging) this.cancel();
		else if (selection.trammel) selection.foldTrammel();
		else selection.choose(null);
		return true;
	}

	#arrow(view: ViewKey, [du, dv]: readonly [number, number], fine: boolean): boolean {
		const { model, selection, editor, preferences } = this.#source;
		if (view === 'orbit') {
			model.sheet.orbit = turnOrbit(model.sheet.orbit, -du * TURN * 2, dv * TURN * 2);
			return true;
		}
		const key = selection.point;
		const from = key && model.entry(key);
		const frame = model.sheet.frame(view);
		if (!key || !from || !frame || editor.readOnly) return false;
		const step = stepMm(fine, preferences);
		const to = nudged(from, unprojectMove(frame, [du * step, dv * step]));
		editor.edit((document) => writePlace(document, model.hand, key, to), `moving ${MARK_NAMES[key]}`, `nudge.${key}`);
		return true;
	}
}

const ARROWS: Record<string, readonly [number, number]> = {
	ArrowLeft: [-1, 0],
	ArrowRight: [1, 0],
	ArrowUp: [0, 1],
	ArrowDown: [0, -1]
};
