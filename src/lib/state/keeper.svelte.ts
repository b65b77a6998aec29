import { SignedOutError, ApiProblem, UnreachableError, type BuildPlace, type Fetch } from '$lib/client/api';
import { getDraft, putDraft, StaleDraftError, type DraftSnapshot } from '$lib/client/drafts';
import type { UnsentStore } from '$lib/client/unsent';
import type { AxleDocument } from '$lib/schemas/axle';
import { differences, mergeThreeWay, valueAt, type Conflict, type Path } from './merge';

/** What another person changed, and is now in the draft beside mine. */
export interface MergedNotice {
	by: string;
	at: string;
	entries: { path: Path; was: unknown; now: unknown }[];
}

/** Two people changed the same points or fields. */
export interface DraftConflict {
	by: string;
	at: string;
	entries: Conflict[];
}

/** What the keeper needs of the editor it keeps for. */
export interface Kept {
	document(): AxleDocument;
	/** Another's changes come in; they are not a step of my history. */
	adopt(document: AxleDocument, paths: Path[]): void;
	/** A drag is on: nothing is sent until it ends. */
	busy(): boolean;
}

export interface KeeperOptions {
	place: BuildPlace;
	/** Id of the signed-in person: whose unsent edits these are. */
	person: string;
	draft: DraftSnapshot;
	unsent: UnsentStore | null;
	fetch?: Fetch;
	/** Pause in typing after which the draft is sent, ms. */
	pause?: number;
}

type Trouble = { kind: 'offline' | 'expired' | 'refused' | 'failed'; message: string };

const LONGEST_WAIT_MS = 5000;
const RETRY_AFTER_MS = [2000, 5000, 15000, 30000] as const;

/** Sends the draft to the server, one write at a time, and meets what others did to it meanwhile. */
export class DraftKeeper {
	/** The last state of the draft that the server is known to hold. */
	base: DraftSnapshot;
	notice = $state.raw<MergedNotice | null>(null);
	trouble = $state.raw<Trouble | null>(null);
	sending = $state(false);
	/** When the server last confirmed, by this device's clock; null before the first time on this page. */
	keptAt = $state.raw<number | null>(null);
	/** Whether this device holds the unsent edits; false where the browser keeps nothing. */
	onDevice = $state(false);
	#theirs = $state.raw<DraftSnapshot | null>(null);
	#timer: ReturnType<typeof setTimeout> | null = null;
	#waitingSince: number | null = null;
	#failures = 0;
	#run: Promise<void> | null = null;
	#writing: Promise<void> = Promise.resolve();
	#gone = false;
	readonly options: KeeperOptions;
	readonly kept: Kept;

	/** Points and fields that the server does not hold as they stand here. */
	readonly changed = $derived.by(() => differences(this.base.document, this.kept.document()));
	readonly conflict = $derived.by<DraftConflict | null>(() => {
		if (!this.#theirs) return null;
		const { conflicts } = mergeThreeWay(this.base.document, this.kept.document(), this.#theirs.document);
		return { by: this.#theirs.updatedBy, at: this.#theirs.updatedAt, entries: conflicts };
	});

	constructor(options: KeeperOptions, kept: Kept) {
		this.options = options;
		this.kept = kept;
		this.base = $state.raw(options.draft);
	}

	/** Something changed here: hold it on this device at once, send it after a pause. */
	touch(): void {
		this.remember();
		if (this.trouble?.kind === 'refused') this.trouble = null;
		this.#waitingSince ??= Date.now();
		const longest = this.#waitingSince + LONGEST_WAIT_MS - Date.now();
		this.#schedule(Math.max(0, Math.min(this.options.pause ?? 600, longest)));
	}

	/** Sends now what is not kept yet. True when the server holds everything. */
	async flush(): Promise<boolean> {
		this.#unschedule();
		this.#run ??= this.#send().finally(() => (this.#run = null));
		await this.#run;
		return this.changed.length === 0;
	}

	/** Reads the draft again and takes in what others changed; silent when the server cannot be asked. */
	async refresh(): Promise<void> {
		if (this.sending || this.#theirs) return;
		try {
			const current = await getDraft(this.options.place, { fetch: this.options.fetch });
			this.trouble = null;
			this.receive(current);
		} catch (error) {
			// Only a lost session is worth saying; a draft that cannot be asked for shows when it cannot be kept.
			if (error instanceof SignedOutError) this.#take(error);
		}
	}

	/** A state of the draft read from the server: newer than what is known, it is merged in. */
	receive(current: DraftSnapshot): void {
		if (current.version <= this.base.version || this.sending || this.kept.busy()) return;
		this.meet(current);
		if (this.changed.length > 0) this.touch();
	}

	/** Joins the server's state and mine; where both changed one thing, waits for a choice. */
	meet(current: DraftSnapshot): void {
		const before = this.base.document;
		const { merged, conflicts, taken } = mergeThreeWay(before, this.kept.document(), current.document);
		if (conflicts.length > 0) {
			this.#theirs = current;
			this.#unschedule();
		} else {
			this.#rebase(current);
			if (taken.length > 0) {
				const entries = taken.map((path) => ({ path, was: valueAt(before, path), now: valueAt(merged, path) }));
				this.notice = { by: current.updatedBy, at: current.updatedAt, entries };
				this.kept.adopt(merged, taken);
			}
		}
		this.remember();
	}

	/** After the choice: the other's state is the new ground, and what is not in conflict of theirs comes in. */
	settle(): void {
		const theirs = this.#theirs;
		if (!theirs) return;
		const { merged, taken } = mergeThreeWay(this.base.document, this.kept.document(), theirs.document);
		this.#rebase(theirs);
		this.kept.adopt(merged, taken);
		this.touch();
	}

	/** The server answered with a whole new draft (started from a revision). */
	replace(current: DraftSnapshot): void {
		this.#rebase(current);
		this.keptAt = Date.now();
		this.trouble = null;
		this.remember();
	}

	/** Holds unsent edits on this device, or removes them once nothing is unsent. Writes follow each other in order. */
	remember(): Promise<void> {
		const { unsent, person, place } = this.options;
		if (!unsent) return Promise.resolve();
		const { base, changed } = this;
		const document = this.kept.document();
		this.#writing = this.#writing.then(async () => {
			if (changed.length === 0) await unsent.clear(person, place.build);
			else {
				const ground = { version: base.version, document: base.document };
				this.onDevice = await unsent.write({
					person,
					build: place.build,
					base: ground,
					document,
					writtenAt: Date.now()
				});
			}
		});
		return this.#writing;
	}

	/** No more retries: the page is left. What is unsent stays on this device. */
	dispose(): void {
		this.#gone = true;
		this.#unschedule();
	}

	#rebase(current: DraftSnapshot): void {
		this.base = { ...this.base, ...current };
		this.#theirs = null;
	}

	#schedule(delay: number): void {
		this.#unschedule();
		if (this.#theirs || this.#gone || this.kept.busy()) return;
		this.#timer = setTimeout(() => void this.flush(), delay);
	}

	#unschedule(): void {
		if (this.#timer !== null) clearTimeout(this.#timer);
		this.#timer = null;
	}

	async #send(): Promise<void> {
		while (this.changed.length > 0 && !this.#theirs && !this.kept.busy()) {
			const document = this.kept.document();
			this.sending = true;
			try {
				const kept = await putDraft(this.options.place, document, this.base.version, { fetch: this.options.fetch });
				this.#rebase({ ...kept, document });
				this.#succeed();
			} catch (error) {
				if (!this.#take(error)) return;
			} finally {
				this.sending = false;
			}
		}
		this.#waitingSince = null;
		await this.remember();
	}

	#succeed(): void {
		this.keptAt = Date.now();
		this.trouble = null;
		this.#failures = 0;
		this.#waitingSince = null;
	}

	/** Says what a failed write means; true when it was met and the next write may go. */
	#take(error: unknown): boolean {
		if (error instanceof StaleDraftError) {
			// In the middle of a drag nothing may move under the hand: the write at its end is met again.
			if (this.kept.busy()) return false;
			this.meet(error.current);
			return true;
		}
		if (error instanceof SignedOutError) this.trouble = { kind: 'expired', message: 'You are signed out.' };
		else if (error instanceof UnreachableError) this.#retryLater('offline', error.message);
		else if (error instanceof ApiProblem && error.status < 500 && error.status !== 429) {
			const fields = error.problem.errors?.map((entry) => entry.message).join(' ');
			this.trouble = { kind: 'refused', message: fields || error.message };
		} else this.#retryLater('failed', error instanceof Error ? error.message : 'The server did not keep the draft.');
		return false;
	}

	#retryLater(kind: 'offline' | 'failed', message: string): void {
		this.trouble = { kind, message };
		const delay = RETRY_AFTER_MS[Math.min(this.#failures, RETRY_AFTER_MS.length - 1)] ?? 30000;
		this.#failures += 1;
		this.#schedule(delay);
	}
}
