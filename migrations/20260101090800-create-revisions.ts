import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE revisions (
			id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			shop_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			build_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			number INT NOT NULL,
			parent_number INT NULL,
			note VARCHAR(500) NOT NULL,
			-- The canonical bytes the hash was taken over; never rewritten.
			document LONGTEXT CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
			hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			request_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			created_at DATETIME(3) NOT NULL,
			created_by CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			PRIMARY KEY (id),
			UNIQUE KEY revisions_number (build_id, number),
			UNIQUE KEY revisions_request (build_id, request_id),
			UNIQUE KEY revisions_shop (shop_id, build_id, id),
			KEY revisions_author (created_by),
			CONSTRAINT revisions_build_fk FOREIGN KEY (shop_id, build_id) REFERENCES builds (shop_id, id),
			CONSTRAINT revisions_author_fk FOREIGN KEY (created_by) REFERENCES people (id)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE revisions');
