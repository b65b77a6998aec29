import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { POST } from '../../src/routes/api/v1/kinematics/bump/+server';
import { axleGeometry } from '../../src/lib/domain/axle';
import type { Problem } from '../../src/lib/schemas/problem';
import { seedDemo } from '../../src/lib/server/migrator';
import { PICKUP } from '../../seeders/demo/others';
import { signedIn } from '../support/people';
import { openTestServer, Visitor } from '../support/server';

let db: Awaited<ReturnType<typeof openTestServer>>;
let builder: Visitor;
beforeAll(async () => {
	db = await openTestServer();
	await seedDemo(db.url);
	builder = await signedIn('builder');
});
afterAll(async () => {
	await db.close();
});

const read = axleGeometry(PICKUP);
if ('missing' in read) throw new Error('the demo pick-up is complete');
const geometry = read.left;
const ask = (body: unknown, headers: Record<string, string> = {}, who = builder) =>
	who.call(POST, '/api/v1/kinematics/bump', { method: 'POST', body, headers });
const errorsOf = (answer: { body: never }) => (answer.body as Problem).errors ?? [];

interface Answer {
	kernelVersion: string;
	states: { travel: number; camber: number; points: Record<string, number[]> }[];
	lowLimit: { value: number; locks: string } | null;
	highLimit: { value: number; locks: string } | null;
}

describe('POST /api/v1/kinematics/bump', () => {
	test('gives every state with the kernel’s version', async () => {
		const answer = await ask({ geometry, from: -50, to: 50, step: 25 });
		expect(answer.status).toBe(200);
		const { states, lowLimit, highLimit, kernelVersion } = answer.body as Answer;
		expect(states.map(({ travel }) => travel)).toEqual([-50, -25, 0, 25, 50]);
		// Static camber as entered.
		expect(states[2]?.camber).toBeCloseTo(-0.5, 9);
		expect(states[2]?.points.upperBall?.[2]).toBeCloseTo(512, 6);
		expect([lowLimit, highLimit]).toEqual([null, null]);
		expect(kernelVersion).toMatch(/^\d+\.\d+\.\d+$/);
		expect(JSON.stringify(answer.body)).not.toContain('NaN');
	});

	test('a sweep past the bind gives what can be reached and what locks', async () => {
		const { states, highLimit } = (await ask({ geometry, from: 0, to: 900, step: 10 })).body as Answer;
		expect(states.length).toBeLessThan(91);
		expect(highLimit).toMatchObject({ value: expect.any(Number) as number, locks: expect.any(String) as string });
	});

	test('2001 states and no more', async () => {
		expect(((await ask({ geometry, from: -50, to: 50, step: 0.05 })).body as Answer).states).toHaveLength(2001);
		const tooMany = await ask({ geometry, from: -50, to: 50, step: 0.0499 });
		expect(tooMany.status).toBe(422);
		expect(errorsOf(tooMany)).toEqual([{ field: 'step', message: expect.stringContaining('2001') as string }]);
		expect((await ask({ geometry, from: 0, to: 10, step: 0 })).status).toBe(422);
	});

	test('64 KB and no more', async () => {
		expect((await ask({ geometry, from: 0, to: 10, step: 5, padding: 'x'.repeat(66_000) })).status).toBe(413);
		expect((await ask({ geometry, from: 0, to: 10, step: 5, padding: 'x'.repeat(60_000) })).status).toBe(200);
	});

	test('what cannot be solved names the point or link, what is missing its field', async () => {
		const flat = { ...geometry, points: { ...geometry.points, upperRear: geometry.points.upperFront } };
		const answer = await ask({ geometry: flat, from: 0, to: 10, step: 5 });
		expect(answer.status).toBe(422);
		expect(errorsOf(answer)[0]).toMatchObject({ field: expect.stringMatching(/^geometry\.upper/) as string });
		const { upperBall: _, ...rest } = geometry.points;
		expect(errorsOf(await ask({ geometry: { ...geometry, points: rest }, from: 0, to: 10, step: 5 }))[0]?.field).toBe(
			'geometry.points.upperBall'
		);
	});

	test('is for people signed in, from our own pages, as JSON', async () => {
		const body = { geometry, from: 0, to: 10, step: 5 };
		expect((await ask(body, {}, new Visitor())).status).toBe(401);
		expect((await ask(body, { origin: 'https://elsewhere.example' })).status).toBe(403);
		expect((await ask(body, { 'content-type': 'text/plain' })).status).toBe(415);
		expect((await ask('{"geometry":', {})).status).toBe(400);
	});

	test('is limited per person, and says how long to wait', async () => {
		const body = { geometry, from: 0, to: 1, step: 1 };
		const other = await signedIn('owner');
		let last = await ask(body);
		for (let i = 0; i < 61 && last.status !== 429; i++) last = await ask(body);
		expect(last.status).toBe(429);
		expect(Number(last.headers.get('retry-after'))).toBeGreaterThan(0);
		expect((await ask(body, {}, other)).status).toBe(200);
	});
});
