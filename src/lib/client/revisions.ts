import type { KeepInput, RevisionSummary } from '$lib/schemas/build';
import { z } from 'zod';
import { buildUrl, request, type BuildPlace, type Fetch } from './api';

const revisionSchema: z.ZodType<RevisionSummary> = z.object({
	id: z.string(),
	letter: z.string(),
	number: z.number().int(),
	note: z.string(),
	parentLetter: z.string().nullable(),
	hash: z.string(),
	createdAt: z.string(),
	createdBy: z.string(),
	releasedAt: z.string().nullable(),
	releasedBy: z.string().nullable()
});

/**
 * Makes the draft permanent under the next letter. `requestId` is made once per asking, so that a second
 * click, or a retry after a lost answer, gives the same revision again.
 */
export async function keepRevision(place: BuildPlace, asked: KeepInput, fetch?: Fetch): Promise<RevisionSummary> {
	return revisionSchema.parse(await request(buildUrl(place, '/revisions'), { method: 'POST', body: asked, fetch }));
}

/** Releases a revision for fabrication: a dated record of its own, the revision does not change. */
export async function releaseRevision(place: BuildPlace, letter: string, fetch?: Fetch): Promise<void> {
	const url = buildUrl(place, `/revisions/${encodeURIComponent(letter)}/release`);
	await request(url, { method: 'POST', body: {}, fetch });
}
