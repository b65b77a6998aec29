import { guard } from '$lib/server/guard';
import { readStock } from '$lib/server/shims';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => ({ stock: await readStock(await guard(event, 'stock.read')) });
