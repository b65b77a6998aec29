import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE people (
			id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			name VARCHAR(80) NOT NULL,
			-- Compared byte for byte: two addresses that differ in an accent are two people.
			email VARCHAR(254) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
			password_hash VARCHAR(255) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			preferences LONGTEXT CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
			demo BOOLEAN NOT NULL DEFAULT FALSE,
			created_at DATETIME(3) NOT NULL,
			PRIMARY KEY (id),
			UNIQUE KEY people_email (email),
			KEY people_demo (demo)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE people');
