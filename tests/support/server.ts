import type { RequestEvent } from '@sveltejs/kit';
import { closeDatabase, openDatabase } from '../../src/lib/server/db';
import { log } from '../../src/lib/server/log';
import { newRequestId } from '../../src/lib/server/ids';
import { readSession } from '../../src/lib/server/auth/session';
import { createTestDatabase } from './db';

export const ORIGIN = 'http://localhost:4173';

/** The application's server modules on a database of the file's own. */
export async function openTestServer() {
	const db = await createTestDatabase();
	Object.assign(process.env, {
		DATABASE_URL: db.url,
		ORIGIN,
		HOST: 'localhost',
		TRAMMEL_PRIVATE_DATABASE: '1'
	});
	// Expected refusals of the tests would fill the screen.
	log.level = 'fatal';
	openDatabase(db.url);
	return {
		...db,
		close: async () => {
			await closeDatabase();
			await db.drop();
		}
	};
}

interface Asked {
	method?: string;
	params?: Record<string, string>;
	headers?: Record<string, string>;
	body?: unknown;
	form?: Record<string, string | string[]>;
}

/** A browser of one person: keeps cookies between requests and makes events as Kit hands them to handlers. */
export class Visitor {
	readonly cookies = new Map<string, string>();

	constructor(readonly ip = '203.0.113.7') {}

	/** An event with its session read, as hooks.server.ts does before any handler runs. */
	async event(
		path: string,
		{ method = 'GET', params = {}, headers = {}, body, form }: Asked = {}
	): Promise<RequestEvent> {
		const url = new URL(path, ORIGIN);
		const sent = new Headers({ ...(method === 'GET' ? {} : { origin: ORIGIN }), ...headers });
		if (body !== undefined && !sent.has('content-type')) sent.set('content-type', 'application/json');
		const payload = form
			? toForm(form)
			: typeof body === 'string'
				? body
				: body === undefined
					? null
					: JSON.stringify(body);
		const event = {
			url,
			params,
			route: { id: url.pathname },
			request: new Request(url, { method, headers: sent, body: payload }),
			cookies: {
				get: (name: string) => this.cookies.get(name),
				set: (name: string, value: string) => void this.cookies.set(name, value),
				delete: (name: string) => void this.cookies.delete(name)
			},
			getClientAddress: () => this.ip,
			locals: { person: null, session: null, requestId: newRequestId() },
			setHeaders: () => undefined,
			depends: () => undefined
		} as unknown as RequestEvent;
		Object.assign(event.locals, await readSession(event));
		return event;
	}

	/** Calls a handler of a +server.ts; gives status, headers and the parsed body. */
	async call<Event>(handler: (event: Event) => Promise<Response> | Response, path: string, asked: Asked = {}) {
		const response = await handler((await this.event(path, asked)) as Event);
		const text = await response.text();
		return { status: response.status, headers: response.headers, body: (text ? JSON.parse(text) : null) as never };
	}
}

function toForm(fields: Record<string, string | string[]>): FormData {
	const form = new FormData();
	for (const [name, value] of Object.entries(fields)) for (const one of [value].flat()) form.append(name, one);
	return form;
}

/** Runs what is expected to end in a refusal or redirect; gives its status, place and message. */
export async function refusal(
	work: Promise<unknown> | (() => unknown)
): Promise<{ status: number; location?: string; message?: string }> {
	try {
		await (typeof work === 'function' ? work() : work);
	} catch (thrown) {
		const { status, location, body } = thrown as { status?: number; location?: string; body?: { message: string } };
		if (status === undefined) throw thrown;
		return { status, ...(location === undefined ? {} : { location }), ...(body ? { message: body.message } : {}) };
	}
	throw new Error('Nothing was refused.');
}
