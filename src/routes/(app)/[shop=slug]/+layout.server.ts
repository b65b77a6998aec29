import { guard } from '$lib/server/guard';
import { abilities } from '$lib/server/policy';
import { readShop } from '$lib/server/shops';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async (event) => {
	const actor = await guard(event, 'build.list');
	return { shop: await readShop(actor), role: actor.role, can: abilities(actor.role) };
};
