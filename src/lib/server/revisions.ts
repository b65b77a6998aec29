import type { IncludeOptions, Transaction } from 'sequelize';
import { revisionLetter, revisionNumber } from '../domain/letters';
import type { DraftData, KeepInput, ReleasedFigures, RevisionFull, RevisionSummary } from '../schemas/build';
import type { Actor } from './actor';
import { note } from './audit';
import { database, Draft, Person, Release, Revision } from './db';
import { canonical, readDocument, solveDocument } from './documents';
import { readDraft, refuseStale, replaceDraft } from './drafts';
import { releasedFigures } from './figures';
import { newId, sha256 } from './ids';
import { log } from './log';
import { seesEverything } from './policy';
import { refuse, refuseUnknown } from './problem';
import { viewFor } from './serializers';
import { findBuild } from './visibility';

const SUMMARY_COLUMNS = ['id', 'number', 'parentNumber', 'note', 'hash', 'createdAt'];

/** The revisions of a build the actor may see, newest first, without their documents. */
export async function listRevisions(actor: Actor, buildId: string): Promise<RevisionSummary[]> {
	const rows = await Revision.findAll({
		attributes: SUMMARY_COLUMNS,
		where: { shopId: actor.shopId, buildId },
		include: joins(actor, ['releasedAt']),
		order: [['number', 'DESC']]
	});
	const released = new Set(rows.filter((row) => row.release).map((row) => row.number));
	return rows.map((row) => summarise(actor, row, released));
}

/** One revision with its document, checked against its hash, and the figures stored at release; 404 when not the actor's to see. */
export async function readRevision(
	actor: Actor,
	buildId: string,
	letter: string,
	transaction?: Transaction
): Promise<RevisionFull> {
	const row = await findRevision(actor, buildId, letter, transaction);
	const parentReleased = row.parentNumber !== null && (await isReleased(actor, buildId, row.parentNumber));
	const released = new Set(parentReleased && row.parentNumber !== null ? [row.parentNumber] : []);
	const figures = row.release ? (JSON.parse(row.release.figures) as Pick<ReleasedFigures, 'left' | 'right'>) : null;
	return {
		...summarise(actor, row, released),
		document: readDocument(verified(row, letter)),
		figures:
			figures && row.release
				? { kernelVersion: row.release.kernelVersion, left: figures.left, right: figures.right }
				: null
	};
}

/**
 * Makes the draft permanent under the next letter: one transaction under the build's lock. A request id seen before
 * gives the revision it made. Refuses a stale version (409) and a draft that is incomplete or cannot be solved (422).
 */
export async function keepRevision(
	actor: Actor,
	buildId: string,
	input: KeepInput
): Promise<{ revision: RevisionSummary; created: boolean }> {
	const { number, created } = await database().transaction(async (transaction) => {
		await findBuild(actor, buildId, transaction, true);
		const { shopId } = actor;
		const same = await Revision.findOne({
			attributes: ['number'],
			where: { shopId, buildId, requestId: input.requestId },
			transaction
		});
		if (same) return { number: same.number, created: false };
		const draft = await Draft.findOne({ where: { shopId, buildId }, transaction, lock: true });
		if (!draft) refuseUnknown();
		if (draft.version !== input.draftVersion) await refuseStale(actor, buildId, transaction);
		const number = await addRevision(actor, draft, input, transaction);
		await draft.update({ parentNumber: number }, { transaction });
		return { number, created: true };
	});
	const letter = revisionLetter(number);
	if (created) await note(actor, 'revision.kept', { buildId, detail: letter });
	return { revision: await readSummary(actor, buildId, letter), created };
}

/** Adds the draft's document as the next revision; gives its number. */
async function addRevision(actor: Actor, draft: Draft, input: KeepInput, transaction: Transaction): Promise<number> {
	const { shopId, buildId, parentNumber } = draft;
	const document = readDocument(draft.document);
	solveDocument(document);
	const bytes = canonical(document);
	const last = await Revision.max<number | null, Revision>('number', { where: { shopId, buildId }, transaction });
	const number = (last ?? 0) + 1;
	await Revision.create(
		{
			id: newId(),
			shopId,
			buildId,
			number,
			parentNumber,
			note: input.note,
			document: bytes,
			hash: sha256(bytes),
			requestId: input.requestId,
			createdAt: new Date(),
			createdBy: actor.personId
		},
		{ transaction }
	);
	return number;
}

/** Replaces the draft by a revision's document, which becomes its parent; 409 when `version` is not the draft's. */
export async function startDraftFrom(
	actor: Actor,
	buildId: string,
	version: number,
	letter: string
): Promise<DraftData> {
	const revision = await readRevision(actor, buildId, letter);
	await replaceDraft(actor, buildId, version, {
		document: canonical(revision.document),
		parentNumber: revision.number
	});
	return readDraft(actor, buildId);
}

/** Releases a revision for fabrication, with the figures computed now; released before, it stays as it was. */
export async function releaseRevision(actor: Actor, buildId: string, letter: string): Promise<RevisionSummary> {
	const made = await database().transaction(async (transaction) => {
		await findBuild(actor, buildId, transaction, true);
		const row = await findRevision(actor, buildId, letter, transaction);
		if (row.release) return false;
		const { kernelVersion, ...figures } = releasedFigures(solveDocument(readDocument(verified(row, letter))));
		await Release.create(
			{
				id: newId(),
				shopId: actor.shopId,
				buildId,
				revisionId: row.id,
				figures: JSON.stringify(figures),
				kernelVersion,
				releasedAt: new Date(),
				releasedBy: actor.personId
			},
			{ transaction }
		);
		return true;
	});
	if (made) await note(actor, 'revision.released', { buildId, detail: letter });
	return readSummary(actor, buildId, letter);
}

/** The row behind a letter when the actor may see it; 404 otherwise. */
export async function findRevision(
	actor: Actor,
	buildId: string,
	letter: string,
	transaction?: Transaction
): Promise<Revision> {
	const number = revisionNumber(letter);
	if (number === null) refuseUnknown();
	const row = await Revision.findOne({
		where: { shopId: actor.shopId, buildId, number },
		include: joins(actor),
		...(transaction ? { transaction } : {})
	});
	return row ?? refuseUnknown();
}

async function readSummary(actor: Actor, buildId: string, letter: string): Promise<RevisionSummary> {
	const { document: _document, figures: _figures, ...summary } = await readRevision(actor, buildId, letter);
	return summary;
}

async function isReleased(actor: Actor, buildId: string, number: number): Promise<boolean> {
	const include = { model: Release, as: 'release', required: true };
	return (await Revision.count({ where: { shopId: actor.shopId, buildId, number }, include })) > 0;
}

/** Author and release of a revision; for those who see released revisions only, the release is required. */
function joins(actor: Actor, releaseColumns?: string[]): IncludeOptions[] {
	const name = { attributes: ['name'] };
	return [
		{ model: Person, as: 'author', ...name },
		{
			model: Release,
			as: 'release',
			required: !seesEverything(actor.role),
			include: [{ model: Person, as: 'author', ...name }],
			...(releaseColumns ? { attributes: releaseColumns } : {})
		}
	];
}

function summarise(actor: Actor, row: Revision, released: Set<number>): RevisionSummary {
	return viewFor(actor.role).revision({
		id: row.id,
		letter: revisionLetter(row.number),
		number: row.number,
		note: row.note,
		parentLetter: row.parentNumber === null ? null : revisionLetter(row.parentNumber),
		parentReleased: row.parentNumber !== null && released.has(row.parentNumber),
		hash: row.hash,
		createdAt: row.createdAt.toISOString(),
		createdBy: row.author?.name ?? '',
		releasedAt: row.release?.releasedAt.toISOString() ?? null,
		releasedBy: row.release?.author?.name ?? null
	});
}

/** The stored bytes when they still give the stored hash: a revision that changed is not shown as one. */
function verified(row: Revision, letter: string): string {
	if (sha256(row.document) === row.hash) return row.document;
	log.error({ revision: row.id }, 'revision does not match its hash');
	refuse(
		500,
		`Revision ${letter} does not match its fingerprint: its stored data was changed. It is not shown; restore it from a backup.`
	);
}
