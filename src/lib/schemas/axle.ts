import { z } from 'zod';

/** Version of the document this application writes. */
export const AXLE_SCHEMA = 1;

/** The eight hardpoints of a corner, in the order in which a table shows them. */
export const AXLE_POINTS = [
	'upperFront',
	'upperRear',
	'upperBall',
	'lowerFront',
	'lowerRear',
	'lowerBall',
	'tieRodInner',
	'tieRodOuter'
] as const;

/** Farthest a coordinate may lie from the origin, mm. */
export const FAR_MM = 10_000;

/** A number within limits; the message names what is meant and what is accepted. */
function within(label: string, low: number, high: number, unit: string) {
	const [from, to] = [low, high].map((end) => String(end).replace('-', '−'));
	const message = `${label}: a number from ${from} to ${to}${unit ? ` ${unit}` : ''}.`;
	return z.number({ error: message }).min(low, message).max(high, message);
}

/** As `within`, or null while it has not been typed. */
function entry(label: string, low: number, high: number, unit: string) {
	return within(label, low, high, unit).nullable();
}

function pointEntry(name: string) {
	const axis = (word: string) => entry(`${name}, ${word}`, -FAR_MM, FAR_MM, 'mm');
	return z.tuple([axis('fore'), axis('out'), axis('up')], { error: `${name}: three coordinates in mm.` });
}

const points = z.strictObject({
	upperFront: pointEntry('Upper arm, front pivot'),
	upperRear: pointEntry('Upper arm, rear pivot'),
	upperBall: pointEntry('Upper ball joint'),
	lowerFront: pointEntry('Lower arm, front pivot'),
	lowerRear: pointEntry('Lower arm, rear pivot'),
	lowerBall: pointEntry('Lower ball joint'),
	tieRodInner: pointEntry('Inner tie-rod joint'),
	tieRodOuter: pointEntry('Outer tie-rod joint')
});

const wheel = z.strictObject({
	track: entry('Track', 300, 4000, 'mm'),
	x: within('Wheel, fore', -FAR_MM, FAR_MM, 'mm'),
	loadedRadius: entry('Loaded radius', 50, 1000, 'mm'),
	camber: within('Static camber', -20, 20, '°'),
	toe: within('Static toe', -20, 20, '°')
});

const coilover = z.strictObject({
	top: pointEntry('Coil-over, top'),
	bottom: pointEntry('Coil-over, bottom'),
	on: z.enum(['lowerArm', 'upperArm', 'upright'], { error: 'Coil-over on: lowerArm, upperArm or upright.' }),
	rate: entry('Spring rate', 0, 10_000, 'N/mm'),
	forceAtRide: entry('Spring force at ride height', -100_000, 1_000_000, 'N'),
	openLength: entry('Coil-over, open length', 0, 5000, 'mm'),
	closedLength: entry('Coil-over, closed length', 0, 5000, 'mm')
});

export const cornerSchema = z.strictObject({ points, wheel, coilover: coilover.nullable() });

export const vehicleSchema = z.strictObject({
	wheelbase: entry('Wheelbase', 500, 10_000, 'mm'),
	cgHeight: entry('Height of the centre of gravity', 50, 3000, 'mm'),
	frontBrakeShare: entry('Front brake share', 0, 1, ''),
	frontBrakes: z.enum(['upright', 'inboard'], { error: 'Front brakes: upright or inboard.' }),
	sprungCornerMass: entry('Sprung corner mass', 1, 20_000, 'kg'),
	tyreRate: entry('Tyre rate', 1, 10_000, 'N/mm')
});

const thread = z
	.string({ error: 'Thread: such as 5/8-18 or M16x1.5.' })
	.regex(/^[0-9A-Za-z./-]{1,20}$/, 'Thread: such as 5/8-18 or M16x1.5.');

/** Shims under the upper pivots. `side`: which way one more shim moves the pivot shaft. Packs are those the geometry was entered with, mm. */
const shimAdjuster = z.strictObject({
	kind: z.literal('shim'),
	side: z.enum(['outboard', 'inboard'], { error: 'A shim moves the pivot: outboard or inboard.' }),
	direction: z
		.tuple([
			within('Shim direction', -1, 1, ''),
			within('Shim direction', -1, 1, ''),
			within('Shim direction', -1, 1, '')
		])
		.refine((direction) => Math.hypot(...direction) > 0.1, 'Shim direction: fore, out and up, not all of them near 0.'),
	frontNow: within('Front pack now', 0, 100, 'mm'),
	rearNow: within('Rear pack now', 0, 100, 'mm'),
	boltReserve: entry('Thread left past the nut', 0, 200, 'mm'),
	maxPack: within('Thickest pack', 0, 100, 'mm'),
	maxDifference: within('Largest difference front to rear', 0, 100, 'mm')
});

/** Threaded legs of the upper arm. Engagement in mm of thread. */
const rodEndAdjuster = z.strictObject({
	kind: z.literal('rodEnd'),
	thread,
	fitting: z.enum(['throughBolt', 'sleeve'], { error: 'Rod end fitting: throughBolt or sleeve.' }),
	handedness: z.enum(['right', 'left'], { error: 'Thread: right or left hand.' }),
	engagementNow: entry('Thread engaged now', 0, 300, 'mm'),
	minEngagement: entry('Least thread engaged', 0, 300, 'mm')
});

export const adjustersSchema = z.strictObject({
	upper: z.discriminatedUnion('kind', [shimAdjuster, rodEndAdjuster]),
	tieRod: z.strictObject({ thread, fitting: z.enum(['rodEnd', 'sleeve']), flats: z.literal(6) })
});

/** Figures by the names of the registry of outputs; `bumpSteer` is toe against toe at ride height, over travel only. */
export const FIGURE_KEYS = [
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
	'wheelRate',
	'rideFrequency',
	'bumpSteer'
] as const;
export type FigureKey = (typeof FIGURE_KEYS)[number];

const figure = z.enum(FIGURE_KEYS, { error: 'Target: a figure of the list.' });
const bound = entry('Target', -1e6, 1e6, '');

const rideTarget = z.strictObject({ figure, at: z.literal('ride'), low: bound, high: bound });
const travelTarget = z.strictObject({
	figure,
	at: z.literal('travel'),
	from: within('Target, droop end', -500, 500, 'mm'),
	to: within('Target, bump end', -500, 500, 'mm'),
	measure: z.enum(['peak', 'range'], { error: 'Target over travel: peak or range.' }),
	low: bound,
	high: bound
});
export const targetSchema = z
	.discriminatedUnion('at', [rideTarget, travelTarget])
	.refine((target) => target.low !== null || target.high !== null, 'Target: a lower or an upper bound, or both.')
	.refine(
		(target) => target.low === null || target.high === null || target.low <= target.high,
		'Target: the lower bound first.'
	)
	.refine((target) => target.at === 'ride' || target.from < target.to, 'Target: travel from droop to bump.');

const wished = (label: string) =>
	z
		.strictObject({ value: within(label, -30, 30, '°'), tolerance: within(`${label}, tolerance`, 0.001, 10, '°') })
		.nullable();
const alignTarget = z.strictObject({
	camber: wished('Camber'),
	caster: wished('Caster'),
	toe: wished('Toe per wheel')
});

const MIRROR_OR_OWN = 'Right side: "mirror" or a corner of its own.';

/** The right side. A plain union would answer a wrong coordinate with "invalid input"; this names the coordinate. */
const rightSchema = z.unknown().transform((value, context): 'mirror' | z.infer<typeof cornerSchema> => {
	if (value === 'mirror') return value;
	const isCorner = typeof value === 'object' && value !== null;
	const read = isCorner ? cornerSchema.safeParse(value) : null;
	if (read?.success) return read.data;
	const issues = read?.error.issues ?? [{ path: [], message: MIRROR_OR_OWN }];
	for (const { path, message } of issues) context.addIssue({ code: 'custom', path: [...path], message });
	return z.NEVER;
});

/** One axle's geometry with what is wanted of it: the thing a draft holds and a revision keeps. mm, degrees, N/mm, kg. */
export const axleSchema = z.strictObject({
	schema: z.literal(AXLE_SCHEMA),
	left: cornerSchema,
	right: rightSchema,
	vehicle: vehicleSchema,
	adjusters: adjustersSchema,
	targets: z.array(targetSchema).max(60, 'Targets: at most 60.'),
	alignment: z.strictObject({ left: alignTarget, right: alignTarget })
});

export type Coordinate = number | null;
export type PointEntry = z.infer<typeof points>['upperFront'];
export type CornerEntry = z.infer<typeof cornerSchema>;
export type VehicleEntry = z.infer<typeof vehicleSchema>;
export type AdjusterEntry = z.infer<typeof adjustersSchema>;
export type Target = z.infer<typeof targetSchema>;
export type AlignTarget = z.infer<typeof alignTarget>;
export type AxleDocument = z.infer<typeof axleSchema>;
