/** What went wrong: an entry that is no number, a corner that cannot work, a place it cannot reach, a target it cannot meet. */
export type KinematicsErrorCode = 'not-finite' | 'degenerate' | 'out-of-reach' | 'no-solution';

/** The moving links of a corner; the wheel's own extreme is laid to the arm that has stopped lifting it. */
export type LinkName = 'lowerArm' | 'upperArm' | 'tieRod';

export const LINK_WORDS: Record<LinkName, string> = {
	lowerArm: 'lower arm',
	upperArm: 'upper arm',
	tieRod: 'tie rod'
};

export interface KinematicsErrorDetails {
	/** `out-of-reach`: the last reachable value of the quantity asked for, mm (travel, rack) or degrees (roll). */
	lastReachable?: number;
	/** `out-of-reach`: the link that locks there. */
	locks?: LinkName;
	/** `no-solution`: the nearest value of the target that can be had, degrees. */
	best?: number;
	/** The side of the vehicle, where a sweep or alignment covers both. */
	side?: 'left' | 'right';
}

/** The one error this folder throws. `at` names the point, link, field or target at fault; the message says what would do. */
export class KinematicsError extends Error {
	readonly code: KinematicsErrorCode;
	readonly at: string;
	readonly lastReachable?: number;
	readonly locks?: LinkName;
	readonly best?: number;
	readonly side?: 'left' | 'right';

	constructor(code: KinematicsErrorCode, at: string, message: string, details: KinematicsErrorDetails = {}) {
		super(message);
		this.name = 'KinematicsError';
		this.code = code;
		this.at = at;
		if (details.lastReachable !== undefined) this.lastReachable = details.lastReachable;
		if (details.locks !== undefined) this.locks = details.locks;
		if (details.best !== undefined) this.best = details.best;
		if (details.side !== undefined) this.side = details.side;
	}
}

/** A number for a message: three decimals at most, a plain minus. */
export function inWords(value: number): string {
	return String(Math.round(value * 1000) / 1000);
}
