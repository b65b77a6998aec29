import { axleGeometry, rightCorner, type Missing } from '$lib/domain/axle';
import type { Side } from '$lib/domain/datum';
import { evaluate, type Evaluation } from '$lib/domain/evaluation';
import {
	KinematicsError,
	solveCorner,
	type CornerGeometry,
	type CornerState,
	type Sweep,
	type SweepRange
} from '$lib/kinematics';
import type { AxleDocument } from '$lib/schemas/axle';

/** A corner that could be solved. The sweep ends where it binds: the last reachable states are in it. */
export interface SolvedCorner {
	readonly geometry: CornerGeometry;
	readonly evaluation: Evaluation;
	readonly ride: CornerState;
	readonly sweep: Sweep<CornerState>;
	/** How far the wheel goes within the range, mm. */
	readonly reach: { readonly low: number; readonly high: number };
}

/** What came of solving a document: a corner, or why there is none. */
export type Outcome =
	| { readonly solved: SolvedCorner; readonly missing: null; readonly error: null }
	| { readonly solved: null; readonly missing: readonly Missing[]; readonly error: null }
	| { readonly solved: null; readonly missing: null; readonly error: KinematicsError };

/** The state at a travel, or null beyond the corner's reach. mm. */
export function stateAt(geometry: CornerGeometry, travel: number): CornerState | null {
	try {
		return solveCorner(geometry, { travel, rack: 0 });
	} catch (error) {
		if (error instanceof KinematicsError) return null;
		throw error;
	}
}

/** A bump sweep with the last reachable states at its ends, where it binds between two steps. */
export function sweptToLimits(geometry: CornerGeometry, sweep: Sweep<CornerState>): Sweep<CornerState> {
	const states = [...sweep.states];
	const { lowLimit, highLimit } = sweep;
	const apart = (a: CornerState | undefined, travel: number) => !a || Math.abs(a.travel - travel) > 1e-9;
	const low = lowLimit && apart(states[0], lowLimit.value) ? stateAt(geometry, lowLimit.value) : null;
	const high = highLimit && apart(states.at(-1), highLimit.value) ? stateAt(geometry, highLimit.value) : null;
	if (low) states.unshift(low);
	if (high) states.push(high);
	return { ...sweep, states };
}

/** Solves one corner of a document over a range of travel (mm), its own targets judged. A mirrored right side is the left's image. */
export function solveDocument(document: AxleDocument, side: Side, range: SweepRange): Outcome {
	const read = axleGeometry(document);
	if ('missing' in read) return { solved: null, missing: read.missing, error: null };
	const geometry = side === 'right' ? rightCorner(read.axle) : read.left;
	try {
		const evaluation = evaluate(geometry, document.targets, range);
		const { lowLimit, highLimit } = evaluation.sweep;
		const solved = {
			geometry,
			evaluation,
			ride: evaluation.ride,
			sweep: sweptToLimits(geometry, evaluation.sweep),
			reach: { low: lowLimit?.value ?? range.from, high: highLimit?.value ?? range.to }
		};
		return { solved, missing: null, error: null };
	} catch (error) {
		if (error instanceof KinematicsError) return { solved: null, missing: null, error };
		throw error;
	}
}

/** Up to this many of what is missing are named one by one. */
const NAMED = 3;

/** Why an outcome has no corner, one sentence; null where it has one. `name` begins it: "Revision C". */
export function whyUnsolved(name: string, { missing, error }: Outcome): string | null {
	const within = (text: string) => text.charAt(0).toLowerCase() + text.slice(1);
	if (error) return `${name} cannot be solved: ${within(error.message)}`;
	if (!missing) return null;
	const labels = missing.map(({ label }) => within(label));
	const rest = labels.length - NAMED;
	const told = rest > 0 ? `${labels.slice(0, NAMED).join('; ')} and ${rest} more` : labels.join('; ');
	return `${name} is not complete: still to be typed are ${told}.`;
}
