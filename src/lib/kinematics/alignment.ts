import { vec3 } from 'gl-matrix';
import { KinematicsError } from './errors';
import { evaluateAt } from './evaluate';
import type { CornerGeometry, Vec3 } from './geometry';
import * as at from './layout';
import { adjust, prepare, type Setting } from './prepare';
import type { Prepared } from './prepared';
import { CornerState } from './state';

/**
 * What the upper arm is adjusted by. `pivotShift` (shims): its two pivots move along `direction`, told in the axes of a
 * left corner (default +y, outboard; its length does not count; a right corner takes its mirror) and the legs keep their
 * lengths. `legLength` (rod ends): the leg from a pivot to the ball joint grows and the pivots stay.
 */
export type Adjusters = { readonly kind: 'pivotShift'; readonly direction?: Vec3 } | { readonly kind: 'legLength' };

/** Movement at the upper arm's front and rear, and growth of the tie rod, mm. */
export interface AlignmentMoves {
	readonly front: number;
	readonly rear: number;
	readonly tieRod: number;
}

/** How the car stands while it is measured. */
export interface Stance {
	/** Wheel-centre travel of the corner as entered at which the car stands, mm, bump +, 0 by default. */
	readonly travel?: number;
	/** Nose-down rake of the body to the road, degrees: caster to the road = caster in the body − rake. */
	readonly rake?: number;
}

/** A corner ready to be adjusted: as entered, and the ground it stands on. */
export interface Bench {
	readonly entered: Prepared;
	readonly adjusters: Adjusters;
	/** z of the ground in the body's axes, mm. */
	readonly ground: number;
	/** Where the search for the standing height starts, mm of travel. */
	readonly travel: number;
}

/** The contact point is on the ground when it is this near, as a part of the corner's size. */
const ON_GROUND = 1e-13;
const MOST_STEPS = 50;

function settingOf(entered: Prepared, adjusters: Adjusters, moves: AlignmentMoves): Setting {
	const { upperFront, upperRear } = entered.geometry.points;
	const { front, rear, tieRod } = moves;
	if (adjusters.kind === 'legLength') return { upperFront, upperRear, frontLeg: front, rearLeg: rear, tieRod };
	const along = vec3.normalize([0, 0, 0], adjusters.direction ?? [0, 1, 0]);
	const shifted = (pivot: Vec3, by: number): Vec3 => [
		pivot[0] + by * along[0],
		pivot[1] + by * along[1],
		pivot[2] + by * along[2]
	];
	return {
		upperFront: shifted(upperFront, front),
		upperRear: shifted(upperRear, rear),
		frontLeg: 0,
		rearLeg: 0,
		tieRod
	};
}

function checkAdjusters(adjusters: Adjusters): void {
	if (adjusters.kind !== 'pivotShift' && adjusters.kind !== 'legLength') {
		throw new KinematicsError('degenerate', 'adjusters', 'The adjusters must be of kind pivotShift or legLength.');
	}
	if (adjusters.kind === 'legLength' || adjusters.direction === undefined) return;
	const length = Math.hypot(...adjusters.direction);
	if (!Number.isFinite(length)) {
		throw new KinematicsError('not-finite', 'direction', 'The direction of the shift is not three numbers.');
	}
	if (!(length > 0)) {
		throw new KinematicsError('degenerate', 'direction', 'The direction of the shift must not be 0, 0, 0.');
	}
}

function checkStance({ travel = 0, rake = 0 }: Stance): void {
	if (!Number.isFinite(travel)) {
		throw new KinematicsError('not-finite', 'travel', 'The standing height is not a number: give it in mm of travel.');
	}
	if (!Number.isFinite(rake)) {
		throw new KinematicsError(
			'not-finite',
			'rake',
			'The rake is not a number: give it in degrees, nose down positive.'
		);
	}
}

/** The entered corner standing on its ground, rack 0. @throws KinematicsError */
export function standing(geometry: CornerGeometry, adjusters: Adjusters, stance: Stance): Bench {
	checkAdjusters(adjusters);
	checkStance(stance);
	const entered = prepare(geometry);
	const travel = stance.travel ?? 0;
	const row = new Float64Array(at.STATE_LENGTH);
	evaluateAt(entered, travel, 0, row, 0);
	return { entered, adjusters, ground: row[at.CONTACT + 2] as number, travel };
}

/**
 * The corner in an adjustment with the body held and the contact point on the ground: Newton on the travel; the contact
 * point's rise per mm of it is 1 + r·s_z·s_z'/√(1 − s_z²).
 * @throws KinematicsError `out-of-reach`
 */
export function adjusted({ entered, adjusters, ground, travel }: Bench, moves: AlignmentMoves): CornerState {
	const p = adjust(entered, settingOf(entered, adjusters, moves));
	const row = new Float64Array(at.STATE_LENGTH);
	const enough = ON_GROUND * (p.size + Math.abs(p.wheelHeight));
	let height = travel;
	for (let step = 0; step < MOST_STEPS; step++) {
		evaluateAt(p, height, 0, row, 0);
		const gap = (row[at.CONTACT + 2] as number) - ground;
		if (Math.abs(gap) <= enough) break;
		const [sx, sy, sz] = [row[at.SPIN] as number, row[at.SPIN + 1] as number, row[at.SPIN + 2] as number];
		const tilt = (row[at.TURN] as number) * sy - (row[at.TURN + 1] as number) * sx;
		const next = height - gap / (1 + (p.radius * sz * tilt) / Math.sqrt(1 - sz * sz));
		if (next === height) break;
		height = next;
	}
	return new CornerState(p, row, 0);
}

/**
 * The corner after its upper arm and tie rod have been adjusted: body held at its height, contact point on the ground,
 * rack 0. The state's `travel` is the resulting shift of the wheel centre. The legs keep the lengths they have, so a
 * pair of pivots moved apart stretches the pivot shaft by the little the geometry asks (under 0.01 mm for 2 mm of shim).
 * @throws KinematicsError
 */
export function applyAlignment(
	geometry: CornerGeometry,
	adjusters: Adjusters,
	moves: AlignmentMoves,
	stance: Stance = {}
): CornerState {
	const { front, rear, tieRod } = moves;
	for (const [name, value] of Object.entries({ front, rear, tieRod })) {
		if (!Number.isFinite(value)) {
			throw new KinematicsError('not-finite', name, `The movement \`${name}\` is not a number: give it in mm.`);
		}
	}
	return adjusted(standing(geometry, adjusters, stance), moves);
}
