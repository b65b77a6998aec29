import { revisionNumber } from '$lib/domain/letters';
import type { AxleDocument, FigureKey } from '$lib/schemas/axle';
import type { RevisionSummary } from '$lib/schemas/build';

/** How many geometries are compared. */
export const FEWEST = 2;
export const MOST = 4;

/** The name of the draft in the address. */
export const DRAFT = 'draft';

/** One geometry of the comparison, in the order in which they were chosen. */
export interface CompareEntry {
	/** As in the address and at the line's end: a letter, or "draft". */
	key: string;
	/** Null for the draft. */
	letter: string | null;
	/** "revision C", "the draft". */
	name: string;
	note: string;
	document: AxleDocument;
	/** Its look among the series: the newest is steel solid, whatever the order. */
	seriesIndex: number;
}

/** The curves drawn until others are chosen. */
export const USUAL_COMPARED: readonly FigureKey[] = [
	'camber',
	'bumpSteer',
	'caster',
	'rollCentreHeight',
	'halfTrack',
	'motionRatio'
];

type Given = { letter: string | null; note: string; document: AxleDocument };

/** How new a geometry is: letters follow each other, the draft follows them all. */
const age = (letter: string | null): number => (letter === null ? Infinity : (revisionNumber(letter) ?? 0));

/** What the page was given as entries; `draft` is the draft as it stands here, edits that are not sent yet included. */
export function entriesOf(compared: readonly Given[], draft: AxleDocument | null): CompareEntry[] {
	const newestFirst = compared.map(({ letter }) => age(letter)).sort((a, b) => b - a);
	return compared.map(({ letter, note, document }) => ({
		key: letter ?? DRAFT,
		letter,
		name: letter === null ? 'the draft' : `revision ${letter}`,
		note,
		document: letter === null ? (draft ?? document) : document,
		seriesIndex: newestFirst.indexOf(age(letter))
	}));
}

/** The newest of the entries: its letter stands in the title block, its targets are drawn. */
export function newestOf(entries: readonly CompareEntry[]): CompareEntry | null {
	return entries.find(({ seriesIndex }) => seriesIndex === 0) ?? null;
}

/** "revision B", "the draft" at the beginning of a sentence. */
export const atStart = (name: string): string => name.charAt(0).toUpperCase() + name.slice(1);

export interface Choice {
	value: string;
	label: string;
}

const SHORT_NOTE = 34;

/** Every geometry that can be chosen, newest first. A long note is cut in the list; the whole stands with the revision. */
export function choices(revisions: readonly RevisionSummary[], draft: boolean): Choice[] {
	const cut = (note: string) => (note.length > SHORT_NOTE ? `${note.slice(0, SHORT_NOTE - 1).trimEnd()}…` : note);
	return [
		...(draft ? [{ value: DRAFT, label: 'Draft' }] : []),
		...revisions.map(({ letter, note }) => ({ value: letter, label: note ? `${letter} · ${cut(note)}` : letter }))
	];
}

/** What a place in the chooser may hold: everything that no other place holds. */
export function choicesAt(all: readonly Choice[], keys: readonly string[], place: number): Choice[] {
	return all.filter(({ value }) => keys[place] === value || !keys.includes(value));
}

/** The chosen keys with one replaced. */
export const replaced = (keys: readonly string[], place: number, key: string): string[] =>
	keys.map((one, k) => (k === place ? key : one));

/** The chosen keys with the newest that is not among them added; the same where all are, or four are. */
export function added(keys: readonly string[], all: readonly Choice[]): string[] {
	const next = all.find(({ value }) => !keys.includes(value));
	return next && keys.length < MOST ? [...keys, next.value] : [...keys];
}
