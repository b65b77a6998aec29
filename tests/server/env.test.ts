import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { Person } from '../../src/lib/server/db';
import { isLoopback, readEnv, SettingsError } from '../../src/lib/server/env';
import { seedDemo } from '../../src/lib/server/migrator';
import { refuseStrayDemo } from '../../src/lib/server/start';
import { signIn } from '../../src/lib/server/auth/sign-in';
import { DEMO_SIGN_INS } from '../../src/lib/server/demo';
import { openTestServer, Visitor } from '../support/server';

const good = {
	DATABASE_URL: 'mariadb://a:b@127.0.0.1:3306/trammel',
	ORIGIN: 'http://localhost:4173',
	HOST: 'localhost'
};
const message = (source: Record<string, string | undefined>): string => {
	try {
		readEnv(source);
	} catch (error) {
		if (error instanceof SettingsError) return error.message;
		throw error;
	}
	return '';
};

describe('settings', () => {
	test('are read', () => {
		expect(readEnv({ ...good, TRAMMEL_PRIVATE_DATABASE: '1' })).toMatchObject({
			demo: true,
			secure: false,
			origin: 'http://localhost:4173'
		});
		expect(readEnv({ ...good, ORIGIN: 'https://shop.example.com' })).toMatchObject({ demo: false, secure: true });
	});

	test.each([
		['DATABASE_URL', undefined],
		['DATABASE_URL', 'localhost'],
		['DATABASE_URL', 'postgres://a@b/c'],
		['DATABASE_URL', 'mariadb://a:b@127.0.0.1:3306/'],
		['ORIGIN', undefined],
		['ORIGIN', 'localhost:4173'],
		['ORIGIN', 'https://shop.example.com/path'],
		['LOG_LEVEL', 'loud'],
		['TRAMMEL_PRIVATE_DATABASE', 'yes']
	])('%s = %s is refused by name, with what would do', (name, value) => {
		expect(message({ ...good, [name]: value })).toMatch(new RegExp(`^${name} (is|must)`));
	});

	test('all that is wrong is said at once', () => {
		expect(message({}).split('\n')).toHaveLength(2);
	});

	test('the private database must be on this machine, and so must the server', () => {
		const on = { ...good, TRAMMEL_PRIVATE_DATABASE: '1' };
		expect(message({ ...on, DATABASE_URL: 'mariadb://a:b@db.example.com:3306/trammel' })).toContain(
			'not on this machine'
		);
		expect(message({ ...on, HOST: '0.0.0.0' })).toContain('HOST is 0.0.0.0');
		expect(message({ ...on, HOST: undefined })).toContain('HOST is 0.0.0.0');
		for (const host of ['localhost', '127.0.0.1', '127.8.0.1', '::1']) expect(isLoopback(host)).toBe(true);
		for (const host of ['127.0.0.1.example.com', 'localhost.example.com', '10.0.0.1', '0.0.0.0', ''])
			expect(isLoopback(host)).toBe(false);
	});
});

describe('the demo outside its private database', () => {
	let db: Awaited<ReturnType<typeof openTestServer>>;
	beforeAll(async () => {
		db = await openTestServer();
		// Not the private database: as when a copy of it is served elsewhere.
		process.env.TRAMMEL_PRIVATE_DATABASE = '0';
		await seedDemo(db.url);
	});
	afterAll(async () => {
		await db.close();
	});

	test('the application does not start on a database that holds it', async () => {
		await expect(refuseStrayDemo(false)).rejects.toThrow(SettingsError);
		await expect(refuseStrayDemo(true)).resolves.toBeUndefined();
	});

	test('its sign-ins open nothing, in the words of any wrong password', async () => {
		const [account] = DEMO_SIGN_INS;
		if (!account) throw new Error('no demo accounts');
		const event = await new Visitor().event('/sign-in', { method: 'POST' });
		expect(await signIn(event, account)).toMatchObject({
			ok: false,
			message: expect.stringContaining('do not go together') as string
		});
		await Person.update({ demo: false }, { where: { email: account.email } });
		expect((await signIn(event, account)).ok).toBe(true);
	});
});
