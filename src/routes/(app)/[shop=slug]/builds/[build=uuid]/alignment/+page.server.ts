import { chosenRevision } from '$lib/server/chosen';
import { guard } from '$lib/server/guard';
import { can } from '$lib/server/policy';
import { listRecords } from '$lib/server/records';
import { readStock } from '$lib/server/shims';
import type { PageServerLoad } from './$types';

/** The revision on the bench (null: the draft), its as-found and as-set records, and the shim stock for those who see it. */
export const load: PageServerLoad = async (event) => {
	const { build } = event.params;
	const actor = await guard(event, 'revision.read', event.params);
	const revision = await chosenRevision(actor, build, event.url.searchParams.get('rev'));
	return {
		revision,
		records: revision ? await listRecords(actor, build, revision.letter) : [],
		stock: can(actor.role, 'stock.read') ? await readStock(actor) : null
	};
};
