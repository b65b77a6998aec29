import { emptyAxle } from '../../src/lib/domain/axle';
import type { AdjusterEntry, AxleDocument, CornerEntry, Target, VehicleEntry } from '../../src/lib/schemas/axle';

/** Points of one corner, mm: x forward, y left, z up from the ground under the axle. */
export type Points = CornerEntry['points'];

const shims: AdjusterEntry['upper'] = {
	kind: 'shim',
	side: 'outboard',
	direction: [0, 1, 0],
	frontNow: 3,
	rearNow: 3,
	boltReserve: 14,
	maxPack: 12,
	maxDifference: 6
};

/** What a builder of a road car asks of a front end: ride figures, and bump steer over the middle 50 mm. */
const roadTargets: Target[] = [
	{ figure: 'caster', at: 'ride', low: 4.5, high: 7 },
	{ figure: 'camber', at: 'ride', low: -1, high: 0 },
	{ figure: 'scrubRadius', at: 'ride', low: 0, high: 35 },
	{ figure: 'rollCentreHeight', at: 'ride', low: 25, high: 70 },
	{ figure: 'antiDive', at: 'ride', low: 10, high: 30 },
	{ figure: 'camberRate', at: 'ride', low: -0.04, high: -0.02 },
	{ figure: 'bumpSteer', at: 'travel', from: -25, to: 25, measure: 'peak', low: null, high: 0.1 }
];

interface Parts {
	points: Points;
	wheel: CornerEntry['wheel'];
	coilover: CornerEntry['coilover'];
	vehicle: VehicleEntry;
	adjusters?: AdjusterEntry;
}

/** A complete mirrored axle document of the demo. */
export function axleOf({ points, wheel, coilover, vehicle, adjusters }: Parts): AxleDocument {
	const empty = emptyAxle();
	const wanted = {
		camber: { value: -0.5, tolerance: 0.25 },
		caster: { value: 5, tolerance: 0.5 },
		toe: { value: 0.05, tolerance: 0.05 }
	};
	return {
		...empty,
		left: { points, wheel, coilover },
		vehicle,
		adjusters: adjusters ?? { upper: shims, tieRod: { thread: '5/8-18', fitting: 'rodEnd', flats: 6 } },
		targets: roadTargets,
		alignment: { left: wanted, right: wanted }
	};
}
