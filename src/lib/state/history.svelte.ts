import { apply, create, type Patches } from 'mutative';

/** A recipe changes the document it is given in place; what it changed becomes one step. */
export type Recipe<T> = (document: T) => void;

interface Step {
	label: string;
	forward: Patches<true>;
	back: Patches<true>;
	/** Steps with the same key that follow each other closely become one. */
	key: string | null;
	at: number;
}

/** What one recipe did: the new document, and how to go forward and back. Empty `forward` means nothing changed. */
export interface Change<T> {
	document: T;
	forward: Patches<true>;
	back: Patches<true>;
}

/** Runs a recipe on an untouched copy. */
export function change<T extends object>(document: T, recipe: Recipe<T>): Change<T> {
	const [next, forward, back] = create(document, (draft) => void recipe(draft as T), { enablePatches: true });
	return { document: next as T, forward, back };
}

const STEPS_KEPT = 300;
const JOIN_WITHIN_MS = 900;

/** Undo and redo as patches, so that going back over my edits leaves alone what others changed meanwhile. */
export class History<T extends object> {
	#done = $state.raw<readonly Step[]>([]);
	#undone = $state.raw<readonly Step[]>([]);

	get undoLabel(): string | null {
		return this.#done.at(-1)?.label ?? null;
	}

	get redoLabel(): string | null {
		return this.#undone.at(-1)?.label ?? null;
	}

	/** Remembers a change; `key` joins it to the step before when that has the same key and is fresh (a held key). */
	push(label: string, { forward, back }: Change<T>, key: string | null = null, now = Date.now()): void {
		const last = this.#done.at(-1);
		const step: Step = { label, forward, back, key, at: now };
		this.#undone = [];
		if (last && key !== null && last.key === key && now - last.at < JOIN_WITHIN_MS) {
			const joined = { ...step, forward: [...last.forward, ...forward], back: [...back, ...last.back] };
			this.#done = [...this.#done.slice(0, -1), joined];
		} else this.#done = [...this.#done.slice(1 - STEPS_KEPT), step];
	}

	/** The document one step back, or null when there is none. */
	undo(document: T): T | null {
		const step = this.#done.at(-1);
		if (!step) return null;
		this.#done = this.#done.slice(0, -1);
		this.#undone = [...this.#undone, { ...step, key: null }];
		return this.#apply(document, step.back);
	}

	/** The document one step forward again, or null when there is none. */
	redo(document: T): T | null {
		const step = this.#undone.at(-1);
		if (!step) return null;
		this.#undone = this.#undone.slice(0, -1);
		this.#done = [...this.#done, step];
		return this.#apply(document, step.forward);
	}

	/** Forgets everything: the document was changed by another in a way that steps cannot be walked over. */
	clear(): void {
		this.#done = [];
		this.#undone = [];
	}

	#apply(document: T, patches: Patches<true>): T | null {
		try {
			return apply(document, patches) as T;
		} catch {
			// The place a step speaks of is gone (another person made the right side a mirror again).
			this.clear();
			return null;
		}
	}
}
