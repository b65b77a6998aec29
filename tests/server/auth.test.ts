import { verify } from '@node-rs/argon2';
import { createHash } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test, vi } from 'vitest';
import { easyPassword } from '../../src/lib/server/auth/common';
import { localPath } from '../../src/lib/server/auth/next';
import { readSession, endSession } from '../../src/lib/server/auth/session';
import { signIn } from '../../src/lib/server/auth/sign-in';
import { signUp } from '../../src/lib/server/auth/sign-up';
import { slugOf } from '../../src/lib/server/auth/slug';
import { openTestServer, Visitor } from '../support/server';

// The real verification, watched: equal work for a known and an unknown address is counted, not timed.
vi.mock('@node-rs/argon2', async (original) => {
	const real = await original<{ verify: typeof verify }>();
	return { ...real, verify: vi.fn(real.verify) };
});

const PASSWORD = 'three plumb bobs in a row';
let db: Awaited<ReturnType<typeof openTestServer>>;
beforeAll(async () => {
	db = await openTestServer();
	const visitor = new Visitor();
	const made = await signUp(await visitor.event('/sign-up', { method: 'POST' }), {
		name: 'Ada Winter',
		email: 'ada@example.test',
		password: PASSWORD,
		shop: 'Winter & Daughter'
	});
	expect(made).toEqual({ ok: true, shopSlug: 'winter-daughter' });
});
afterAll(async () => {
	await db.close();
});
beforeEach(async () => {
	await db.query('DELETE FROM attempts');
	await db.query('DELETE FROM sessions');
	vi.mocked(verify).mockClear();
});

const tryIn = async (visitor: Visitor, email: string, password: string) =>
	signIn(await visitor.event('/sign-in', { method: 'POST' }), { email, password });
const personOf = async (visitor: Visitor) => (await visitor.event('/')).locals.person;

describe('sessions', () => {
	test('the database holds the hash of the session id, the cookie the id', async () => {
		const visitor = new Visitor();
		expect((await tryIn(visitor, 'ada@example.test', PASSWORD)).ok).toBe(true);
		const id = visitor.cookies.get('trammel') ?? '';
		const rows = await db.query('SELECT id_hash FROM sessions');
		expect(rows).toEqual([{ id_hash: createHash('sha256').update(id).digest('hex') }]);
		expect(await personOf(visitor)).toMatchObject({ name: 'Ada Winter' });
	});

	test('signing in again gives a new id and ends the old session', async () => {
		const visitor = new Visitor();
		await tryIn(visitor, 'ada@example.test', PASSWORD);
		const first = visitor.cookies.get('trammel');
		await tryIn(visitor, 'ada@example.test', PASSWORD);
		expect(visitor.cookies.get('trammel')).not.toBe(first);
		expect(await db.query('SELECT COUNT(*) AS n FROM sessions')).toEqual([{ n: '1' }]);
	});

	test('twelve idle hours end it; use before that extends it', async () => {
		const visitor = new Visitor();
		await tryIn(visitor, 'ada@example.test', PASSWORD);
		await db.query('UPDATE sessions SET expires_at = UTC_TIMESTAMP(3) + INTERVAL 1 MINUTE');
		expect(await personOf(visitor)).not.toBeNull();
		const [row] = await db.query('SELECT TIMESTAMPDIFF(MINUTE, UTC_TIMESTAMP(3), expires_at) AS minutes FROM sessions');
		expect(Number(row?.minutes)).toBeGreaterThanOrEqual(12 * 60 - 1);
		await db.query('UPDATE sessions SET expires_at = UTC_TIMESTAMP(3) - INTERVAL 1 SECOND');
		expect(await personOf(visitor)).toBeNull();
		expect(visitor.cookies.has('trammel')).toBe(false);
		expect(await db.query('SELECT * FROM sessions')).toEqual([]);
	});

	test('thirty days after sign-in it ends, however much it was used', async () => {
		const visitor = new Visitor();
		await tryIn(visitor, 'ada@example.test', PASSWORD);
		await db.query(
			'UPDATE sessions SET created_at = UTC_TIMESTAMP(3) - INTERVAL 30 DAY + INTERVAL 2 HOUR, expires_at = UTC_TIMESTAMP(3) + INTERVAL 1 HOUR'
		);
		expect(await personOf(visitor)).not.toBeNull();
		const [row] = await db.query('SELECT TIMESTAMPDIFF(MINUTE, UTC_TIMESTAMP(3), expires_at) AS minutes FROM sessions');
		expect(Number(row?.minutes)).toBeLessThanOrEqual(120);
	});

	test('sign-out removes the session; a made-up cookie is nobody', async () => {
		const visitor = new Visitor();
		await tryIn(visitor, 'ada@example.test', PASSWORD);
		await endSession(await visitor.event('/sign-out', { method: 'POST' }));
		expect(await db.query('SELECT * FROM sessions')).toEqual([]);
		visitor.cookies.set('trammel', 'x'.repeat(40));
		expect((await readSession(await visitor.event('/'))).person).toBeNull();
	});
});

describe('sign-in tells nothing about who exists', () => {
	test('same words and one verification each for a wrong password and an unknown address', async () => {
		const wrong = await tryIn(new Visitor(), 'ada@example.test', 'not the password at all');
		expect(vi.mocked(verify)).toHaveBeenCalledTimes(1);
		const unknown = await tryIn(new Visitor(), 'nobody@example.test', 'not the password at all');
		expect(vi.mocked(verify)).toHaveBeenCalledTimes(2);
		expect(unknown).toEqual(wrong);
	});

	test('the limit answers both the same way, and without verifying', async () => {
		const answers = [];
		for (const email of ['ada@example.test', 'nobody@example.test']) {
			for (let i = 0; i < 10; i++) await tryIn(new Visitor(`198.51.100.${i}`), email, 'wrong wrong wrong');
			vi.mocked(verify).mockClear();
			answers.push(await tryIn(new Visitor('198.51.100.99'), email, PASSWORD));
			expect(vi.mocked(verify)).not.toHaveBeenCalled();
		}
		expect(answers[0]).toMatchObject({ ok: false, retryAfter: expect.any(Number) as number });
		expect(answers[1]).toMatchObject({ message: answers[0]?.ok === false ? answers[0].message : '' });
	});

	test('the stored password is argon2id', async () => {
		const [row] = await db.query("SELECT password_hash FROM people WHERE email = 'ada@example.test'");
		expect(row?.password_hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
	});
});

describe('limits', () => {
	test('a browser the owner has used before still gets in while a stranger is being refused', async () => {
		const owner = new Visitor('192.0.2.1');
		await tryIn(owner, 'ada@example.test', PASSWORD);
		for (let i = 0; i < 12; i++) await tryIn(new Visitor(`198.51.100.${i}`), 'ada@example.test', 'wrong wrong wrong');
		expect((await tryIn(new Visitor('192.0.2.2'), 'ada@example.test', PASSWORD)).ok).toBe(false);
		expect((await tryIn(owner, 'ada@example.test', PASSWORD)).ok).toBe(true);
	});

	test('the account count ends by itself', async () => {
		for (let i = 0; i < 11; i++) await tryIn(new Visitor(`198.51.100.${i}`), 'ada@example.test', 'wrong wrong wrong');
		await db.query(`UPDATE attempts SET expire = ${Date.now() - 1}`);
		expect((await tryIn(new Visitor('198.51.100.50'), 'ada@example.test', PASSWORD)).ok).toBe(true);
	});

	test('one address trying many accounts is held too; good sign-ins do not count', async () => {
		const good = new Visitor('192.0.2.9');
		for (let i = 0; i < 3; i++) await tryIn(good, 'ada@example.test', PASSWORD);
		const rows = await db.query("SELECT points FROM attempts WHERE `key` LIKE 'address:%'");
		expect(rows).toEqual([{ points: 0 }]);
		const bad = new Visitor('192.0.2.10');
		for (let i = 0; i < 50; i++) await tryIn(bad, `person${i}@example.test`, 'wrong wrong wrong');
		expect(await tryIn(bad, 'ada@example.test', PASSWORD)).toMatchObject({
			ok: false,
			retryAfter: expect.any(Number) as number
		});
	});

	test('neither table of attempts nor audit holds an address', async () => {
		await tryIn(new Visitor('192.0.2.77'), 'ada@example.test', 'wrong wrong wrong');
		const dump = JSON.stringify([
			await db.query('SELECT * FROM attempts'),
			await db.query('SELECT * FROM audit_entries')
		]);
		expect(dump).not.toMatch(/ada@|192\.0\.2/);
		expect(dump).toContain('sign-in.failed');
	});
});

describe('sign-up', () => {
	const form = {
		name: 'Bo Lark',
		email: 'bo@example.test',
		password: 'welds cool in their own time',
		shop: 'Winter / Daughter'
	};

	test('a taken shop name gets a number, a taken address is said so', async () => {
		const visitor = new Visitor();
		expect(await signUp(await visitor.event('/sign-up', { method: 'POST' }), form)).toEqual({
			ok: true,
			shopSlug: 'winter-daughter-2'
		});
		expect(await personOf(visitor)).toMatchObject({ name: 'Bo Lark' });
		expect(await signUp(await new Visitor().event('/sign-up', { method: 'POST' }), form)).toMatchObject({
			ok: false,
			field: 'email'
		});
	});

	test.each([
		['1qaz2wsx3edc', 'on the list'],
		['Motherfucker', 'on the list, capital'],
		['123motherfucker1', 'on the list with digits at its ends'],
		['abcabcabcabcabc', 'a short pattern'],
		['passwordpassword', 'a common one doubled'],
		['Bo Lark’s shop', 'own shop']
	])('refuses %s (%s)', async (password) => {
		expect(await easyPassword(password, ['Bo Lark', 'Bo Larks Shop'])).toBeTypeOf('string');
	});

	test('accepts a few words', async () => {
		expect(await easyPassword(form.password, [form.name, form.email, form.shop])).toBeNull();
	});

	test('slugs', () => {
		expect(slugOf('Ölund & Söner')).toBe('olund-soner');
		expect(slugOf('東京')).toBe('shop');
		expect(slugOf('API')).toBe('shop-api');
	});
});

describe('where to go after sign-in', () => {
	test.each([
		'//evil.example',
		'https://evil.example',
		'/\\evil.example',
		'\\\\evil.example',
		'/\t/evil.example',
		'/..//evil.example',
		'javascript:alert(1)',
		'/sign-out',
		'/api/v1/me',
		''
	])('%j is not followed', (next) => {
		expect(localPath(next, '/home')).toBe('/home');
	});
	test('a local path with its search is', () => {
		expect(localPath('/winter/builds?stage=quoted', '/home')).toBe('/winter/builds?stage=quoted');
	});
});
