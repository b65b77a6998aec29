/** A thread an adjuster may have. `pitch` and `diameter` in mm. */
export interface Thread {
	/** As stored in the axle document: `5/8-18`, `M16x1.5`. */
	readonly key: string;
	/** As a person reads it. */
	readonly label: string;
	readonly series: 'UNF' | 'metric';
	readonly pitch: number;
	readonly diameter: number;
}

const MM_PER_INCH = 25.4;

const unified = (name: string, inches: number, perInch: number): Thread => ({
	key: `${name}-${perInch}`,
	label: `${name}-${perInch} UNF`,
	series: 'UNF',
	pitch: MM_PER_INCH / perInch,
	diameter: inches * MM_PER_INCH
});

const metric = (diameter: number, pitch: number): Thread => ({
	key: `M${diameter}x${pitch}`,
	label: `M${diameter}×${pitch}`,
	series: 'metric',
	pitch,
	diameter
});

/** Threads of adjusters: ASME B1.1 (UNF) and ISO 261, recalled. */
export const THREADS: readonly Thread[] = [
	unified('3/8', 3 / 8, 24),
	unified('7/16', 7 / 16, 20),
	unified('1/2', 1 / 2, 20),
	unified('9/16', 9 / 16, 18),
	unified('5/8', 5 / 8, 18),
	unified('3/4', 3 / 4, 16),
	metric(12, 1.75),
	metric(12, 1.5),
	metric(12, 1.25),
	metric(14, 2),
	metric(14, 1.5),
	metric(16, 2),
	metric(16, 1.5),
	metric(18, 2.5),
	metric(18, 1.5)
];

/** The thread of that key; null where it is not in the table. */
export function threadOf(key: string): Thread | null {
	return THREADS.find((thread) => thread.key === key) ?? null;
}

/** How a threaded part is held, which decides by what steps its length changes. */
export type Fitting =
	/** A rod end whose eye a bolt goes through: it fits only at every half turn. */
	| 'throughBolt'
	/** The rod turns in one end while the other end swivels: any part of a turn. */
	| 'rodEnd'
	/** A sleeve or rod with a right-hand thread at one end and a left-hand thread at the other: any part of a turn. */
	| 'sleeve';

/** Length change of one whole turn, mm: one pitch, or two for a left- and right-hand sleeve. */
export function perTurn(thread: Thread, fitting: Fitting): number {
	return fitting === 'sleeve' ? 2 * thread.pitch : thread.pitch;
}

/** Length change of the smallest step that can be set, mm: half a pitch on a through bolt; null where any part of a turn will do. */
export function smallestStep(thread: Thread, fitting: Fitting): number | null {
	return fitting === 'throughBolt' ? thread.pitch / 2 : null;
}

/** Turns for a length change in mm, + longer. */
export function turnsFor(length: number, thread: Thread, fitting: Fitting): number {
	return length / perTurn(thread, fitting);
}

/** Thread that stays engaged at each end after the part grew by `growth` mm; a sleeve shares the growth between its two ends. */
export function engagementAfter(engagementNow: number, growth: number, fitting: Fitting): number {
	return engagementNow - (fitting === 'sleeve' ? growth / 2 : growth);
}

/**
 * Least engagement taken where the maker's figure was not entered, mm: one thread diameter.
 * Common practice, no source; the maker's figure wins.
 */
export function usualEngagement(thread: Thread): number {
	return thread.diameter;
}

/**
 * Which way to turn, in words. A rod end with a right-hand thread comes out, and its leg grows, when it is turned
 * anticlockwise as seen from its eye; a left-hand thread the other way.
 */
export function turningWords(turns: number, fitting: Fitting, handedness: 'right' | 'left'): string {
	if (turns === 0) return 'leave as it is';
	const longer = turns > 0;
	if (fitting === 'sleeve') return longer ? 'longer: both threads come out' : 'shorter: both threads go in';
	const anticlockwise = longer === (handedness === 'right');
	return `${longer ? 'out' : 'in'}, ${anticlockwise ? 'anticlockwise' : 'clockwise'} seen from the eye`;
}
