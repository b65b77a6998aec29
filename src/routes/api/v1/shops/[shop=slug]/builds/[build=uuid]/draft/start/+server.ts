import { json } from '@sveltejs/kit';
import { startSchema } from '$lib/schemas/build';
import { endpoint, readBody, readIfMatch } from '$lib/server/api';
import { guard } from '$lib/server/guard';
import { startDraftFrom } from '$lib/server/revisions';
import type { RequestEvent } from './$types';

export const POST = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'draft.write', event.params);
	const version = readIfMatch(event);
	const { letter } = await readBody(event, startSchema);
	const draft = await startDraftFrom(actor, event.params.build, version, letter);
	return json(draft, { headers: { etag: `"${draft.version}"` } });
});
