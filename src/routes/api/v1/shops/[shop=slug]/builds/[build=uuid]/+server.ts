import { json } from '@sveltejs/kit';
import { buildPatchSchema } from '$lib/schemas/build';
import { endpoint, readBody } from '$lib/server/api';
import { changeBuild, readBuild } from '$lib/server/builds';
import { guard } from '$lib/server/guard';
import type { RequestEvent } from './$types';

export const GET = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'build.read', event.params);
	return json(await readBuild(actor, event.params.build));
});

export const PATCH = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'build.edit', event.params);
	const patch = await readBody(event, buildPatchSchema);
	if (patch.archived !== undefined) await guard(event, 'build.archive', event.params);
	return json(await changeBuild(actor, event.params.build, patch));
});
