import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE releases (
			id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			shop_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			build_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			revision_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			figures LONGTEXT CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
			kernel_version VARCHAR(40) NOT NULL,
			released_at DATETIME(3) NOT NULL,
			released_by CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			PRIMARY KEY (id),
			UNIQUE KEY releases_revision (revision_id),
			KEY releases_build (shop_id, build_id, revision_id),
			KEY releases_author (released_by),
			CONSTRAINT releases_revision_fk FOREIGN KEY (shop_id, build_id, revision_id) REFERENCES revisions (shop_id, build_id, id),
			CONSTRAINT releases_author_fk FOREIGN KEY (released_by) REFERENCES people (id)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE releases');
