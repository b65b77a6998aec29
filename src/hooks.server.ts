import { building } from '$app/environment';
import type { Handle, HandleServerError, ServerInit } from '@sveltejs/kit';
import { start, stop } from '$lib/server/start';
import { readSession } from '$lib/server/auth/session';
import { newRequestId } from '$lib/server/ids';
import { isApi } from '$lib/server/guard';
import { log } from '$lib/server/log';
import { problemResponse } from '$lib/server/problem';

export const init: ServerInit = async () => {
	if (!building) await start();
};

// adapter-node tells when the last request has been answered.
process.on('sveltekit:shutdown', stop);

export const handle: Handle = async ({ event, resolve }) => {
	const began = performance.now();
	event.locals.requestId = newRequestId();
	Object.assign(event.locals, await readSession(event));
	const theme = event.locals.person?.preferences.theme ?? 'system';
	const resolved = await resolve(event, {
		transformPageChunk: ({ html }) => html.replace('%trammel.theme%', theme),
		filterSerializedResponseHeaders: (name) => name === 'content-type'
	});
	const response = isApi(event) ? asProblem(resolved) : resolved;
	harden(response.headers, event.locals.person !== null);
	log.info({
		id: event.locals.requestId,
		method: event.request.method,
		route: event.route.id,
		status: response.status,
		ms: Math.round(performance.now() - began)
	});
	return response;
};

/** What no endpoint answered (an unknown address, a method it has not) is problem+json like every other refusal of the API. */
function asProblem(response: Response): Response {
	if (response.status < 400 || response.headers.get('content-type')?.includes('json')) return response;
	return problemResponse(response.status, {
		detail: response.status === 405 ? 'This address takes other methods.' : 'There is nothing at this address.'
	});
}

function harden(headers: Headers, signedIn: boolean): void {
	headers.set('x-content-type-options', 'nosniff');
	headers.set('referrer-policy', 'no-referrer');
	headers.set('permissions-policy', 'camera=(), geolocation=(), microphone=()');
	if (!headers.has('content-security-policy')) headers.set('content-security-policy', "frame-ancestors 'none'");
	if (signedIn) headers.set('cache-control', 'private, no-store');
}

export const handleError: HandleServerError = ({ error, event, status, message }) => {
	if (status === 404) return { message: 'There is nothing at this address.' };
	const id = event.locals.requestId ?? newRequestId();
	log.error({ id, route: event.route.id, status, err: error }, message);
	return { message: 'Something went wrong here.', id };
};
