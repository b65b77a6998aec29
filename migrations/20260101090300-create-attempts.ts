import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE attempts (
			id VARCHAR(120) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			points INT NOT NULL,
			expires_at DATETIME(3) NOT NULL,
			PRIMARY KEY (id),
			KEY attempts_expires (expires_at)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE attempts');
