import { DataTypes, Model } from 'sequelize';
import type { InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize';
import type { Role } from '../../../schemas/auth';
import { id } from './columns';
import type { Person } from './people';

export class Shop extends Model<InferAttributes<Shop>, InferCreationAttributes<Shop>> {
	declare id: string;
	declare slug: string;
	declare name: string;
	declare techniciansSeeAll: boolean;
	declare createdAt: Date;
}

export class Membership extends Model<InferAttributes<Membership>, InferCreationAttributes<Membership>> {
	declare shopId: string;
	declare personId: string;
	declare role: Role;
	declare createdAt: Date;
	declare shop?: NonAttribute<Shop>;
	declare person?: NonAttribute<Person>;
}

export class ShimShelf extends Model<InferAttributes<ShimShelf>, InferCreationAttributes<ShimShelf>> {
	declare shopId: string;
	declare version: number;
	declare updatedAt: Date;
	declare updatedBy: string;
	declare author?: NonAttribute<Person>;
}

export class ShimRow extends Model<InferAttributes<ShimRow>, InferCreationAttributes<ShimRow>> {
	declare id: string;
	declare shopId: string;
	declare unit: 'mm' | 'in';
	declare thickness: number;
	declare count: number;
}

export function defineShops(sequelize: Sequelize): void {
	Shop.init(
		{
			id: id(true),
			slug: { type: DataTypes.STRING(60), allowNull: false },
			name: { type: DataTypes.STRING(80), allowNull: false },
			techniciansSeeAll: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
			createdAt: { type: DataTypes.DATE(3), allowNull: false }
		},
		{ sequelize, tableName: 'shops' }
	);
	Membership.init(
		{
			shopId: id(true),
			personId: id(true),
			role: { type: DataTypes.STRING(12), allowNull: false },
			createdAt: { type: DataTypes.DATE(3), allowNull: false }
		},
		{ sequelize, tableName: 'memberships' }
	);
	ShimShelf.init(
		{
			shopId: id(true),
			version: { type: DataTypes.INTEGER, allowNull: false },
			updatedAt: { type: DataTypes.DATE(3), allowNull: false },
			updatedBy: id()
		},
		{ sequelize, tableName: 'shim_shelves' }
	);
	ShimRow.init(
		{
			id: id(true),
			shopId: id(),
			unit: { type: DataTypes.CHAR(2), allowNull: false },
			thickness: { type: DataTypes.DOUBLE, allowNull: false },
			count: { type: DataTypes.INTEGER, allowNull: false }
		},
		{ sequelize, tableName: 'shims' }
	);
}
