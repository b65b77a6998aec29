import * as mariadb from 'mariadb';

/**
 * The `mariadb` module as Sequelize 6 can use it. The driver freezes `meta` on its result arrays, and Sequelize deletes
 * it from raw results; here an array result is copied and carries `meta` as a plain, deletable property.
 */
export const mariadbForSequelize = {
	...mariadb,
	async createConnection(config: mariadb.ConnectionConfig): Promise<mariadb.Connection> {
		const connection = await mariadb.createConnection(config);
		const query = connection.query.bind(connection);
		Object.defineProperty(connection, 'query', {
			configurable: true,
			writable: true,
			value: async (sql: string | mariadb.QueryOptions, values?: unknown) => withDeletableMeta(await query(sql, values))
		});
		return connection;
	}
};

function withDeletableMeta(result: unknown): unknown {
	if (!Array.isArray(result)) return result;
	const copy: unknown[] = [...(result as unknown[])];
	const meta: unknown = (result as { meta?: unknown }).meta;
	return Object.defineProperty(copy, 'meta', { value: meta, configurable: true, writable: true, enumerable: false });
}
