import type { Transaction } from 'sequelize';
import { revisionLetter } from '../domain/letters';
import type { AxleDocument } from '../schemas/axle';
import type { DraftData } from '../schemas/build';
import type { Actor } from './actor';
import { Build, database, Draft, Person } from './db';
import { canonical, readDocument } from './documents';
import { refuse, refuseUnknown } from './problem';
import { findBuild } from './visibility';

/** What a saved draft answers. */
export type DraftSaved = Pick<DraftData, 'version' | 'updatedAt' | 'updatedBy'>;

/** The build's one draft. */
export async function readDraft(actor: Actor, buildId: string, transaction?: Transaction): Promise<DraftData> {
	const row = await Draft.findOne({
		where: { shopId: actor.shopId, buildId },
		include: { model: Person, as: 'author', attributes: ['name'] },
		...(transaction ? { transaction } : {})
	});
	if (!row) refuseUnknown();
	return {
		version: row.version,
		document: readDocument(row.document),
		updatedAt: row.updatedAt.toISOString(),
		updatedBy: row.author?.name ?? '',
		parent: row.parentNumber === null ? null : revisionLetter(row.parentNumber)
	};
}

/** Replaces the draft when `version` is still the current one; otherwise 409 with what is stored now. */
export async function writeDraft(
	actor: Actor,
	buildId: string,
	version: number,
	document: AxleDocument
): Promise<DraftSaved> {
	return replaceDraft(actor, buildId, version, { document: canonical(document) });
}

/** Replaces the draft's document (and its parent where given) when `version` is current; 409 otherwise. The build is locked first, as everywhere. */
export async function replaceDraft(
	actor: Actor,
	buildId: string,
	version: number,
	change: { document: string; parentNumber?: number | null }
): Promise<DraftSaved> {
	return database().transaction(async (transaction) => {
		await findBuild(actor, buildId, transaction, true);
		const updatedAt = new Date();
		const { shopId, personId } = actor;
		// The version in the WHERE clause decides: of two writers on one version the second changes no row.
		const [count] = await Draft.update(
			{ ...change, version: version + 1, updatedAt, updatedBy: personId },
			{ where: { shopId, buildId, version }, transaction }
		);
		if (count === 0) await refuseStale(actor, buildId, transaction);
		await Build.update({ updatedAt }, { where: { shopId, id: buildId }, transaction });
		return { version: version + 1, updatedAt: updatedAt.toISOString(), updatedBy: actor.personName };
	});
}

/** 409 with the draft as it is stored now. */
export async function refuseStale(actor: Actor, buildId: string, transaction?: Transaction): Promise<never> {
	const { version, document, updatedAt, updatedBy } = await readDraft(actor, buildId, transaction);
	refuse(409, `${updatedBy} changed the draft in the meantime.`, {
		current: { version, document, updatedAt, updatedBy }
	});
}
