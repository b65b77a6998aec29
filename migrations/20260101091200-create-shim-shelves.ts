import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE shim_shelves (
			shop_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			version INT NOT NULL,
			updated_at DATETIME(3) NOT NULL,
			updated_by CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			PRIMARY KEY (shop_id),
			KEY shim_shelves_author (updated_by),
			CONSTRAINT shim_shelves_shop_fk FOREIGN KEY (shop_id) REFERENCES shops (id),
			CONSTRAINT shim_shelves_author_fk FOREIGN KEY (updated_by) REFERENCES people (id)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE shim_shelves');
