import { LINK_NAMES } from '$lib/domain/points';
import { OUTPUTS, reasonOf } from '$lib/domain/outputs';
import { formatDelta, formatQuantity, unitLabel } from '$lib/format';
import type { CornerState, Sweep } from '$lib/kinematics';
import type { FigureKey } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';

export interface TableColumn {
	key: FigureKey;
	label: string;
	unit: string;
	sign: string;
}

export interface TableCell {
	text: string;
	/** Why there is no figure; null where there is one. */
	reason: string | null;
}

export interface TableRow {
	/** mm. */
	travel: number;
	text: string;
	/** What binds here, in words; null where the travel goes on. */
	binds: string | null;
	cells: TableCell[];
}

/** Rows of one page: the usual range by its usual step stands on one. */
export const PAGE_ROWS = 41;

export function tableColumns(keys: readonly FigureKey[], preferences: Preferences): TableColumn[] {
	return keys.map((key) => {
		const { short, quantity, sign } = OUTPUTS[key];
		return { key, label: short, unit: unitLabel(quantity, preferences), sign };
	});
}

/** How many pages a count of rows takes, and the page asked for brought among them. */
export function pageOf(rows: number, asked: number): { page: number; pages: number; from: number; to: number } {
	const pages = Math.max(1, Math.ceil(rows / PAGE_ROWS));
	const page = Math.max(1, Math.min(pages, asked));
	return { page, pages, from: (page - 1) * PAGE_ROWS, to: Math.min(rows, page * PAGE_ROWS) };
}

/** Rows of a sweep from bump down to droop, as the chart stands, from the `from`-th to before the `to`-th. `ride` is the corner at ride height. */
export function tableRows(
	sweep: Sweep<CornerState>,
	ride: CornerState,
	keys: readonly FigureKey[],
	preferences: Preferences,
	from = 0,
	to = sweep.states.length
): TableRow[] {
	const bindsAt = (travel: number): string | null => {
		const limit = [sweep.lowLimit, sweep.highLimit].find((one) => one && Math.abs(one.value - travel) < 1e-9);
		return limit ? `${LINK_NAMES[limit.locks]} binds` : null;
	};
	return [...sweep.states]
		.reverse()
		.slice(from, to)
		.map((state) => ({
			travel: state.travel,
			text: formatDelta(state.travel, 'length', preferences),
			binds: bindsAt(state.travel),
			cells: keys.map((key) => {
				const { quantity, read } = OUTPUTS[key];
				const value = read(state, ride);
				return {
					text: formatQuantity(value, quantity, preferences),
					reason: value === null ? reasonOf(key, state) : null
				};
			})
		}));
}

/** Every reason for a dash among some rows, once, with the figure's name: "motion ratio: needs the coil-over". */
export function reasonsAmong(rows: readonly TableRow[], columns: readonly TableColumn[]): string[] {
	const told = columns.flatMap(({ label }, place) =>
		rows
			.map(({ cells }) => cells[place]?.reason)
			.filter((reason) => typeof reason === 'string')
			.map((reason) => `${label}: ${reason}`)
	);
	return [...new Set(told)];
}

/** The place of the row nearest to a travel (mm) among some rows, or −1 where there are none. */
export function nearestRow(rows: readonly TableRow[], travel: number): number {
	return rows.reduce((best, row, place) => {
		const kept = rows[best];
		return !kept || Math.abs(row.travel - travel) < Math.abs(kept.travel - travel) ? place : best;
	}, -1);
}
