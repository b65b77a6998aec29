import Papa from 'papaparse';
import { parseLength } from '../parse';
import type { AxleDocument, PointEntry } from '../schemas/axle';
import type { Preferences } from '../schemas/preferences';
import { toDisplay } from '../units';
import { toCsv } from './csv';
import type { CsvCell } from './csv';
import { DATUM_AXES, PLACE_OF, axisWord, fromDatum, toDatum } from './datum';
import type { Datum, DatumAxis, DatumPoint, Side } from './datum';
import { decimalOf, plainDecimal } from './decimalSign';
import { findColumns } from './pasteColumns';
import type { Axes, Columns, LengthUnit } from './pasteColumns';
import { readPointName } from './pointNames';
import { POINTS, POINT_ORDER, entryOf } from './points';
import type { PointKey } from './points';

/** How a pasted list is to be read; the person's answers come in here. */
export interface PasteOptions {
	datum: Datum;
	/** The side for rows whose name tells none. */
	side: Side;
	preferences: Pick<Preferences, 'length' | 'numbers'>;
	/** Answered: the decimal sign of the list. */
	decimal?: Preferences['numbers'];
	/** Answered: the unit of all numbers without one; overrides the head. */
	unit?: LengthUnit;
	/** Answered: whether columns are the datum's or the vehicle's x, y, z. */
	axes?: Axes;
	/** The first point where a list has no names; `upperFront` unless said. */
	first?: PointKey;
}

/** One coordinate as pasted. `mm` in the builder's datum; null where the cell is empty, wrong or cannot be read yet. */
export interface PasteCell {
	text: string;
	mm: number | null;
	/** `row 3, up: "abc" is not a length. …` */
	error: string | null;
}

export interface PasteRow {
	/** Counted from 1 in the pasted text. */
	line: number;
	name: string;
	side: Side;
	/** The point it is for; null: the row is left out and `problem` says why. */
	key: PointKey | null;
	cells: Record<DatumAxis, PasteCell>;
	problem: string | null;
}

/** Something only the person can tell; the answer goes into `PasteOptions` by the name of `about`. */
export interface PasteQuestion {
	about: 'decimal' | 'unit';
	message: string;
	choices: readonly { value: Preferences['numbers'] | LengthUnit; label: string }[];
}

/** What a paste would do. Nothing is applied. */
export interface PasteResult {
	rows: PasteRow[];
	/** The decimal sign has to be asked first: no number is read yet. */
	ambiguous: boolean;
	questions: PasteQuestion[];
	unit: LengthUnit;
	unitFrom: 'head' | 'person' | 'preferences';
	axes: Axes;
	/** How the list was taken, in words. */
	taken: string;
	/** Rows and cells that cannot be taken, each named by its row and column. */
	errors: string[];
	/** What may be applied: stored axes, null where a cell was empty (the old coordinate stays). */
	points: { side: Side; key: PointKey; point: PointEntry }[];
}

const LONGEST = 100_000;
const MOST_ROWS = 400;

/** Lines that end in three numbers parted by spaces: their commas are decimal signs, not what parts the cells. */
function isSpaced(body: string): boolean {
	const lines = body.split('\n').filter((line) => line.trim() !== '');
	const ending = lines.filter((line) =>
		/(?:^|\s)(?:[-+−–]?\d+(?:[.,]\d+)?\s+){2}[-+−–]?\d+(?:[.,]\d+)?\s*$/.test(line)
	);
	return ending.length > lines.length / 2;
}

/** The cells of a pasted text: parted by tabs, semicolons or commas, else by spaces. An empty line keeps its number. */
function cellsOf(text: string): string[][] {
	const body = text
		.replace(/^\ufeff/, '')
		.replace(/\r\n?/g, '\n')
		.replace(/\s+$/, '');
	const sign = ['\t', ';'].find((one) => body.includes(one));
	const delimiter = sign ?? (/,.*,/.test(body) && !isSpaced(body) ? ',' : undefined);
	if (delimiter) {
		const { data } = Papa.parse<string[]>(body, { delimiter, skipEmptyLines: false });
		return data.map((row) => row.map((cell) => cell.trim()));
	}
	return body.split('\n').map((line) => {
		const wide = line.trim().split(/\s{2,}/);
		if (wide.length >= 3) return wide;
		const words = line.trim().split(/\s+/);
		return words.length > 3 ? [words.slice(0, -3).join(' '), ...words.slice(-3)] : words;
	});
}

const isBlank = (row: readonly string[]): boolean => row.every((cell) => cell === '');

interface Reading {
	options: PasteOptions;
	columns: Columns;
	unitOf: Record<DatumAxis, LengthUnit>;
	axes: Axes;
	decimal: Preferences['numbers'] | null;
}

const unread = (text: string): PasteCell => ({ text, mm: null, error: null });

/** A cell as it stands in its column, mm, before it is turned into the datum. */
function readCell(text: string, line: number, axis: DatumAxis, { columns, unitOf, decimal }: Reading): PasteCell {
	if (/^[-–—]?$/.test(text) || decimal === null) return unread(text);
	const unit = unitOf[axis];
	const plain = plainDecimal(text, decimal);
	const asIs = parseLength(plain, { numbers: decimal, length: unit === 'in' ? 'in' : 'mm' });
	const bare = /^[-+−–]?[\d.,\s]+$/.test(plain);
	const read = bare && unit !== 'in' ? parseLength(`${plain} ${unit}`, { numbers: decimal, length: 'mm' }) : asIs;
	if (read.ok) return { text, mm: read.mm, error: null };
	const shown = text.length > 24 ? `${text.slice(0, 24)}…` : text;
	return { text, mm: null, error: `row ${line}, ${columns.word[axis]}: "${shown}" is not a length. ${read.message}` };
}

/** The cells in the datum: fore and aft turned where the list has them the other way, x y z brought over. */
function cellsInDatum(raw: Record<DatumAxis, PasteCell>, side: Side, reading: Reading): Record<DatumAxis, PasteCell> {
	const { options, columns, axes } = reading;
	if (axes === 'datum') {
		const { fore } = raw;
		return columns.flipped && fore.mm !== null ? { ...raw, fore: { ...fore, mm: 0 - fore.mm } } : raw;
	}
	const outward = (y: number | null) => (side === 'right' && y !== null ? -Math.abs(y) : y);
	const shown: DatumPoint = toDatum([raw.fore.mm, outward(raw.out.mm), raw.up.mm], options.datum, side);
	return {
		out: { ...raw.out, mm: shown.out },
		up: { ...raw.up, mm: shown.up },
		fore: { ...raw.fore, mm: shown.fore }
	};
}

/** The point of a row: by its name, or by its place in the order of the table. */
function pointOf(
	name: string,
	place: number,
	{ columns, options }: Reading
): { key: PointKey | null; side: Side; problem: string | null } {
	if (columns.name === null) {
		const key = POINT_ORDER[POINT_ORDER.indexOf(options.first ?? 'upperFront') + place] ?? null;
		return { key, side: options.side, problem: key ? null : 'more rows than points' };
	}
	const named = readPointName(name);
	if (named) return { key: named.key, side: named.side ?? options.side, problem: null };
	const problem = name === '' ? 'no point is named' : `"${name.slice(0, 40)}" is not one of the points`;
	return { key: null, side: options.side, problem };
}

function readRows(body: { cells: string[]; line: number }[], reading: Reading): PasteRow[] {
	const taken = new Map<string, number>();
	return body.map(({ cells, line }, place) => {
		const { columns } = reading;
		const name = columns.name === null ? '' : (cells[columns.name] ?? '');
		const { key, side, problem } = pointOf(name, place, reading);
		const cell = (axis: DatumAxis) => readCell(cells[columns.place[axis]] ?? '', line, axis, reading);
		const row = {
			line,
			name,
			side,
			cells: cellsInDatum({ out: cell('out'), up: cell('up'), fore: cell('fore') }, side, reading)
		};
		const before = key && taken.get(`${side} ${key}`);
		if (key && before) return { ...row, key: null, problem: `the ${POINTS[key].name} stands in row ${before} already` };
		if (key) taken.set(`${side} ${key}`, line);
		return { ...row, key, problem };
	});
}

const DECIMAL_QUESTION: PasteQuestion = {
	about: 'decimal',
	message: 'Which is the decimal sign in this list? Its numbers can be read either way.',
	choices: [
		{ value: 'point', label: 'Point: 12.375 is twelve and three eighths' },
		{ value: 'comma', label: 'Comma: 12,375 is twelve and three eighths' }
	]
};

/** Numbers without a unit whose size fits the other system better: points of a car lie some hundred mm, or some ten inches, out. */
function unitQuestion(rows: readonly PasteRow[], unit: LengthUnit): PasteQuestion | null {
	const texts = rows.flatMap(({ key, cells }) => (key ? DATUM_AXES.map((axis) => cells[axis].text) : []));
	const sizes = texts
		.filter((text) => /^[-+−–]?[\d.,]+$/.test(text))
		.map((text) => parseFloat(text.replace(/^[-+−–]/, '')));
	const largest = Math.max(0, ...sizes.filter(Number.isFinite));
	const doubtful = unit === 'mm' ? largest > 0 && largest <= 60 : unit === 'in' && largest >= 120;
	if (!doubtful) return null;
	return {
		about: 'unit',
		message: `No unit is named and the largest number is ${Math.round(largest)}. Are these mm or inches?`,
		choices: [
			{ value: 'mm', label: 'mm' },
			{ value: 'in', label: 'inches' }
		]
	};
}

function takenAs({ columns, axes, options }: Reading, unit: LengthUnit): string {
	const names = columns.name === null ? 'points in the order of the table' : 'points by name';
	if (axes === 'vehicle') return `${names}; x forward, y left, z up from the ground below the axle; ${unit}`;
	const along = columns.flipped
		? options.datum.foreAft === 'fore'
			? 'aft, turned to fore'
			: 'fore, turned to aft'
		: options.datum.foreAft;
	const order = [...DATUM_AXES].sort((a, b) => columns.place[a] - columns.place[b]);
	return `${names}; ${order.map((axis) => (axis === 'fore' ? along : axis)).join(', ')}; ${unit}`;
}

function nothing(message: string, { preferences }: PasteOptions): PasteResult {
	const unit = preferences.length;
	return {
		rows: [],
		ambiguous: false,
		questions: [],
		unit,
		unitFrom: 'preferences',
		axes: 'datum',
		taken: '',
		errors: [message],
		points: []
	};
}

function applicable(rows: readonly PasteRow[], datum: Datum): PasteResult['points'] {
	return rows.flatMap(({ key, side, cells }) => {
		const wrong = DATUM_AXES.some((axis) => cells[axis].error !== null);
		const empty = DATUM_AXES.every((axis) => cells[axis].mm === null);
		if (!key || wrong || empty) return [];
		const shown = { out: cells.out.mm, up: cells.up.mm, fore: cells.fore.mm };
		return [{ side, key, point: fromDatum(shown, datum, side) }];
	});
}

/**
 * Reads a pasted block or a CSV file of points. Column heads (out, up, fore or aft, in any order, or x, y, z) and point names in
 * many spellings are recognised; without heads the order is out, up, fore, without names that of the table. Nothing is applied.
 */
export function readPaste(text: string, options: PasteOptions): PasteResult {
	if (text.length > LONGEST)
		return nothing('This is too long for a list of points: at most 100,000 characters.', options);
	const all = cellsOf(text);
	const columns = findColumns(all, options.datum);
	if (!columns)
		return nothing(
			'No row has three numbers. A list has a name and out, up, fore in each row, or three numbers.',
			options
		);
	const body = all
		.map((cells, at) => ({ cells, line: at + 1 }))
		.slice(columns.body)
		.filter(({ cells }) => !isBlank(cells));
	if (body.length > MOST_ROWS)
		return nothing(`This is too long for a list of points: at most ${MOST_ROWS} rows.`, options);
	const numbers = body.flatMap(({ cells }) => DATUM_AXES.map((axis) => cells[columns.place[axis]] ?? ''));
	const unitOf = (axis: DatumAxis) => options.unit ?? columns.unit[axis] ?? options.preferences.length;
	const reading: Reading = {
		options,
		columns,
		unitOf: { out: unitOf('out'), up: unitOf('up'), fore: unitOf('fore') },
		axes: options.axes ?? columns.axes,
		decimal: options.decimal ?? decimalOf(numbers, options.preferences.numbers)
	};
	const rows = readRows(body, reading);
	const unit = reading.unitOf.out;
	const unitFrom = options.unit ? 'person' : columns.unit.out ? 'head' : 'preferences';
	const ambiguous = reading.decimal === null;
	const unitDoubt = unitFrom === 'preferences' ? unitQuestion(rows, unit) : null;
	const doubt = ambiguous ? DECIMAL_QUESTION : unitDoubt;
	const errors = rows.flatMap(({ line, problem, cells }) =>
		problem ? [`row ${line}: ${problem}`] : DATUM_AXES.flatMap((axis) => cells[axis].error ?? [])
	);
	const points = ambiguous ? [] : applicable(rows, options.datum);
	return {
		rows,
		ambiguous,
		questions: doubt ? [doubt] : [],
		unit,
		unitFrom,
		axes: reading.axes,
		taken: takenAs(reading, unit),
		errors,
		points
	};
}

/** A pasted point over the one that stood there: empty cells keep the old coordinate. */
export function mergedPoint(before: Readonly<PointEntry>, pasted: Readonly<PointEntry>): PointEntry {
	const at = (axis: DatumAxis) => pasted[PLACE_OF[axis]] ?? before[PLACE_OF[axis]];
	return [at('fore'), at('out'), at('up')];
}

/** The points as a CSV that `readPaste` takes back: names, then out, up, fore (or aft) in the builder's datum and the person's unit. */
export function pointsToCsv(
	document: AxleDocument,
	datum: Datum,
	preferences: Pick<Preferences, 'length' | 'numbers'>
): string {
	const unit = preferences.length;
	const units = { length: unit, angle: 'decimal', force: 'N' } as const;
	const number = (mm: number | null) => (mm === null ? null : Math.round(toDisplay(mm, 'length', units) * 1e9) / 1e9);
	const rows: CsvCell[][] = [['point', ...DATUM_AXES.map((axis) => `${axisWord(axis, datum)} ${unit}`)]];
	const sides = document.right === 'mirror' ? (['left'] as const) : (['left', 'right'] as const);
	for (const side of sides) {
		const corner = side === 'left' ? document.left : document.right;
		if (corner === 'mirror') continue;
		for (const key of POINT_ORDER) {
			const entry = entryOf(corner, key);
			if (!entry) continue;
			const shown = toDatum(entry, datum, side);
			const name = sides.length > 1 ? `${side} ${POINTS[key].name}` : POINTS[key].name;
			rows.push([name, ...DATUM_AXES.map((axis) => number(shown[axis]))]);
		}
	}
	return toCsv(rows, preferences);
}
