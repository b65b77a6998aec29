import { verify } from '@node-rs/argon2';
import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { axleGeometry, upgradeAxle } from '../../src/lib/domain/axle';
import { solveCorner, sweepBump } from '../../src/lib/kinematics';
import { DEMO_SIGN_INS } from '../../src/lib/server/demo';
import { migrateDown, migrateUp, seedDemo } from '../../src/lib/server/migrator';
import { createTestDatabase } from '../support/db';

let db: Awaited<ReturnType<typeof createTestDatabase>>;
beforeAll(async () => {
	db = await createTestDatabase();
	await seedDemo(db.url);
});
afterAll(async () => {
	await db.drop();
});

const TABLES = [
	'people',
	'shops',
	'memberships',
	'builds',
	'build_people',
	'revisions',
	'releases',
	'drafts',
	'alignment_records',
	'shim_shelves',
	'shims'
];

async function contents(): Promise<Record<string, unknown>> {
	return Object.fromEntries(
		await Promise.all(TABLES.map(async (table) => [table, await db.query(`SELECT * FROM ${table} ORDER BY 1, 2, 3`)]))
	);
}

async function geometries() {
	const rows = await db.query(
		'SELECT b.name, r.number, r.document FROM revisions r JOIN builds b ON b.id = r.build_id UNION ALL SELECT b.name, 0, d.document FROM drafts d JOIN builds b ON b.id = d.build_id ORDER BY 1, 2'
	);
	return rows.map((row) => {
		const read = axleGeometry(upgradeAxle(JSON.parse(String(row.document))));
		if ('missing' in read) throw new Error(`${String(row.name)} ${String(row.number)} is incomplete`);
		return { name: String(row.name), number: Number(row.number), geometry: read.left };
	});
}

describe('the demo', () => {
	test('seeding again changes nothing, and what a person changed stays', async () => {
		await db.query("UPDATE builds SET notes = 'changed by hand' WHERE name = 'Shop pick-up'");
		await db.query("DELETE FROM shims WHERE unit = 'mm' AND thickness = 5");
		const before = await contents();
		await seedDemo(db.url);
		expect(await contents()).toEqual(before);
	});

	test('one person a role with a password that opens, and a neighbour’s shop', async () => {
		for (const { email, password, role } of DEMO_SIGN_INS) {
			const [row] = await db.query(
				`SELECT p.password_hash, p.demo, m.role FROM people p JOIN memberships m ON m.person_id = p.id WHERE p.email = '${email}'`
			);
			expect(row).toMatchObject({ demo: 1, role });
			expect(await verify(String(row?.password_hash), password)).toBe(true);
		}
		expect(await db.query('SELECT COUNT(*) AS n FROM shops')).toEqual([{ n: '2' }]);
	});

	test('every stored hash is the SHA-256 of its document', async () => {
		const rows = await db.query('SELECT document, hash FROM revisions');
		expect(rows).toHaveLength(7);
		for (const { document, hash } of rows)
			expect(createHash('sha256').update(String(document)).digest('hex')).toBe(hash);
	});

	test('every geometry runs ±75 mm without a bind', async () => {
		for (const { geometry } of await geometries()) {
			const sweep = sweepBump(geometry, { from: -75, to: 75, step: 5 });
			expect(sweep.states).toHaveLength(31);
			expect(sweep.lowLimit ?? sweep.highLimit ?? null).toBeNull();
		}
	});

	test('the roadster’s revisions do what their notes say', async () => {
		const steps = (await geometries()).filter(({ name, number }) => name === 'Grey roadster' && number > 0);
		const figures = steps.map(({ geometry }) => {
			const ride = solveCorner(geometry, { travel: 0, rack: 0 });
			const { states } = sweepBump(geometry, { from: -25, to: 25, step: 5 });
			return { ride, bumpSteer: Math.max(...states.map(({ toe }) => Math.abs(toe - ride.toe))) };
		});
		const [a, b, c, d, e] = figures;
		if (!a || !b || !c || !d || !e) throw new Error('five revisions are expected');
		expect(b.ride.camberRate).toBeLessThan(3 * (a.ride.camberRate ?? NaN));
		expect(b.bumpSteer).toBeGreaterThan(0.1);
		for (const later of [c, d, e]) expect(later.bumpSteer).toBeLessThan(0.1);
		expect(d.ride.caster - c.ride.caster).toBeGreaterThan(1);
		expect(d.ride.antiDive ?? 0).toBeGreaterThan(15);
		expect(d.ride.rollCentreHeight).toBeGreaterThan(80);
		expect(e.ride.rollCentreHeight).toBeLessThan(50);
	});

	test('migrations down and up again on seeded data give the same schema', async () => {
		const schema = async () =>
			Promise.all(TABLES.map(async (table) => (await db.query(`SHOW CREATE TABLE ${table}`))[0]));
		const before = await schema();
		await migrateDown(db.url, { to: 0 });
		expect(await db.query("SHOW TABLES LIKE 'people'")).toEqual([]);
		await migrateUp(db.url);
		expect(await schema()).toEqual(before);
	});

	test('is refused for a database on another machine', async () => {
		await expect(seedDemo('mariadb://a:b@db.example.test:3306/trammel')).rejects.toThrow(/this machine/);
	});
});
