import { literal, Op } from 'sequelize';
import type { Transaction, WhereOptions } from 'sequelize';
import type { Actor } from './actor';
import { Build, database } from './db';
import { refuseUnknown } from './problem';

/** The WHERE part that leaves only builds the actor may know of. */
export function visibleBuilds(actor: Actor): WhereOptions<Build> {
	if (actor.seesAllBuilds) return { shopId: actor.shopId };
	const [shop, person] = [actor.shopId, actor.personId].map((value) => database().escape(value));
	const assigned = literal(`(SELECT build_id FROM build_people WHERE shop_id = ${shop} AND person_id = ${person})`);
	return { shopId: actor.shopId, id: { [Op.in]: assigned } };
}

/** True when the build is in the actor's shop and theirs to know of. */
export async function mayKnowBuild(actor: Actor, buildId: string): Promise<boolean> {
	return (await Build.count({ where: { [Op.and]: [visibleBuilds(actor), { id: buildId }] } })) > 0;
}

/** The build's row when the actor may know of it; 404 otherwise. With `lock` the row is held until the transaction ends. */
export async function findBuild(
	actor: Actor,
	buildId: string,
	transaction?: Transaction,
	lock = false
): Promise<Build> {
	const where = { [Op.and]: [visibleBuilds(actor), { id: buildId }] };
	const build = await Build.findOne({ where, ...(transaction ? { transaction, lock } : {}) });
	return build ?? refuseUnknown();
}
