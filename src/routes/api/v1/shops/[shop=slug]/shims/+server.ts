import { json } from '@sveltejs/kit';
import { shimStockSchema } from '$lib/schemas/shims';
import { endpoint, readBody } from '$lib/server/api';
import { guard } from '$lib/server/guard';
import { readStock, writeStock } from '$lib/server/shims';
import type { RequestEvent } from './$types';

export const GET = endpoint(async (event: RequestEvent) => json(await readStock(await guard(event, 'stock.read'))));

export const PUT = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'stock.edit');
	return json(await writeStock(actor, await readBody(event, shimStockSchema)));
});
