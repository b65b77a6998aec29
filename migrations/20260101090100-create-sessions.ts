import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE sessions (
			id_hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			person_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			created_at DATETIME(3) NOT NULL,
			expires_at DATETIME(3) NOT NULL,
			PRIMARY KEY (id_hash),
			KEY sessions_person (person_id),
			KEY sessions_expires (expires_at),
			CONSTRAINT sessions_person_fk FOREIGN KEY (person_id) REFERENCES people (id) ON DELETE CASCADE
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE sessions');
