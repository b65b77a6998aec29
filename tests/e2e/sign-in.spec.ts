import { signIn, signOut, signUp, stranger } from './support/people';
import { expect, expectSound, test } from './support/test';

test('a wrong password says the same as an unknown address, and keeps the address typed', async ({
	page,
	expected
}) => {
	expected.allow(/400/);
	const said: string[] = [];
	for (const email of ['owner@demo.example', 'nobody.at.all@example.com']) {
		await page.goto('/sign-in');
		await page.getByLabel('Email').fill(email);
		await page.getByLabel('Password').fill('not the right words');
		await page.getByRole('button', { name: 'Sign in', exact: true }).click();
		const message = page.getByRole('status');
		await expect(message).toBeVisible();
		said.push(await message.innerText());
		await expect(page.getByLabel('Email')).toHaveValue(email);
		await expect(page.getByLabel('Password')).toHaveValue('');
	}
	expect(said[0]).toBe(said[1]);
});

test('signing in goes on to the local page that was asked for, and never to another site', async ({ page }) => {
	await page.goto('/quill-chassis/builds?sort=name');
	await expect(page).toHaveURL(/\/sign-in\?next=/);
	await page.getByLabel('Email').fill('builder@demo.example');
	await page.getByLabel('Password').fill('tack then measure 2');
	await page.getByRole('button', { name: 'Sign in', exact: true }).click();
	await expect(page).toHaveURL(/\/quill-chassis\/builds\?sort=name/);
	await signOut(page, 'Tobias Renner');
	await page.goto('/sign-in?next=https://elsewhere.example/');
	await page.getByLabel('Email').fill('builder@demo.example');
	await page.getByLabel('Password').fill('tack then measure 2');
	await page.getByRole('button', { name: 'Sign in', exact: true }).click();
	await expect(page.getByRole('heading', { name: 'Builds', level: 1 })).toBeVisible();
	expect(new URL(page.url()).hostname).toBe(new URL(page.url()).hostname.replace('elsewhere.example', ''));
});

test('sign-up makes a shop of one’s own and refuses a common password by name of the field', async ({
	page,
	expected
}) => {
	expected.allow(/400/);
	const person = stranger();
	await page.goto('/sign-up');
	await expectSound(page);
	await page.getByLabel('Your name').fill(person.name);
	await page.getByLabel('Shop').fill(person.shop);
	await page.getByLabel('Email').fill(person.email);
	await page.getByLabel('Password').fill('password1234');
	await page.getByRole('button', { name: 'Open the book' }).click();
	await expect(page.getByLabel('Password')).toHaveAttribute('aria-invalid', 'true');
	await expect(page.getByLabel('Shop')).toHaveValue(person.shop);
	await signUp(page, person);
	await expect(page.getByRole('link', { name: person.shop })).toBeVisible();
	await expectSound(page);
	await signOut(page, person.name);
	await page.goto('/quill-chassis/builds');
	await expect(page).toHaveURL(/\/sign-in/);
});

test('a session ends at sign-out for the back button too', async ({ page }) => {
	await signIn(page, 'owner');
	const inside = page.url();
	await signOut(page, 'Marta Quill');
	await page.goto(inside);
	await expect(page).toHaveURL(/\/sign-in/);
});
