import { UniqueConstraintError } from 'sequelize';
import type { SignUpForm } from '../../schemas/auth';
import type { AnyEvent } from '../actor';
import { note } from '../audit';
import { database, Membership, Person, Shop } from '../db';
import { newId } from '../ids';
import { storedDefaults } from '../people';
import { freeSlug } from './slug';
import { easyPassword } from './common';
import { countAttempt } from './limiter';
import { hashPassword } from './password';
import { rememberDevice, startSession } from './session';

/** Done, or why not; `field` null where no field is at fault. */
export type SignUpResult =
	{ ok: true; shopSlug: string } | { ok: false; field: 'email' | 'password' | null; message: string };

const TAKEN = 'There is an account with this address already; sign in instead.';

/** Makes a person and the shop they own, and signs them in. */
export async function signUp(event: AnyEvent, form: SignUpForm): Promise<SignUpResult> {
	const easy = await easyPassword(form.password, [form.name, form.email, form.email.split('@')[0] ?? '', form.shop]);
	if (easy) return { ok: false, field: 'password', message: easy };
	if ((await countAttempt('signUp', event.getClientAddress())) > 0)
		return { ok: false, field: null, message: 'Too many new accounts from here. Try again in an hour.' };
	if ((await Person.count({ where: { email: form.email } })) > 0) return { ok: false, field: 'email', message: TAKEN };
	const passwordHash = await hashPassword(form.password);
	try {
		const made = await createPersonAndShop(form, passwordHash);
		await startSession(event, made.personId);
		await rememberDevice(event, made.personId);
		await note({ personId: made.personId, shopId: made.shopId, requestId: event.locals.requestId }, 'sign-up');
		return { ok: true, shopSlug: made.slug };
	} catch (failure) {
		if (failure instanceof UniqueConstraintError && 'people_email' in failure.fields)
			return { ok: false, field: 'email', message: TAKEN };
		throw failure;
	}
}

async function createPersonAndShop(
	form: SignUpForm,
	passwordHash: string
): Promise<{ personId: string; shopId: string; slug: string }> {
	return database().transaction(async (transaction) => {
		const createdAt = new Date();
		const personId = newId();
		const shopId = newId();
		const slug = await freeSlug(form.shop, transaction);
		await Person.create(
			{
				id: personId,
				name: form.name,
				email: form.email,
				passwordHash,
				preferences: storedDefaults(),
				demo: false,
				createdAt
			},
			{ transaction }
		);
		await Shop.create({ id: shopId, slug, name: form.shop, techniciansSeeAll: false, createdAt }, { transaction });
		await Membership.create({ shopId, personId, role: 'owner', createdAt }, { transaction });
		return { personId, shopId, slug };
	});
}
