import { fail, redirect } from '@sveltejs/kit';
import { message, superValidate } from 'sveltekit-superforms/server';
import { zod } from 'superforms-zod4';
import { signInSchema } from '$lib/schemas/auth';
import { localPath } from '$lib/server/auth/next';
import { signIn } from '$lib/server/auth/sign-in';
import { demoSignIns } from '$lib/server/demo';
import { homeOf } from '$lib/server/home';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const next = localPath(url.searchParams.get('next'), '');
	if (locals.person) redirect(303, next || (await homeOf(locals.person.id)));
	return { form: await superValidate({ next }, zod(signInSchema), { errors: false }), demo: await demoSignIns() };
};

export const actions: Actions = {
	default: async (event) => {
		const form = await superValidate(event.request, zod(signInSchema));
		const { password } = form.data;
		// The password is never sent back.
		form.data.password = '';
		if (!form.valid) return fail(400, { form });
		const result = await signIn(event, { email: form.data.email, password });
		if (!result.ok) return message(form, result.message, { status: result.retryAfter ? 429 : 400 });
		redirect(303, localPath(form.data.next, '') || (await homeOf(result.personId)));
	}
};
