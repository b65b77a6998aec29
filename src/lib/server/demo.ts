import type { DemoAccount } from '../schemas/auth';
import { Person } from './db';
import { env } from './env';

/** One invented person for each role; they exist only in a database seeded with the demo. */
export const DEMO_SIGN_INS: DemoAccount[] = [
	{ role: 'owner', name: 'Marta Quill', email: 'owner@demo.example', password: 'square to the rail 1' },
	{ role: 'builder', name: 'Tobias Renner', email: 'builder@demo.example', password: 'tack then measure 2' },
	{ role: 'technician', name: 'Ines Halloran', email: 'technician@demo.example', password: 'jam nuts are tight 3' },
	{ role: 'client', name: 'Per Sandvoll', email: 'client@demo.example', password: 'when is it ready 4' }
];

/** The sign-ins to show on the sign-in page: only where they work, and only those that were seeded; null where there are none. */
export async function demoSignIns(): Promise<DemoAccount[] | null> {
	if (!env().demo) return null;
	const rows = await Person.findAll({ attributes: ['email'], where: { demo: true } });
	const seeded = new Set(rows.map(({ email }) => email));
	const shown = DEMO_SIGN_INS.filter(({ email }) => seeded.has(email));
	return shown.length > 0 ? shown : null;
}
