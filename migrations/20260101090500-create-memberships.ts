import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE memberships (
			shop_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			person_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			role VARCHAR(12) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			created_at DATETIME(3) NOT NULL,
			PRIMARY KEY (shop_id, person_id),
			KEY memberships_person (person_id),
			KEY memberships_role (shop_id, role),
			CONSTRAINT memberships_shop_fk FOREIGN KEY (shop_id) REFERENCES shops (id),
			CONSTRAINT memberships_person_fk FOREIGN KEY (person_id) REFERENCES people (id),
			CONSTRAINT memberships_role_known CHECK (role IN ('owner', 'builder', 'technician', 'client'))
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE memberships');
