import type { CornerState, Sweep, SweepLimit } from '../kinematics';
import type { FigureKey } from '../schemas/axle';
import type { Preferences } from '../schemas/preferences';
import { decimalsOf, formatNumber, unitLabel } from '../format';
import { toDisplay } from '../units';
import { toCsv } from './csv';
import type { CsvCell } from './csv';
import { OUTPUTS } from './outputs';
import { LINK_NAMES } from './points';

/** A sweep as rows of numbers in the person's units; null where a figure does not exist. The first column is travel. */
export interface TravelTable {
	readonly head: readonly { key: FigureKey | 'travel'; label: string; unit: string }[];
	readonly rows: readonly (readonly (number | null)[])[];
	/** Where the corner binds, in words: at most one at each end. */
	readonly limits: readonly string[];
}

/** Decimals in a file: the arithmetic of a sweep holds no more, and a nought reads as a nought. */
const FILE_DECIMALS = 12;
/** What a file says of its own figures. */
export const FILE_PRECISION = `Figures as computed, to ${FILE_DECIMALS} decimals: geometry, not strength.`;

function limitInWords(end: 'droop' | 'bump', limit: SweepLimit | undefined, preferences: Preferences): string[] {
	if (!limit) return [];
	const shown = toDisplay(limit.value, 'length', preferences);
	const where = formatNumber(shown, decimalsOf('length', preferences), preferences);
	return [`${end} ends at ${where} ${unitLabel('length', preferences)}: the ${LINK_NAMES[limit.locks]} binds`];
}

/** The figures of a sweep, one row a state. Angles are decimal degrees whatever the person writes. `ride` is the corner at ride height. */
export function travelTable(
	sweep: Sweep<CornerState>,
	ride: CornerState,
	keys: readonly FigureKey[],
	preferences: Preferences
): TravelTable {
	const units = { ...preferences, angle: 'decimal' } as const;
	const outputs = keys.map((key) => OUTPUTS[key]);
	return {
		head: [
			{ key: 'travel', label: 'Travel', unit: unitLabel('length', units) },
			...outputs.map(({ key, label, quantity }) => ({ key, label, unit: unitLabel(quantity, units) }))
		],
		rows: sweep.states.map((state) => [
			toDisplay(state.travel, 'length', units),
			...outputs.map((output) => {
				const value = output.read(state, ride);
				return value === null ? null : toDisplay(value, output.quantity, units);
			})
		]),
		limits: [
			...limitInWords('droop', sweep.lowLimit, preferences),
			...limitInWords('bump', sweep.highLimit, preferences)
		]
	};
}

/**
 * The table as a CSV file: one head row with units, then numbers at full precision; binding limits and `notes` as rows of text
 * at the end.
 */
export function travelCsv(table: TravelTable, preferences: Preferences, notes: readonly string[] = []): string {
	const exact = (value: number | null) => (value === null ? null : Number(value.toFixed(FILE_DECIMALS)));
	const rows: CsvCell[][] = [
		table.head.map(({ label, unit }) => (unit === '' ? label : `${label}, ${unit}`)),
		...table.rows.map((row) => row.map(exact)),
		...[...table.limits, ...notes].map((note) => [note])
	];
	return toCsv(rows, preferences);
}
