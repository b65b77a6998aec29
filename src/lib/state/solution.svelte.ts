import { evaluate, type Evaluation } from '$lib/domain/evaluation';
import {
	KinematicsError,
	solveCorner,
	type CornerGeometry,
	type CornerState,
	type Sweep,
	type SweepRange
} from '$lib/kinematics';
import type { Judgement } from '$lib/domain/targets';
import { createContext } from 'svelte';
import type { DraftEditor } from './draft.svelte';
import type { Selection } from './selection.svelte';

/** A corner that could be solved: its figures at ride height, its curves, its targets judged. */
export type Solved = Evaluation;

interface Attempt {
	solved: Solved | null;
	error: KinematicsError | null;
}

const RANGE: SweepRange = { from: -75, to: 75, step: 2.5 };

function attempt<T>(solve: () => T): { value: T | null; error: KinematicsError | null } {
	try {
		return { value: solve(), error: null };
	} catch (error) {
		if (error instanceof KinematicsError) return { value: null, error };
		throw error;
	}
}

/** What the kernel says of the corner that is worked on: recomputed with every edit, never stored. */
export class Solution {
	/** The travel slide, mm, bump +; 0 is ride height. */
	travel = $state(0);
	/** What the curves cover, mm. */
	range: SweepRange;
	readonly #editor: DraftEditor;
	readonly #selection: Selection;
	#last: Solved | null = null;

	/** The corner of the chosen side; a mirrored right side is solved as the left, whose figures it shares. Null while points are missing. */
	readonly corner = $derived.by<CornerGeometry | null>(() => {
		const geometry = this.#editor.geometry;
		if (!geometry) return null;
		const { axle, left } = geometry;
		return this.#selection.side === 'right' && 'right' in axle ? axle.right : left;
	});

	readonly #attempt = $derived.by<Attempt>(() => {
		const { corner, range } = this;
		if (!corner) return { solved: null, error: null };
		const { value, error } = attempt(() => evaluate(corner, this.#editor.document.targets, range));
		if (value) this.#last = value;
		return { solved: value, error };
	});

	readonly #atTravel = $derived.by(() => {
		const { solved } = this.#attempt;
		if (!solved) return { value: null, error: null };
		const { travel } = this;
		return travel === 0
			? { value: solved.ride, error: null }
			: attempt(() => solveCorner(solved.geometry, { travel, rack: 0 }));
	});

	/** How far the wheel goes within the range, mm: to the ends, or to where it binds. */
	readonly reach = $derived.by(() => ({
		low: this.#attempt.solved?.sweep.lowLimit?.value ?? Math.min(this.range.from, this.range.to),
		high: this.#attempt.solved?.sweep.highLimit?.value ?? Math.max(this.range.from, this.range.to)
	}));

	constructor(editor: DraftEditor, selection: Selection, range: SweepRange = RANGE) {
		this.#editor = editor;
		this.#selection = selection;
		this.range = $state.raw(range);
	}

	/** The state at ride height, or null: points are missing, or `error` says why it cannot be. */
	get ride(): CornerState | null {
		return this.#attempt.solved?.ride ?? null;
	}

	/** The state at the travel slide, or null where it is out of reach (`travelError`) or there is no ride state. */
	get atTravel(): CornerState | null {
		return this.#atTravel.value;
	}

	/** The curves. */
	get sweep(): Sweep<CornerState> | null {
		return this.#attempt.solved?.sweep ?? null;
	}

	/** Every figure at ride height in stored units; null without a ride state. */
	get figures(): Solved['figures'] | null {
		return this.#attempt.solved?.figures ?? null;
	}

	/** The targets of the document with what was reached and the verdict, in their order; empty without a ride state. */
	get judgements(): readonly Judgement[] {
		return this.#attempt.solved?.judgements ?? [];
	}

	/** Why the corner cannot be solved as it stands; null when it can, or while points are missing. */
	get error(): KinematicsError | null {
		return this.#attempt.error;
	}

	/** Why the travel slide's place cannot be reached. */
	get travelError(): KinematicsError | null {
		return this.#atTravel.error;
	}

	/** The newest corner that could be solved: what stays as a ghost while `error` stands. Null before there was one. */
	get lastGood(): Solved | null {
		return this.#attempt.solved ?? this.#last;
	}

	/** The edit this solution belongs to: views, figures and curves carry it as `data-edit`. */
	get revisionCounter(): number {
		return this.#editor.revisionCounter;
	}
}

export const [getSolution, setSolution] = createContext<Solution>();
