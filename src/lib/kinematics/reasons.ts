import type { CornerGeometry } from './geometry';
import type { FigureName } from './layout';

/** A figure that may be absent: the numbers, and the two front-view centres. */
export type AbsentName = FigureName | 'instantCentreFront' | 'instantCentreByArms' | 'steeringAxisGround' | 'coilover';

const LEVEL_AXIS = 'The steering axis lies level here, so it does not meet this plane.';
const PARALLEL_MOTION =
	'The upright moves without turning in the front view, so its instant centre is infinitely far away.';
const PARALLEL_ARMS = 'The arms run parallel in the front view, so their lines do not meet.';
const DEAD_CENTRE = 'The linkage stands at a dead centre here, so there is no rate.';

/** Figures of the position alone, which a dead centre does not take away. */
const GEOMETRIC = new Set<AbsentName>([
	'scrubRadius',
	'mechanicalTrail',
	'kingpinOffsetAtHub',
	'trailAtHub',
	'steeringAxisGround'
]);

function listed(missing: string[]): string {
	const last = missing.at(-1) ?? '';
	return missing.length > 1 ? `${missing.slice(0, -1).join(', ')} and ${last}` : last;
}

function lacks(pairs: readonly (readonly [unknown, string])[]): string | null {
	const missing = pairs.filter(([value]) => value === undefined || value === null).map(([, words]) => words);
	return missing.length > 0 ? `Not entered: ${listed(missing)}.` : null;
}

function whatIsMissing(name: AbsentName, { coilover, vehicle }: CornerGeometry): string | null {
	switch (name) {
		case 'antiDive':
			return lacks([
				[vehicle?.wheelbase, 'the wheelbase'],
				[vehicle?.cgHeight, "the centre of gravity's height"],
				[vehicle?.frontBrakeShare, 'the front brake share']
			]);
		case 'coilover':
		case 'motionRatio':
		case 'motionRatioRate':
		case 'coiloverLength':
			return lacks([[coilover, 'the coil-over']]);
		case 'springForce':
		case 'wheelRate':
		case 'wheelRateFromForce':
		case 'rideFrequency':
		case 'rideFrequencyOnTyre':
			return (
				lacks([[coilover, 'the coil-over']]) ??
				lacks([
					[coilover?.rate, 'the spring rate'],
					[coilover?.forceAtRide, 'the spring force at ride height'],
					[name.startsWith('ride') ? vehicle?.sprungCornerMass : 0, 'the sprung corner mass'],
					[name === 'rideFrequencyOnTyre' ? vehicle?.tyreRate : 0, 'the tyre rate']
				])
			);
		default:
			return null;
	}
}

function whyNotThere(name: AbsentName): string {
	switch (name) {
		case 'instantCentreFront':
		case 'swingArmFront':
			return PARALLEL_MOTION;
		case 'instantCentreByArms':
			return PARALLEL_ARMS;
		case 'rollCentreHeight':
			return 'The contact point does not rise with the wheel here, so its normal does not meet the centreline.';
		case 'rollCentreByArms':
			return 'The line from the contact point through the meet of the arms is upright, so it does not cross the centreline.';
		case 'scrubRadius':
		case 'mechanicalTrail':
		case 'kingpinOffsetAtHub':
		case 'trailAtHub':
		case 'steeringAxisGround':
			return LEVEL_AXIS;
		case 'rideFrequency':
		case 'rideFrequencyOnTyre':
			return 'The wheel rate is not positive here, so the body does not swing on it.';
		default:
			return DEAD_CENTRE;
	}
}

/** Why a figure is absent from a state that can be solved: its input is missing, or it does not exist there. */
export function reasonFor(name: AbsentName, geometry: CornerGeometry, atDeadCentre: boolean): string {
	return whatIsMissing(name, geometry) ?? (atDeadCentre && !GEOMETRIC.has(name) ? DEAD_CENTRE : whyNotThere(name));
}
