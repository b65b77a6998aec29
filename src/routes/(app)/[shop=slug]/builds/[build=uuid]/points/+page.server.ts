import { guard } from '$lib/server/guard';
import { chosenRevision } from '$lib/server/chosen';
import type { PageServerLoad } from './$types';

/** `revision`: the one of `?rev=`, shown read-only; null means the draft. */
export const load: PageServerLoad = async (event) => {
	const actor = await guard(event, 'revision.read', event.params);
	return { revision: await chosenRevision(actor, event.params.build, event.url.searchParams.get('rev')) };
};
