import { redirect } from '@sveltejs/kit';
import { guard } from '$lib/server/guard';
import type { RequestHandler } from './$types';

/** A shop's own address leads to its builds. */
export const GET: RequestHandler = async (event) => {
	const actor = await guard(event, 'build.list');
	redirect(303, `/${actor.shopSlug}/builds`);
};
