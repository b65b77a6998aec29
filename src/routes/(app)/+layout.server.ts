import { guardPerson } from '$lib/server/guard';
import { listShops } from '$lib/server/shops';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async (event) => {
	const person = guardPerson(event);
	return { person, shops: await listShops(person) };
};
