import type { CornerGeometry, Vec3 } from '../../../src/lib/kinematics';

const raised = (x: number, y: number, z: number): Vec3 => [x, y, z + 445.1];

/**
 * Left front corner of a military truck. Points: Project Chrono (BSD-3), data/vehicle/hmmwv/suspension, front double
 * wishbone, raised to stand on the ground. Loaded radius: US Army TM 9-2320-387-24-1, para 8-10 (hub height 16.5 in).
 */
export const TRUCK: CornerGeometry = {
	points: {
		lowerFront: raised(223, 307, 0),
		lowerRear: raised(-223, 307, 0),
		lowerBall: raised(-36, 787, -118),
		upperFront: raised(-48, 446, 245),
		upperRear: raised(-268, 478, 196),
		upperBall: raised(-53, 716, 215),
		tieRodInner: raised(-250, 448, 54),
		tieRodOuter: raised(-176, 821, -16)
	},
	wheel: { track: 1820, x: -40, loadedRadius: 419.1, camber: 0, toe: 0 }
};

/** An invented road corner with every optional part; its numbers are nobody's. */
export const ROAD: CornerGeometry = {
	points: {
		upperFront: [105, 372, 418],
		upperRear: [-128, 381, 403],
		upperBall: [-21, 603, 447],
		lowerFront: [152, 318, 171],
		lowerRear: [-163, 327, 182],
		lowerBall: [6, 668, 158],
		tieRodInner: [-118, 338, 203],
		tieRodOuter: [-132, 655, 196]
	},
	wheel: { track: 1480, x: 2, loadedRadius: 301, camber: -0.8, toe: 0.12 },
	coilover: {
		top: [12, 402, 560],
		bottom: [8, 552, 186],
		on: 'lowerArm',
		rate: 62,
		forceAtRide: 4150,
		openLength: 430,
		closedLength: 310
	},
	vehicle: {
		wheelbase: 2540,
		cgHeight: 505,
		frontBrakeShare: 0.62,
		frontBrakes: 'upright',
		sprungCornerMass: 268,
		tyreRate: 205
	}
};
