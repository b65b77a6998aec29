import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { BuildFacts, BuildList, RevisionFull } from '../../src/lib/schemas/build';
import type { AlignmentRecord } from '../../src/lib/schemas/record';
import { seedDemo } from '../../src/lib/server/migrator';
import { COUPE_ID, ROADSTER_ID } from '../../seeders/demo/builds';
import { api } from '../support/api';
import { everyone, DEMO_ROLES } from '../support/people';
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

const BUILD_FIELDS =
	'archivedAt cgHeight client datum frontBrakeShare frontMass id loadedRadius name notes people rearMass rideHeight stage track tyreSize unsprungCornerMass updatedAt wheelbase';
const REVISION_FIELDS =
	'createdAt createdBy document figures hash id letter note number parentLetter releasedAt releasedBy';
const fields = (value: object) => Object.keys(value).sort().join(' ');

describe('what each role’s JSON holds', () => {
	test('a build: the same fields, and whose car it is, the notes and the people only for whom they are', async () => {
		const read = async (role: (typeof DEMO_ROLES)[number]) =>
			(await api(people[role], ROADSTER_ID).read()).body as BuildFacts;
		for (const role of DEMO_ROLES) expect(fields(await read(role))).toBe(BUILD_FIELDS);
		for (const role of ['owner', 'builder'] as const) {
			expect(await read(role)).toMatchObject({
				client: 'P. Sandvoll',
				notes: expect.stringContaining('Rear track') as string
			});
			expect((await read(role)).people?.map((person) => person.role)).toEqual(['technician', 'client']);
		}
		expect(await read('technician')).toMatchObject({ client: null, notes: null, people: null, track: 1420 });
		expect(await read('client')).toMatchObject({ client: 'P. Sandvoll', notes: null, people: null });
	});

	test('the list tells a technician no client, and does not let them search for one', async () => {
		const list = async (role: (typeof DEMO_ROLES)[number], search = '') =>
			(await api(people[role]).list(search)).body as BuildList;
		expect((await list('technician')).items.map(({ client }) => client)).toEqual([null, null]);
		expect((await list('technician', '?q=sandvoll')).total).toBe(0);
		expect((await list('owner', '?q=sandvoll')).total).toBe(1);
		expect((await list('client')).items[0]).toMatchObject({ client: 'P. Sandvoll', letter: 'D' });
		expect((await list('owner', '?q=grey')).items[0]).toMatchObject({ letter: 'E' });
	});

	test('a revision: the builder’s note is not for the client', async () => {
		const read = async (role: (typeof DEMO_ROLES)[number]) =>
			(await api(people[role], ROADSTER_ID).revision('D')).body as RevisionFull;
		for (const role of DEMO_ROLES) expect(fields(await read(role))).toBe(REVISION_FIELDS);
		expect(await read('owner')).toMatchObject({
			parentLetter: 'C',
			note: expect.stringContaining('anti-dive') as string
		});
		expect(await read('technician')).toMatchObject({
			parentLetter: null,
			note: expect.stringContaining('anti-dive') as string
		});
		expect(await read('client')).toMatchObject({ parentLetter: null, note: '' });
	});

	test('a record: the technician’s note stays in the shop', async () => {
		await api(people.owner, COUPE_ID).change({
			people: (
				await db.query("SELECT id FROM people WHERE email IN ('client@demo.example', 'technician@demo.example')")
			).map(({ id }) => String(id))
		});
		const notes = await Promise.all(
			DEMO_ROLES.map(
				async (role) => ((await api(people[role], COUPE_ID).records('B')).body as AlignmentRecord[])[0]?.note !== ''
			)
		);
		expect(notes).toEqual([true, true, true, false]);
	});
});
