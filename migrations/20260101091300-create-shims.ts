import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE shims (
			id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			shop_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			unit CHAR(2) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			thickness DOUBLE NOT NULL,
			count INT NOT NULL,
			PRIMARY KEY (id),
			UNIQUE KEY shims_shelf (shop_id, unit, thickness),
			CONSTRAINT shims_shelf_fk FOREIGN KEY (shop_id) REFERENCES shim_shelves (shop_id)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE shims');
