import { json } from '@sveltejs/kit';
import { endpoint, readBody } from '$lib/server/api';
import { BUMP_BODY_LIMIT, bumpSchema, limitBump, runBump } from '$lib/server/bump';
import { guardPerson } from '$lib/server/guard';
import type { RequestEvent } from './$types';

export const POST = endpoint(async (event: RequestEvent) => {
	const person = guardPerson(event);
	await limitBump(person);
	return json(runBump(await readBody(event, bumpSchema, BUMP_BODY_LIMIT)));
});
