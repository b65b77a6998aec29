import { revisionLetter } from '../domain/letters';
import type { AlignmentRecord, RecordInput } from '../schemas/record';
import type { Actor } from './actor';
import { note } from './audit';
import { AlignmentRow, database, Person } from './db';
import { newId } from './ids';
import { findRevision } from './revisions';
import { viewFor } from './serializers';
import { findBuild } from './visibility';

/** The as-found and as-set records of a revision the actor may see, newest first. */
export async function listRecords(actor: Actor, buildId: string, letter: string): Promise<AlignmentRecord[]> {
	const revision = await findRevision(actor, buildId, letter);
	const rows = await AlignmentRow.findAll({
		where: { shopId: actor.shopId, buildId, revisionId: revision.id },
		include: { model: Person, as: 'author', attributes: ['name'] },
		order: [
			['createdAt', 'DESC'],
			['id', 'DESC']
		],
		limit: 200
	});
	return rows.map((row) => toRecord(actor, row, revision.number));
}

/** Appends a record to a revision the actor may see; the same request id again gives the record it made. */
export async function addRecord(
	actor: Actor,
	buildId: string,
	letter: string,
	{ requestId, kind, ...entry }: RecordInput
): Promise<{ record: AlignmentRecord; created: boolean }> {
	const { row, number, created } = await database().transaction(async (transaction) => {
		await findBuild(actor, buildId, transaction, true);
		const revision = await findRevision(actor, buildId, letter, transaction);
		const { shopId } = actor;
		const same = await AlignmentRow.findOne({ where: { shopId, buildId, requestId }, transaction });
		if (same) return { row: same, number: revision.number, created: false };
		const row = await AlignmentRow.create(
			{
				id: newId(),
				shopId,
				buildId,
				revisionId: revision.id,
				revisionHash: revision.hash,
				kind,
				entry: JSON.stringify(entry),
				requestId,
				createdAt: new Date(),
				createdBy: actor.personId
			},
			{ transaction }
		);
		return { row, number: revision.number, created: true };
	});
	if (created) await note(actor, 'record.added', { buildId, detail: `${letter} ${kind}` });
	const author = await Person.findByPk(row.createdBy, { attributes: ['name'] });
	return { record: toRecord(actor, row, number, author?.name), created };
}

function toRecord(
	actor: Actor,
	row: AlignmentRow,
	number: number,
	authorName = row.author?.name ?? ''
): AlignmentRecord {
	return viewFor(actor.role).record({
		...(JSON.parse(row.entry) as Omit<RecordInput, 'requestId' | 'kind'>),
		id: row.id,
		kind: row.kind,
		revisionLetter: revisionLetter(number),
		revisionHash: row.revisionHash,
		createdAt: row.createdAt.toISOString(),
		createdBy: authorName
	});
}
