import { formatExact, formatQuantity, formatWithUnit, MINUS, NONE, unitLabel } from '$lib/format';
import { parseQuantity } from '$lib/parse';
import type { AxleDocument } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';
import { fromDisplay, MM_PER_INCH } from '$lib/units';
import type { GridCell, GridRow } from './rows';

/** Between stored numbers and the text of a cell, in the person's units. */

/** What was typed as it is stored (null: emptied), or what would be accepted. */
export type Read = { ok: true; value: number | null } | { ok: false; message: string };

/** Closer than this the shown text says the whole number, mm or degrees: opening the cell need not show more. */
const SAME = 1e-7;

/** The value as it stands in the table: rounded to its decimals, an en dash for none. */
export function cellText(cell: GridCell, document: AxleDocument, preferences: Preferences): string {
	return formatQuantity(cell.read(document), cell.quantity, preferences);
}

/** The value as it is opened for typing: as shown where that is all of it, otherwise in full. */
export function entryText(cell: GridCell, document: AxleDocument, preferences: Preferences): string {
	const value = cell.read(document);
	if (value === null) return '';
	const shown = formatQuantity(value, cell.quantity, preferences);
	const back = parseQuantity(shown, cell.quantity, preferences);
	const whole = back.ok && Math.abs(back.value - value) < SAME;
	return whole ? shown : formatExact(value, cell.quantity, preferences);
}

/** The value in full with a plain minus, for a spreadsheet. */
export function exactText(cell: GridCell, document: AxleDocument, preferences: Preferences): string {
	return formatExact(cell.read(document), cell.quantity, preferences).replace(MINUS, '-');
}

/** Reads what was typed into a cell; emptied means not typed yet, where the cell may be empty. */
export function readCell(cell: GridCell, text: string, preferences: Preferences): Read {
	const typed = text.trim();
	if (typed === '' || typed === NONE) {
		return cell.empties
			? { ok: true, value: null }
			: { ok: false, message: 'a number is needed here, 0 if there is none.' };
	}
	const read = parseQuantity(typed, cell.quantity, preferences);
	if (!read.ok || (read.value >= cell.low && read.value <= cell.high)) return read;
	const low = formatQuantity(cell.low, cell.quantity, preferences);
	return { ok: false, message: `accepted from ${low} to ${formatWithUnit(cell.high, cell.quantity, preferences)}.` };
}

/** One press of a ± key, in the stored unit: 1 mm or 1/16 in, 0.05°, 1 N/mm or 5 lb/in, 10 N or 5 lb. */
export function stepOf(quantity: GridCell['quantity'], preferences: Preferences): number {
	if (quantity === 'length') return preferences.length === 'mm' ? 1 : MM_PER_INCH / 16;
	if (quantity === 'angle') return 0.05;
	const [metric, imperial] = quantity === 'rate' ? [1, 5] : [10, 5];
	return fromDisplay(preferences.force === 'N' ? metric : imperial, quantity, preferences);
}

/** The step in words, for the key's name. */
export function stepWords(quantity: GridCell['quantity'], preferences: Preferences): string {
	if (quantity === 'length' && preferences.length === 'in') return '1/16 in';
	return formatWithUnit(stepOf(quantity, preferences), quantity, preferences).replace(/[.,]0+(?=\D|$)/, '');
}

/** What stands after a lone number of a row: its unit and what the sign means. Degrees and minutes carry their own marks. */
export function unitNote(row: GridRow, preferences: Preferences): string {
	const quantity = row.cells[0]?.quantity ?? 'length';
	const marked = quantity === 'angle' && preferences.angle === 'minutes';
	return [marked ? '' : unitLabel(quantity, preferences), row.note ?? ''].filter(Boolean).join(' ');
}
