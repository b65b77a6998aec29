import { createHash } from 'node:crypto';
import type { QueryInterface } from 'sequelize';
import { QueryTypes } from 'sequelize';
import { v7 } from 'uuid';

type Row = Record<string, string | number | boolean | Date | null>;

/** The id of a demo row: the same at every seeding, in the shape of every other id. */
export function demoId(name: string): string {
	const random = createHash('sha256').update(`demo ${name}`).digest().subarray(0, 16);
	return v7({ msecs: Date.UTC(2026, 0, 5, 8), seq: random.readUInt32BE(0) >>> 1, random });
}

/** A moment of the demo's story, UTC. */
export function at(day: string, time = '09:30'): Date {
	return new Date(`${day}T${time}:00.000Z`);
}

/** Adds the rows whose keys are not there yet; what a person has changed since stays as it is. */
export async function insertMissing(
	context: QueryInterface,
	table: string,
	keys: string[],
	rows: Row[]
): Promise<void> {
	for (const row of rows) {
		const where = keys.map((key) => `\`${key}\` = :${key}`).join(' AND ');
		const found = await context.sequelize.query(`SELECT 1 FROM \`${table}\` WHERE ${where} LIMIT 1`, {
			replacements: row,
			type: QueryTypes.SELECT
		});
		if (found.length === 0) await context.bulkInsert(table, [row]);
	}
}
