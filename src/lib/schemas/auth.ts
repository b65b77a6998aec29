import { z } from 'zod';
import type { Preferences } from './preferences';

/** The person of the request, as pages may see them. */
export interface SignedInPerson {
	id: string;
	name: string;
	email: string;
	preferences: Preferences;
}

/** A shop the person belongs to, with their one role there. */
export interface ShopMembership {
	slug: string;
	name: string;
	role: Role;
}

export const ROLES = ['owner', 'builder', 'technician', 'client'] as const;
export type Role = (typeof ROLES)[number];

/** A published sign-in of the demo, shown only where it works. */
export interface DemoAccount {
	role: Role;
	name: string;
	email: string;
	password: string;
}

export const PASSWORD_MIN = 12;
export const PASSWORD_MAX = 200;

const email = z
	.string()
	.trim()
	.toLowerCase()
	.min(1, 'Enter the email address of your account.')
	.max(254, 'An email address has at most 254 characters.')
	.email('Enter an email address such as name@example.com.');

/** Sign-in form. `next` is the local path to go on to; anything else is ignored by the server. */
export const signInSchema = z.object({
	email,
	password: z
		.string()
		.min(1, 'Enter your password.')
		.max(PASSWORD_MAX, `A password has at most ${PASSWORD_MAX} characters.`),
	next: z.string().max(500).default('')
});

/** Sign-up form: a person and the shop they will own. */
export const signUpSchema = z.object({
	name: z.string().trim().min(1, 'Enter your name.').max(80, 'A name has at most 80 characters.'),
	email,
	password: z
		.string()
		.min(PASSWORD_MIN, `Use at least ${PASSWORD_MIN} characters; a few words in a row do well.`)
		.max(PASSWORD_MAX, `A password has at most ${PASSWORD_MAX} characters.`),
	shop: z
		.string()
		.trim()
		.min(2, 'Enter the name of your shop, 2 to 80 characters.')
		.max(80, 'A shop name has at most 80 characters.')
});

export type SignInForm = z.infer<typeof signInSchema>;
export type SignUpForm = z.infer<typeof signUpSchema>;
