import type { Transaction } from 'sequelize';
import type { ShimStock, ShimStockInput } from '../schemas/shims';
import type { Actor } from './actor';
import { note } from './audit';
import { database, Person, ShimRow, ShimShelf, Shop } from './db';
import { newId } from './ids';
import { refuse } from './problem';

/** The shop's shim stock, thinnest first; version 0 when nothing was ever put in. */
export async function readStock(actor: Actor, transaction?: Transaction): Promise<ShimStock> {
	const { shopId } = actor;
	const within = transaction ? { transaction } : {};
	const shelf = await ShimShelf.findByPk(shopId, {
		include: { model: Person, as: 'author', attributes: ['name'] },
		...within
	});
	const rows = await ShimRow.findAll({
		where: { shopId },
		order: [
			['thickness', 'ASC'],
			['unit', 'ASC']
		],
		...within
	});
	return {
		version: shelf?.version ?? 0,
		items: rows.map(({ thickness, unit, count }) => ({ thickness, unit, count })),
		updatedAt: shelf?.updatedAt.toISOString() ?? null,
		updatedBy: shelf?.author?.name ?? null
	};
}

/** Replaces the whole stock when `version` is the one stored; 409 with the stock as it is otherwise. */
export async function writeStock(actor: Actor, { version, items }: ShimStockInput): Promise<ShimStock> {
	const stock = await database().transaction(async (transaction) => {
		const { shopId, personId } = actor;
		await Shop.findByPk(shopId, { transaction, lock: true });
		const current = await readStock(actor, transaction);
		if (current.version !== version)
			refuse(409, `${current.updatedBy ?? 'Someone'} changed the stock in the meantime.`, { current });
		const shelf = { version: version + 1, updatedAt: new Date(), updatedBy: personId };
		if (version === 0) await ShimShelf.create({ shopId, ...shelf }, { transaction });
		else await ShimShelf.update(shelf, { where: { shopId }, transaction });
		await ShimRow.destroy({ where: { shopId }, transaction });
		await ShimRow.bulkCreate(
			items.map((item) => ({ id: newId(), shopId, ...item })),
			{ transaction }
		);
		return readStock(actor, transaction);
	});
	await note(actor, 'stock.changed');
	return stock;
}
