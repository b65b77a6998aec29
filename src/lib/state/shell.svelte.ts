import { createContext } from 'svelte';

const KEY = 'trammel-digit-keys';

/** What belongs to this device rather than to the person: whether bare digits open the areas. */
export class Shell {
	#digits = $state(true);

	/** Reads the device's choice; called in the browser only. */
	restore() {
		this.#digits = localStorage.getItem(KEY) !== 'off';
	}

	get digits() {
		return this.#digits;
	}

	set digits(on: boolean) {
		this.#digits = on;
		localStorage.setItem(KEY, on ? 'on' : 'off');
	}
}

const [get, set] = createContext<Shell>();

/** The shell of this window. Throws outside the signed-in layout. */
export const getShell = get;
export const setShell = set;
