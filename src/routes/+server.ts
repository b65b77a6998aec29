import { redirect } from '@sveltejs/kit';
import { homeOf } from '$lib/server/home';
import type { RequestHandler } from './$types';

/** The front door: to the person's builds, or to sign-in. */
export const GET: RequestHandler = async ({ locals }) =>
	redirect(303, locals.person ? await homeOf(locals.person.id) : '/sign-in');
