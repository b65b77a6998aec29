import { fail, redirect } from '@sveltejs/kit';
import { setError, superValidate } from 'sveltekit-superforms/server';
import { zod } from 'superforms-zod4';
import { buildFormSchema } from '$lib/schemas/build';
import type { AnyEvent } from '$lib/server/actor';
import { fillBuildForm, readBuildForm } from '$lib/server/build-form';
import { changeBuild, readBuild } from '$lib/server/builds';
import { guard, guardPerson } from '$lib/server/guard';
import { listAssignable } from '$lib/server/people';
import { can } from '$lib/server/policy';
import type { Actions, PageServerLoad, RequestEvent } from './$types';

/** The job card: facts come from the layout; the form only for those who may change them. */
export const load: PageServerLoad = async (event) => {
	const actor = await guard(event, 'build.read', event.params);
	if (!can(actor.role, 'build.edit')) return { form: null, assignable: [] };
	const facts = await readBuild(actor, event.params.build);
	const form = await superValidate(
		fillBuildForm(facts, guardPerson(event as AnyEvent).preferences),
		zod(buildFormSchema),
		{ errors: false }
	);
	return { form, assignable: await listAssignable(actor) };
};

const setArchived = (archived: boolean) => async (event: RequestEvent) => {
	const actor = await guard(event, 'build.archive', event.params);
	await changeBuild(actor, event.params.build, { archived });
	redirect(303, archived ? `/${actor.shopSlug}/builds` : `/${actor.shopSlug}/builds/${event.params.build}`);
};

export const actions: Actions = {
	save: async (event) => {
		const actor = await guard(event, 'build.edit', event.params);
		const form = await superValidate(event.request, zod(buildFormSchema));
		const stored = await readBuild(actor, event.params.build);
		const read = readBuildForm(form.data, guardPerson(event).preferences, stored);
		if (!read.ok) for (const { field, message } of read.errors) setError(form, field, message);
		if (!form.valid || !read.ok) return fail(400, { form });
		await changeBuild(actor, event.params.build, { ...read.input, people: form.data.people });
		return { form };
	},
	archive: setArchived(true),
	restore: setArchived(false)
};
