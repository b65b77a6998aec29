import { Op } from 'sequelize';
import type { Transaction } from 'sequelize';
import { Shop } from '../db';

// First parts of other addresses: a shop may not take them.
const TAKEN = new Set(['api', 'sign-in', 'sign-up', 'sign-out', 'help', 'about', 'settings', 'share']);

/** A shop's name as an address part: `Ölund & Söner` → `olund-soner`. */
export function slugOf(name: string): string {
	const slug = name
		.normalize('NFKD')
		.replace(/\p{M}/gu, '')
		.toLowerCase()
		.replace(/[^a-z0-9]+/g, '-')
		.slice(0, 50)
		.replace(/^-+|-+$/g, '');
	return slug === '' || TAKEN.has(slug) ? `shop${slug && `-${slug}`}` : slug;
}

/** The first free slug for a name: `plumb`, `plumb-2`, `plumb-3` … */
export async function freeSlug(name: string, transaction: Transaction): Promise<string> {
	const base = slugOf(name);
	const rows = await Shop.findAll({
		attributes: ['slug'],
		where: { [Op.or]: [{ slug: base }, { slug: { [Op.like]: `${base}-%` } }] },
		transaction
	});
	const used = new Set(rows.map(({ slug }) => slug));
	let free = base;
	for (let n = 2; used.has(free); n++) free = `${base}-${n}`;
	return free;
}
