import { error } from '@sveltejs/kit';
import type { FieldError, Problem } from '../schemas/problem';

const TITLES: Record<number, string> = {
	400: 'The request cannot be read',
	401: 'Sign in first',
	403: 'Not allowed for your role',
	404: 'Not found',
	405: 'Not by this method',
	409: 'Changed by someone else in the meantime',
	413: 'Too large',
	415: 'JSON is expected',
	422: 'Some of it cannot be accepted',
	428: 'Say which version you changed',
	429: 'Too many attempts',
	500: 'Something went wrong here'
};

/** Ends the request with an expected refusal: an error page for pages, problem+json for endpoints. */
export function refuse(
	status: number,
	detail: string,
	extra: Omit<Problem, 'type' | 'status' | 'title' | 'detail'> = {}
): never {
	error(status, { message: detail, problem: { detail, ...extra } });
}

/** 404 in the same words whether the thing is missing or belongs to someone else. */
export function refuseUnknown(): never {
	refuse(404, 'There is nothing here, or it is not yours to see.');
}

/** 422 naming each field at fault. */
export function refuseFields(
	errors: FieldError[],
	detail = errors[0]?.message ?? 'Some of it cannot be accepted.'
): never {
	refuse(422, detail, { errors });
}

/** The answer body and headers for a problem (RFC 9457). */
export function problemResponse(
	status: number,
	{ detail, ...extra }: Omit<Problem, 'type' | 'status' | 'title'>
): Response {
	const body: Problem = {
		type: 'about:blank',
		title: TITLES[status] ?? 'The request failed',
		status,
		detail,
		...extra
	};
	const headers: Record<string, string> = { 'content-type': 'application/problem+json' };
	if (extra.retryAfter !== undefined) headers['retry-after'] = String(extra.retryAfter);
	return new Response(JSON.stringify(body), { status, headers });
}
