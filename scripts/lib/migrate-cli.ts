import { migrateDown, migrateUp, pendingMigrations, seedDemo } from '../../src/lib/server/migrator';

/**
 * node --import tsx scripts/lib/migrate-cli.ts <step>...   with DATABASE_URL
 * Steps: pending · up · seed · down=<name|0>. Prints one line of JSON: the names per step.
 */
async function main(databaseUrl: string | undefined, steps: string[]): Promise<void> {
	if (!databaseUrl) throw new Error('DATABASE_URL is missing.');
	const done: Record<string, string[]> = {};
	for (const step of steps) {
		const [word, name] = step.split('=');
		if (word === 'pending') done.pending = await pendingMigrations(databaseUrl);
		else if (word === 'up') done.up = await migrateUp(databaseUrl);
		else if (word === 'down' && name) done.down = await migrateDown(databaseUrl, { to: name === '0' ? 0 : name });
		else if (word === 'seed') await seedDemo(databaseUrl);
		else throw new Error(`Unknown step "${step}".`);
	}
	process.stdout.write(`${JSON.stringify(done)}\n`);
}

/** An unreachable server or a wrong password is no fault of the program: no stack trace for it. */
function inWords(error: unknown, databaseUrl: string): string {
	if (!(error instanceof Error)) return String(error);
	if (!/^Sequelize.*(Connection|AccessDenied|HostNotFound|HostNotReachable)/.test(error.name))
		return error.stack ?? error.message;
	const { host, pathname } = new URL(databaseUrl);
	return `The database ${pathname.slice(1)} at ${host} cannot be used: ${error.message}`;
}

const url = process.env.DATABASE_URL;
main(url, process.argv.slice(2)).catch((error: unknown) => {
	process.stderr.write(`${inWords(error, url ?? 'mariadb://none/none')}\n`);
	process.exitCode = 1;
});
