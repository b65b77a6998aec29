import { mat3, vec3 } from 'gl-matrix';
import { adjusted, standing, type Adjusters, type AlignmentMoves, type Bench, type Stance } from './alignment';
import { inWords, KinematicsError } from './errors';
import type { CornerGeometry } from './geometry';
import type { CornerState } from './state';

const TARGET_NAMES = ['camber', 'caster', 'toe'] as const;
export type TargetName = (typeof TARGET_NAMES)[number];

/** Degrees, read to the road, per wheel; null or absent leaves one free. */
export type AlignmentTargets = { readonly [Name in TargetName]?: number | null };

export interface AlignmentSolution extends AlignmentMoves {
	/** The state in the body's axes: its caster is the road's plus the rake. */
	readonly state: CornerState;
}

/** A target is met when it is this near, degrees; a search that can come no nearer than the second has not met it. */
const MET = 1e-11;
const NEARLY_MET = 1e-8;
const MOST_STEPS = 60;
const SHORTEST_PART = 1e-5;
/** Step of the forward difference, mm, and longest step taken at once, as a part of the upper arm. */
const PROBE = 1e-4;
const LONGEST_STEP = 0.1;
/** The nearest that can be had is found to this part of the way to the target. */
const FINEST_PART = 1e-7;

type Triple = [number, number, number];

/** A point of the search: three amounts along the ways of adjusting, the state, and what each target is missed by. */
interface Trial {
	readonly amounts: Triple;
	readonly moves: AlignmentMoves;
	readonly state: CornerState;
	readonly misses: Triple;
}

interface Search {
	readonly bench: Bench;
	readonly free: readonly [boolean, boolean, boolean];
	/** In the body's axes; what is free counts for nothing. */
	readonly wanted: Triple;
}

/**
 * The moves for three amounts. With camber and caster both asked they are front and rear. Camber alone: both move
 * equally. Caster alone: the rear moves as much as the front, the other way. Toe free: the tie rod stays.
 */
function movesOf({ free }: Search, [first, second, third]: Triple): AlignmentMoves {
	const tieRod = free[2] ? 0 : third;
	if (free[0] && free[1]) return { front: 0, rear: 0, tieRod };
	if (free[1]) return { front: first, rear: first, tieRod };
	if (free[0]) return { front: second, rear: -second, tieRod };
	return { front: first, rear: second, tieRod };
}

/** @returns null where the linkage cannot be assembled so */
function trial(search: Search, amounts: Triple): Trial | null {
	const moves = movesOf(search, amounts);
	try {
		const state = adjusted(search.bench, moves);
		const miss = (i: 0 | 1 | 2): number => (search.free[i] ? 0 : state[TARGET_NAMES[i]] - search.wanted[i]);
		return { amounts, moves, state, misses: [miss(0), miss(1), miss(2)] };
	} catch (error) {
		if (error instanceof KinematicsError && error.code === 'out-of-reach') return null;
		throw error;
	}
}

function worst(misses: Triple): number {
	return Math.max(...misses.map(Math.abs));
}

/** Newton's step from a trial, by forward differences; null where an adjuster does nothing or two do the same. */
function newtonStep(search: Search, from: Trial): Triple | null {
	const jacobian = mat3.identity([0, 0, 0, 0, 0, 0, 0, 0, 0]);
	for (const i of [0, 1, 2] as const) {
		if (search.free[i]) continue;
		const amounts: Triple = [...from.amounts];
		amounts[i] += PROBE;
		const probe = trial(search, amounts);
		if (!probe) return null;
		for (const row of [0, 1, 2] as const) jacobian[3 * i + row] = (probe.misses[row] - from.misses[row]) / PROBE;
	}
	const inverse = mat3.invert([0, 0, 0, 0, 0, 0, 0, 0, 0], jacobian);
	if (!inverse) return null;
	const step = vec3.transformMat3([0, 0, 0], from.misses, inverse);
	const longest = Math.max(Math.abs(step[0]), Math.abs(step[1]), Math.abs(step[2]));
	if (!Number.isFinite(longest)) return null;
	const most = LONGEST_STEP * search.bench.entered.upper.radius;
	const part = longest > most ? most / longest : 1;
	return [-step[0] * part, -step[1] * part, -step[2] * part];
}

/** Newton with a step that is halved until it comes nearer. @returns the nearest trial, met or not */
function nearest(search: Search, start: Triple): Trial | null {
	let best = trial(search, start);
	for (let count = 0; best && count < MOST_STEPS && worst(best.misses) > MET; count++) {
		const step = newtonStep(search, best);
		if (!step) return best;
		let next: Trial | null = null;
		for (let part = 1; part > SHORTEST_PART; part /= 2) {
			const { amounts }: Trial = best;
			next = trial(search, [amounts[0] + part * step[0], amounts[1] + part * step[1], amounts[2] + part * step[2]]);
			if (next && worst(next.misses) < worst(best.misses)) break;
			next = null;
		}
		if (!next) return best;
		best = next;
	}
	return best;
}

function isMet(found: Trial | null): found is Trial {
	return found !== null && worst(found.misses) <= NEARLY_MET;
}

/** How far a target can be followed from where it stands, the others met: the last trial that meets all. */
function follow(search: Search, i: 0 | 1 | 2, from: number): Trial | null {
	const asking = (value: number): Search => {
		const wanted: Triple = [...search.wanted];
		wanted[i] = value;
		return { ...search, wanted };
	};
	let best = nearest(asking(from), [0, 0, 0]);
	if (!isMet(best)) return null;
	let good = 0;
	let bad = 1;
	while (bad - good > FINEST_PART) {
		const middle = (good + bad) / 2;
		const found: Trial | null = nearest(asking(from + middle * (search.wanted[i] - from)), best.amounts);
		if (isMet(found)) {
			best = found;
			good = middle;
		} else {
			bad = middle;
		}
	}
	return best;
}

/** Names the target that cannot be had beside the others, and the nearest that can. */
function noSolution(search: Search, found: Trial | null, rake: number): KinematicsError {
	const start = trial(search, [0, 0, 0]);
	const misses = (found ?? start)?.misses ?? [0, 0, 0];
	const byMiss = ([0, 1, 2] as const)
		.filter((i) => !search.free[i])
		.sort((a, b) => Math.abs(misses[b]) - Math.abs(misses[a]));
	for (const i of byMiss) {
		const name = TARGET_NAMES[i];
		const end = start && follow(search, i, start.state[name]);
		if (end) return cannotBeHad(name, search.wanted[i], end.state[name], rake);
	}
	const name = TARGET_NAMES[byMiss[0] ?? 0];
	const reached = (found ?? start)?.state[name] ?? search.wanted[byMiss[0] ?? 0];
	return cannotBeHad(name, search.wanted[byMiss[0] ?? 0], reached, rake);
}

function cannotBeHad(name: TargetName, wanted: number, reached: number, rake: number): KinematicsError {
	const toRoad = name === 'caster' ? rake : 0;
	const best = reached - toRoad;
	return new KinematicsError(
		'no-solution',
		name,
		`A ${name} of ${inWords(wanted - toRoad)}° cannot be had with these adjusters beside the other targets: the nearest is ${inWords(best)}°. Ask for less, or leave another target free.`,
		{ best }
	);
}

/**
 * The adjustment that gives camber, caster and toe to the road (degrees, per wheel), body held, contact point on the
 * ground, rack 0; exact, unrounded mm. Caster in the body = target caster + rake. A free camber or caster ties front and
 * rear together (`movesOf`), a free toe leaves the tie rod.
 * @throws KinematicsError `no-solution` naming the target, with the nearest that can be had in `best`
 */
export function solveAlignment(
	geometry: CornerGeometry,
	adjusters: Adjusters,
	targets: AlignmentTargets,
	stance: Stance = {}
): AlignmentSolution {
	const rake = stance.rake ?? 0;
	const value = (name: TargetName): number => {
		const target = targets[name] ?? 0;
		if (Number.isFinite(target)) return target;
		throw new KinematicsError(
			'not-finite',
			name,
			`The target for ${name} is not a number: give it in degrees, or leave it free.`
		);
	};
	const isFree = (name: TargetName): boolean => targets[name] === null || targets[name] === undefined;
	const wanted: Triple = [value('camber'), value('caster') + rake, value('toe')];
	const free = [isFree('camber'), isFree('caster'), isFree('toe')] as const;
	const search: Search = { bench: standing(geometry, adjusters, stance), free, wanted };
	const found = nearest(search, [0, 0, 0]);
	if (!isMet(found)) throw noSolution(search, found, rake);
	return { ...found.moves, state: found.state };
}
