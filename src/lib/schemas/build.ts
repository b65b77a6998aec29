import { z } from 'zod';
import type { AxleDocument } from './axle';

export const STAGES = ['quoted', 'laidOut', 'inFabrication', 'onItsWheels', 'delivered'] as const;
export type Stage = (typeof STAGES)[number];

/** The stages in the words of the shop. */
export const STAGE_WORDS: Record<Stage, string> = {
	quoted: 'quoted',
	laidOut: 'laid out',
	inFabrication: 'in fabrication',
	onItsWheels: 'on its wheels',
	delivered: 'delivered'
};

/** Accepted range of a fact, in its stored unit. */
export interface Range {
	low: number;
	high: number;
	unit: string;
	label: string;
}

/** The numeric facts of a build with their limits: mm, kg, and the brake share as a fraction. */
export const FACT_RANGES = {
	wheelbase: { low: 1000, high: 6000, unit: 'mm', label: 'Wheelbase' },
	track: { low: 600, high: 2600, unit: 'mm', label: 'Track' },
	loadedRadius: { low: 100, high: 800, unit: 'mm', label: 'Loaded radius' },
	rideHeight: { low: 20, high: 1000, unit: 'mm', label: 'Ride height' },
	frontMass: { low: 50, high: 5000, unit: 'kg', label: 'Front mass' },
	rearMass: { low: 50, high: 5000, unit: 'kg', label: 'Rear mass' },
	unsprungCornerMass: { low: 1, high: 300, unit: 'kg', label: 'Unsprung corner mass' },
	cgHeight: { low: 100, high: 1500, unit: 'mm', label: 'Height of the centre of gravity' },
	frontBrakeShare: { low: 0, high: 1, unit: '', label: 'Front brake share' }
} as const satisfies Record<string, Range>;
export type FactName = keyof typeof FACT_RANGES;
export const FACT_NAMES = Object.keys(FACT_RANGES) as FactName[];

function fact(name: FactName) {
	const { low, high, unit, label } = FACT_RANGES[name];
	const message = `${label}: a number from ${low} to ${high}${unit ? ` ${unit}` : ''}, or nothing.`;
	return z.number({ error: message }).min(low, message).max(high, message).nullable().default(null);
}

/** Where the builder measures from. `height`: datum plane above ground at ride height, mm; `foreOrigin`: x of the datum's zero, mm. */
export const datumSchema = z.object({
	origin: z.enum(['ground', 'table', 'rail'], { error: 'Datum: ground, table or rail.' }),
	height: z.number().min(-2000).max(2000),
	foreAft: z.enum(['fore', 'aft'], { error: 'Datum: fore or aft is positive.' }),
	foreOrigin: z.number().min(-10000).max(10000)
});

const nameField = z.string().trim().min(1, 'Name: 1 to 80 characters.').max(80, 'Name: at most 80 characters.');
const clientField = z.string().trim().max(80, 'Client: at most 80 characters.');
const tyreField = z.string().trim().max(40, 'Tyre size: at most 40 characters, such as 205/55R16.');
const notesField = z.string().max(10000, 'Notes: at most 10,000 characters.');
const stageField = z.enum(STAGES, { error: `Stage: one of ${STAGES.join(', ')}.` });

/** What the API takes to create a build, in stored units. */
export const buildInputSchema = z.object({
	name: nameField,
	client: clientField.default(''),
	stage: stageField.default('quoted'),
	datum: datumSchema.default({ origin: 'ground', height: 0, foreAft: 'fore', foreOrigin: 0 }),
	wheelbase: fact('wheelbase'),
	track: fact('track'),
	tyreSize: tyreField.default(''),
	loadedRadius: fact('loadedRadius'),
	rideHeight: fact('rideHeight'),
	frontMass: fact('frontMass'),
	rearMass: fact('rearMass'),
	unsprungCornerMass: fact('unsprungCornerMass'),
	cgHeight: fact('cgHeight'),
	frontBrakeShare: fact('frontBrakeShare'),
	notes: notesField.default('')
});
export type BuildInput = z.infer<typeof buildInputSchema>;

/** A field that may be left out; its default is dropped, or a missing key would reset the stored value. */
function maybe<Field extends z.ZodType>(field: z.ZodDefault<Field> | Field) {
	return (field instanceof z.ZodDefault ? (field.unwrap() as Field) : field).optional();
}

const { shape } = buildInputSchema;

/** What the API takes to change a build: only the keys given change. */
export const buildPatchSchema = z.object({
	name: maybe(shape.name),
	client: maybe(shape.client),
	stage: maybe(shape.stage),
	datum: maybe(shape.datum),
	wheelbase: maybe(shape.wheelbase),
	track: maybe(shape.track),
	tyreSize: maybe(shape.tyreSize),
	loadedRadius: maybe(shape.loadedRadius),
	rideHeight: maybe(shape.rideHeight),
	frontMass: maybe(shape.frontMass),
	rearMass: maybe(shape.rearMass),
	unsprungCornerMass: maybe(shape.unsprungCornerMass),
	cgHeight: maybe(shape.cgHeight),
	frontBrakeShare: maybe(shape.frontBrakeShare),
	notes: maybe(shape.notes),
	archived: z.boolean().optional(),
	people: z.array(z.uuid()).max(100).optional()
});
export type BuildPatch = z.infer<typeof buildPatchSchema>;

const typed = z.string().trim().max(40).default('');

/**
 * The build form of pages: numbers stay as typed, in the person's units, so that nothing typed is lost;
 * the server reads them with src/lib/parse.ts. Brake share is typed in percent.
 */
export const buildFormSchema = z.object({
	name: nameField,
	client: clientField.default(''),
	stage: stageField.default('quoted'),
	datumOrigin: datumSchema.shape.origin.default('ground'),
	datumHeight: typed,
	datumForeAft: datumSchema.shape.foreAft.default('fore'),
	datumForeOrigin: typed,
	wheelbase: typed,
	track: typed,
	tyreSize: tyreField.default(''),
	loadedRadius: typed,
	rideHeight: typed,
	frontMass: typed,
	rearMass: typed,
	unsprungCornerMass: typed,
	cgHeight: typed,
	frontBrakePercent: typed,
	notes: notesField.default(''),
	people: z.array(z.uuid()).max(100).default([])
});
export type BuildForm = z.infer<typeof buildFormSchema>;

export const BUILD_SORTS = ['updated', 'name', 'client', 'stage'] as const;

/** The list's search parameters; anything unreadable falls back, since an address bar is not a form. */
export const buildListSchema = z.object({
	q: z.string().trim().max(80).catch(''),
	stage: z.enum(STAGES).nullable().catch(null),
	sort: z.enum(BUILD_SORTS).catch('updated'),
	dir: z.enum(['up', 'down']).nullable().catch(null),
	archived: z.enum(['yes', 'no']).catch('no'),
	page: z.coerce.number().int().min(1).max(100000).catch(1)
});
export type BuildListQuery = z.infer<typeof buildListSchema>;

export interface BuildPerson {
	id: string;
	name: string;
	role: 'technician' | 'client';
}

/** A build as its reader may see it; `null` in client, notes and people also means "not shown to your role". */
export interface BuildFacts extends Omit<BuildInput, 'client' | 'notes'> {
	id: string;
	client: string | null;
	notes: string | null;
	people: BuildPerson[] | null;
	archivedAt: string | null;
	updatedAt: string;
}

export interface BuildListItem {
	id: string;
	name: string;
	client: string | null;
	stage: Stage;
	/** Letter of the newest revision the reader may see. */
	letter: string | null;
	archivedAt: string | null;
	updatedAt: string;
}

export interface BuildList {
	items: BuildListItem[];
	total: number;
	page: number;
	pages: number;
}

export interface DraftData {
	version: number;
	document: AxleDocument;
	updatedAt: string;
	updatedBy: string;
	/** Letter of the revision the draft was started from. */
	parent: string | null;
}

export interface RevisionSummary {
	id: string;
	letter: string;
	number: number;
	note: string;
	parentLetter: string | null;
	hash: string;
	createdAt: string;
	createdBy: string;
	releasedAt: string | null;
	releasedBy: string | null;
}

/** The figures computed when a revision was released: figure key → value at ride height, per side. */
export interface ReleasedFigures {
	kernelVersion: string;
	left: Record<string, number | null>;
	right: Record<string, number | null>;
}

export interface RevisionFull extends RevisionSummary {
	document: AxleDocument;
	figures: ReleasedFigures | null;
}

/** Body of `POST …/revisions`. `requestId` makes a repeated click the same revision. */
export const keepSchema = z.object({
	note: z.string().trim().min(1, 'Note: say in a few words what changed.').max(500, 'Note: at most 500 characters.'),
	requestId: z.uuid('requestId: a UUID made by the sender.'),
	draftVersion: z.number().int().min(1)
});
export type KeepInput = z.infer<typeof keepSchema>;

/** Body of `POST …/draft/start`. */
export const startSchema = z.object({
	letter: z.string().regex(/^[A-Z]{1,4}$/, 'letter: a revision letter such as C.')
});
