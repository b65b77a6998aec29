import { fail, redirect } from '@sveltejs/kit';
import { message, setError, superValidate } from 'sveltekit-superforms/server';
import { zod } from 'superforms-zod4';
import { signUpSchema } from '$lib/schemas/auth';
import { signUp } from '$lib/server/auth/sign-up';
import { homeOf } from '$lib/server/home';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	if (locals.person) redirect(303, await homeOf(locals.person.id));
	return { form: await superValidate(zod(signUpSchema)) };
};

export const actions: Actions = {
	default: async (event) => {
		const form = await superValidate(event.request, zod(signUpSchema));
		const { password } = form.data;
		form.data.password = '';
		if (!form.valid) return fail(400, { form });
		const result = await signUp(event, { ...form.data, password });
		if (!result.ok) {
			if (result.field === null) return message(form, result.message, { status: 429 });
			return setError(form, result.field, result.message);
		}
		redirect(303, `/${result.shopSlug}/builds`);
	}
};
