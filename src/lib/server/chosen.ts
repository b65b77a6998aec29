import { axleHash } from '../domain/axle';
import type { AxleDocument } from '../schemas/axle';
import type { RevisionFull } from '../schemas/build';
import type { Actor } from './actor';
import { readDraft } from './drafts';
import { can } from './policy';
import { refuse } from './problem';
import { listRevisions, readRevision } from './revisions';

/** One geometry to compare: a revision, or the draft (`letter` null). */
export interface Compared {
	letter: string | null;
	/** The draft's parent letter, for its title block. */
	parent: string | null;
	note: string;
	document: AxleDocument;
}

/**
 * The revision named by `?rev=` (404 when it is not the actor's to see); without one null, which means the draft, or
 * for those who do not see drafts the newest revision they may see.
 */
export async function chosenRevision(
	actor: Actor,
	buildId: string,
	letter: string | null
): Promise<RevisionFull | null> {
	if (letter) return readRevision(actor, buildId, letter.toUpperCase());
	if (can(actor.role, 'draft.read')) return null;
	const [newest] = await listRevisions(actor, buildId);
	return newest ? readRevision(actor, buildId, newest.letter) : null;
}

/** The two to four geometries named by `?revs=B,C,draft`; without one the newest revision and the draft, or, where the draft is that revision or not to be seen, the newest two. */
export async function comparedRevisions(actor: Actor, buildId: string, names: string | null): Promise<Compared[]> {
	const wanted = names
		? [
				...new Set(
					names
						.split(',')
						.map((name) => name.trim())
						.filter(Boolean)
				)
			]
		: await proposed(actor, buildId);
	if (wanted.length > 4) refuse(400, 'Compare takes two to four: revision letters or "draft".');
	return Promise.all(
		wanted.map((name) =>
			name.toLowerCase() === 'draft' ? readComparedDraft(actor, buildId) : readCompared(actor, buildId, name)
		)
	);
}

/** Older first, since differences count from the first. */
async function proposed(actor: Actor, buildId: string): Promise<string[]> {
	const [newest, before] = await listRevisions(actor, buildId);
	const kept = [before, newest].filter((one) => one !== undefined).map(({ letter }) => letter);
	if (!can(actor.role, 'draft.read')) return kept;
	// A draft that nobody has touched since its revision would be compared with itself.
	const { document } = await readDraft(actor, buildId);
	const touched = !newest || (await axleHash(document)) !== newest.hash;
	return touched || !before ? [...kept.slice(-1), 'draft'] : kept;
}

async function readComparedDraft(actor: Actor, buildId: string): Promise<Compared> {
	if (!can(actor.role, 'draft.read')) refuse(404, 'There is nothing here, or it is not yours to see.');
	const { document, parent } = await readDraft(actor, buildId);
	return { letter: null, parent, note: '', document };
}

async function readCompared(actor: Actor, buildId: string, name: string): Promise<Compared> {
	const { letter, parentLetter, note, document } = await readRevision(actor, buildId, name.toUpperCase());
	return { letter, parent: parentLetter, note, document };
}
