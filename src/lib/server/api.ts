import { isHttpError, isRedirect } from '@sveltejs/kit';
import type { z } from 'zod';
import type { AnyEvent } from './actor';
import { log } from './log';
import { problemResponse, refuse, refuseFields } from './problem';

/** Wraps a JSON endpoint: writes must come from our own pages, refusals become problem+json, the unexpected an id that is in the log. */
export function endpoint<Event extends AnyEvent>(
	handler: (event: Event) => Promise<Response>
): (event: Event) => Promise<Response> {
	return async (event) => {
		try {
			checkOrigin(event);
			return await handler(event);
		} catch (failure) {
			if (isRedirect(failure)) throw failure;
			if (isHttpError(failure))
				return problemResponse(failure.status, failure.body.problem ?? { detail: failure.body.message });
			const id = event.locals.requestId;
			log.error({ id, route: event.route.id, err: failure }, 'unexpected error');
			return problemResponse(500, { detail: `Something went wrong here. The log holds the details under ${id}.`, id });
		}
	};
}

/** Writes carry an Origin, and it is ours; browsers send it with every request that is not a plain read. */
function checkOrigin({ request, url }: AnyEvent): void {
	if (request.method === 'GET' || request.method === 'HEAD') return;
	if (request.headers.get('origin') !== url.origin)
		refuse(403, 'Writes are taken from the application’s own pages only.');
}

/** Reads a JSON body of at most `limit` bytes and checks it against `schema`; 415, 413, 400 or 422 otherwise. */
export async function readBody<Schema extends z.ZodType>(
	event: AnyEvent,
	schema: Schema,
	limit = 256 * 1024
): Promise<z.output<Schema>> {
	const body = await readJson(event, limit);
	const parsed = schema.safeParse(body);
	if (parsed.success) return parsed.data;
	refuseFields(parsed.error.issues.map(({ path, message }) => ({ field: path.join('.'), message })));
}

/** 415 unless the request says it carries JSON: a form of another site cannot say so. */
export function requireJson({ request }: AnyEvent): void {
	if (request.headers.get('content-type')?.split(';')[0]?.trim() !== 'application/json')
		refuse(415, 'Send application/json.');
}

async function readJson(event: AnyEvent, limit: number): Promise<unknown> {
	requireJson(event);
	const text = await readText(event.request, limit);
	try {
		return JSON.parse(text);
	} catch {
		refuse(400, 'The body is not JSON.');
	}
}

/** Stops reading at the limit, whatever length was announced. */
async function readText(request: Request, limit: number): Promise<string> {
	const chunks: Uint8Array[] = [];
	let size = 0;
	const reader = request.body?.getReader();
	for (;;) {
		const part = await reader?.read();
		if (!part || part.done) break;
		size += part.value.byteLength;
		if (size > limit) {
			await reader?.cancel();
			refuse(413, `The body may hold at most ${Math.floor(limit / 1024)} KB.`);
		}
		chunks.push(part.value);
	}
	return Buffer.concat(chunks).toString('utf8');
}

/** The version in `If-Match: "7"`; 428 without one, 400 when it is not a version. */
export function readIfMatch({ request }: AnyEvent): number {
	const header = request.headers.get('if-match');
	if (header === null) refuse(428, 'Send If-Match with the version that was changed.');
	const version = /^(?:W\/)?"(\d{1,9})"$/.exec(header.trim())?.[1];
	if (version === undefined) refuse(400, 'If-Match must be a version in quotes, such as "7".');
	return Number(version);
}
