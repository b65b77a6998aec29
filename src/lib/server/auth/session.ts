import { randomBytes } from 'node:crypto';
import { readPreferences } from '../people';
import type { SignedInPerson } from '../../schemas/auth';
import type { AnyEvent } from '../actor';
import { KnownDevice } from '../db';
import { env } from '../env';
import { sha256 } from '../ids';
import { lucia, MAX_LIFE } from './lucia';

const DEVICE_LIFE_S = 400 * 24 * 3600;

// A `__Host-` cookie cannot be set or overridden from another host; browsers take it only over https.
const cookieName = () => (env().secure ? '__Host-trammel' : 'trammel');
const deviceCookieName = () => (env().secure ? '__Host-trammel-device' : 'trammel-device');
const attributes = () => ({ path: '/', httpOnly: true, sameSite: 'lax', secure: env().secure }) as const;

/** The person and session of a request's cookie, or nulls; an ended session's cookie is removed. */
export async function readSession(event: AnyEvent): Promise<Pick<App.Locals, 'person' | 'session'>> {
	const id = event.cookies.get(cookieName());
	if (!id) return { person: null, session: null };
	const { session, user } = await lucia.validateSession(id);
	if (!session) {
		event.cookies.delete(cookieName(), attributes());
		return { person: null, session: null };
	}
	const person: SignedInPerson = {
		id: user.id,
		name: user.name,
		email: user.email,
		preferences: readPreferences(user.preferences)
	};
	return { person, session: { id: session.id, expiresAt: session.expiresAt } };
}

/** Begins a session under a new id; one that was open in this browser ends. */
export async function startSession(event: AnyEvent, personId: string): Promise<void> {
	await endSession(event);
	const session = await lucia.createSession(personId, {});
	event.cookies.set(cookieName(), session.id, { ...attributes(), maxAge: MAX_LIFE.seconds() });
	await lucia.deleteExpiredSessions();
}

/** Ends this browser's session, in the database and in the cookie. */
export async function endSession(event: AnyEvent): Promise<void> {
	const id = event.cookies.get(cookieName());
	if (!id) return;
	await lucia.invalidateSession(id);
	event.cookies.delete(cookieName(), attributes());
}

/** The hash of this browser's device token when this person has signed in from it before, else null. */
export async function knownDevice(event: AnyEvent, personId: string | null): Promise<string | null> {
	const token = event.cookies.get(deviceCookieName());
	if (!token) return null;
	const row = await KnownDevice.findByPk(sha256(token));
	return row && row.personId === personId ? row.tokenHash : null;
}

/** Marks this browser as one the person has signed in from. */
export async function rememberDevice(event: AnyEvent, personId: string): Promise<void> {
	if (await knownDevice(event, personId)) return;
	const token = randomBytes(32).toString('base64url');
	await KnownDevice.create({ tokenHash: sha256(token), personId, createdAt: new Date() });
	event.cookies.set(deviceCookieName(), token, { ...attributes(), maxAge: DEVICE_LIFE_S });
}
