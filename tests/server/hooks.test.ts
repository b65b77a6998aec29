import type { RequestEvent } from '@sveltejs/kit';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { handle, handleError } from '../../src/hooks.server';
import { actions as signInActions, load as signInLoad } from '../../src/routes/(public)/sign-in/+page.server';
import { actions as signUpActions } from '../../src/routes/(public)/sign-up/+page.server';
import { GET as signOutGet, POST as signOutPost } from '../../src/routes/(public)/sign-out/+server';
import { log } from '../../src/lib/server/log';
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
});

describe('an unexpected error', () => {
	test('shows an id that is in the log, and the log holds no address, statement or value', async () => {
		const lines: Record<string, unknown>[] = [];
		const event = await new Visitor().event('/quill-chassis/builds?q=secret');
		const error = Object.assign(new Error('no answer for marta@demo.example'), {
			sql: 'SELECT secret',
			parameters: ['secret']
		});
		const written = captureLog(lines);
		const shown = await handleError({ error, event: event as RequestEvent, status: 500, message: 'Internal Error' });
		written.stop();
		expect(shown).toEqual({ message: 'Something went wrong here.', id: event.locals.requestId });
		expect(lines[0]).toMatchObject({
			id: event.locals.requestId,
			err: { type: 'Error', message: 'no answer for [address]' }
		});
		expect(JSON.stringify(lines)).not.toMatch(/secret|marta@/);
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

function captureLog(lines: Record<string, unknown>[]) {
	const write = process.stdout.write.bind(process.stdout);
	const stream = Object.getOwnPropertySymbols(log).map((symbol) => (log as unknown as Record<symbol, unknown>)[symbol]);
	const sink = stream.find(
		(value): value is { write: (line: string) => void } =>
			typeof (value as { write?: unknown } | null)?.write === 'function'
	);
	if (!sink) throw new Error('the log has no stream');
	const original = sink.write.bind(sink);
	sink.write = (line) => void lines.push(JSON.parse(line) as Record<string, unknown>);
	const { level } = log;
	log.level = 'error';
	return {
		stop: () => {
			sink.write = original;
			log.level = level;
			process.stdout.write = write;
		}
	};
}

describe('signing in and out by form', () => {
	const post = async (visitor: Visitor, fields: Record<string, string>) =>
		visitor.event('/sign-in', { method: 'POST', form: fields });
	const right = { email: ' Owner@Demo.example ', password: 'square to the rail 1' };

	test('a wrong password keeps the address typed, never the password', async () => {
		const event = await post(new Visitor(), { ...right, password: 'not this one', next: `/${SHOP}/stock` });
		const answer = (await signInActions.default(event as never)) as unknown as {
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
			await refusal(async () => signInActions.default((await post(new Visitor(), { ...right, next })) as never))
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
		const refused = (await signUpActions.default((await post(new Visitor(), fields)) as never)) as unknown as {
			data: { form: { errors: Record<string, string[]>; data: { password: string } } };
		};
		expect(refused.data.form.errors.password?.[0]).toContain('common');
		expect(refused.data.form.data.password).toBe('');
		const good = { ...fields, password: 'level the table first' };
		expect(await refusal(async () => signUpActions.default((await post(new Visitor(), good)) as never))).toEqual({
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
