import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE shops (
			id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			slug VARCHAR(60) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			name VARCHAR(80) NOT NULL,
			technicians_see_all BOOLEAN NOT NULL DEFAULT FALSE,
			created_at DATETIME(3) NOT NULL,
			PRIMARY KEY (id),
			UNIQUE KEY shops_slug (slug)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE shops');
