import { DATUM_AXES, axisWord } from './datum';
import type { Datum, DatumAxis } from './datum';

export const LENGTH_UNITS = ['mm', 'cm', 'm', 'in', 'ft'] as const;
export type LengthUnit = (typeof LENGTH_UNITS)[number];

/** Whether columns are the builder's datum, or the vehicle's own x forward, y left, z up from the ground below the axle. */
export type Axes = 'datum' | 'vehicle';

/** Where things stand in the rows of a pasted list. */
export interface Columns {
	/** Index of the first row after the head. */
	body: number;
	name: number | null;
	place: Record<DatumAxis, number>;
	/** The words over the columns, for messages. */
	word: Record<DatumAxis, string>;
	/** Fore and aft the other way round than the datum has it. */
	flipped: boolean;
	axes: Axes;
	/** Found in the head, for each column or for all. */
	unit: Record<DatumAxis, LengthUnit | null>;
}

const UNIT_WORDS: readonly (readonly [RegExp, LengthUnit])[] = [
	[/^(mm|millimet(er|re)s?)$/, 'mm'],
	[/^(cm|centimet(er|re)s?)$/, 'cm'],
	[/^(m|met(er|re)s?)$/, 'm'],
	[/^(in|inch|inches|")$/, 'in'],
	[/^(ft|foot|feet|')$/, 'ft']
];

/** The axis that a word names: as builders say it, or the letter of the vehicle's axis. */
const AXIS_WORDS: readonly (readonly [RegExp, DatumAxis, 'word' | 'aft' | 'letter'])[] = [
	[/^(out|outboard|outward|lateral|width|side|centreline|centerline|cl)$/, 'out', 'word'],
	[/^(up|height|vertical|high|above)$/, 'up', 'word'],
	[/^(fore|forward|fwd|longitudinal|long|ahead)$/, 'fore', 'word'],
	[/^(aft|rearward|back|behind)$/, 'fore', 'aft'],
	[/^x$/, 'fore', 'letter'],
	[/^y$/, 'out', 'letter'],
	[/^z$/, 'up', 'letter']
];

const wordsOf = (cell: string): string[] =>
	cell
		.toLowerCase()
		.replace(/″|”/g, '"')
		.split(/[^a-z"']+/)
		.filter((word) => word !== '');

function unitIn(cell: string): LengthUnit | null {
	for (const word of wordsOf(cell)) {
		const found = UNIT_WORDS.find(([pattern]) => pattern.test(word));
		if (found) return found[1];
	}
	return null;
}

function axisIn(cell: string): { axis: DatumAxis; by: 'word' | 'aft' | 'letter' } | null {
	const words = wordsOf(cell);
	for (const [pattern, axis, by] of AXIS_WORDS) {
		if (words.some((word) => pattern.test(word)) && !/\d/.test(cell)) return { axis, by };
	}
	return null;
}

interface Head {
	row: number;
	place: Record<DatumAxis, number>;
	by: Record<DatumAxis, 'word' | 'aft' | 'letter'>;
}

/** The first of the leading rows that names all three axes. */
function findHead(rows: readonly string[][]): Head | null {
	for (const [row, cells] of rows.slice(0, 12).entries()) {
		const found = new Map<DatumAxis, { place: number; by: 'word' | 'aft' | 'letter' }>();
		for (const [place, cell] of cells.entries()) {
			const axis = axisIn(cell);
			if (axis && !found.has(axis.axis)) found.set(axis.axis, { place, by: axis.by });
		}
		const [out, up, fore] = DATUM_AXES.map((axis) => found.get(axis));
		if (!out || !up || !fore) continue;
		return {
			row,
			place: { out: out.place, up: up.place, fore: fore.place },
			by: { out: out.by, up: up.by, fore: fore.by }
		};
	}
	return null;
}

/** A line of units under the head: nothing in it but units. */
function isUnitRow(cells: readonly string[] | undefined): cells is string[] {
	const filled = (cells ?? []).filter((cell) => cell !== '');
	return (
		filled.length > 0 && filled.every((cell) => wordsOf(cell).length === 1 && unitIn(cell) !== null && !/\d/.test(cell))
	);
}

/** A unit said above the head ("all dimensions in inches"); "m" and "in" alone are words of a sentence. */
function unitAbove(rows: readonly string[][]): LengthUnit | null {
	const text = rows.flat().join(' ').toLowerCase();
	const found =
		/\b(mm|millimet(?:er|re)s?|cm|inch(?:es)?)\b/.exec(text) ?? /units?\s*[:=]?\s*\(?(mm|cm|in|m)\b/.exec(text);
	return found ? unitIn(found[1] ?? '') : null;
}

const looksNumeric = (cell: string): boolean => /^[-+−–]?\s*[.,]?\d/.test(cell);

function columnsByHead(rows: readonly string[][], { row, place, by }: Head, datum: Datum): Columns {
	const cells = rows[row] ?? [];
	const units = isUnitRow(rows[row + 1]) ? rows[row + 1] : undefined;
	const above =
		unitAbove(rows.slice(0, row)) ?? unitIn(cells.filter((_, at) => !Object.values(place).includes(at)).join(' '));
	const unitAt = (at: number) => unitIn(cells[at] ?? '') ?? (units ? unitIn(units[at] ?? '') : null) ?? above;
	const vehicle = DATUM_AXES.every((axis) => by[axis] === 'letter');
	const body = row + (units ? 2 : 1);
	const first = rows.slice(body).find((one) => one.some((cell) => cell !== '')) ?? [];
	const others = cells.map((_, at) => at).filter((at) => !Object.values(place).includes(at));
	const named = others.find((at) => /name|point|joint|pivot|label|descr|part|where/i.test(cells[at] ?? ''));
	return {
		body,
		name: named ?? others.find((at) => !looksNumeric(first[at] ?? '') && (first[at] ?? '') !== '') ?? null,
		place,
		word: { out: cells[place.out] ?? 'out', up: cells[place.up] ?? 'up', fore: cells[place.fore] ?? 'fore' },
		flipped: !vehicle && by.fore !== 'letter' && (by.fore === 'aft') !== (datum.foreAft === 'aft'),
		axes: vehicle ? 'vehicle' : 'datum',
		unit: { out: unitAt(place.out), up: unitAt(place.up), fore: unitAt(place.fore) }
	};
}

/** Without a head: a name, where one stands before or after the numbers, then out, up, fore as the table has them. */
function columnsByOrder(rows: readonly string[][], datum: Datum): Columns | null {
	const first = rows.find((row) => row.filter(looksNumeric).length >= 3);
	if (!first) return null;
	const numeric = first.map((_, at) => at).filter((at) => looksNumeric(first[at] ?? ''));
	const [out, up, fore] = numeric.slice(-3);
	if (out === undefined || up === undefined || fore === undefined) return null;
	const name = first.findIndex((cell, at) => cell !== '' && !numeric.includes(at));
	// A row before it may lack a number and still be one of the list.
	const body = rows.findIndex((row) => [out, up, fore].some((at) => looksNumeric(row[at] ?? '')));
	const unit = unitAbove(rows.slice(0, body));
	return {
		body,
		name: name < 0 ? null : name,
		place: { out, up, fore },
		word: { out: 'out', up: 'up', fore: axisWord('fore', datum) },
		flipped: false,
		axes: 'datum',
		unit: { out: unit, up: unit, fore: unit }
	};
}

/** Where the names and the three coordinates stand, or null where no row has three numbers. */
export function findColumns(rows: readonly string[][], datum: Datum): Columns | null {
	const head = findHead(rows);
	return head ? columnsByHead(rows, head, datum) : columnsByOrder(rows, datum);
}
