import { DataTypes, Model } from 'sequelize';
import type { InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize';
import type { Stage } from '../../../schemas/build';
import { id } from './columns';
import type { Person } from './people';

/** Numbers in mm, kg; the brake share is a fraction of 1. */
export class Build extends Model<InferAttributes<Build>, InferCreationAttributes<Build>> {
	declare id: string;
	declare shopId: string;
	declare name: string;
	declare client: string;
	declare stage: Stage;
	declare stageOrder: number;
	/** JSON of the builder's datum. */
	declare datum: string;
	declare wheelbase: number | null;
	declare track: number | null;
	declare tyreSize: string;
	declare loadedRadius: number | null;
	declare rideHeight: number | null;
	declare frontMass: number | null;
	declare rearMass: number | null;
	declare unsprungCornerMass: number | null;
	declare cgHeight: number | null;
	declare frontBrakeShare: number | null;
	declare notes: string;
	declare archived: boolean;
	declare archivedAt: Date | null;
	declare createdAt: Date;
	declare updatedAt: Date;
}

export class BuildPersonRow extends Model<InferAttributes<BuildPersonRow>, InferCreationAttributes<BuildPersonRow>> {
	declare shopId: string;
	declare buildId: string;
	declare personId: string;
	declare createdAt: Date;
	declare person?: NonAttribute<Person>;
}

export class Draft extends Model<InferAttributes<Draft>, InferCreationAttributes<Draft>> {
	declare shopId: string;
	declare buildId: string;
	declare version: number;
	/** The axle document as canonical JSON. */
	declare document: string;
	declare parentNumber: number | null;
	declare updatedAt: Date;
	declare updatedBy: string;
	declare author?: NonAttribute<Person>;
}

export function defineBuilds(sequelize: Sequelize): void {
	// A fresh object each: Sequelize writes the column's name into the definition it is given.
	const measure = () => ({ type: DataTypes.DOUBLE, allowNull: true });
	Build.init(
		{
			id: id(true),
			shopId: id(),
			name: { type: DataTypes.STRING(80), allowNull: false },
			client: { type: DataTypes.STRING(80), allowNull: false },
			stage: { type: DataTypes.STRING(16), allowNull: false },
			stageOrder: { type: DataTypes.TINYINT, allowNull: false },
			datum: { type: DataTypes.TEXT('long'), allowNull: false },
			wheelbase: measure(),
			track: measure(),
			tyreSize: { type: DataTypes.STRING(40), allowNull: false },
			loadedRadius: measure(),
			rideHeight: measure(),
			frontMass: measure(),
			rearMass: measure(),
			unsprungCornerMass: measure(),
			cgHeight: measure(),
			frontBrakeShare: measure(),
			notes: { type: DataTypes.TEXT, allowNull: false },
			archived: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
			archivedAt: { type: DataTypes.DATE(3), allowNull: true },
			createdAt: { type: DataTypes.DATE(3), allowNull: false },
			updatedAt: { type: DataTypes.DATE(3), allowNull: false }
		},
		{ sequelize, tableName: 'builds' }
	);
	BuildPersonRow.init(
		{
			shopId: id(true),
			buildId: id(true),
			personId: id(true),
			createdAt: { type: DataTypes.DATE(3), allowNull: false }
		},
		{ sequelize, tableName: 'build_people' }
	);
	Draft.init(
		{
			shopId: id(true),
			buildId: id(true),
			version: { type: DataTypes.INTEGER, allowNull: false },
			document: { type: DataTypes.TEXT('long'), allowNull: false },
			parentNumber: { type: DataTypes.INTEGER, allowNull: true },
			updatedAt: { type: DataTypes.DATE(3), allowNull: false },
			updatedBy: id()
		},
		{ sequelize, tableName: 'drafts' }
	);
}
