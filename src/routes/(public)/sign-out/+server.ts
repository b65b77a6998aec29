import { redirect } from '@sveltejs/kit';
import { note } from '$lib/server/audit';
import { endSession } from '$lib/server/auth/session';
import type { RequestHandler } from './$types';

/** Reading this address signs nobody out: only a post from our own pages does (Kit checks the origin of form posts). */
export const GET: RequestHandler = () => redirect(303, '/');

export const POST: RequestHandler = async (event) => {
	const { person, requestId } = event.locals;
	await endSession(event);
	if (person) await note({ personId: person.id, shopId: null, requestId }, 'sign-out');
	redirect(303, '/sign-in');
};
