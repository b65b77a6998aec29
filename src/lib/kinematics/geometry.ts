/** A place or direction `[x, y, z]`: x forward, y left, z up (ISO 8855), mm where it is a place. */
export type Vec3 = readonly [number, number, number];

/** A place in the front view, `[y, z]`, mm. */
export type Vec2 = readonly [number, number];

export const POINT_NAMES = [
	'upperFront',
	'upperRear',
	'upperBall',
	'lowerFront',
	'lowerRear',
	'lowerBall',
	'tieRodInner',
	'tieRodOuter'
] as const;

export type PointName = (typeof POINT_NAMES)[number];

/** The points as a builder names them, for messages. */
export const POINT_WORDS: Record<PointName, string> = {
	upperFront: 'upper arm, front pivot',
	upperRear: 'upper arm, rear pivot',
	upperBall: 'upper ball joint',
	lowerFront: 'lower arm, front pivot',
	lowerRear: 'lower arm, rear pivot',
	lowerBall: 'lower ball joint',
	tieRodInner: 'inner tie-rod joint',
	tieRodOuter: 'outer tie-rod joint'
};

export type Side = 'left' | 'right';

export interface WheelGeometry {
	/** Between the two contact points, mm. */
	readonly track: number;
	/** Contact point fore and aft, mm, normally 0. */
	readonly x: number;
	/** Wheel centre to ground, along the wheel plane, mm. */
	readonly loadedRadius: number;
	/** Static camber, degrees, negative: top leans inboard. */
	readonly camber: number;
	/** Static toe of this wheel, degrees, toe-in positive. */
	readonly toe: number;
}

export type CoiloverMount = 'lowerArm' | 'upperArm' | 'upright';

export interface CoiloverGeometry {
	readonly top: Vec3;
	readonly bottom: Vec3;
	/** What the bottom end is bolted to; the top end is on the body. */
	readonly on: CoiloverMount;
	/** Spring rate, N/mm. */
	readonly rate?: number | null;
	/** Spring force at ride height, N, compression positive. */
	readonly forceAtRide?: number | null;
	/** Eye to eye, mm. */
	readonly openLength?: number | null;
	readonly closedLength?: number | null;
}

export interface VehicleData {
	/** mm */
	readonly wheelbase?: number | null;
	/** mm above ground */
	readonly cgHeight?: number | null;
	/** Front share of the braking force, 0 to 1. */
	readonly frontBrakeShare?: number | null;
	/** Where the front brake's torque goes; on the upright unless said. */
	readonly frontBrakes?: 'upright' | 'inboard' | null;
	/** Sprung mass on this corner, kg. */
	readonly sprungCornerMass?: number | null;
	/** Tyre rate, N/mm. */
	readonly tyreRate?: number | null;
}

/** One corner at ride height. A right corner has y negative, or may be given with +y outboard where the side is known otherwise. */
export interface CornerGeometry {
	readonly points: Readonly<Record<PointName, Vec3>>;
	readonly wheel: WheelGeometry;
	readonly coilover?: CoiloverGeometry | null;
	readonly vehicle?: VehicleData | null;
}

/** Both wheels: one corner and its mirror, or two corners that may differ. */
export type AxleGeometry = CornerGeometry | { readonly left: CornerGeometry; readonly right: CornerGeometry };

/** The side a corner was entered on, told by its lower ball joint. */
export function sideOf(geometry: CornerGeometry): Side {
	return geometry.points.lowerBall[1] < 0 ? 'right' : 'left';
}

/** The mirror image in the vehicle's centre plane. */
export function mirror(point: Vec3): Vec3 {
	return [point[0], -point[1], point[2]];
}
