import type { CornerState, FigureName } from '../kinematics';
import { FIGURE_KEYS } from '../schemas/axle';
import type { FigureKey } from '../schemas/axle';
import type { Quantity } from '../units';

export type { FigureKey };

/** A figure as it is named, signed and read everywhere: tables, curves, targets, sheets. */
export interface Output {
	readonly key: FigureKey;
	readonly label: string;
	/** For a narrow column or the end of a curve. */
	readonly short: string;
	readonly quantity: Quantity;
	/** What the sign means, one sentence. */
	readonly sign: string;
	/** What has to be entered beside the eight points and the wheel, or null. */
	readonly needs: string | null;
	/** Only over travel: at ride height it is 0 by its definition. */
	readonly curveOnly: boolean;
	/** The figure of a state, in the stored unit; null where it does not exist. `ride` is the same corner at ride height. */
	read(state: CornerState, ride?: CornerState): number | null;
}

type Plain = Exclude<FigureKey, 'bumpSteer'>;
type Entry = readonly [label: string, short: string, quantity: Quantity, sign: string, needs?: string];

const COILOVER = 'the coil-over';
const SPRING = 'the coil-over with its spring rate and force at ride height';

/** Signs and definitions as in the kernel's README. */
const ENTRIES: Readonly<Record<Plain & FigureName, Entry>> = {
	camber: ['Camber', 'camber', 'angle', 'Negative: the top of the wheel leans inboard.'],
	toe: ['Toe per wheel', 'toe', 'angle', 'Positive: toe-in, one wheel.'],
	caster: ['Caster', 'caster', 'angle', 'Positive: the top of the steering axis leans rearward.'],
	kpi: ['Kingpin inclination', 'KPI', 'angle', 'Positive: the top of the steering axis leans inboard.'],
	includedAngle: ['Included angle', 'included', 'angle', 'Kingpin inclination plus camber.'],
	scrubRadius: [
		'Scrub radius',
		'scrub',
		'length',
		'Positive: the steering axis meets the ground inboard of the contact point.'
	],
	mechanicalTrail: [
		'Mechanical trail',
		'trail',
		'length',
		'Positive: the steering axis meets the ground ahead of the contact point.'
	],
	kingpinOffsetAtHub: [
		'Kingpin offset at the hub',
		'hub offset',
		'length',
		'Positive: the steering axis passes inboard of the wheel centre.'
	],
	trailAtHub: [
		'Trail at the hub',
		'hub trail',
		'length',
		'Positive: the steering axis passes ahead of the wheel centre.'
	],
	camberRate: ['Camber gain', 'camber gain', 'anglePerLength', 'Negative: the top leans further inboard in bump.'],
	toeRate: ['Bump steer at this height', 'bump steer', 'anglePerLength', 'Positive: the wheel toes in as it rises.'],
	casterRate: ['Caster change', 'caster change', 'anglePerLength', 'Positive: caster grows in bump.'],
	rollCentreHeight: ['Roll centre height', 'roll centre', 'length', 'Above the contact point; negative: below ground.'],
	rollCentreByArms: [
		'Roll centre by the arms',
		'by arms',
		'length',
		'From the lines of the arms, the steering left out; above the contact point.'
	],
	swingArmFront: [
		'Swing arm, front view',
		'swing arm',
		'length',
		'Horizontal; positive: the instant centre lies inboard.'
	],
	halfTrack: [
		'Half-track change',
		'half-track',
		'length',
		'Against ride height; positive: the contact point has moved outboard.'
	],
	halfTrackRate: [
		'Half-track change at this height',
		'half-track rate',
		'lengthPerLength',
		'Positive: the contact point moves outboard in bump.'
	],
	antiDive: [
		'Anti-dive',
		'anti-dive',
		'percent',
		'Positive: the contact point moves forward in bump.',
		'wheelbase, height of the centre of gravity and front brake share'
	],
	motionRatio: [
		'Motion ratio',
		'motion ratio',
		'ratio',
		'Spring movement per wheel movement; below 1 as a rule.',
		COILOVER
	],
	wheelRate: ['Wheel rate', 'wheel rate', 'rate', 'At the wheel centre; positive: the force grows in bump.', SPRING],
	rideFrequency: [
		'Ride frequency',
		'ride frequency',
		'frequency',
		'Undamped, the tyre left out; never negative.',
		`${SPRING}, and the sprung corner mass`
	]
};

function plainOutput(key: Plain, [label, short, quantity, sign, needs]: Entry): Output {
	return {
		key,
		label,
		short,
		quantity,
		sign,
		needs: needs ?? null,
		curveOnly: false,
		read: (state) => finite(state[key])
	};
}

function finite(value: number | null): number | null {
	return value !== null && Number.isFinite(value) ? value : null;
}

const BUMP_STEER: Output = {
	key: 'bumpSteer',
	label: 'Bump steer',
	short: 'bump steer',
	quantity: 'angle',
	sign: 'Toe per wheel against toe at ride height; positive: toes in.',
	needs: null,
	curveOnly: true,
	read: (state, ride) => (ride ? finite(state.toe - ride.toe) : null)
};

/** Every figure by its key. */
export const OUTPUTS: Readonly<Record<FigureKey, Output>> = Object.fromEntries(
	FIGURE_KEYS.map((key) => [key, key === 'bumpSteer' ? BUMP_STEER : plainOutput(key, ENTRIES[key])])
) as Record<FigureKey, Output>;

/** The figures in the order in which they are listed. */
export const OUTPUT_LIST: readonly Output[] = FIGURE_KEYS.map((key) => OUTPUTS[key]);

/** Why a figure is absent from a state, in words, or null where it is there. */
export function reasonOf(key: FigureKey, state: CornerState): string | null {
	if (OUTPUTS[key].read(state, state) !== null) return null;
	const { needs } = OUTPUTS[key];
	const told = key === 'bumpSteer' ? undefined : state.reasons[key];
	return told ?? (needs ? `Needs ${needs}.` : 'It does not exist in this position.');
}
