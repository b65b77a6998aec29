import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE known_devices (
			token_hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			person_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			created_at DATETIME(3) NOT NULL,
			PRIMARY KEY (token_hash),
			KEY known_devices_person (person_id, created_at),
			CONSTRAINT known_devices_person_fk FOREIGN KEY (person_id) REFERENCES people (id) ON DELETE CASCADE
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE known_devices');
