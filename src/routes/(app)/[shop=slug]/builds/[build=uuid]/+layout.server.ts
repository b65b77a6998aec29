import { readBuild } from '$lib/server/builds';
import { readDraft } from '$lib/server/drafts';
import { guard } from '$lib/server/guard';
import { can } from '$lib/server/policy';
import { listRevisions } from '$lib/server/revisions';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async (event) => {
	const { build } = event.params;
	const actor = await guard(event, 'build.read', event.params);
	event.depends('trammel:build');
	return {
		build: await readBuild(actor, build),
		draft: can(actor.role, 'draft.read') ? await readDraft(actor, build) : null,
		revisions: await listRevisions(actor, build)
	};
};
