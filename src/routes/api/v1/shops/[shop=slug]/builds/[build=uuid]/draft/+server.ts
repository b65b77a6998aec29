import { json } from '@sveltejs/kit';
import { endpoint, readBody, readIfMatch } from '$lib/server/api';
import { draftBodySchema, receiveDocument } from '$lib/server/documents';
import { readDraft, writeDraft } from '$lib/server/drafts';
import { guard } from '$lib/server/guard';
import type { RequestEvent } from './$types';

export const GET = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'draft.read', event.params);
	const draft = await readDraft(actor, event.params.build);
	return json(draft, { headers: { etag: `"${draft.version}"` } });
});

export const PUT = endpoint(async (event: RequestEvent) => {
	const actor = await guard(event, 'draft.write', event.params);
	const version = readIfMatch(event);
	const { document } = await readBody(event, draftBodySchema);
	const saved = await writeDraft(actor, event.params.build, version, receiveDocument(document));
	return json(saved, { headers: { etag: `"${saved.version}"` } });
});
