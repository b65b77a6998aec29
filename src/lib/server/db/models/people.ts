import { DataTypes, Model } from 'sequelize';
import type { InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize';
import { id } from './columns';

export class Person extends Model<InferAttributes<Person>, InferCreationAttributes<Person>> {
	declare id: string;
	declare name: string;
	declare email: string;
	declare passwordHash: string;
	/** JSON, read through the preferences schema. */
	declare preferences: string;
	declare demo: boolean;
	declare createdAt: Date;
}

export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
	/** SHA-256 of the session id, hex; the id itself is only in the person's cookie. */
	declare idHash: string;
	declare personId: string;
	declare createdAt: Date;
	declare expiresAt: Date;
	declare person?: NonAttribute<Person>;
}

export class KnownDevice extends Model<InferAttributes<KnownDevice>, InferCreationAttributes<KnownDevice>> {
	declare tokenHash: string;
	declare personId: string;
	declare createdAt: Date;
}

export function definePeople(sequelize: Sequelize): void {
	Person.init(
		{
			id: id(true),
			name: { type: DataTypes.STRING(80), allowNull: false },
			email: { type: DataTypes.STRING(254), allowNull: false },
			passwordHash: { type: DataTypes.STRING(255), allowNull: false },
			preferences: { type: DataTypes.TEXT('long'), allowNull: false },
			demo: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
			createdAt: { type: DataTypes.DATE(3), allowNull: false }
		},
		{ sequelize, tableName: 'people' }
	);
	Session.init(
		{
			idHash: { type: DataTypes.CHAR(64), primaryKey: true },
			personId: id(),
			createdAt: { type: DataTypes.DATE(3), allowNull: false },
			expiresAt: { type: DataTypes.DATE(3), allowNull: false }
		},
		{ sequelize, tableName: 'sessions' }
	);
	KnownDevice.init(
		{
			tokenHash: { type: DataTypes.CHAR(64), primaryKey: true },
			personId: id(),
			createdAt: { type: DataTypes.DATE(3), allowNull: false }
		},
		{ sequelize, tableName: 'known_devices' }
	);
}
