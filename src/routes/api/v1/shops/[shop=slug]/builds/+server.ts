import { json } from '@sveltejs/kit';
import { buildInputSchema, buildListSchema } from '$lib/schemas/build';
import { endpoint, readBody } from '$lib/server/api';
import { createBuild, listBuilds } from '$lib/server/builds';
import { guard } from '$lib/server/guard';
import type { RequestEvent } from './$types';

export const GET = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'build.list');
	return json(await listBuilds(actor, buildListSchema.parse(Object.fromEntries(event.url.searchParams))));
});

export const POST = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'build.create');
	const build = await createBuild(actor, await readBody(event, buildInputSchema));
	return json(build, { status: 201, headers: { location: `${event.url.pathname}/${build.id}` } });
});
