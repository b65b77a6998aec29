import type { AxleDocument } from '../../src/lib/schemas/axle';
import { axleOf } from './corner';

/** Pick-up, laid out: rack ahead of the axle, upper arm adjusted by rod ends. */
export const PICKUP: AxleDocument = axleOf({
	points: {
		upperFront: [110, 430, 486],
		upperRear: [-140, 430, 478],
		upperBall: [-16, 700, 512],
		lowerFront: [190, 372, 242],
		lowerRear: [-190, 372, 238],
		lowerBall: [6, 742, 232],
		tieRodInner: [150, 384, 274],
		tieRodOuter: [158, 756, 272]
	},
	wheel: { track: 1640, x: 0, loadedRadius: 345, camber: -0.5, toe: 0.08 },
	coilover: {
		top: [-20, 470, 600],
		bottom: [-5, 620, 262],
		on: 'lowerArm',
		rate: 88,
		forceAtRide: 5600,
		openLength: 450,
		closedLength: 300
	},
	vehicle: {
		wheelbase: 3050,
		cgHeight: 610,
		frontBrakeShare: 0.68,
		frontBrakes: 'upright',
		sprungCornerMass: 380,
		tyreRate: 240
	},
	adjusters: {
		upper: {
			kind: 'rodEnd',
			thread: '3/4-16',
			fitting: 'throughBolt',
			handedness: 'right',
			engagementNow: 24,
			minEngagement: 19
		},
		tieRod: { thread: '5/8-18', fitting: 'sleeve', flats: 6 }
	}
});

/** Coupe, on its wheels: shims inboard of the pivot shaft. The first revision had the rack ends 8 mm low. */
const coupe = (rackHeight: number): AxleDocument =>
	axleOf({
		points: {
			upperFront: [95, 410, 424],
			upperRear: [-125, 410, 416],
			upperBall: [-14, 655, 446],
			lowerFront: [165, 360, 206],
			lowerRear: [-175, 360, 202],
			lowerBall: [10, 690, 196],
			tieRodInner: [-122, 372, rackHeight],
			tieRodOuter: [-128, 676, 244]
		},
		wheel: { track: 1500, x: 0, loadedRadius: 310, camber: -0.75, toe: 0.06 },
		coilover: {
			top: [-14, 440, 540],
			bottom: [0, 590, 222],
			on: 'lowerArm',
			rate: 70,
			forceAtRide: 4000,
			openLength: 430,
			closedLength: 300
		},
		vehicle: {
			wheelbase: 2720,
			cgHeight: 520,
			frontBrakeShare: 0.62,
			frontBrakes: 'upright',
			sprungCornerMass: 290,
			tyreRate: 220
		},
		adjusters: {
			upper: {
				kind: 'shim',
				side: 'inboard',
				direction: [0, 1, 0],
				frontNow: 4.5,
				rearNow: 3,
				boltReserve: 12,
				maxPack: 12,
				maxDifference: 6
			},
			tieRod: { thread: 'M16x1.5', fitting: 'rodEnd', flats: 6 }
		}
	});

export const COUPE_REVISIONS = [
	{ day: '2026-03-18', note: 'As taped on the jig.', document: coupe(236) },
	{ day: '2026-04-02', note: 'Rack 8 up on new mounts: bump steer gone from the middle 50.', document: coupe(244) }
];
