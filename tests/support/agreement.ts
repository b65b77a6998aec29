/** Compares a kernel state with the independent solver's figures, within the tolerances of the project's kinematics page. */
import type { Outside } from './newton-figures';
import type { LinkPoint, V3 } from './newton';

/** The part of a kernel state that is compared. */
export interface KernelState {
	camber: number;
	toe: number;
	caster: number;
	kpi: number;
	includedAngle: number;
	scrubRadius: number | null;
	mechanicalTrail: number | null;
	kingpinOffsetAtHub: number | null;
	trailAtHub: number | null;
	camberRate: number | null;
	toeRate: number | null;
	casterRate: number | null;
	instantCentreFront: readonly [number, number] | null;
	rollCentreHeight: number | null;
	instantCentreByArms: readonly [number, number] | null;
	rollCentreByArms: number | null;
	swingArmFront: number | null;
	halfTrackRate: number | null;
	antiDive: number | null;
	motionRatio: number | null;
	wheelRate: number | null;
	rideFrequency: number | null;
	rideFrequencyOnTyre: number | null;
	points: Readonly<Record<LinkPoint, V3>>;
	wheelCentre: V3;
	contactPoint: V3;
	spinAxis: V3;
}

const ANGLE = 1e-6;
const LENGTH = 1e-6;
/** Centres are compared where they lie nearer than this, mm. */
const FAR = 50_000;
const rateTolerance = (rate: number): number => 1e-9 + 1e-6 * Math.abs(rate);

type Finding = string;

class Findings {
	readonly list: Finding[] = [];

	number(name: string, mine: number | null, theirs: number | null, tolerance: number): void {
		if (mine === null && theirs === null) return;
		if (mine === null || theirs === null) this.list.push(`${name}: outside ${mine}, kernel ${theirs}`);
		else if (!(Math.abs(mine - theirs) <= tolerance)) {
			this.list.push(`${name}: outside ${mine}, kernel ${theirs}, off ${mine - theirs}, allowed ${tolerance}`);
		}
	}

	place(name: string, mine: V3, theirs: V3, tolerance: number): void {
		mine.forEach((x, i) => this.number(`${name}[${i}]`, x, theirs[i] ?? NaN, tolerance));
	}

	/** A centre, or a distance to it: relative to its distance, only where it is near. */
	centre(name: string, mine: number | null, theirs: number | null, distance: number): void {
		if (distance < FAR) this.number(name, mine, theirs, 1e-6 * distance + LENGTH * 1e-3);
	}
}

/** Every disagreement in places and attitude; empty when they agree. */
export function comparePlaces(mine: Omit<Outside, never>, theirs: KernelState): Finding[] {
	const found = new Findings();
	for (const key of ['camber', 'toe', 'caster', 'kpi', 'includedAngle'] as const) {
		found.number(key, mine[key], theirs[key], ANGLE);
	}
	for (const key of ['scrubRadius', 'mechanicalTrail', 'kingpinOffsetAtHub', 'trailAtHub'] as const) {
		found.number(key, mine[key], theirs[key], LENGTH);
	}
	for (const [key, point] of Object.entries(mine.points)) {
		found.place(key, point, theirs.points[key as LinkPoint], LENGTH);
	}
	found.place('wheelCentre', mine.wheelCentre, theirs.wheelCentre, LENGTH);
	found.place('contactPoint', mine.contactPoint, theirs.contactPoint, LENGTH);
	found.place('spinAxis', mine.spinAxis, theirs.spinAxis, 1e-8);
	return found.list;
}

/** Every disagreement in rates and what follows from them. */
export function compareRates(mine: Outside, theirs: KernelState): Finding[] {
	const found = new Findings();
	for (const key of ['camberRate', 'toeRate', 'casterRate', 'halfTrackRate'] as const) {
		found.number(key, mine[key], theirs[key], rateTolerance(mine[key]));
	}
	const contact = mine.contactPoint;
	const away = (c: readonly [number, number] | null): number =>
		c ? Math.hypot(c[0] - contact[1], c[1] - contact[2]) : Infinity;
	for (const key of ['instantCentreFront', 'instantCentreByArms'] as const) {
		for (const i of [0, 1] as const) {
			found.centre(`${key}[${i}]`, mine[key]?.[i] ?? null, theirs[key]?.[i] ?? null, away(mine[key]));
		}
	}
	found.centre('swingArmFront', mine.swingArmFront, theirs.swingArmFront, away(mine.instantCentreFront));
	const slope = mine.contactVelocity[1] / mine.contactVelocity[2];
	found.number(
		'rollCentreHeight',
		mine.rollCentreHeight,
		theirs.rollCentreHeight,
		Math.abs(contact[1]) * rateTolerance(slope)
	);
	const byArms = mine.rollCentreByArms ?? 0;
	found.number('rollCentreByArms', mine.rollCentreByArms, theirs.rollCentreByArms, LENGTH + 1e-6 * Math.abs(byArms));
	const perSlope = mine.antiDive === null || mine.diveSlope === 0 ? 0 : Math.abs(mine.antiDive / mine.diveSlope);
	found.number('antiDive', mine.antiDive, theirs.antiDive, perSlope * rateTolerance(mine.diveSlope));
	compareSpring(found, mine, theirs);
	return found.list;
}

function compareSpring(found: Findings, mine: Outside, theirs: KernelState): void {
	found.number('motionRatio', mine.motionRatio, theirs.motionRatio, rateTolerance(mine.motionRatio ?? 0));
	const { motionRatio: ratio, motionRatioRate: second, springForce: force, wheelRate: rate } = mine;
	if (ratio === null || second === null || force === null || rate === null) {
		found.number('wheelRate', rate, theirs.wheelRate, 0);
		return;
	}
	// The spring's own rate times the square of the ratio is what is left of the wheel rate without the force's part.
	const first = Math.abs((rate - force * second) / (ratio * ratio || 1));
	const off = 2 * first * Math.abs(ratio) * rateTolerance(ratio) + Math.abs(force) * rateTolerance(second) + 1e-9;
	found.number('wheelRate', rate, theirs.wheelRate, off);
	for (const key of ['rideFrequency', 'rideFrequencyOnTyre'] as const) {
		const value = mine[key];
		// Near zero stiffness the root has no slope to speak of, and just below there is no frequency.
		if (rate < 1e-3 && value !== null) continue;
		found.number(key, value, theirs[key], value === null ? 0 : (value * off) / rate + 1e-12);
	}
}
