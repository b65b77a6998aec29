import { redirect } from '@sveltejs/kit';
import type { SignedInPerson } from '../schemas/auth';
import type { Actor, AnyEvent } from './actor';
import { note } from './audit';
import { verdict } from './policy';
import type { Act } from './policy';
import { refuse, refuseUnknown } from './problem';
import { findActor } from './shops';
import { mayKnowBuild } from './visibility';

// Layout, page and guard of one request ask for the same membership; it is read once a request.
const actors = new WeakMap<App.Locals, Promise<Actor | null>>();

/**
 * One line in every load, action and endpoint of a shop: who asks, and may they do this act?
 * Not signed in → sign-in page, or 401 for the API. Not theirs to know → 404. Known, but not their role's act → 403.
 */
export async function guard(event: AnyEvent, act: Act, params: { build?: string } = {}): Promise<Actor> {
	const person = guardPerson(event);
	let found = actors.get(event.locals);
	if (!found) actors.set(event.locals, (found = findActor(person, event.params.shop ?? '', event.locals.requestId)));
	const actor = (await found) ?? refuseUnknown();
	if (params.build !== undefined && !(await mayKnowBuild(actor, params.build))) refuseUnknown();
	const word = verdict(actor.role, act);
	if (word === 'hidden') refuseUnknown();
	if (word === 'no') {
		await note(actor, 'refused', { detail: act, buildId: params.build ?? null });
		refuse(403, `A ${actor.role} of this shop may not do this.`);
	}
	return actor;
}

/** For what belongs to the person, in no shop: signed in is enough. */
export function guardPerson(event: AnyEvent): SignedInPerson {
	return event.locals.person ?? askToSignIn(event);
}

function askToSignIn(event: AnyEvent): never {
	if (isApi(event)) refuse(401, 'Sign in first.');
	redirect(303, `/sign-in?next=${encodeURIComponent(event.url.pathname + event.url.search)}`);
}

/** True for requests to the JSON API. */
export function isApi(event: Pick<AnyEvent, 'url'>): boolean {
	return event.url.pathname.startsWith('/api/');
}
