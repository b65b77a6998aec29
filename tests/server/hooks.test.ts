import type { RequestEvent } from '@sveltejs/kit';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { handle, handleError } from '../../src/hooks.server';
import { actions as signInActions, load as signInLoad } from '../../src/routes/(public)/sign-in/+page.server';
import { actions as signUpActions } from '../../src/routes/(public)/sign-up/+page.server';
import { GET as signOutGet, POST as signOutPost } from '../../src/routes/(public)/sign-out/+server';
import { Person } from '../../src/lib/server/db';
import { createLog, log } from '../../src/lib/server/log';
import { seedDemo } from '../../src/lib/server/migrator';
import { signedIn, SHOP } from '../support/people';
import { openTestServer, refusal, Visitor } from '../support/server';

let db: Awaited<ReturnType<typeof openTestServer>>;
beforeAll(async () => {
	db = await openTestServer();
	await seedDemo(db.url);
});
afterAll(async () => {
	await db.close();
});

type Resolve = Parameters<typeof handle>[0]['resolve'];
const answering =
	(html: string): Resolve =>
	async (_event, options) =>
		new Response(await options?.transformPageChunk?.({ html, done: true }));

describe('every answer', () => {
	test('carries the security headers; signed in it is not stored, and wears the person’s theme', async () => {
		const page = '<html data-theme="%trammel.theme%">';
		const nobody = await handle({ event: await new Visitor().event('/sign-in'), resolve: answering(page) });
		expect(Object.fromEntries(nobody.headers)).toMatchObject({
			'x-content-type-options': 'nosniff',
			'referrer-policy': 'no-referrer',
			'content-security-policy': "frame-ancestors 'none'"
		});
		expect(nobody.headers.has('cache-control')).toBe(false);
		expect(await nobody.text()).toBe('<html data-theme="system">');
		await db.query(
			`UPDATE people SET preferences = JSON_SET(preferences, '$.theme', 'daylight') WHERE email = 'owner@demo.example'`
		);
		const owner = await handle({ event: await (await signedIn('owner')).event('/'), resolve: answering(page) });
		expect(owner.headers.get('cache-control')).toBe('private, no-store');
		expect(await owner.text()).toBe('<html data-theme="daylight">');
	});

	test('an API address nothing answers is problem+json too', async () => {
		const missing: Resolve = async () =>
			new Response('<!doctype html>', { status: 404, headers: { 'content-type': 'text/html' } });
		const answer = await handle({ event: await new Visitor().event('/api/v1/nothing'), resolve: missing });
		expect(answer.headers.get('content-type')).toBe('application/problem+json');
		expect(await answer.json()).toMatchObject({ status: 404, title: 'Not found' });
	});
});

describe('an unexpected error', () => {
	test('shows an id under which the log holds it', async () => {
		const event = await new Visitor().event('/quill-chassis/builds?q=typed');
		const error = new Error('no answer');
		const written = vi.spyOn(log, 'error');
		const shown = await handleError({ error, event: event as RequestEvent, status: 500, message: 'Internal Error' });
		expect(shown).toEqual({ message: 'Something went wrong here.', id: event.locals.requestId });
		expect(written).toHaveBeenCalledWith(
			{ id: event.locals.requestId, route: '/quill-chassis/builds', status: 500, err: error },
			'Internal Error'
		);
		written.mockRestore();
	});

	test('the log holds its kind and place; no address, statement or value', async () => {
		const lines: string[] = [];
		const scratch = createLog({ write: (line) => void lines.push(line) });
		scratch.error({
			err: Object.assign(new Error('no answer for marta@demo.example'), {
				sql: 'SELECT umbrella',
				parameters: ['umbrella']
			})
		});
		const duplicate: unknown = await Person.create({ ...known, email: 'owner@demo.example' }).catch(
			(error: unknown) => error
		);
		scratch.error({ err: duplicate });
		scratch.error(duplicate);
		expect(lines.map((line) => JSON.parse(line) as unknown)).toMatchObject([
			{ err: { type: 'Error', message: 'no answer for [address]' } },
			{ err: { type: 'SequelizeUniqueConstraintError', code: 'ER_DUP_ENTRY' } },
			{ err: { type: 'SequelizeUniqueConstraintError', code: 'ER_DUP_ENTRY' } }
		]);
		expect(lines.join()).not.toMatch(/umbrella|marta@|owner@/);
	});

	test('a page that does not exist is no error of ours', async () => {
		const event = await new Visitor().event('/nowhere/at/all');
		expect(
			await handleError({ error: new Error('x'), event: event as RequestEvent, status: 404, message: 'Not Found' })
		).toEqual({
			message: 'There is nothing at this address.'
		});
	});
});

const known = {
	id: '01930000-0000-7000-8000-000000000001',
	name: 'x',
	passwordHash: '',
	preferences: '{}',
	demo: false,
	createdAt: new Date()
};

describe('signing in and out by form', () => {
	const post = async (visitor: Visitor, fields: Record<string, string>) =>
		visitor.event('/sign-in', { method: 'POST', form: fields });
	const right = { email: ' Owner@Demo.example ', password: 'square to the rail 1' };

	test('a wrong password keeps the address typed, never the password', async () => {
		const event = await post(new Visitor(), { ...right, password: 'not this one', next: `/${SHOP}/stock` });
		const answer = (await signInActions.default?.(event as never)) as unknown as {
			status: number;
			data: { form: { data: object; message: string } };
		};
		expect(answer.status).toBe(400);
		expect(answer.data.form.data).toEqual({ email: 'owner@demo.example', password: '', next: `/${SHOP}/stock` });
		expect(answer.data.form.message).toContain('do not go together');
	});

	test.each([
		[`/${SHOP}/stock`, `/${SHOP}/stock`],
		['https://elsewhere.example/', `/${SHOP}/builds`],
		['//elsewhere.example', `/${SHOP}/builds`],
		['', `/${SHOP}/builds`]
	])('after sign-in, next=%j leads to %s', async (next, place) => {
		expect(
			await refusal(async () => signInActions.default?.((await post(new Visitor(), { ...right, next })) as never))
		).toEqual({
			status: 303,
			location: place
		});
	});

	test('the page shows the demo’s accounts here, and nobody signed in sees it', async () => {
		const page = (await signInLoad((await new Visitor().event('/sign-in')) as never)) as unknown as {
			demo: { role: string }[];
		};
		expect(page.demo.map(({ role }) => role)).toEqual(['owner', 'builder', 'technician', 'client']);
		expect(
			await refusal(async () => signInLoad((await (await signedIn('owner')).event('/sign-in')) as never))
		).toMatchObject({ status: 303 });
	});

	test('signing up leads to the new shop’s builds; a common password is refused at its field', async () => {
		const fields = { name: 'Cy Moss', email: 'cy@example.test', password: 'qwerty123456', shop: 'Moss' };
		const refused = (await signUpActions.default?.((await post(new Visitor(), fields)) as never)) as unknown as {
			data: { form: { errors: Record<string, string[]>; data: { password: string } } };
		};
		expect(refused.data.form.errors.password?.[0]).toContain('common');
		expect(refused.data.form.data.password).toBe('');
		const good = { ...fields, password: 'level the table first' };
		expect(await refusal(async () => signUpActions.default?.((await post(new Visitor(), good)) as never))).toEqual({
			status: 303,
			location: '/moss/builds'
		});
	});

	test('reading the sign-out address signs nobody out, posting does', async () => {
		const visitor = await signedIn('builder');
		expect(await refusal(async () => signOutGet((await visitor.event('/sign-out')) as never))).toEqual({
			status: 303,
			location: '/'
		});
		expect((await visitor.event('/')).locals.person).not.toBeNull();
		expect(
			await refusal(async () => signOutPost((await visitor.event('/sign-out', { method: 'POST' })) as never))
		).toMatchObject({ location: '/sign-in' });
		expect((await visitor.event('/')).locals.person).toBeNull();
	});
});
