import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE build_people (
			shop_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			build_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			person_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			created_at DATETIME(3) NOT NULL,
			PRIMARY KEY (shop_id, build_id, person_id),
			KEY build_people_person (shop_id, person_id, build_id),
			CONSTRAINT build_people_build_fk FOREIGN KEY (shop_id, build_id) REFERENCES builds (shop_id, id),
			CONSTRAINT build_people_member_fk FOREIGN KEY (shop_id, person_id) REFERENCES memberships (shop_id, person_id)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE build_people');
