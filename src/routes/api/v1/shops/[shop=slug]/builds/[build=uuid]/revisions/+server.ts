import { json } from '@sveltejs/kit';
import { keepSchema } from '$lib/schemas/build';
import { endpoint, readBody } from '$lib/server/api';
import { guard } from '$lib/server/guard';
import { keepRevision, listRevisions } from '$lib/server/revisions';
import type { RequestEvent } from './$types';

export const GET = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'revision.read', event.params);
	return json(await listRevisions(actor, event.params.build));
});

export const POST = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'revision.keep', event.params);
	const { revision, created } = await keepRevision(actor, event.params.build, await readBody(event, keepSchema));
	return json(revision, {
		status: created ? 201 : 200,
		headers: { location: `${event.url.pathname}/${revision.letter}` }
	});
});
