import { fail, redirect } from '@sveltejs/kit';
import { setError, superValidate } from 'sveltekit-superforms/server';
import { zod } from 'superforms-zod4';
import { buildFormSchema } from '$lib/schemas/build';
import { readBuildForm } from '$lib/server/build-form';
import { createBuild } from '$lib/server/builds';
import { guard, guardPerson } from '$lib/server/guard';
import { listAssignable } from '$lib/server/people';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const actor = await guard(event, 'build.create');
	return { form: await superValidate(zod(buildFormSchema)), assignable: await listAssignable(actor) };
};

export const actions: Actions = {
	default: async (event) => {
		const actor = await guard(event, 'build.create');
		const form = await superValidate(event.request, zod(buildFormSchema));
		const read = readBuildForm(form.data, guardPerson(event).preferences);
		if (!read.ok) for (const { field, message } of read.errors) setError(form, field, message);
		if (!form.valid || !read.ok) return fail(400, { form });
		const build = await createBuild(actor, read.input, form.data.people);
		redirect(303, `/${actor.shopSlug}/builds/${build.id}`);
	}
};
