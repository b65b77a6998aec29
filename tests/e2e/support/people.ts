import { expect, type Page } from '@playwright/test';
import { DEMO_SIGN_INS } from '../../../src/lib/server/demo';
import type { Role } from '../../../src/lib/schemas/auth';

/** Signs in as the demo's person of a role; ends on the shop's builds. */
export async function signIn(page: Page, role: Role): Promise<void> {
	const account = DEMO_SIGN_INS.find((one) => one.role === role);
	if (!account) throw new Error(`The demo has no ${role}.`);
	await page.goto('/sign-in');
	await page.getByLabel('Email').fill(account.email);
	await page.getByLabel('Password').fill(account.password);
	await page.getByRole('button', { name: 'Sign in', exact: true }).click();
	await expect(page.getByRole('heading', { name: 'Builds', level: 1 })).toBeVisible();
}

export interface NewShop {
	name: string;
	email: string;
	password: string;
	shop: string;
}

/** Someone nobody has signed up yet; every call gives another. */
export function stranger(): NewShop {
	const mark = `${Date.now().toString(36)}${Math.random().toString(36).slice(2, 6)}`;
	return {
		name: 'Odile Farrow',
		email: `odile.${mark}@example.com`,
		password: 'plumb bob and chalk line',
		shop: `Farrow Frames ${mark}`
	};
}

/** Signs a stranger up; ends on their empty book. */
export async function signUp(page: Page, person: NewShop = stranger()): Promise<NewShop> {
	await page.goto('/sign-up');
	await page.getByLabel('Your name').fill(person.name);
	await page.getByLabel('Shop').fill(person.shop);
	await page.getByLabel('Email').fill(person.email);
	await page.getByLabel('Password').fill(person.password);
	await page.getByRole('button', { name: 'Open the book' }).click();
	await expect(page.getByRole('heading', { name: 'Builds', level: 1 })).toBeVisible();
	return person;
}

export async function signOut(page: Page, name: string): Promise<void> {
	await page.getByRole('button', { name, exact: true }).click();
	await page.getByRole('button', { name: 'Sign out' }).click();
	await expect(page).toHaveURL(/\/sign-in/);
}
