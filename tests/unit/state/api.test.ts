import { ApiProblem, buildUrl, request, SignedOutError, UnreachableError } from '$lib/client/api';
import { worthRetrying } from '$lib/client/query';
import { expect, test } from 'vitest';

const answering = (response: Response) => async () => response;
const problem = (status: number, body: unknown, type = 'application/problem+json') =>
	answering(
		new Response(typeof body === 'string' ? body : JSON.stringify(body), { status, headers: { 'content-type': type } })
	);

test('sends JSON with the version as a strong validator, and gives the parsed answer', async () => {
	let sent: RequestInit | undefined;
	const fetch: typeof globalThis.fetch = async (_url, init) => {
		sent = init;
		return Response.json({ version: 4 });
	};
	expect(await request('/api/v1/x', { method: 'PUT', body: { a: 1 }, ifMatch: 3, fetch })).toEqual({ version: 4 });
	expect(sent?.body).toBe('{"a":1}');
	expect(sent?.headers).toMatchObject({ 'if-match': '"3"', 'content-type': 'application/json' });
});

test('an empty answer is null', async () => {
	expect(await request('/api/v1/x', { fetch: answering(new Response(null, { status: 204 })) })).toBeNull();
});

test('a refusal carries the fields at fault', async () => {
	const body = {
		type: 'about:blank',
		title: 'x',
		status: 422,
		detail: 'Track.',
		errors: [{ field: 'track', message: 'Track: 600 to 2600 mm.' }]
	};
	const error = await request('/api/v1/x', { fetch: problem(422, body) }).catch((caught: unknown) => caught);
	expect(error).toBeInstanceOf(ApiProblem);
	expect(error).toMatchObject({ status: 422, message: 'Track.', problem: { errors: body.errors } });
});

test("a proxy's page is a problem with its status in words", async () => {
	const error = await request('/api/v1/x', { fetch: problem(502, '<html>', 'text/html') }).catch(
		(caught: unknown) => caught
	);
	expect(error).toMatchObject({ status: 502, message: 'The server answered 502.' });
});

test('signed out and unreachable are told apart', async () => {
	await expect(request('/api/v1/x', { fetch: problem(401, { detail: 'Sign in first.' }) })).rejects.toBeInstanceOf(
		SignedOutError
	);
	const cut = async () => Promise.reject(new TypeError('Failed to fetch'));
	await expect(request('/api/v1/x', { fetch: cut })).rejects.toBeInstanceOf(UnreachableError);
});

test('parts of an address are escaped', () => {
	expect(buildUrl({ shop: 'a/b', build: 'c d' }, '/draft')).toBe('/api/v1/shops/a%2Fb/builds/c%20d/draft');
});

test('only what may come right by itself is asked again, twice', async () => {
	const refused = (await request('/x', { fetch: problem(404, {}) }).catch((caught: unknown) => caught)) as Error;
	const faulty = (await request('/x', { fetch: problem(500, {}) }).catch((caught: unknown) => caught)) as Error;
	expect(worthRetrying(0, refused)).toBe(false);
	expect([0, 1, 2].map((failures) => worthRetrying(failures, faulty))).toEqual([true, true, false]);
	expect(worthRetrying(0, new UnreachableError(null))).toBe(true);
});
