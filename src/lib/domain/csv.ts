import Papa from 'papaparse';
import type { Preferences } from '../schemas/preferences';

export type CsvCell = string | number | null;

/** Tells a spreadsheet that the file is UTF-8. */
const BYTE_ORDER_MARK = '\ufeff';
/** What a spreadsheet may take for the beginning of a formula (plain and full width), or strips before one. */
const FORMULA = /^[=+\-@\t\r\n\uff1d\uff0b\uff0d\uff20]/;

/** Text that a spreadsheet will show and not compute: a leading apostrophe before what would begin a formula. */
export function neutralised(text: string): string {
	return FORMULA.test(text) ? `'${text}` : text;
}

/**
 * Rows as a CSV file (RFC 4180, CRLF, UTF-8 with its mark). Text is neutralised, numbers stay numbers, null is an empty cell. With
 * a decimal comma, cells are parted by semicolons, as spreadsheets there expect.
 */
export function toCsv(rows: readonly (readonly CsvCell[])[], { numbers }: Pick<Preferences, 'numbers'>): string {
	const comma = numbers === 'comma';
	const written = rows.map((row) =>
		row.map((cell) => {
			if (cell === null || (typeof cell === 'number' && !Number.isFinite(cell))) return '';
			if (typeof cell === 'string') return neutralised(cell);
			return comma ? String(cell + 0).replace('.', ',') : String(cell + 0);
		})
	);
	return BYTE_ORDER_MARK + Papa.unparse(written, { delimiter: comma ? ';' : ',', newline: '\r\n' });
}

/** A file name of plain letters: "copper-coupe-rev-c-travel.csv". */
export function fileName(parts: readonly string[], extension: string): string {
	const plain = parts
		.join(' ')
		.normalize('NFKD')
		.replace(/[\u0300-\u036f]/g, '')
		.toLowerCase()
		.replace(/[^a-z0-9]+/g, '-')
		.replace(/^-+|-+$/g, '')
		.slice(0, 80);
	return `${plain || 'export'}.${extension}`;
}
