import { ConnectionError, DatabaseError } from 'sequelize';
import { closeDatabase, openDatabase, Person } from './db';
import { env, SettingsError } from './env';

/** Reads the settings and opens the database; ends the process with clear words when the application may not start. */
export async function start(): Promise<void> {
	try {
		const { databaseUrl, demo } = env();
		openDatabase(databaseUrl);
		await refuseStrayDemo(demo);
	} catch (failure) {
		console.error(`Trammel cannot start.\n${inWords(failure)}`);
		process.exit(1);
	}
}

function inWords(failure: unknown): string {
	if (failure instanceof SettingsError) return failure.message;
	if (failure instanceof ConnectionError)
		return 'The database of DATABASE_URL does not answer, or refuses this user. Check the address, the password and that it runs.';
	if (failure instanceof DatabaseError) return 'The database is not up to date. Run npm run migrate.';
	return failure instanceof Error ? (failure.stack ?? failure.message) : String(failure);
}

/** Closes the pool, so that the process can end. */
export async function stop(): Promise<void> {
	await closeDatabase();
}

/** The demo's sign-ins are published; a database that holds them is served from this machine to this machine only. */
export async function refuseStrayDemo(demo: boolean): Promise<void> {
	if (demo || (await Person.count({ where: { demo: true } })) === 0) return;
	throw new SettingsError(
		"DATABASE_URL holds the demo's published sign-ins. Use a database without the demo, or start the private one with npm start and no DATABASE_URL."
	);
}
