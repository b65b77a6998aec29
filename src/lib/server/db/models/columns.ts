import { DataTypes } from 'sequelize';
import type { Model, ModelStatic } from 'sequelize';

/** A UUID column (36 ASCII characters); ids are made by the application, never by the database. */
export function id(primaryKey = false) {
	return { type: DataTypes.CHAR(36), allowNull: false, primaryKey };
}

/** Makes rows of these models final: they are added and read, never changed or removed. */
export function appendOnly(...models: ModelStatic<Model>[]): void {
	for (const model of models) {
		const refuse = () => {
			throw new Error(`${model.tableName} is append-only`);
		};
		for (const hook of ['beforeUpdate', 'beforeDestroy', 'beforeBulkUpdate', 'beforeBulkDestroy'] as const)
			model.addHook(hook, refuse);
	}
}
