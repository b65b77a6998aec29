import type { Problem } from '$lib/schemas/problem';

/** One place where the browser speaks to `/api/v1`: JSON out, JSON in, problem+json (RFC 9457) turned into typed errors. */

/** The server answered, and refused. `problem.errors` names the fields at 422. */
export class ApiProblem extends Error {
	override readonly name: string = 'ApiProblem';

	constructor(readonly problem: Problem) {
		super(problem.detail);
	}

	get status(): number {
		return this.problem.status;
	}
}

/** 401: nobody is signed in any more; what was typed is still here. */
export class SignedOutError extends ApiProblem {
	override readonly name = 'SignedOutError';
}

/** No answer came: offline, the server is down, or the network dropped the request. */
export class UnreachableError extends Error {
	override readonly name = 'UnreachableError';

	constructor(cause: unknown) {
		super('The server cannot be reached.', { cause });
	}
}

export type Fetch = typeof globalThis.fetch;

export interface ApiRequest {
	method?: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
	body?: unknown;
	/** The version this write was made against. */
	ifMatch?: number;
	signal?: AbortSignal;
	/** Survives the page being closed; the browser allows 64 KB of body. */
	keepalive?: boolean;
	fetch?: Fetch;
}

/** Reads a refusal; a body that is not problem+json (a proxy's page) still gives a problem with the status in words. */
async function readProblem(response: Response): Promise<Problem> {
	const title = `The server answered ${response.status}.`;
	const otherwise: Problem = { type: 'about:blank', title, status: response.status, detail: title };
	if (!response.headers.get('content-type')?.includes('json')) return otherwise;
	const body: unknown = await response.json().catch(() => null);
	return typeof body === 'object' && body !== null ? { ...otherwise, ...body, status: response.status } : otherwise;
}

/**
 * Sends one request and gives the parsed answer, null for an empty one.
 * Throws `UnreachableError` (no answer), `SignedOutError` (401) or `ApiProblem` (any other refusal).
 */
export async function request(url: string, options: ApiRequest = {}): Promise<unknown> {
	const { method = 'GET', body, ifMatch, signal, keepalive, fetch = globalThis.fetch } = options;
	const headers: Record<string, string> = { accept: 'application/json' };
	if (body !== undefined) headers['content-type'] = 'application/json';
	if (ifMatch !== undefined) headers['if-match'] = `"${ifMatch}"`;
	let response: Response;
	try {
		const sent = body === undefined ? undefined : JSON.stringify(body);
		response = await fetch(url, { method, headers, body: sent, signal, keepalive, credentials: 'same-origin' });
	} catch (cause) {
		throw new UnreachableError(cause);
	}
	if (!response.ok) {
		const problem = await readProblem(response);
		throw response.status === 401 ? new SignedOutError(problem) : new ApiProblem(problem);
	}
	return response.status === 204 ? null : response.json();
}

/** A build: the shop by its slug, the build by its id. */
export interface BuildPlace {
	shop: string;
	build: string;
}

/** `/api/v1/shops/{shop}/builds/{build}` and what follows, both parts escaped. */
export function buildUrl({ shop, build }: BuildPlace, rest = ''): string {
	return `/api/v1/shops/${encodeURIComponent(shop)}/builds/${encodeURIComponent(build)}${rest}`;
}
