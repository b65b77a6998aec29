import { Membership, Shop } from './db';

/** Where a person starts: the builds of their first shop by name. */
export async function homeOf(personId: string): Promise<string> {
	const row = await Membership.findOne({
		where: { personId },
		include: { model: Shop, as: 'shop', attributes: ['slug'], required: true },
		order: [[{ model: Shop, as: 'shop' }, 'name', 'ASC']]
	});
	return row?.shop ? `/${row.shop.slug}/builds` : '/no-shop';
}
