import type { Connection } from 'mariadb';
import type { Sequelize } from 'sequelize';

type Done = (error: unknown, result?: unknown) => void;

/**
 * The application's pool in the shape the rate limiter's SQL store expects: callbacks instead of promises, and `??`
 * for names, which the driver does not know.
 */
export function attemptsStore(sequelize: Sequelize) {
	const { connectionManager } = sequelize;
	return {
		getConnection(done: (error: unknown, connection?: unknown) => void): void {
			connectionManager
				.getConnection({ type: 'write' })
				.then((taken) => done(null, asCallbacks(taken as Connection)), done);
		}
	};

	function asCallbacks(connection: Connection) {
		return {
			query(sql: string, ...rest: [Done] | [unknown[], Done]): void {
				const done = rest.at(-1) as Done;
				const { text, values } = withNames(sql, rest.length === 2 ? rest[0] : []);
				connection.query(text, values).then((result: unknown) => done(null, result), done);
			},
			rollback(): void {
				connection.rollback().catch(() => connection.destroy());
			},
			release(): void {
				connectionManager.releaseConnection(connection);
			}
		};
	}
}

function withNames(sql: string, given: unknown[]): { text: string; values: unknown[] } {
	const values = [...given];
	const text = sql.replaceAll('??', () => `\`${String(values.shift()).replaceAll('`', '``')}\``);
	return { text, values };
}
