import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import {
	actions as cardActions,
	load as cardLoad
} from '../../src/routes/(app)/[shop=slug]/builds/[build=uuid]/+page.server';
import { actions as newActions } from '../../src/routes/(app)/[shop=slug]/builds/new/+page.server';
import type { BuildFacts, BuildForm } from '../../src/lib/schemas/build';
import { DEFAULT_PREFERENCES } from '../../src/lib/schemas/preferences';
import type { Problem } from '../../src/lib/schemas/problem';
import { fillBuildForm, readBuildForm } from '../../src/lib/server/build-form';
import { seedDemo } from '../../src/lib/server/migrator';
import { COUPE_ID, ROADSTER_ID } from '../../seeders/demo/builds';
import { api } from '../support/api';
import { everyone, SHOP } from '../support/people';
import { openTestServer, refusal } from '../support/server';

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

const inInches = { ...DEFAULT_PREFERENCES, length: 'in', inches: 'fraction', force: 'lbf' } as const;
const empty = {
	wheelbase: '',
	track: '',
	loadedRadius: '',
	rideHeight: '',
	frontMass: '',
	rearMass: '',
	unsprungCornerMass: '',
	cgHeight: '',
	frontBrakePercent: ''
};
const form = (values: Partial<BuildForm>): BuildForm => ({
	name: 'Trial',
	client: '',
	stage: 'quoted',
	datumOrigin: 'ground',
	datumHeight: '',
	datumForeAft: 'fore',
	datumForeOrigin: '',
	tyreSize: '',
	notes: '',
	people: [],
	...empty,
	...values
});

describe('builds over the API', () => {
	test('created with only a name, changed only where asked', async () => {
		const made = await api(people.builder).create({ name: ' Trial ' });
		expect(made.status).toBe(201);
		const { id } = made.body as BuildFacts;
		expect(made.headers.get('location')).toBe(`/api/v1/shops/${SHOP}/builds/${id}`);
		expect(made.body).toMatchObject({
			name: 'Trial',
			stage: 'quoted',
			wheelbase: null,
			datum: { origin: 'ground' },
			people: []
		});
		const builder = api(people.builder, id);
		await builder.change({
			wheelbase: 2500,
			notes: 'kept',
			stage: 'laidOut',
			datum: { origin: 'table', height: 100, foreAft: 'aft', foreOrigin: -20 }
		});
		expect((await builder.change({ track: 1400 })).body).toMatchObject({
			name: 'Trial',
			wheelbase: 2500,
			track: 1400,
			notes: 'kept',
			stage: 'laidOut',
			datum: { origin: 'table', height: 100, foreAft: 'aft', foreOrigin: -20 }
		});
		expect((await builder.change({ wheelbase: null })).body).toMatchObject({ wheelbase: null, track: 1400 });
		expect((await builder.change({})).body).toMatchObject({ notes: 'kept', track: 1400 });
	});

	test('each number to its own column', async () => {
		const numbers = {
			wheelbase: 2501,
			track: 1402,
			loadedRadius: 303,
			rideHeight: 104,
			frontMass: 505,
			rearMass: 506,
			unsprungCornerMass: 37,
			cgHeight: 508,
			frontBrakeShare: 0.59
		};
		const { id } = (await api(people.builder).create({ name: 'Numbers', ...numbers })).body as BuildFacts;
		expect((await api(people.builder, id).read()).body).toMatchObject(numbers);
	});

	test.each([
		[{}, 'name'],
		[{ name: '' }, 'name'],
		[{ name: 'x', track: 10 }, 'track'],
		[{ name: 'x', track: '1400' }, 'track'],
		[{ name: 'x', frontBrakeShare: 1.2 }, 'frontBrakeShare'],
		[{ name: 'x', stage: 'sold' }, 'stage'],
		[{ name: 'x', datum: { origin: 'moon', height: 0, foreAft: 'fore', foreOrigin: 0 } }, 'datum.origin']
	])('%j is refused at %s', async (body, field) => {
		const answer = await api(people.builder).create(body);
		expect(answer.status).toBe(422);
		expect((answer.body as Problem).errors?.map((error) => error.field)).toContain(field);
	});

	test('writes want our own pages and JSON', async () => {
		const create = (headers: Record<string, string>) => api(people.owner).create({ name: 'x' }, headers);
		expect((await create({ origin: 'https://elsewhere.example' })).status).toBe(403);
		expect((await create({ origin: 'null' })).status).toBe(403);
		expect((await create({ 'content-type': 'application/x-www-form-urlencoded' })).status).toBe(415);
		expect((await create({ 'content-type': 'application/json; charset=utf-8' })).status).toBe(201);
	});

	test('put away and taken out again', async () => {
		const owner = api(people.owner, COUPE_ID);
		expect((await owner.change({ archived: true })).body).toMatchObject({ archivedAt: expect.any(String) as string });
		const names = async (search: string) =>
			((await owner.list(search)).body as { items: { name: string }[] }).items.map(({ name }) => name);
		expect(await names('')).not.toContain('Long coupe');
		expect(await names('?archived=yes')).toEqual(['Long coupe']);
		expect((await owner.change({ archived: false })).body).toMatchObject({ archivedAt: null });
	});
});

describe('the build form', () => {
	test('reads what a person types in their units', () => {
		const read = readBuildForm(
			form({
				wheelbase: '102 3/8',
				track: '1420 mm',
				frontMass: '1200',
				frontBrakePercent: '64',
				datumOrigin: 'rail',
				datumHeight: '10 1/4'
			}),
			inInches
		);
		expect(read).toMatchObject({ ok: true });
		if (!read.ok) return;
		expect(read.input.wheelbase).toBeCloseTo(102.375 * 25.4, 9);
		expect(read.input.track).toBe(1420);
		expect(read.input.frontMass).toBeCloseTo(1200 * 0.45359237, 9);
		expect(read.input.frontBrakeShare).toBeCloseTo(0.64, 12);
		expect(read.input.datum.height).toBeCloseTo(260.35, 9);
	});

	test('names each field at fault, with the range in the person’s units', () => {
		const read = readBuildForm(
			form({ wheelbase: 'long', track: '5', frontBrakePercent: '120', cgHeight: '480 mm' }),
			inInches
		);
		expect(read).toEqual({
			ok: false,
			errors: [
				{ field: 'wheelbase', message: expect.any(String) as string },
				{ field: 'track', message: expect.stringMatching(/^Track: from 23\.62\d* to 102\.36\d* in\.$/) as string },
				{ field: 'frontBrakePercent', message: 'Front brake share: from 0 to 100 %.' }
			]
		});
	});

	test('a field left as it was shown keeps the stored value to the last digit', async () => {
		const stored = (await api(people.owner, ROADSTER_ID).read()).body as BuildFacts;
		const odd = { ...stored, track: 1420 + 1 / 3, frontMass: 560.123456789012, frontBrakeShare: 0.6 + 1 / 30 };
		const read = readBuildForm(fillBuildForm(odd, inInches), inInches, odd);
		expect(read).toMatchObject({
			ok: true,
			input: { track: odd.track, frontMass: odd.frontMass, frontBrakeShare: odd.frontBrakeShare, datum: stored.datum }
		});
	});

	test('an unreadable number comes back as typed, beside its error, and nothing is stored', async () => {
		const fields = { ...form({ name: 'Typed', track: 'wide' }), people: [] };
		const event = await people.builder.event(`/${SHOP}/builds/new`, {
			method: 'POST',
			params: { shop: SHOP },
			form: fields
		});
		const answer = (await newActions.default?.(event as never)) as unknown as {
			status: number;
			data: { form: { data: BuildForm; errors: Record<string, string[]> } };
		};
		expect(answer.status).toBe(400);
		expect(answer.data.form.data.track).toBe('wide');
		expect(answer.data.form.errors.track?.[0]).toMatch(/mm/);
		expect(await db.query("SELECT id FROM builds WHERE name = 'Typed'")).toEqual([]);
	});

	test('a new build from the form, then saved from its job card', async () => {
		const technician = (await db.query("SELECT id FROM people WHERE email = 'technician@demo.example'")).map(({ id }) =>
			String(id)
		);
		const event = await people.builder.event(`/${SHOP}/builds/new`, {
			method: 'POST',
			params: { shop: SHOP },
			form: { ...form({ name: 'From the form', track: '1450', wheelbase: '2600' }), people: technician }
		});
		const { location } = await refusal(() => newActions.default?.(event as never));
		const build = location?.split('/').at(-1) ?? '';
		expect((await api(people.builder, build).read()).body).toMatchObject({
			track: 1450,
			people: [{ name: 'Ines Halloran' }]
		});
		const params = { shop: SHOP, build };
		const save = await people.builder.event('/?/save', {
			method: 'POST',
			params,
			form: { ...form({ name: 'Renamed', track: '1460' }), people: technician }
		});
		await cardActions.save?.(save as never);
		expect((await api(people.builder, build).read()).body).toMatchObject({
			name: 'Renamed',
			track: 1460,
			wheelbase: null
		});
		expect((await cardLoad((await people.technician.event('/', { params })) as never)) as unknown).toEqual({
			form: null,
			assignable: []
		});
		const denied = await people.technician.event('/?/save', {
			method: 'POST',
			params,
			form: { ...form({}), people: [] }
		});
		expect(await refusal(() => cardActions.save?.(denied as never))).toMatchObject({ status: 403 });
	});
});
