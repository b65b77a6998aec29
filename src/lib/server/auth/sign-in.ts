import type { SignInForm } from '../../schemas/auth';
import type { AnyEvent } from '../actor';
import { note } from '../audit';
import { Person } from '../db';
import { env } from '../env';
import { countAttempt, forgetAttempts, takeBackAttempt } from './limiter';
import { standInHash, verifyPassword } from './password';
import { knownDevice, rememberDevice, startSession } from './session';

/** Done, or why not: the same words and the same work whether the address is known or not. */
export type SignInResult = { ok: true; personId: string } | { ok: false; message: string; retryAfter?: number };

const WRONG = 'This address and password do not go together. Check both and try again.';

/** Signs a person in: counts the attempt, verifies once, begins a session under a new id. */
export async function signIn(
	event: AnyEvent,
	{ email, password }: Pick<SignInForm, 'email' | 'password'>
): Promise<SignInResult> {
	const ip = event.getClientAddress();
	const { requestId } = event.locals;
	const person = await Person.findOne({ where: { email } });
	const device = await knownDevice(event, person?.id ?? null);
	const [kind, key] = device ? (['device', device] as const) : (['account', email] as const);
	const wait = Math.max(await countAttempt('address', ip), await countAttempt(kind, key));
	const subject = { personId: person?.id ?? null, shopId: null, requestId };
	if (wait > 0) {
		await note(subject, 'sign-in.limited');
		return { ok: false, message: `Too many attempts. Try again in ${inMinutes(wait)}.`, retryAfter: wait };
	}
	const matches = await verifyPassword(person?.passwordHash ?? (await standInHash()), password);
	// The demo's passwords are published: they open nothing outside the private server they were made for.
	if (!person || !matches || (person.demo && !env().demo)) {
		await note(subject, 'sign-in.failed');
		return { ok: false, message: WRONG };
	}
	await forgetAttempts(kind, key);
	await takeBackAttempt('address', ip);
	await startSession(event, person.id);
	await rememberDevice(event, person.id);
	await note(subject, 'sign-in');
	return { ok: true, personId: person.id };
}

function inMinutes(seconds: number): string {
	const minutes = Math.ceil(seconds / 60);
	return minutes === 1 ? 'a minute' : `${minutes} minutes`;
}
