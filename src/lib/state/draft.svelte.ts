import type { BuildPlace, Fetch } from '$lib/client/api';
import { StaleDraftError, startDraft, type DraftSnapshot } from '$lib/client/drafts';
import type { UnsentStore } from '$lib/client/unsent';
import { axleGeometry } from '$lib/domain/axle';
import type { AxleDocument } from '$lib/schemas/axle';
import { createContext } from 'svelte';
import { change, History, type Change, type Recipe } from './history.svelte';
import { DraftKeeper } from './keeper.svelte';
import { differences, mergeThreeWay, valueAt, writeAt, type Path } from './merge';

/**
 * kept: the server holds everything · saving: on its way · waiting: about to be sent, or sent again ·
 * offline: no server, kept on this device · conflict: somebody changed the same · expired: signed out ·
 * refused: the server will not take it, `message` says why.
 */
export type DraftStatus = 'kept' | 'saving' | 'waiting' | 'offline' | 'conflict' | 'expired' | 'refused';

export interface DraftOptions {
	place: BuildPlace;
	/** Id of the signed-in person. */
	person: string;
	draft: DraftSnapshot;
	/** Why nothing may be changed here; null or absent: it may. */
	readOnly?: string | null;
	/** What edits are marked against: the parent revision's document. Without it, the draft as this page read it. */
	baseline?: AxleDocument;
	/** Where unsent edits wait on this device; null or absent on the server and in a read-only view. */
	unsent?: UnsentStore | null;
	fetch?: Fetch;
	/** Pause after an edit before it is sent, ms; 600 unless said. */
	pause?: number;
}

/** The one draft of a build while it is worked on: edits, undo, and its way to the server. */
export class DraftEditor {
	/** The document as it stands; replaced, never changed in place. */
	document: AxleDocument;
	/** Rises with every change; table, views, figures and curves carry it as `data-edit`. */
	revisionCounter = $state(0);
	/** What edits are marked against until a revision is kept. */
	baseline: AxleDocument;
	readonly readOnlyReason: string | null;
	readonly place: BuildPlace;
	readonly #keeper: DraftKeeper;
	readonly #history = new History<AxleDocument>();
	readonly #unsent: UnsentStore | null;
	readonly #fetch: Fetch | undefined;
	#drag = $state.raw<{ from: AxleDocument; label: string } | null>(null);

	readonly #solved = $derived.by(() => axleGeometry(this.document));
	/** The axle ready for the kernel, or null while coordinates are missing. */
	readonly geometry = $derived('axle' in this.#solved ? this.#solved : null);
	/** What still has to be typed, or null when nothing is missing. */
	readonly missing = $derived('missing' in this.#solved ? this.#solved.missing : null);

	constructor(options: DraftOptions) {
		this.document = $state.raw(options.draft.document);
		this.baseline = $state.raw(options.baseline ?? options.draft.document);
		this.readOnlyReason = options.readOnly ?? null;
		this.place = options.place;
		this.#unsent = this.readOnlyReason === null ? (options.unsent ?? null) : null;
		this.#fetch = options.fetch;
		this.#keeper = new DraftKeeper(
			{ ...options, unsent: this.#unsent },
			{
				document: () => this.document,
				adopt: (document, paths) => this.#adopt(document, paths),
				busy: () => this.#drag !== null
			}
		);
	}

	get readOnly(): boolean {
		return this.readOnlyReason !== null;
	}

	/** Version of the draft that the server is known to hold. */
	get version(): number {
		return this.#keeper.base.version;
	}

	/** Letter of the revision the draft follows, or null. */
	get parent(): string | null {
		return this.#keeper.base.parent ?? null;
	}

	get updatedAt(): string {
		return this.#keeper.base.updatedAt;
	}

	get updatedBy(): string {
		return this.#keeper.base.updatedBy;
	}

	get status(): DraftStatus {
		const { conflict, trouble, sending, changed } = this.#keeper;
		if (conflict) return 'conflict';
		if (sending) return 'saving';
		if (trouble?.kind === 'expired') return 'expired';
		if (changed.length === 0) return 'kept';
		return trouble && trouble.kind !== 'failed' ? trouble.kind : 'waiting';
	}

	/** How many points and fields the server does not hold yet. */
	get waiting(): number {
		return this.#keeper.changed.length;
	}

	/** Why the last write did not go through, in words; null when nothing is wrong. */
	get message(): string | null {
		return this.#keeper.trouble?.message ?? null;
	}

	/** When the server last confirmed, ms of this device's clock; null before the first time on this page. */
	get keptAt(): number | null {
		return this.#keeper.keptAt;
	}

	/** Whether this device holds what the server does not. */
	get onDevice(): boolean {
		return this.#keeper.onDevice;
	}

	/** What two people changed to different values; null when nothing waits for a choice. */
	get conflict() {
		return this.#keeper.conflict;
	}

	/** What another person changed and is now in the draft; null when there is nothing to tell. */
	get notice() {
		return this.#keeper.notice;
	}

	get dragging(): boolean {
		return this.#drag !== null;
	}

	/** The document as it was when the drag began, for the hair mark at the old place; null outside a drag. */
	get dragFrom(): AxleDocument | null {
		return this.#drag?.from ?? null;
	}

	/** What undo would take back, in words; null when there is nothing. */
	get undoLabel(): string | null {
		return this.readOnly ? null : this.#history.undoLabel;
	}

	get redoLabel(): string | null {
		return this.readOnly ? null : this.#history.redoLabel;
	}

	/**
	 * Changes the document by one recipe: one undo step named `label`. Edits with the same `joins` key that follow
	 * each other closely (a held key) are one step. Gives false when nothing changed or nothing may.
	 */
	edit(recipe: Recipe<AxleDocument>, label: string, joins: string | null = null): boolean {
		if (this.readOnly || this.#drag) return false;
		const done = change(this.document, recipe);
		if (done.forward.length === 0) return false;
		this.#step(label, done, joins);
		return true;
	}

	/** Starts a drag: until `commitDrag` everything is one undo step and nothing is sent. */
	beginDrag(label: string): void {
		if (this.readOnly || this.#drag) return;
		this.#drag = { from: this.document, label };
	}

	/** The drag so far, always from where it began: the recipe sets places, it does not add to the last call. */
	dragTo(recipe: Recipe<AxleDocument>): void {
		if (!this.#drag) return;
		const { document } = change(this.#drag.from, recipe);
		// A pointer that trembles in place is no new edit.
		if (differences(this.document, document).length > 0) this.#show(document);
	}

	/** Ends the drag as one undo step. */
	commitDrag(): void {
		const drag = this.#drag;
		if (!drag) return;
		this.#drag = null;
		const done = this.#between(drag.from, this.document);
		if (done.forward.length === 0) return;
		// What the drag showed last stands already: its end is a step, not another edit.
		this.#history.push(drag.label, done);
		this.#keeper.touch();
	}

	/** Ends the drag and puts everything back. */
	cancelDrag(): void {
		const drag = this.#drag;
		if (!drag) return;
		this.#drag = null;
		this.#show(drag.from);
		if (this.waiting > 0) this.#keeper.touch();
	}

	/** Takes the last step back; gives its name, or null when there was none. */
	undo(): string | null {
		return this.#walk(this.undoLabel, (document) => this.#history.undo(document));
	}

	/** Does the step that was taken back again; gives its name, or null when there was none. */
	redo(): string | null {
		return this.#walk(this.redoLabel, (document) => this.#history.redo(document));
	}

	/** Settles a conflict: the keys (path joined by dots) of the entries to take from the other; the rest stays mine. */
	resolve(theirs: ReadonlySet<string>): void {
		const conflict = this.#keeper.conflict;
		if (!conflict) return;
		const taken = conflict.entries.filter((entry) => theirs.has(entry.path.join('.')));
		const done = change(this.document, (draft) => taken.forEach(({ path, theirs }) => writeAt(draft, path, theirs)));
		if (done.forward.length > 0) {
			this.#history.push(`taking ${taken.length} from ${conflict.by}`, done);
			this.#show(done.document);
		}
		this.#keeper.settle();
	}

	dismissNotice(): void {
		this.#keeper.notice = null;
	}

	/** Sends now what is not kept yet. True when the server holds everything. */
	flush(): Promise<boolean> {
		return this.readOnly ? Promise.resolve(true) : this.#keeper.flush();
	}

	/** Reads the draft again: what others kept meanwhile is merged in. */
	refresh(): Promise<void> {
		return this.readOnly ? Promise.resolve() : this.#keeper.refresh();
	}

	/** Fresh page data: a newer draft on the server is merged in. */
	receive(draft: DraftSnapshot): void {
		if (!this.readOnly) this.#keeper.receive(draft);
	}

	/** A revision was kept from this draft: edits are marked against it from now on. */
	revisionKept(letter: string): void {
		this.baseline = this.document;
		this.#keeper.base = { ...this.#keeper.base, parent: letter };
	}

	/** Starts the draft anew from a revision; undo gives back what it held. Throws what the server refused. */
	async startFrom(letter: string): Promise<void> {
		if (this.readOnly) return;
		if (!(await this.flush())) throw new Error('Some edits are not kept on the server yet: keep or settle them first.');
		const current = await startDraft(this.place, letter, this.version, { fetch: this.#fetch }).catch(
			(error: unknown) => {
				if (error instanceof StaleDraftError) this.receive(error.current);
				throw error;
			}
		);
		const done = this.#between(this.document, current.document);
		this.#keeper.replace(current);
		this.#history.push(`starting from ${letter}`, done);
		this.#show(current.document);
		this.baseline = current.document;
	}

	/** Brings back edits that waited on this device. */
	async restore(): Promise<void> {
		const found = await this.#unsent?.read(this.#keeper.options.person, this.place.build);
		if (!found) return;
		const server = this.#keeper.base;
		// What was typed since this page opened stands over what was typed before.
		const mine = mergeThreeWay(server.document, this.document, found.document).merged;
		const done = this.#between(this.document, mine);
		if (found.base.version !== server.version) this.#keeper.base = { ...server, ...found.base };
		if (done.forward.length > 0) {
			this.#history.push('edits from before the reload', done);
			this.#show(mine);
		}
		if (found.base.version !== server.version) this.#keeper.meet(server);
		if (this.waiting > 0) this.#keeper.touch();
	}

	/**
	 * Joins the editor to the window: unsent edits come back, a returning network or a page shown again sends and
	 * reads. Gives the function that lets go of it all; return it from `onMount`.
	 */
	connect(): () => void {
		if (this.readOnly) return () => {};
		const again = () => void this.flush();
		const seen = () => {
			if (window.document.visibilityState === 'hidden') again();
			else void this.flush().then(() => this.#keeper.refresh());
		};
		window.addEventListener('online', again);
		window.document.addEventListener('visibilitychange', seen);
		void this.restore();
		return () => {
			window.removeEventListener('online', again);
			window.document.removeEventListener('visibilitychange', seen);
			this.commitDrag();
			void this.flush();
			this.#keeper.dispose();
		};
	}

	#walk(label: string | null, step: (document: AxleDocument) => AxleDocument | null): string | null {
		if (label === null || this.#drag) return null;
		const document = step(this.document);
		if (!document) return null;
		this.#show(document);
		this.#keeper.touch();
		return label;
	}

	#step(label: string, done: Change<AxleDocument>, joins: string | null = null): void {
		this.#history.push(label, done, joins);
		this.#show(done.document);
		this.#keeper.touch();
	}

	#show(document: AxleDocument): void {
		if (document === this.document) return;
		this.document = document;
		this.revisionCounter += 1;
	}

	#between(before: AxleDocument, after: AxleDocument): Change<AxleDocument> {
		const paths = differences(before, after);
		return change(before, (draft) => paths.forEach((path) => writeAt(draft, path, valueAt(after, path))));
	}

	#adopt(document: AxleDocument, paths: Path[]): void {
		// Steps speak of places in lists and in the right corner; when another changes those, the steps no longer fit.
		const reshaped = paths.some(
			([first, second]) => first === 'targets' || (first === 'right' && second === undefined)
		);
		if (reshaped) this.#history.clear();
		this.#show(document);
	}
}

export const [getDraftEditor, setDraftEditor] = createContext<DraftEditor>();
