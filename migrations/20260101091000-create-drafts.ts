import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE drafts (
			shop_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			build_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			version INT NOT NULL,
			document LONGTEXT CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
			parent_number INT NULL,
			updated_at DATETIME(3) NOT NULL,
			updated_by CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			PRIMARY KEY (shop_id, build_id),
			KEY drafts_author (updated_by),
			CONSTRAINT drafts_build_fk FOREIGN KEY (shop_id, build_id) REFERENCES builds (shop_id, id),
			CONSTRAINT drafts_author_fk FOREIGN KEY (updated_by) REFERENCES people (id)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE drafts');
