import { describeValue } from '$lib/components/draft/describe';
import { axisWord, DATUM_AXES, moveToDatum, type Datum, type DatumAxis } from '$lib/domain/datum';
import { changeInWords, diffAxles, type ChangedField, type MovedPoint } from '$lib/domain/difference';
import { POINTS } from '$lib/domain/points';
import { targetInWords } from '$lib/domain/targets';
import { formatDelta, formatQuantity, NONE } from '$lib/format';
import type { AxleDocument } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';

/** A point that moved, in the builder's datum and the person's units. */
export interface MovedRow {
	key: string;
	/** "upper ball joint", "right side, upper ball joint". */
	name: string;
	/** Signed displacement along each axis; a dash where the point does not move, or a place is not whole. */
	by: Record<DatumAxis, string>;
	/** The straight distance. */
	total: string;
	/** Why there is no displacement; null where there is. */
	reason: string | null;
}

/** What differs from one document to another, ready to be read. */
export interface Changes {
	moved: MovedRow[];
	/** Fields that are not points, and targets, one sentence each. */
	others: string[];
	same: boolean;
}

/** Less than this is rounding, mm. */
const STILL = 1e-6;

function movedRow(
	{ side, key, displacement, distance }: MovedPoint,
	datum: Datum,
	preferences: Preferences,
	sided: boolean
): MovedRow {
	const by = displacement && moveToDatum(displacement, datum, side);
	const shown = (axis: DatumAxis) =>
		by && Math.abs(by[axis]) > STILL ? formatDelta(by[axis], 'length', preferences) : NONE;
	const name = POINTS[key].name;
	return {
		key: `${side} ${key}`,
		name: sided ? `${side}, ${name}` : name,
		by: { out: shown('out'), up: shown('up'), fore: shown('fore') },
		total: formatQuantity(distance, 'length', preferences),
		reason: by ? null : 'One of the two places is not typed.'
	};
}

/** Words of the trade for what the document spells its own way; numbers as the registry writes them. */
function fieldInWords(field: ChangedField, preferences: Preferences): string {
	const worded = (value: number | string | null) =>
		typeof value === 'string' ? describeValue(field.path.split('.'), value, preferences) : value;
	return changeInWords({ ...field, before: worded(field.before), after: worded(field.after) }, preferences);
}

/** What differs from `before` to `after`. The side is named only where the two sides are told apart. */
export function changesBetween(
	before: AxleDocument,
	after: AxleDocument,
	datum: Datum,
	preferences: Preferences
): Changes {
	const { points, fields, targets, same } = diffAxles(before, after);
	const sided = points.some(({ side }) => side === 'right');
	return {
		moved: points.map((point) => movedRow(point, datum, preferences, sided)),
		others: [
			...fields.map((field) => fieldInWords(field, preferences)),
			...targets.removed.map((target) => `Target taken out: ${targetInWords(target, preferences)}`),
			...targets.added.map((target) => `Target set: ${targetInWords(target, preferences)}`)
		],
		same
	};
}

/** The columns of a table of moved points: out, up, and fore or aft as the builder has it. */
export const movedColumns = (datum: Datum): { axis: DatumAxis; word: string }[] =>
	DATUM_AXES.map((axis) => ({ axis, word: axisWord(axis, datum) }));
