import { json } from '@sveltejs/kit';
import { endpoint, requireJson } from '$lib/server/api';
import { guard } from '$lib/server/guard';
import { releaseRevision } from '$lib/server/revisions';
import type { RequestEvent } from './$types';

export const POST = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'revision.release', event.params);
	requireJson(event);
	return json(await releaseRevision(actor, event.params.build, event.params.letter));
});
