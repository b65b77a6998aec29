import { json } from '@sveltejs/kit';
import { recordInputSchema } from '$lib/schemas/record';
import { endpoint, readBody } from '$lib/server/api';
import { guard } from '$lib/server/guard';
import { addRecord, listRecords } from '$lib/server/records';
import type { RequestEvent } from './$types';

export const GET = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'revision.read', event.params);
	return json(await listRecords(actor, event.params.build, event.params.letter));
});

export const POST = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'record.add', event.params);
	const input = await readBody(event, recordInputSchema);
	const { record, created } = await addRecord(actor, event.params.build, event.params.letter, input);
	return json(record, { status: created ? 201 : 200 });
});
