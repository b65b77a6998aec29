import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE builds (
			id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			shop_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			name VARCHAR(80) NOT NULL,
			client VARCHAR(80) NOT NULL,
			stage VARCHAR(16) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			-- Place of the stage in the life of a build, so that an index can sort by it.
			stage_order TINYINT NOT NULL,
			datum LONGTEXT CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
			wheelbase DOUBLE NULL,
			track DOUBLE NULL,
			tyre_size VARCHAR(40) NOT NULL,
			loaded_radius DOUBLE NULL,
			ride_height DOUBLE NULL,
			front_mass DOUBLE NULL,
			rear_mass DOUBLE NULL,
			unsprung_corner_mass DOUBLE NULL,
			cg_height DOUBLE NULL,
			front_brake_share DOUBLE NULL,
			notes TEXT NOT NULL,
			archived BOOLEAN NOT NULL DEFAULT FALSE,
			archived_at DATETIME(3) NULL,
			created_at DATETIME(3) NOT NULL,
			updated_at DATETIME(3) NOT NULL,
			PRIMARY KEY (id),
			UNIQUE KEY builds_shop (shop_id, id),
			KEY builds_updated (shop_id, archived, updated_at, id),
			-- With the client at its end a search reads the index alone.
			KEY builds_name (shop_id, archived, name, id, client),
			KEY builds_client (shop_id, archived, client, id),
			KEY builds_stage (shop_id, archived, stage_order, updated_at, id),
			CONSTRAINT builds_shop_fk FOREIGN KEY (shop_id) REFERENCES shops (id)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE builds');
