import type { ShopMembership, SignedInPerson } from '../schemas/auth';
import type { Actor } from './actor';
import { Membership, Shop } from './db';
import { seesEverything } from './policy';

/** The shops a person belongs to, by name, with their role in each. */
export async function listShops(person: SignedInPerson): Promise<ShopMembership[]> {
	const rows = await Membership.findAll({
		where: { personId: person.id },
		include: { model: Shop, as: 'shop', attributes: ['slug', 'name'], required: true },
		order: [[{ model: Shop, as: 'shop' }, 'name', 'ASC']]
	});
	return rows.flatMap(({ role, shop }) => (shop ? [{ slug: shop.slug, name: shop.name, role }] : []));
}

/** Who the person is in the shop of this slug, or null when they are nobody there. */
export async function findActor(person: SignedInPerson, slug: string, requestId: string): Promise<Actor | null> {
	const row = await Membership.findOne({
		where: { personId: person.id },
		include: { model: Shop, as: 'shop', where: { slug }, required: true }
	});
	if (!row?.shop) return null;
	const { role, shop } = row;
	return {
		personId: person.id,
		personName: person.name,
		shopId: shop.id,
		shopSlug: shop.slug,
		role,
		seesAllBuilds: seesEverything(role) || (role === 'technician' && shop.techniciansSeeAll),
		requestId
	};
}

/** The shop an actor stands in, as its pages show it. */
export async function readShop(actor: Actor): Promise<{ slug: string; name: string; techniciansSeeAll: boolean }> {
	const shop = await Shop.findByPk(actor.shopId, { rejectOnEmpty: true });
	return { slug: shop.slug, name: shop.name, techniciansSeeAll: shop.techniciansSeeAll };
}
