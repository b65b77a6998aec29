/** What a key means in the table. Pure: told apart here, done by the grid's state. */
export type GridAct =
	| { do: 'move'; rows: number; columns: number; extend: boolean }
	/** To the first or last cell: of the row, or of the whole table. */
	| { do: 'edge'; end: 'first' | 'last'; of: 'row' | 'table'; extend: boolean }
	/** To the next or previous cell in reading order; past the ends the table is left. */
	| { do: 'next'; by: 1 | -1 }
	| { do: 'edit' }
	/** Starts an entry with this text. */
	| { do: 'type'; text: string }
	| { do: 'clear' }
	| { do: 'all' }
	| { do: 'undo' }
	| { do: 'redo' }
	/** The next Tab leaves the table. */
	| { do: 'release' };

/** What a key means while a cell is being typed into; anything else belongs to the text. */
export type EntryAct =
	| { do: 'commit'; then: { rows: number; columns: number } | { by: 1 | -1 } | null }
	| { do: 'restore' }
	/** F2: arrows move in the text instead of leaving the cell. */
	| { do: 'caret' };

export type Key = Pick<KeyboardEvent, 'key' | 'shiftKey' | 'ctrlKey' | 'metaKey' | 'altKey'>;

const ARROWS: Record<string, { rows: number; columns: number }> = {
	ArrowUp: { rows: -1, columns: 0 },
	ArrowDown: { rows: 1, columns: 0 },
	ArrowLeft: { rows: 0, columns: -1 },
	ArrowRight: { rows: 0, columns: 1 }
};
const PAGE_ROWS = 8;

function withControl({ key, shiftKey }: Key): GridAct | null {
	const letter = key.toLowerCase();
	if (letter === 'z') return { do: shiftKey ? 'redo' : 'undo' };
	if (letter === 'y') return { do: 'redo' };
	if (letter === 'a') return { do: 'all' };
	if (key === 'Home' || key === 'End') {
		return { do: 'edge', end: key === 'Home' ? 'first' : 'last', of: 'table', extend: shiftKey };
	}
	if (key === 'ArrowLeft' || key === 'ArrowRight') {
		return { do: 'edge', end: key === 'ArrowLeft' ? 'first' : 'last', of: 'row', extend: shiftKey };
	}
	return null;
}

/** The act of a key on a cell that is not being typed into, or null: the key is not the table's. */
export function gridAct(pressed: Key): GridAct | null {
	const { key, shiftKey: extend, ctrlKey, metaKey, altKey } = pressed;
	if (altKey) return null;
	if (ctrlKey || metaKey) return withControl(pressed);
	const arrow = ARROWS[key];
	if (arrow) return { do: 'move', ...arrow, extend };
	switch (key) {
		case 'Enter':
			return { do: 'move', rows: extend ? -1 : 1, columns: 0, extend: false };
		case 'Tab':
			return { do: 'next', by: extend ? -1 : 1 };
		case 'Home':
		case 'End':
			return { do: 'edge', end: key === 'Home' ? 'first' : 'last', of: 'row', extend };
		case 'PageUp':
		case 'PageDown':
			return { do: 'move', rows: key === 'PageUp' ? -PAGE_ROWS : PAGE_ROWS, columns: 0, extend };
		case 'F2':
			return { do: 'edit' };
		case 'Delete':
		case 'Backspace':
			return { do: 'clear' };
		case 'Escape':
			return { do: 'release' };
		default:
			return key.length === 1 && key !== ' ' ? { do: 'type', text: key } : null;
	}
}

/** The act of a key in an open entry. `caret`: the arrows belong to the text. */
export function entryAct({ key, shiftKey, ctrlKey, metaKey, altKey }: Key, caret: boolean): EntryAct | null {
	if (ctrlKey || metaKey || altKey) return null;
	if (key === 'Enter') return { do: 'commit', then: { rows: shiftKey ? -1 : 1, columns: 0 } };
	if (key === 'Tab') return { do: 'commit', then: { by: shiftKey ? -1 : 1 } };
	if (key === 'Escape') return { do: 'restore' };
	if (key === 'F2') return { do: 'caret' };
	const arrow = ARROWS[key];
	return arrow && (arrow.rows !== 0 || !caret) && !shiftKey ? { do: 'commit', then: arrow } : null;
}
