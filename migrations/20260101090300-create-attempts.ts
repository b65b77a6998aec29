import type { QueryInterface } from 'sequelize';
import type { MigrationFn } from 'umzug';

export const up: MigrationFn<QueryInterface> = ({ context }) =>
	context.sequelize.query(`
		CREATE TABLE attempts (
			-- The columns and their order are those of the rate limiter's store; \`expire\` is in ms since 1970.
			\`key\` VARCHAR(255) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
			points INT NOT NULL DEFAULT 0,
			expire BIGINT UNSIGNED NULL,
			PRIMARY KEY (\`key\`),
			KEY attempts_expire (expire)
		) ENGINE = InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci
	`);

export const down: MigrationFn<QueryInterface> = ({ context }) => context.sequelize.query('DROP TABLE attempts');
