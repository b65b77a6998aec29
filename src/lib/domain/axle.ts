import { canonicalize } from 'json-canonicalize';
import type { AxleGeometry, CoiloverGeometry, CornerGeometry, Vec3, VehicleData } from '../kinematics';
import { AXLE_POINTS, AXLE_SCHEMA, axleSchema } from '../schemas/axle';
import type { AlignTarget, AxleDocument, CornerEntry, PointEntry, VehicleEntry } from '../schemas/axle';
import { DATUM_AXES, PLACE_OF } from './datum';
import type { Side } from './datum';
import { POINTS, entryOf, pathOf } from './points';
import type { PointKey } from './points';

/** Something that still has to be typed. `path` is its field, `label` its name with the coordinates that lack. */
export interface Missing {
	path: string;
	label: string;
}

/** A document that cannot be read: written by a newer version, or not an axle. `fields` names what is wrong. */
export class AxleDocumentError extends Error {
	constructor(
		readonly code: 'newer' | 'invalid',
		message: string,
		readonly fields: readonly { field: string; message: string }[] = []
	) {
		super(message);
		this.name = 'AxleDocumentError';
	}
}

const noEntry = (): PointEntry => [null, null, null];
const noTarget = (): AlignTarget => ({ camber: null, caster: null, toe: null });

function emptyCorner(): CornerEntry {
	const points = Object.fromEntries(AXLE_POINTS.map((name) => [name, noEntry()])) as CornerEntry['points'];
	return { points, wheel: { track: null, x: 0, loadedRadius: null, camber: 0, toe: 0 }, coilover: null };
}

/** A coil-over of which nothing is typed yet. */
export function emptyCoilover(): NonNullable<CornerEntry['coilover']> {
	return {
		top: noEntry(),
		bottom: noEntry(),
		on: 'lowerArm',
		rate: null,
		forceAtRide: null,
		openLength: null,
		closedLength: null
	};
}

/**
 * A document of which nothing is typed yet: shims that move the upper pivots outboard, no targets. Thickest pack and
 * front-to-rear difference are within what service manuals give (8 to 19 mm, 3 to 10 mm by make).
 */
export function emptyAxle(): AxleDocument {
	return {
		schema: AXLE_SCHEMA,
		left: emptyCorner(),
		right: 'mirror',
		vehicle: {
			wheelbase: null,
			cgHeight: null,
			frontBrakeShare: null,
			frontBrakes: 'upright',
			sprungCornerMass: null,
			tyreRate: null
		},
		adjusters: {
			upper: {
				kind: 'shim',
				side: 'outboard',
				direction: [0, 1, 0],
				frontNow: 0,
				rearNow: 0,
				boltReserve: null,
				maxPack: 12,
				maxDifference: 6
			},
			tieRod: { thread: '5/8-18', fitting: 'rodEnd', flats: 6 }
		},
		targets: [],
		alignment: { left: noTarget(), right: noTarget() }
	};
}

/** What turns a document of schema n into one of n + 1, by n. Stored bytes are never rewritten; reading goes through here. */
const UPGRADES: Readonly<Record<number, (older: Record<string, unknown>) => Record<string, unknown>>> = {};

/**
 * A stored or received document in the current schema.
 * @throws AxleDocumentError in words, where it is newer than this version or is no axle document
 */
export function upgradeAxle(json: unknown): AxleDocument {
	const isObject = typeof json === 'object' && json !== null && !Array.isArray(json);
	let document = isObject ? (json as Record<string, unknown>) : {};
	const written = document.schema;
	if (typeof written !== 'number' || !Number.isInteger(written) || written < 1) {
		throw new AxleDocumentError('invalid', 'This is not an axle document: it does not say its schema.', [
			{ field: 'schema', message: `Schema: a whole number from 1 to ${AXLE_SCHEMA}.` }
		]);
	}
	if (written > AXLE_SCHEMA) {
		throw new AxleDocumentError(
			'newer',
			`This geometry was written by a newer version (schema ${written}; this one reads up to ${AXLE_SCHEMA}). Update this installation to open it.`
		);
	}
	for (let schema = written; schema < AXLE_SCHEMA; schema += 1) document = UPGRADES[schema]?.(document) ?? document;
	const read = axleSchema.safeParse(document);
	if (read.success) return read.data;
	const fields = read.error.issues.map(({ path, message }) => ({ field: path.join('.'), message }));
	throw new AxleDocumentError(
		'invalid',
		`This axle document cannot be read: ${fields[0]?.message ?? 'unknown'}`,
		fields
	);
}

/** The words of the coordinates a point still lacks: "out and up", or none. */
function lacking(entry: Readonly<PointEntry>): string {
	const axes = DATUM_AXES.filter((axis) => entry[PLACE_OF[axis]] === null);
	return axes.length === 3 ? 'all three coordinates' : axes.join(' and ');
}

const isWhole = (entry: Readonly<PointEntry>): entry is [number, number, number] => !entry.includes(null);

function missingPoint(side: Side, key: PointKey, entry: Readonly<PointEntry>): Missing | null {
	if (isWhole(entry)) return null;
	const name = POINTS[key].name;
	return { path: pathOf(side, key), label: `${name[0]?.toUpperCase()}${name.slice(1)}: ${lacking(entry)}` };
}

function missingOf(corner: CornerEntry, side: Side): Missing[] {
	const points = AXLE_POINTS.map((name) => missingPoint(side, name, corner.points[name]));
	const wheel = [
		corner.wheel.track === null ? { path: `${side}.wheel.track`, label: 'Track' } : null,
		corner.wheel.loadedRadius === null ? { path: `${side}.wheel.loadedRadius`, label: 'Loaded radius' } : null
	];
	return [...points, ...wheel].filter((entry) => entry !== null);
}

/** What the coil-over still lacks; without it the corner is solved as if it had none. */
export function missingCoilover(corner: CornerEntry, side: Side = 'left'): Missing[] {
	return (['coiloverTop', 'coiloverBottom'] as const).flatMap((key) => {
		const entry = entryOf(corner, key);
		return (entry && missingPoint(side, key, entry)) ?? [];
	});
}

function coiloverOf({ coilover }: CornerEntry): CoiloverGeometry | null {
	if (!coilover || !isWhole(coilover.top) || !isWhole(coilover.bottom)) return null;
	return { ...coilover, top: coilover.top, bottom: coilover.bottom };
}

/** One corner for the kernel, or what still has to be typed for it. A coil-over that is half typed is left out. */
export function toGeometry(
	corner: CornerEntry,
	vehicle: VehicleEntry,
	side: Side = 'left'
): { geometry: CornerGeometry } | { missing: Missing[] } {
	const missing = missingOf(corner, side);
	const { track, loadedRadius, x, camber, toe } = corner.wheel;
	if (missing.length > 0 || track === null || loadedRadius === null) return { missing };
	const points = corner.points as Record<keyof CornerEntry['points'], Vec3>;
	const facts: VehicleData = vehicle;
	return {
		geometry: { points, wheel: { track, x, loadedRadius, camber, toe }, coilover: coiloverOf(corner), vehicle: facts }
	};
}

/**
 * The axle for the kernel: one corner where the right mirrors the left, both where it does not; `left` is always the
 * left corner. Or what still has to be typed, both sides, the right side's labels beginning with it.
 */
export function axleGeometry(
	document: AxleDocument
): { axle: AxleGeometry; left: CornerGeometry } | { missing: Missing[] } {
	const left = toGeometry(document.left, document.vehicle, 'left');
	if (document.right === 'mirror') {
		return 'missing' in left ? left : { axle: left.geometry, left: left.geometry };
	}
	const right = toGeometry(document.right, document.vehicle, 'right');
	if ('missing' in left || 'missing' in right) {
		const ofRight = 'missing' in right ? right.missing : [];
		return {
			missing: [
				...('missing' in left ? left.missing : []),
				...ofRight.map(({ path, label }) => ({
					path,
					label: `Right side, ${label[0]?.toLowerCase()}${label.slice(1)}`
				}))
			]
		};
	}
	return { axle: { left: left.geometry, right: right.geometry }, left: left.geometry };
}

/** The right corner of an axle for the kernel: the mirror image of the left where it has none of its own. */
export function rightCorner(axle: AxleGeometry): CornerGeometry {
	if ('right' in axle) return axle.right;
	const across = ([x, y, z]: Vec3): Vec3 => [x, 0 - y, z];
	const points = Object.fromEntries(AXLE_POINTS.map((name) => [name, across(axle.points[name])]));
	const coilover = axle.coilover && {
		...axle.coilover,
		top: across(axle.coilover.top),
		bottom: across(axle.coilover.bottom)
	};
	return { ...axle, points: points as Record<keyof CornerEntry['points'], Vec3>, coilover };
}

function refuseNonFinite(value: unknown, path: string): void {
	if (typeof value === 'number' && !Number.isFinite(value)) {
		throw new AxleDocumentError('invalid', `${path} is not a number that can be kept.`, [
			{ field: path, message: 'A finite number.' }
		]);
	}
	if (typeof value !== 'object' || value === null) return;
	for (const [key, inner] of Object.entries(value)) refuseNonFinite(inner, path === '' ? key : `${path}.${key}`);
}

/**
 * The one spelling of a document: JSON by RFC 8785 (keys sorted, numbers as ECMAScript writes them, −0 as 0). These bytes
 * are stored and hashed.
 * @throws AxleDocumentError where a number is not finite
 */
export function canonicalAxle(document: AxleDocument): string {
	refuseNonFinite(document, '');
	return canonicalize(document);
}

/** SHA-256 of the canonical bytes, 64 hex digits: what a revision is named by. */
export async function axleHash(document: AxleDocument): Promise<string> {
	const bytes = new TextEncoder().encode(canonicalAxle(document));
	const digest = await crypto.subtle.digest('SHA-256', bytes);
	return Array.from(new Uint8Array(digest), (byte) => byte.toString(16).padStart(2, '0')).join('');
}
