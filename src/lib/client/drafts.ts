import { upgradeAxle } from '$lib/domain/axle';
import type { AxleDocument } from '$lib/schemas/axle';
import type { DraftData } from '$lib/schemas/build';
import { z } from 'zod';
import { ApiProblem, buildUrl, request, type ApiRequest, type BuildPlace } from './api';

const keptSchema = z.object({ version: z.number().int(), updatedAt: z.string(), updatedBy: z.string() });
const snapshotSchema = keptSchema.extend({ document: z.unknown(), parent: z.string().nullish() });

/** What the server says after a write: the draft's new version, when and by whom. */
export type DraftKept = z.infer<typeof keptSchema>;

/** The draft as the server holds it; `parent` is missing from a refusal, which does not change it. */
export type DraftSnapshot = Omit<DraftData, 'parent'> & { parent?: string | null };

/** 409: somebody kept the draft since; `current` is what the server holds now. */
export class StaleDraftError extends Error {
	override readonly name = 'StaleDraftError';

	constructor(readonly current: DraftSnapshot) {
		super('The draft has changed on the server since this page read it.');
	}
}

type Sending = Pick<ApiRequest, 'fetch' | 'keepalive' | 'signal'>;

/** Reads a draft out of an answer, with the document brought to the current schema. */
function readSnapshot(value: unknown): DraftSnapshot {
	const read = snapshotSchema.parse(value);
	return { ...read, document: upgradeAxle(read.document) };
}

function asStale(error: unknown): unknown {
	const stale = error instanceof ApiProblem && error.status === 409 && error.problem.current !== undefined;
	return stale ? new StaleDraftError(readSnapshot(error.problem.current)) : error;
}

/** The draft of a build. */
export async function getDraft(place: BuildPlace, sending: Sending = {}): Promise<DraftSnapshot> {
	return readSnapshot(await request(buildUrl(place, '/draft'), sending));
}

/** Keeps the document as the draft, if the server still holds `version`; otherwise throws `StaleDraftError`. */
export async function putDraft(
	place: BuildPlace,
	document: AxleDocument,
	version: number,
	sending: Sending = {}
): Promise<DraftKept> {
	try {
		const asked: ApiRequest = { ...sending, method: 'PUT', body: { document }, ifMatch: version };
		return keptSchema.parse(await request(buildUrl(place, '/draft'), asked));
	} catch (error) {
		throw asStale(error);
	}
}

/** Replaces the draft by a revision's document; the same staleness rule as `putDraft`. */
export async function startDraft(
	place: BuildPlace,
	letter: string,
	version: number,
	sending: Sending = {}
): Promise<DraftSnapshot> {
	try {
		const asked: ApiRequest = { ...sending, method: 'POST', body: { letter }, ifMatch: version };
		return readSnapshot(await request(buildUrl(place, '/draft/start'), asked));
	} catch (error) {
		throw asStale(error);
	}
}
