import { json } from '@sveltejs/kit';
import { preferencesPatchSchema } from '$lib/schemas/preferences';
import { endpoint, readBody } from '$lib/server/api';
import { guardPerson } from '$lib/server/guard';
import { changePreferences } from '$lib/server/people';
import type { RequestEvent } from './$types';

export const PATCH = endpoint(async (event: RequestEvent) => {
	const person = guardPerson(event);
	return json(await changePreferences(person, await readBody(event, preferencesPatchSchema)));
});
