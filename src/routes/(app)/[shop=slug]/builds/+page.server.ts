import { buildListSchema } from '$lib/schemas/build';
import { listBuilds } from '$lib/server/builds';
import { guard } from '$lib/server/guard';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const actor = await guard(event, 'build.list');
	const query = buildListSchema.parse(Object.fromEntries(event.url.searchParams));
	return { query, list: await listBuilds(actor, query) };
};
