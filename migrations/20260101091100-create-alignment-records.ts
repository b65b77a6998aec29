import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE alignment_records (
			id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			shop_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			build_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			revision_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			revision_hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			kind VARCHAR(8) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			entry LONGTEXT CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
			request_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			created_at DATETIME(3) NOT NULL,
			created_by CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			PRIMARY KEY (id),
			UNIQUE KEY alignment_records_request (build_id, request_id),
			KEY alignment_records_list (shop_id, build_id, revision_id, created_at),
			KEY alignment_records_author (created_by),
			CONSTRAINT alignment_records_revision_fk FOREIGN KEY (shop_id, build_id, revision_id) REFERENCES revisions (shop_id, build_id, id),
			CONSTRAINT alignment_records_author_fk FOREIGN KEY (created_by) REFERENCES people (id)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query('DROP TABLE alignment_records');
