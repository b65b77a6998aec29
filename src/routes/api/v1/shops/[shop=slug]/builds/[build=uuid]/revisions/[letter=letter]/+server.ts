import { json } from '@sveltejs/kit';
import { endpoint } from '$lib/server/api';
import { guard } from '$lib/server/guard';
import { readRevision } from '$lib/server/revisions';
import type { RequestEvent } from './$types';

export const GET = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'revision.read', event.params);
	return json(await readRevision(actor, event.params.build, event.params.letter));
});
