import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, test } from 'vitest';
import { ROLES } from '../../src/lib/schemas/auth';
import { abilities, ACTS, can, verdict } from '../../src/lib/server/policy';

/** product.md, "The people": y may, - knows of it but may not (403), . does not know of it (404). Owner, builder, technician, client. */
const EXPECTED = `
build.list       y y y y
build.read       y y y y
build.create     y y - -
build.edit       y y - -
build.archive    y y - -
draft.read       y y . .
draft.write      y y . .
revision.read    y y y y
revision.keep    y y - -
revision.release y y - -
record.add       y y y -
stock.read       y y y -
stock.edit       y y - -
shop.settings    y - - -
members.read     y y - -`
	.trim()
	.split('\n')
	.map((line) => line.trim().split(/\s+/));

const SIGN = { yes: 'y', no: '-', hidden: '.' };

describe('the policy', () => {
	test('says of every role and act what the product brief says', () => {
		const table = ACTS.map((act) => [act, ...ROLES.map((role) => SIGN[verdict(role, act)])]);
		expect(table).toEqual(EXPECTED);
	});

	test('abilities are what may be done', () => {
		for (const role of ROLES) for (const act of ACTS) expect(abilities(role)[act]).toBe(can(role, act));
	});
});

const routes = path.resolve('src/routes');
const files = readdirSync(routes, { recursive: true, encoding: 'utf8' }).filter((file) =>
	/\+(server|page\.server|layout\.server)\.ts$/.test(file)
);
/** Open to everyone: signing in, up and out, and the front door that only redirects. */
const OPEN = /^(\+server\.ts$|\(public\)\/sign-(in|up|out)\/)/;

describe('every load, action and endpoint', () => {
	test('there are some', () => {
		expect(files.filter((file) => !OPEN.test(file)).length).toBeGreaterThan(15);
	});

	test.each(files.filter((file) => !OPEN.test(file)))('%s guards each handler', (file) => {
		const source = readFileSync(path.join(routes, file), 'utf8');
		const [, ...handlers] = source.split(/async \(event\b/);
		expect(handlers.length).toBeGreaterThan(0);
		for (const body of handlers) expect(body).toMatch(/\bguard(Person)?\(event\b/);
	});

	test.each(files)('%s keeps clear of the models and under 80 lines', (file) => {
		const source = readFileSync(path.join(routes, file), 'utf8');
		expect(source).not.toMatch(/server\/db|from 'sequelize'/);
		expect(source.split('\n').length).toBeLessThanOrEqual(80);
	});
});

describe('query modules', () => {
	test.each(['builds', 'drafts', 'revisions', 'records', 'shims', 'people', 'shops', 'audit', 'chosen', 'visibility'])(
		'%s: each exported function is told first who asks',
		(name) => {
			const source = readFileSync(`src/lib/server/${name}.ts`, 'utf8');
			const exported = [...source.matchAll(/export (?:async )?function (\w+)\(\s*(\w+): (\w+)/g)].map(
				([, fn, argument, type]) => ({ fn, argument, type })
			);
			// Two readers of stored text touch no row.
			const rows = exported.filter(({ fn }) => fn !== 'readPreferences');
			expect(rows.length).toBeGreaterThan(0);
			for (const { fn, argument, type } of rows)
				expect(`${fn}: ${argument} ${type}`).toMatch(/: (actor (Actor|AuditSubject)|person SignedInPerson)$/);
		}
	);
});
