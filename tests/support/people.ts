import { startSession } from '../../src/lib/server/auth/session';
import { Person } from '../../src/lib/server/db';
import { Visitor } from './server';

export const SHOP = 'quill-chassis';
export const DEMO_ROLES = ['owner', 'builder', 'technician', 'client'] as const;

/** A browser signed in as the demo's person of a role; `neighbour` owns the other shop. */
export async function signedIn(who: (typeof DEMO_ROLES)[number] | 'neighbour'): Promise<Visitor> {
	const person = await Person.findOne({ where: { email: `${who}@demo.example` }, rejectOnEmpty: true });
	const visitor = new Visitor();
	await startSession(await visitor.event('/sign-in', { method: 'POST' }), person.id);
	return visitor;
}

/** Every role's browser and the neighbour's. */
export async function everyone() {
	const [owner, builder, technician, client, neighbour] = await Promise.all(
		([...DEMO_ROLES, 'neighbour'] as const).map((who) => signedIn(who))
	);
	if (!owner || !builder || !technician || !client || !neighbour) throw new Error('the demo is not seeded');
	return { owner, builder, technician, client, neighbour };
}
