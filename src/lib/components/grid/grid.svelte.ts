import type { DraftEditor } from '$lib/state/draft.svelte';
import type { PreferencesReader } from '$lib/state/preferences.svelte';
import type { Selection } from '$lib/state/selection.svelte';
import { SvelteMap } from 'svelte/reactivity';
import { entryAct, gridAct, type Key } from './keys';
import type { GridCell, GridRow } from './rows';
import { cellText, entryText, exactText, readCell } from './values';

/** Text that is not accepted: it stays in its cell, with what would be accepted under it. */
export interface Fault {
	text: string;
	message: string;
}

interface Place {
	row: number;
	column: number;
}

interface Entry {
	/** What stood in the entry when it opened: unchanged text changes nothing, so that looking never rounds. */
	opened: string;
	text: string;
	caret: boolean;
}

export interface GridOptions {
	rows: () => readonly GridRow[];
	editor: DraftEditor;
	selection: Selection;
	preferences: PreferencesReader;
	/** A pasted block that does not fit the cells as it stands: names, headers, an unreadable number. */
	onforeign: (text: string) => void;
}

/** Where the table stands, what is being typed, and what was not accepted. */
export class GridState {
	entry = $state.raw<Entry | null>(null);
	readonly faults = new SvelteMap<string, Fault>();
	/** The next Tab leaves the table. */
	released = $state(false);
	readonly #options: GridOptions;
	#column = $state(0);
	/** A row that is no point (wheel, coil-over), and the selection it was entered beside. */
	#aside = $state.raw<{ key: string; beside: string | null } | null>(null);
	#anchor = $state.raw<Place | null>(null);

	readonly rows = $derived.by(() => this.#options.rows());
	readonly row = $derived.by(() => {
		const { point } = this.#options.selection;
		const aside = this.#aside !== null && this.#aside.beside === point ? this.#aside.key : null;
		const found = this.rows.findIndex((row) =>
			aside === null ? row.point !== null && row.point === point : row.key === aside
		);
		return Math.max(0, found);
	});
	readonly column = $derived.by(() => Math.min(this.#column, (this.rows[this.row]?.cells.length ?? 1) - 1));
	/** The chosen block of cells, ends included. */
	readonly block = $derived.by(() => {
		const from = this.#anchor ?? { row: this.row, column: this.column };
		return {
			top: Math.min(from.row, this.row),
			bottom: Math.max(from.row, this.row),
			left: Math.min(from.column, this.column),
			right: Math.max(from.column, this.column)
		};
	});

	constructor(options: GridOptions) {
		this.#options = options;
	}

	get cell(): GridCell | null {
		return this.rows[this.row]?.cells[this.column] ?? null;
	}

	/** Whether the cell is in the chosen block. */
	holds(row: number, column: number): boolean {
		const { top, bottom, left, right } = this.block;
		return row >= top && row <= bottom && column >= left && column <= right;
	}

	/** Text of a cell as it stands: what was typed and not accepted, or the value. */
	text(cell: GridCell): string {
		return this.faults.get(cell.key)?.text ?? cellText(cell, this.#document, this.#options.preferences.current);
	}

	/** Whether the cell differs from what edits are marked against. */
	edited(cell: GridCell): boolean {
		return cell.read(this.#options.editor.baseline) !== cell.read(this.#document);
	}

	/** Goes to a cell; with `extend` the block grows from where it began. */
	go(row: number, column: number, extend = false): void {
		const to = this.rows[row];
		if (!to) return;
		const { selection } = this.#options;
		this.#anchor = extend ? (this.#anchor ?? { row: this.row, column: this.column }) : null;
		this.#column = column;
		this.released = false;
		if (to.point !== null) {
			this.#aside = null;
			selection.choose(to.point);
		} else this.#aside = { key: to.key, beside: selection.point };
	}

	/** Opens the cell for typing: with its own value, or with the first character typed. */
	open(typed: string | null = null): void {
		const { cell } = this;
		if (!cell || this.#options.editor.readOnly) return;
		const opened =
			this.faults.get(cell.key)?.text ?? entryText(cell, this.#document, this.#options.preferences.current);
		this.entry = { opened, text: typed ?? opened, caret: typed === null };
	}

	/** Takes what was typed. False when it is not accepted: it stays, and says what would be. */
	commit(): boolean {
		const { cell, entry } = this;
		if (!cell || !entry) return true;
		if (entry.text === entry.opened && !this.faults.has(cell.key)) {
			this.entry = null;
			return true;
		}
		if (!this.#take(cell, entry.text)) return false;
		this.entry = null;
		return true;
	}

	/** The person left the cell without finishing: what is not accepted stays in the cell with its message. */
	leave(): void {
		this.commit();
		this.entry = null;
	}

	/** Escape: the cell is again what it was. */
	restore(): void {
		if (this.cell) this.faults.delete(this.cell.key);
		this.entry = null;
	}

	/** One key on a cell. True when it was the table's, and the browser should do nothing with it. */
	press(pressed: Key): boolean {
		const act = gridAct(pressed);
		if (!act) return false;
		switch (act.do) {
			case 'move':
				this.#move(act.rows, act.columns, act.extend);
				return true;
			case 'edge':
				this.#edge(act.end, act.of, act.extend);
				return true;
			case 'next':
				return !this.released && this.#next(act.by);
			case 'edit':
				this.open();
				return true;
			case 'type':
				this.open(act.text);
				return true;
			case 'clear':
				this.#clear();
				return true;
			case 'all':
				this.go(0, 0);
				this.#anchor = { row: 0, column: 0 };
				this.go(this.rows.length - 1, 2, true);
				return true;
			case 'undo':
				this.#options.editor.undo();
				return true;
			case 'redo':
				this.#options.editor.redo();
				return true;
			case 'release':
				this.released = true;
				this.#anchor = null;
				return true;
		}
	}

	/** One key in an open entry. True when it was the table's. */
	type(pressed: Key): boolean {
		const { entry } = this;
		const act = entry && entryAct(pressed, entry.caret);
		if (!act) return false;
		if (act.do === 'restore') this.restore();
		else if (act.do === 'caret') this.entry = { ...entry, caret: !entry.caret };
		else if (this.commit() && act.then) {
			if ('by' in act.then) this.#next(act.then.by);
			else this.#move(act.then.rows, act.then.columns, false);
		}
		return true;
	}

	/** The chosen block as tab-separated lines, exact, in the person's units. */
	copy(): string {
		const { top, bottom, left, right } = this.block;
		const { current } = this.#options.preferences;
		return this.rows
			.slice(top, bottom + 1)
			.map((row) => row.cells.slice(left, right + 1).map((cell) => exactText(cell, this.#document, current)))
			.map((texts) => texts.join('\t'))
			.join('\n');
	}

	/** Puts a copied block in from the chosen cell on, as one step; what does not fit as it stands is handed on. */
	paste(text: string): void {
		const { editor, preferences, onforeign } = this.#options;
		if (editor.readOnly) return;
		const lines = text.replace(/\r\n?/g, '\n').replace(/\n+$/, '').split('\n');
		const block = lines.map((line) => line.split('\t'));
		const [first] = block;
		if (block.length === 1 && first?.length === 1) {
			if (this.cell) this.#take(this.cell, first[0]?.trim() ?? '');
			return;
		}
		const { top, left } = this.block;
		const pairs = block.flatMap((texts, row) =>
			texts.map((one, column) => {
				const cell = this.rows[top + row]?.cells[left + column];
				return { cell, read: cell ? readCell(cell, one.trim(), preferences.current) : null };
			})
		);
		const fitting = pairs.flatMap(({ cell, read }) => (cell && read?.ok ? [{ cell, value: read.value }] : []));
		if (fitting.length < pairs.length) return onforeign(text);
		editor.edit(
			(document) => fitting.forEach(({ cell, value }) => cell.write(document, value)),
			`pasting ${fitting.length} cells`
		);
		fitting.forEach(({ cell }) => this.faults.delete(cell.key));
		this.#anchor = { row: top, column: left };
		this.go(top + block.length - 1, left + Math.max(...block.map((texts) => texts.length)) - 1, true);
	}

	get #document() {
		return this.#options.editor.document;
	}

	#take(cell: GridCell, text: string): boolean {
		const read = readCell(cell, text, this.#options.preferences.current);
		if (!read.ok) {
			this.faults.set(cell.key, { text, message: `${cell.label}: ${read.message}` });
			return false;
		}
		this.faults.delete(cell.key);
		this.#options.editor.edit((document) => cell.write(document, read.value), cell.label);
		return true;
	}

	#clear(): void {
		const { top, bottom, left, right } = this.block;
		const cells = this.rows.slice(top, bottom + 1).flatMap((row) => row.cells.slice(left, right + 1));
		// A field that must hold a number says so, as if nothing had been typed into it.
		cells.forEach((cell) => (cell.empties ? this.faults.delete(cell.key) : this.#take(cell, '')));
		const clearable = cells.filter((cell) => cell.empties);
		const label = clearable.length === 1 ? `clearing ${clearable[0]?.label}` : `clearing ${clearable.length} cells`;
		this.#options.editor.edit((document) => clearable.forEach((cell) => cell.write(document, null)), label);
	}

	#move(rows: number, columns: number, extend: boolean): void {
		const row = Math.min(Math.max(this.row + rows, 0), this.rows.length - 1);
		const width = this.rows[row]?.cells.length ?? 1;
		const column = columns === 0 ? this.#column : Math.min(Math.max(this.column + columns, 0), width - 1);
		this.go(row, column, extend);
	}

	#edge(end: 'first' | 'last', of: 'row' | 'table', extend: boolean): void {
		const row = of === 'row' ? this.row : end === 'first' ? 0 : this.rows.length - 1;
		this.go(row, end === 'first' ? 0 : (this.rows[row]?.cells.length ?? 1) - 1, extend);
	}

	/** The next cell in reading order; false past the ends. */
	#next(by: 1 | -1): boolean {
		const width = this.rows[this.row]?.cells.length ?? 1;
		const column = this.column + by;
		if (column >= 0 && column < width) this.go(this.row, column);
		else {
			const to = this.rows[this.row + by];
			if (!to) return false;
			this.go(this.row + by, by > 0 ? 0 : to.cells.length - 1);
		}
		return true;
	}
}
