import { mirror, type PointName, type Side, type Vec2, type Vec3 } from './geometry';
import * as at from './layout';
import { FIGURE_NAMES, type FigureName } from './layout';
import type { Prepared } from './prepared';
import { reasonFor, type AbsentName } from './reasons';

/** The coil-over in a state: its ends and its length, mm. */
export interface CoiloverState {
	readonly top: Vec3;
	readonly bottom: Vec3;
	readonly length: number;
}

/** A state as plain data, for JSON and for messages between threads. */
export type CornerStateData = Record<FigureName, number | null> & {
	side: Side;
	travel: number;
	rack: number;
	points: Record<PointName, Vec3>;
	wheelCentre: Vec3;
	contactPoint: Vec3;
	spinAxis: Vec3;
	steeringAxisGround: Vec3 | null;
	instantCentreFront: Vec2 | null;
	instantCentreByArms: Vec2 | null;
	coilover: CoiloverState | null;
	reasons: Partial<Record<AbsentName, string>>;
};

/**
 * One position of a corner: a view over its row of numbers. Lengths mm, angles degrees, rates per mm of wheel-centre
 * travel, forces N; signs and definitions in README.md. Places are true vehicle coordinates; signed figures keep each
 * side's own meaning. A figure that does not exist is null and `reasons` says why.
 */
export class CornerState {
	/** The row may be a stretch of a whole sweep's rows. */
	constructor(
		private readonly corner: Prepared,
		private readonly row: Float64Array,
		private readonly offset: number
	) {}

	private at(slot: number): number {
		return this.row[this.offset + slot] as number;
	}

	private orNull(slot: number): number | null {
		const value = this.at(slot);
		return Number.isFinite(value) ? value : null;
	}

	private vector(slot: number): Vec3 {
		return [this.at(slot), this.at(slot + 1), this.at(slot + 2)];
	}

	private chassis(point: Vec3): Vec3 {
		return this.corner.side === 'right' ? mirror(point) : [point[0], point[1], point[2]];
	}

	private centre(slot: number): Vec2 | null {
		const y = this.orNull(slot);
		const z = this.orNull(slot + 1);
		return y === null || z === null ? null : [y, z];
	}

	get side(): Side {
		return this.corner.side;
	}
	/** Wheel centre against the body, mm, bump +. */
	get travel(): number {
		return this.at(at.TRAVEL);
	}
	/** mm, + to the left. */
	get rack(): number {
		return this.at(at.RACK);
	}
	/** Lower arm against its entered position, radians, bump +. */
	get lowerArmAngle(): number {
		return this.at(at.ARM_ANGLE);
	}
	/** All eight points in this position. */
	get points(): Record<PointName, Vec3> {
		const { upperFront, upperRear, geometry } = this.corner;
		return {
			upperFront: this.chassis(upperFront),
			upperRear: this.chassis(upperRear),
			upperBall: this.vector(at.UPPER_BALL),
			lowerFront: this.chassis(geometry.points.lowerFront),
			lowerRear: this.chassis(geometry.points.lowerRear),
			lowerBall: this.vector(at.LOWER_BALL),
			tieRodInner: this.vector(at.TIE_INNER),
			tieRodOuter: this.vector(at.TIE_OUTER)
		};
	}
	get wheelCentre(): Vec3 {
		return this.vector(at.WHEEL_CENTRE);
	}
	/** Lowest point of the tyre's disc. */
	get contactPoint(): Vec3 {
		return this.vector(at.CONTACT);
	}
	/** Unit vector along the axle, outboard. */
	get spinAxis(): Vec3 {
		return this.vector(at.SPIN);
	}
	/** Where the steering axis meets the ground of this state. */
	get steeringAxisGround(): Vec3 | null {
		return Number.isFinite(this.at(at.AXIS_GROUND + 2)) ? this.vector(at.AXIS_GROUND) : null;
	}
	/** Velocity of the upright's material point at the contact point, mm per mm of travel, wheel locked to the upright. */
	get contactVelocity(): Vec3 {
		return this.vector(at.CONTACT_MOVE);
	}
	/** The upright's turning, rad per mm of travel, along the axis of turning. */
	get turning(): Vec3 {
		return this.vector(at.TURN);
	}
	get coilover(): CoiloverState | null {
		const { coilover } = this.corner.geometry;
		if (!coilover) return null;
		return {
			top: this.chassis(coilover.top),
			bottom: this.vector(at.COIL_BOTTOM),
			length: this.at(at.COILOVER_LENGTH)
		};
	}
	/** `[y, z]` in the front view, from the upright's velocity. */
	get instantCentreFront(): Vec2 | null {
		return this.centre(at.CENTRE_FRONT);
	}
	/** `[y, z]`, where the arms' lines meet in the plane x = contact point. */
	get instantCentreByArms(): Vec2 | null {
		return this.centre(at.CENTRE_ARMS);
	}

	get camber(): number {
		return this.at(at.CAMBER);
	}
	get toe(): number {
		return this.at(at.TOE);
	}
	get caster(): number {
		return this.at(at.CASTER);
	}
	get kpi(): number {
		return this.at(at.KPI);
	}
	get includedAngle(): number {
		return this.at(at.INCLUDED_ANGLE);
	}
	get scrubRadius(): number | null {
		return this.orNull(at.SCRUB_RADIUS);
	}
	get mechanicalTrail(): number | null {
		return this.orNull(at.MECHANICAL_TRAIL);
	}
	get kingpinOffsetAtHub(): number | null {
		return this.orNull(at.KINGPIN_OFFSET_AT_HUB);
	}
	get trailAtHub(): number | null {
		return this.orNull(at.TRAIL_AT_HUB);
	}
	get camberRate(): number | null {
		return this.orNull(at.CAMBER_RATE);
	}
	get toeRate(): number | null {
		return this.orNull(at.TOE_RATE);
	}
	get casterRate(): number | null {
		return this.orNull(at.CASTER_RATE);
	}
	get rollCentreHeight(): number | null {
		return this.orNull(at.ROLL_CENTRE_HEIGHT);
	}
	get rollCentreByArms(): number | null {
		return this.orNull(at.ROLL_CENTRE_BY_ARMS);
	}
	get swingArmFront(): number | null {
		return this.orNull(at.SWING_ARM_FRONT);
	}
	/** Contact point's y against ride height, mm, outboard +. */
	get halfTrack(): number {
		return this.at(at.HALF_TRACK);
	}
	get halfTrackRate(): number | null {
		return this.orNull(at.HALF_TRACK_RATE);
	}
	get antiDive(): number | null {
		return this.orNull(at.ANTI_DIVE);
	}
	get motionRatio(): number | null {
		return this.orNull(at.MOTION_RATIO);
	}
	/** d(motion ratio)/d(travel), per mm. */
	get motionRatioRate(): number | null {
		return this.orNull(at.MOTION_RATIO_RATE);
	}
	get coiloverLength(): number | null {
		return this.orNull(at.COILOVER_LENGTH);
	}
	get springForce(): number | null {
		return this.orNull(at.SPRING_FORCE);
	}
	get wheelRate(): number | null {
		return this.orNull(at.WHEEL_RATE);
	}
	/** The part of the wheel rate that comes from the spring's force and the changing motion ratio, N/mm. */
	get wheelRateFromForce(): number | null {
		return this.orNull(at.WHEEL_RATE_FROM_FORCE);
	}
	get rideFrequency(): number | null {
		return this.orNull(at.RIDE_FREQUENCY);
	}
	/** Ride frequency with the tyre's rate in series, Hz. */
	get rideFrequencyOnTyre(): number | null {
		return this.orNull(at.RIDE_FREQUENCY_ON_TYRE);
	}

	/** Why each absent figure is absent, in words. */
	get reasons(): Partial<Record<AbsentName, string>> {
		const reasons: Partial<Record<AbsentName, string>> = {};
		const absent: AbsentName[] = FIGURE_NAMES.filter((name) => this[name] === null);
		if (this.instantCentreFront === null) absent.push('instantCentreFront');
		if (this.instantCentreByArms === null) absent.push('instantCentreByArms');
		if (this.steeringAxisGround === null) absent.push('steeringAxisGround');
		if (this.coilover === null) absent.push('coilover');
		for (const name of absent) reasons[name] = reasonFor(name, this.corner.geometry, this.camberRate === null);
		return reasons;
	}

	toJSON(): CornerStateData {
		const figures = {} as Record<FigureName, number | null>;
		for (const name of FIGURE_NAMES) figures[name] = this[name];
		return {
			side: this.side,
			travel: this.travel,
			rack: this.rack,
			...figures,
			points: this.points,
			wheelCentre: this.wheelCentre,
			contactPoint: this.contactPoint,
			spinAxis: this.spinAxis,
			steeringAxisGround: this.steeringAxisGround,
			instantCentreFront: this.instantCentreFront,
			instantCentreByArms: this.instantCentreByArms,
			coilover: this.coilover,
			reasons: this.reasons
		};
	}
}
