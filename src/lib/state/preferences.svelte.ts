import type { Preferences } from '$lib/schemas/preferences';
import { createContext } from 'svelte';

/** Read `current` where it is used, not once: the person may change units in the header at any time. */
export interface PreferencesReader {
	readonly current: Preferences;
}

const [get, set] = createContext<PreferencesReader>();

/** The signed-in person's choices of units, number format and theme. Throws outside the signed-in layout. */
export const getPreferences = get;

/** Called once by the layout: `setPreferences(() => data.person.preferences)`. */
export function setPreferences(read: () => Preferences): PreferencesReader {
	return set({
		get current() {
			return read();
		}
	});
}
