import { KinematicsError, type LinkName } from './errors';
import { sideOf, type AxleGeometry, type CornerGeometry, type Side } from './geometry';
import { reachableTravel } from './locate';
import { prepare } from './prepare';
import type { Prepared } from './prepared';

export interface PreparedAxle {
	readonly left: Prepared;
	readonly right: Prepared;
}

/** The same error, told of one side. */
export function onSide(error: unknown, side: Side): unknown {
	if (!(error instanceof KinematicsError) || error.side !== undefined) return error;
	return new KinematicsError(error.code, error.at, `${side === 'left' ? 'Left' : 'Right'} corner: ${error.message}`, {
		...error,
		side
	});
}

function prepareSide(geometry: CornerGeometry, side: Side): Prepared {
	try {
		return prepare(geometry, side);
	} catch (error) {
		throw onSide(error, side);
	}
}

/** Both corners, prepared: one geometry is mirrored; of two, the right one may be given with y negative or +y outboard. */
export function prepareAxle(axle: AxleGeometry): PreparedAxle {
	if (typeof axle !== 'object' || axle === null)
		throw new KinematicsError('not-finite', 'axle', 'The axle is missing: give one corner, or a left and a right one.');
	if (!('left' in axle)) return { left: prepare(axle, 'left'), right: prepare(axle, 'right') };
	const left = prepareSide(axle.left, 'left');
	const right = prepareSide(axle.right, 'right');
	if (sideOf(axle.left) === 'right') {
		throw new KinematicsError(
			'degenerate',
			'lowerBall',
			'Left corner: the lower ball joint lies to the right of the centreline: its y must be positive.',
			{ side: 'left' }
		);
	}
	return { left, right };
}

/** A travel at which a corner's reach ends, mm, and what locks there. */
export interface TravelEnd {
	readonly value: number;
	readonly locks: LinkName;
}

/** Both ends of a corner's wheel-centre travel at rack 0. */
export function wholeTravel(p: Prepared): { low: TravelEnd; high: TravelEnd } {
	const { low, high } = reachableTravel(p, -Infinity, Infinity, 0);
	// Travel is bounded by the links, so both ends exist.
	return { low: low as TravelEnd, high: high as TravelEnd };
}
