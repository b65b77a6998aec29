/**
 * The row of numbers that holds one state, in order. Places and directions take three numbers, front-view centres two;
 * NaN stands for a figure that does not exist (the object view turns it into null and a reason).
 */
export const TRAVEL = 0;
export const RACK = 1;
/** Lower-arm angle from the entered position, radians, bump positive. */
export const ARM_ANGLE = 2;
export const UPPER_BALL = 3;
export const LOWER_BALL = 6;
export const TIE_OUTER = 9;
export const TIE_INNER = 12;
export const WHEEL_CENTRE = 15;
export const CONTACT = 18;
export const SPIN = 21;
/** Where the steering axis meets the ground. */
export const AXIS_GROUND = 24;
export const COIL_BOTTOM = 27;
/** The upright's turning per mm of wheel-centre travel, rad/mm, a vector along the axis of turning. */
export const TURN = 30;
/** Velocity of the upright's material point at the contact point per mm of travel, mm/mm. */
export const CONTACT_MOVE = 33;
export const CENTRE_FRONT = 36;
export const CENTRE_ARMS = 38;
/** The first of the named figures. */
export const FIGURES_AT = 40;

/** Figures of a state by name, in the order of the row. Angles in degrees, lengths in mm, forces in N. */
export const FIGURE_NAMES = [
	'camber',
	'toe',
	'caster',
	'kpi',
	'includedAngle',
	'scrubRadius',
	'mechanicalTrail',
	'kingpinOffsetAtHub',
	'trailAtHub',
	'camberRate',
	'toeRate',
	'casterRate',
	'rollCentreHeight',
	'rollCentreByArms',
	'swingArmFront',
	'halfTrack',
	'halfTrackRate',
	'antiDive',
	'motionRatio',
	'motionRatioRate',
	'coiloverLength',
	'springForce',
	'wheelRate',
	'wheelRateFromForce',
	'rideFrequency',
	'rideFrequencyOnTyre'
] as const;

export type FigureName = (typeof FIGURE_NAMES)[number];

export const CAMBER = 40;
export const TOE = 41;
export const CASTER = 42;
export const KPI = 43;
export const INCLUDED_ANGLE = 44;
export const SCRUB_RADIUS = 45;
export const MECHANICAL_TRAIL = 46;
export const KINGPIN_OFFSET_AT_HUB = 47;
export const TRAIL_AT_HUB = 48;
export const CAMBER_RATE = 49;
export const TOE_RATE = 50;
export const CASTER_RATE = 51;
export const ROLL_CENTRE_HEIGHT = 52;
export const ROLL_CENTRE_BY_ARMS = 53;
export const SWING_ARM_FRONT = 54;
export const HALF_TRACK = 55;
export const HALF_TRACK_RATE = 56;
export const ANTI_DIVE = 57;
export const MOTION_RATIO = 58;
export const MOTION_RATIO_RATE = 59;
export const COILOVER_LENGTH = 60;
export const SPRING_FORCE = 61;
export const WHEEL_RATE = 62;
export const WHEEL_RATE_FROM_FORCE = 63;
export const RIDE_FREQUENCY = 64;
export const RIDE_FREQUENCY_ON_TYRE = 65;

/** Numbers in the row of one state. */
export const STATE_LENGTH = 66;
