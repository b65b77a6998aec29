import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { PATCH } from '../../src/routes/api/v1/me/preferences/+server';
import type { Problem } from '../../src/lib/schemas/problem';
import type { AlignmentRecord } from '../../src/lib/schemas/record';
import type { ShimStock } from '../../src/lib/schemas/shims';
import { AlignmentRow, Revision } from '../../src/lib/server/db';
import { seedDemo } from '../../src/lib/server/migrator';
import { COUPE_ID } from '../../seeders/demo/builds';
import { api } from '../support/api';
import { everyone } from '../support/people';
import { openTestServer } from '../support/server';

let db: Awaited<ReturnType<typeof openTestServer>>;
let people: Awaited<ReturnType<typeof everyone>>;
beforeAll(async () => {
	db = await openTestServer();
	await seedDemo(db.url);
	people = await everyone();
});
afterAll(async () => {
	await db.close();
});

describe('alignment records', () => {
	const wheel = { camber: -0.5, caster: 5.1, toe: 0.06, frontPack: 3, rearPack: 4.5 };
	const input = () => ({
		requestId: randomUUID(),
		kind: 'asSet',
		left: wheel,
		right: { ...wheel, camber: null },
		travel: 2,
		rake: null,
		note: 'set'
	});

	test('a technician adds one to a released revision; it names revision and hash, and a repeat makes no second', async () => {
		const technician = api(people.technician, COUPE_ID);
		const asked = input();
		const first = await technician.addRecord('B', asked);
		expect(first.status).toBe(201);
		const record = first.body as AlignmentRecord;
		const [row] = await db.query(`SELECT hash FROM revisions WHERE build_id = '${COUPE_ID}' AND number = 2`);
		expect(record).toMatchObject({
			kind: 'asSet',
			revisionLetter: 'B',
			revisionHash: row?.hash,
			createdBy: 'Ines Halloran',
			rake: null
		});
		expect(record.right).toMatchObject({ camber: null, caster: 5.1, sweep: null });
		const again = await technician.addRecord('B', asked);
		expect(again.status).toBe(200);
		expect((again.body as AlignmentRecord).id).toBe(record.id);
		const list = (await technician.records('B')).body as AlignmentRecord[];
		expect(list.map(({ kind }) => kind)).toEqual(['asSet', 'asFound']);
		expect(list[0]).toEqual(record);
	});

	test('what cannot be a reading is refused by field', async () => {
		const answer = await api(people.technician, COUPE_ID).addRecord('B', {
			...input(),
			left: { ...wheel, camber: 45 }
		});
		expect((answer.body as Problem).errors).toEqual([
			{ field: 'left.camber', message: expect.stringContaining('−20 to 20') as string }
		]);
	});

	test('rows are never changed or removed', async () => {
		const row = await AlignmentRow.findOne({ rejectOnEmpty: true });
		await expect(row.update({ kind: 'asFound' })).rejects.toThrow(/append-only/);
		await expect(row.destroy()).rejects.toThrow(/append-only/);
		await expect(AlignmentRow.destroy({ where: {} })).rejects.toThrow(/append-only/);
		await expect(Revision.update({ note: 'x' }, { where: {} })).rejects.toThrow(/append-only/);
	});
});

describe('shim stock', () => {
	test('is replaced whole, by version', async () => {
		const owner = api(people.owner);
		const before = (await owner.shims()).body as ShimStock;
		expect(before).toMatchObject({ version: 1, updatedBy: 'Tobias Renner' });
		expect(before.items.map(({ unit, thickness }) => `${thickness.toFixed(3)} ${unit}`)).toEqual([
			'0.500 mm',
			'0.794 in',
			'1.000 mm',
			'1.500 mm',
			'1.587 in',
			'2.000 mm',
			'3.000 mm',
			'3.175 in',
			'5.000 mm'
		]);
		const items = [{ thickness: 1.5875, unit: 'in', count: 3 }];
		expect((await owner.putShims({ version: 1, items })).body).toMatchObject({
			version: 2,
			items,
			updatedBy: 'Marta Quill'
		});
		const stale = await api(people.builder).putShims({ version: 1, items: [] });
		expect(stale).toMatchObject({ status: 409, body: { current: { version: 2, items } } });
	});

	test('a second shop starts empty and keeps its own', async () => {
		const neighbour = api(people.neighbour, '', 'northgate-frames');
		expect((await neighbour.shims()).body).toEqual({ version: 0, items: [], updatedAt: null, updatedBy: null });
		expect(
			(await neighbour.putShims({ version: 0, items: [{ thickness: 2, unit: 'mm', count: 5 }] })).body
		).toMatchObject({ version: 1 });
		expect(((await api(people.owner).shims()).body as ShimStock).items).toHaveLength(1);
	});

	test.each([
		[[{ thickness: 0, unit: 'mm', count: 1 }], 'items.0.thickness'],
		[[{ thickness: 1, unit: 'cm', count: 1 }], 'items.0.unit'],
		[[{ thickness: 1, unit: 'mm', count: 1.5 }], 'items.0.count'],
		[[{ thickness: 1, unit: 'mm', count: -1 }], 'items.0.count'],
		[
			[
				{ thickness: 1, unit: 'mm', count: 1 },
				{ thickness: 1, unit: 'mm', count: 2 }
			],
			'items'
		]
	])('%j is refused at %s', async (items, field) => {
		const answer = await api(people.owner).putShims({ version: 2, items });
		expect(answer.status).toBe(422);
		expect((answer.body as Problem).errors?.[0]?.field).toBe(field);
	});
});

describe('preferences', () => {
	test('only the keys given change, and they are the person’s own', async () => {
		const change = (body: unknown) => people.client.call(PATCH, '/api/v1/me/preferences', { method: 'PATCH', body });
		expect((await change({ length: 'in' })).body).toMatchObject({ length: 'in', angle: 'decimal' });
		expect((await change({ theme: 'dark' })).body).toMatchObject({ length: 'in', theme: 'dark' });
		expect((await people.client.event('/')).locals.person?.preferences).toMatchObject({ length: 'in', theme: 'dark' });
		expect((await people.owner.event('/')).locals.person?.preferences).toMatchObject({ length: 'mm' });
		expect((await change({ length: 'furlong' })).status).toBe(422);
		expect((await change({ colour: 'blue' })).status).toBe(422);
	});
});
