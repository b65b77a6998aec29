import type { Actor } from './actor';
import { AuditEntry } from './db';
import { newId } from './ids';

/** Acts that leave a trace. */
export type AuditAct =
	| 'sign-up'
	| 'sign-in'
	| 'sign-in.failed'
	| 'sign-in.limited'
	| 'sign-out'
	| 'refused'
	| 'build.created'
	| 'build.archived'
	| 'build.restored'
	| 'build.people'
	| 'revision.kept'
	| 'revision.released'
	| 'record.added'
	| 'stock.changed';

/** Whoever acts: an actor of a shop, or a person outside any shop (null where nobody is known). */
export type AuditSubject =
	Pick<Actor, 'personId' | 'shopId' | 'requestId'> | { personId: string | null; shopId: null; requestId: string };

/** Adds a row to the audit; rows are never changed. `detail` holds letters and act names, never what a person typed. */
export async function note(
	actor: AuditSubject,
	act: AuditAct,
	{ buildId = null, detail = '' }: { buildId?: string | null; detail?: string } = {}
): Promise<void> {
	await AuditEntry.create({
		id: newId(),
		shopId: actor.shopId,
		personId: actor.personId,
		act,
		buildId,
		detail,
		requestId: actor.requestId,
		createdAt: new Date()
	});
}
