import { guard } from '$lib/server/guard';
import { comparedRevisions } from '$lib/server/chosen';
import type { PageServerLoad } from './$types';

/** `compared`: the revisions and the draft of `?revs=B,C,draft` in that order, two to four. */
export const load: PageServerLoad = async (event) => {
	const actor = await guard(event, 'revision.read', event.params);
	return { compared: await comparedRevisions(actor, event.params.build, event.url.searchParams.get('revs')) };
};
