import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE audit_entries (
			id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			shop_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
			person_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
			act VARCHAR(40) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			build_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
			detail VARCHAR(200) NOT NULL,
			request_id VARCHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			created_at DATETIME(3) NOT NULL,
			PRIMARY KEY (id),
			KEY audit_entries_shop (shop_id, created_at, id),
			KEY audit_entries_person (person_id, created_at)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE audit_entries');
