import type { AxleDocument } from '$lib/schemas/axle';
import { deleteDB, openDB, type DBSchema, type IDBPDatabase } from 'idb';

const DATABASE = 'trammel-unsent';

/** Edits of one person to one draft that no server has confirmed yet, and the version they were made against. */
export interface UnsentDraft {
	person: string;
	build: string;
	/** What the server held when these edits were made: the middle of a three-way comparison. */
	base: { version: number; document: AxleDocument };
	document: AxleDocument;
	/** Milliseconds since 1970, this device's clock. */
	writtenAt: number;
}

interface UnsentSchema extends DBSchema {
	drafts: { key: [string, string]; value: UnsentDraft };
}

/** Where unsent edits wait on this device. Every method resolves even where the browser keeps nothing (private windows). */
export interface UnsentStore {
	read(person: string, build: string): Promise<UnsentDraft | null>;
	write(entry: UnsentDraft): Promise<boolean>;
	clear(person: string, build: string): Promise<void>;
}

async function open(): Promise<IDBPDatabase<UnsentSchema>> {
	return openDB<UnsentSchema>(DATABASE, 1, {
		upgrade(database) {
			database.createObjectStore('drafts', { keyPath: ['person', 'build'] });
		}
	});
}

async function within<T>(use: (database: IDBPDatabase<UnsentSchema>) => Promise<T>, otherwise: T): Promise<T> {
	let database: IDBPDatabase<UnsentSchema> | null = null;
	try {
		database = await open();
		return await use(database);
	} catch (error) {
		// A browser that refuses storage must not stop the editing; the draft still goes to the server.
		console.warn('Unsent edits cannot be kept on this device.', error);
		return otherwise;
	} finally {
		database?.close();
	}
}

/** Unsent edits in IndexedDB, one record a person and build. `write` tells whether the device took it. */
export function createUnsentStore(): UnsentStore {
	return {
		read: (person, build) => within(async (database) => (await database.get('drafts', [person, build])) ?? null, null),
		write: (entry) => within(async (database) => (await database.put('drafts', entry), true), false),
		clear: (person, build) => within((database) => database.delete('drafts', [person, build]), undefined)
	};
}

/** How many builds of this person have unsent edits here: asked before signing out. */
export async function countUnsent(person: string): Promise<number> {
	return within(async (database) => {
		const keys = await database.getAllKeys('drafts');
		return keys.filter(([owner]) => owner === person).length;
	}, 0);
}

/** Removes everything kept on this device; called at sign-out, so that the next person finds nothing. */
export async function clearAllUnsent(): Promise<void> {
	await deleteDB(DATABASE).catch((error: unknown) => console.warn('Unsent edits could not be removed.', error));
}
