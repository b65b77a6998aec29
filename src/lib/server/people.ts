import { DEFAULT_PREFERENCES, preferencesSchema } from '../schemas/preferences';
import type { Preferences } from '../schemas/preferences';
import type { SignedInPerson } from '../schemas/auth';
import type { BuildPerson } from '../schemas/build';
import type { Actor } from './actor';
import { Membership, Person } from './db';

/** Stored preferences, read; what cannot be read (an older or damaged row) falls back to the defaults. */
export function readPreferences(stored: string): Preferences {
	try {
		return preferencesSchema.parse({ ...DEFAULT_PREFERENCES, ...(JSON.parse(stored) as object) });
	} catch {
		return DEFAULT_PREFERENCES;
	}
}

/** The preferences of a new person, as stored. */
export function storedDefaults(): string {
	return JSON.stringify(DEFAULT_PREFERENCES);
}

/** Changes some of a person's own preferences; gives all of them. */
export async function changePreferences(person: SignedInPerson, change: Partial<Preferences>): Promise<Preferences> {
	const preferences = preferencesSchema.parse({ ...person.preferences, ...change });
	await Person.update({ preferences: JSON.stringify(preferences) }, { where: { id: person.id } });
	return preferences;
}

/** The shop's technicians and clients, by name: who can be assigned to a build. */
export async function listAssignable(actor: Actor): Promise<BuildPerson[]> {
	const rows = await Membership.findAll({
		where: { shopId: actor.shopId, role: ['technician', 'client'] },
		include: { model: Person, as: 'person', attributes: ['name'] },
		order: [[{ model: Person, as: 'person' }, 'name', 'ASC']]
	});
	return rows.map(({ personId, role, person }) => ({
		id: personId,
		name: person?.name ?? '',
		role: role === 'client' ? 'client' : 'technician'
	}));
}
