import type { AxleDocument } from '../../src/lib/schemas/axle';
import { axleOf, type Points } from './corner';

const wheel = { track: 1420, x: 0, loadedRadius: 300, camber: -0.5, toe: 0.05 };
const vehicle = {
	wheelbase: 2600,
	cgHeight: 480,
	frontBrakeShare: 0.64,
	frontBrakes: 'upright',
	sprungCornerMass: 245,
	tyreRate: 210
} as const;
const coilover: AxleDocument['left']['coilover'] = {
	top: [-10, 405, 520],
	bottom: [0, 560, 205],
	on: 'lowerArm',
	rate: 62,
	forceAtRide: 3600,
	openLength: 420,
	closedLength: 300
};

/** A: arms near parallel, the rack where the old crossmember had it. Camber gain 0.09° per 10 mm, bump steer 0.33° over ±25 mm. */
const first: Points = {
	upperFront: [90, 344, 424],
	upperRear: [-130, 344, 424],
	upperBall: [-12, 617, 430],
	lowerFront: [150, 332, 196],
	lowerRear: [-170, 332, 196],
	lowerBall: [8, 655, 190],
	tieRodInner: [-120, 330, 232],
	tieRodOuter: [-125, 640, 238]
};
/** B: upper arm 28 mm shorter, its pivots 22 mm lower. Camber gain 0.30° per 10 mm. */
const shorter: Points = { ...first, upperFront: [90, 372, 402], upperRear: [-130, 372, 402] };
/** C: rack ends 4 mm up and 15 mm out. Bump steer 0.02° over ±25 mm. */
const rackMoved: Points = { ...shorter, tieRodInner: [-120, 345, 236] };
/** D: upper pivots raised in front and lowered behind, upper ball joint 6 mm back. Anti-dive 19 %, caster 6.2°. */
const inclined: Points = {
	...rackMoved,
	upperFront: [90, 372, 410],
	upperRear: [-130, 372, 394],
	upperBall: [-18, 617, 430]
};
/** E: lower pivots down, rack ends after them. Roll centre from 84 to 46 mm. */
const lowered: Points = {
	...inclined,
	lowerFront: [150, 332, 188],
	lowerRear: [-170, 332, 186],
	upperFront: [90, 372, 412],
	upperRear: [-130, 372, 396],
	tieRodInner: [-120, 341, 229.5]
};

const documentOf = (points: Points) => axleOf({ points, wheel, coilover, vehicle });

/** The roadster's five revisions in order, each with the note its builder left. */
export const ROADSTER_REVISIONS = [
	{
		points: first,
		day: '2026-08-24',
		note: 'First layout on the old crossmember: arms near parallel, rack where it was.'
	},
	{ points: shorter, day: '2026-08-31', note: 'Upper arm 28 shorter and pivots 22 lower, for camber gain.' },
	{
		points: rackMoved,
		day: '2026-09-09',
		note: 'Rack ends 4 up and 15 out: bump steer inside 0.1 over the middle 50.'
	},
	{
		points: inclined,
		day: '2026-09-25',
		note: 'Upper pivots inclined for anti-dive, upper ball joint 6 back for caster. Released to cut brackets.'
	},
	{
		points: lowered,
		day: '2026-11-12',
		note: 'Lower pivots 8 and 10 down, rack ends after them: roll centre 46, was 84.'
	}
].map(({ points, ...rest }) => ({ ...rest, document: documentOf(points) }));
