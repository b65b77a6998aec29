import { readdirSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import type { QueryInterface, Sequelize } from 'sequelize';
import { QueryTypes } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import type { MigrationFn } from 'umzug';
import { connect } from './db/connection';
import { isLoopback } from './env';

const migrationsFolder = fileURLToPath(new URL('../../../migrations/', import.meta.url));
const seedersFolder = fileURLToPath(new URL('../../../seeders/', import.meta.url));
const LOCK_WAIT_S = 120;

interface Step {
	up: MigrationFn<QueryInterface>;
	down: MigrationFn<QueryInterface>;
}

/** Applies every pending migration; gives the names applied. Two processes never migrate one database at a time. */
export async function migrateUp(databaseUrl: string): Promise<string[]> {
	return withMigrator(databaseUrl, async (umzug) => (await umzug.up()).map(({ name }) => name));
}

/** Reverts migrations down to and including `to`; 0 reverts all. Gives the names reverted. */
export async function migrateDown(databaseUrl: string, { to }: { to: string | 0 }): Promise<string[]> {
	return withMigrator(databaseUrl, async (umzug) => (await umzug.down({ to })).map(({ name }) => name));
}

/** Names of the migrations this database has not had yet. */
export async function pendingMigrations(databaseUrl: string): Promise<string[]> {
	return withMigrator(databaseUrl, async (umzug) => (await umzug.pending()).map(({ name }) => name), { lock: false });
}

/** Fills the demo shop; rows already there stay as they are. Only for a database on this machine: its passwords are published. */
export async function seedDemo(databaseUrl: string): Promise<void> {
	const { hostname } = new URL(databaseUrl);
	if (!isLoopback(hostname))
		throw new Error('The demo is seeded only into a database on this machine (its sign-ins are published).');
	await withDatabase(databaseUrl, (sequelize) =>
		withLock(sequelize, async () => {
			for (const name of stepNames(seedersFolder)) {
				const { up } = await loadStep(seedersFolder, name);
				await up({ name, context: sequelize.getQueryInterface() });
			}
		})
	);
}

function stepNames(folder: string): string[] {
	return readdirSync(folder)
		.filter((file) => /^\d{14}-[a-z0-9-]+\.ts$/.test(file))
		.map((file) => file.slice(0, -'.ts'.length))
		.sort();
}

async function loadStep(folder: string, name: string): Promise<Step> {
	return (await import(/* @vite-ignore */ pathToFileURL(path.join(folder, `${name}.ts`)).href)) as Step;
}

async function withDatabase<Result>(
	databaseUrl: string,
	work: (sequelize: Sequelize) => Promise<Result>
): Promise<Result> {
	const sequelize = connect(databaseUrl, { poolSize: 3 });
	try {
		return await work(sequelize);
	} finally {
		await sequelize.close();
	}
}

async function withMigrator<Result>(
	databaseUrl: string,
	work: (umzug: Umzug<QueryInterface>) => Promise<Result>,
	{ lock = true }: { lock?: boolean } = {}
): Promise<Result> {
	return withDatabase(databaseUrl, (sequelize) => {
		const umzug = new Umzug<QueryInterface>({
			migrations: stepNames(migrationsFolder).map((name) => ({
				name,
				up: async (params) => (await loadStep(migrationsFolder, name)).up(params),
				down: async (params) => (await loadStep(migrationsFolder, name)).down(params)
			})),
			context: sequelize.getQueryInterface(),
			storage: new SequelizeStorage({ sequelize, tableName: 'migrations', modelName: 'AppliedMigration' }),
			logger: undefined
		});
		return lock ? withLock(sequelize, () => work(umzug)) : work(umzug);
	});
}

/** Holds a named server lock on one connection while `work` runs on the others; the transaction keeps that connection out of the pool. */
async function withLock<Result>(sequelize: Sequelize, work: () => Promise<Result>): Promise<Result> {
	const name = `trammel:${sequelize.getDatabaseName()}`.slice(0, 64);
	return sequelize.transaction(async (transaction) => {
		const options = { transaction, type: QueryTypes.SELECT, replacements: { name, wait: LOCK_WAIT_S } } as const;
		const [row] = await sequelize.query<{ got: number | string | null }>(
			'SELECT GET_LOCK(:name, :wait) AS got',
			options
		);
		if (Number(row?.got) !== 1)
			throw new Error('Another process is changing this database; try again when it has finished.');
		try {
			return await work();
		} finally {
			await sequelize.query('SELECT RELEASE_LOCK(:name)', options);
		}
	});
}
