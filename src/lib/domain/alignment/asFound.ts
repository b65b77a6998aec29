import { KinematicsError, solveAlignment } from '../../kinematics';
import type { CornerGeometry, Stance } from '../../kinematics';
import { changedHoldingToe, kernelAdjusters, standingWheel, type UpperAdjuster, type Wheel } from './wheel';

/** What was read on one wheel before anything was touched; null where it was not read. Degrees, toe per wheel; packs in mm. */
export interface Measured {
	readonly camber: number | null;
	/** To the road. */
	readonly caster: number | null;
	readonly toe: number | null;
	readonly frontPack: number | null;
	readonly rearPack: number | null;
}

/** Upper-arm movement that the readings imply against what is recorded, mm. */
export interface Implied {
	readonly front: number;
	readonly rear: number;
	readonly frontRecorded: number;
	readonly rearRecorded: number;
	/** The larger of the two differences. */
	readonly off: number;
	/** Over 1 mm: the car is not the car of this revision. */
	readonly matches: boolean;
}

export interface Found {
	readonly wheel: Wheel;
	/** Packs in the brackets now, mm; growth of the legs since the geometry was entered for rod ends (0). */
	readonly frontNow: number;
	readonly rearNow: number;
	/** Null where too little was read to tell, or where no adjustment gives these readings: then `unlike` says so. */
	readonly implied: Implied | null;
	readonly unlike: string | null;
}

/** Largest difference between implied and recorded packs at which car and revision still match, mm. */
export const MATCHES_WITHIN = 1;

/**
 * A wheel as it stands. What camber and caster read more than the model says is carried as an offset; toe is laid to the
 * tie rod's present length. Without readings it stands as the geometry was entered.
 * @throws KinematicsError where the corner cannot stand so
 */
export function foundWheel(
	geometry: CornerGeometry,
	upper: UpperAdjuster,
	stance: Stance,
	measured: Measured | null
): Found {
	const entered = upper.kind === 'shim' ? { front: upper.frontNow, rear: upper.rearNow } : { front: 0, rear: 0 };
	const packs = upper.kind === 'shim' ? measured : null;
	const frontNow = packs?.frontPack ?? entered.front;
	const rearNow = packs?.rearPack ?? entered.rear;
	const front = frontNow - entered.front;
	const rear = rearNow - entered.rear;
	const asEntered = standingWheel(geometry, upper, stance);
	const toeNow = measured?.toe ?? null;
	const { moves, angles } = changedHoldingToe(asEntered, front, rear, toeNow);
	const offset = {
		camber: (measured?.camber ?? angles.camber) - angles.camber,
		caster: (measured?.caster ?? angles.caster) - angles.caster
	};
	const wheel = standingWheel(geometry, upper, stance, moves, offset);
	return { wheel, frontNow, rearNow, ...impliedBy(geometry, upper, stance, measured, { frontNow, rearNow, entered }) };
}

/** The packs (or growth of legs) with which the model itself would read as measured. */
function impliedBy(
	geometry: CornerGeometry,
	upper: UpperAdjuster,
	stance: Stance,
	measured: Measured | null,
	{ frontNow, rearNow, entered }: { frontNow: number; rearNow: number; entered: { front: number; rear: number } }
): Pick<Found, 'implied' | 'unlike'> {
	if (!measured || measured.camber === null || measured.caster === null) return { implied: null, unlike: null };
	const { camber, caster, toe } = measured;
	try {
		const moves = solveAlignment(geometry, kernelAdjusters(upper), { camber, caster, toe }, stance);
		const [front, rear] = [entered.front + moves.front, entered.rear + moves.rear];
		const off = Math.max(Math.abs(front - frontNow), Math.abs(rear - rearNow));
		const implied = {
			front,
			rear,
			frontRecorded: frontNow,
			rearRecorded: rearNow,
			off,
			matches: off <= MATCHES_WITHIN
		};
		return { implied, unlike: null };
	} catch (error) {
		if (error instanceof KinematicsError) return { implied: null, unlike: error.message };
		throw error;
	}
}
