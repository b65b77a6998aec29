import { OUTPUT_LIST, OUTPUTS } from '$lib/domain/outputs';
import { formatExact } from '$lib/format';
import { parseQuantity } from '$lib/parse';
import { targetSchema, type FigureKey, type Target } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';

/** A target while it is edited: numbers as typed, in the person's units. */
export interface TargetRow {
	id: number;
	figure: FigureKey;
	at: Target['at'];
	measure: 'peak' | 'range';
	from: string;
	to: string;
	low: string;
	high: string;
	errors: Partial<Record<TargetField, string>>;
}

export type TargetField = 'low' | 'high' | 'from' | 'to';

/** The middle 50 mm of travel, over which bump steer is usually judged (common practice, no source). */
const SPAN_MM = 25;

/** Figures a target may speak of at ride height, and over travel. */
export function figuresFor(at: Target['at']): readonly FigureKey[] {
	return OUTPUT_LIST.filter((output) => at === 'travel' || !output.curveOnly).map((output) => output.key);
}

/** A row for a target, or an empty one. */
export function rowOf(target: Target | null, id: number, preferences: Preferences): TargetRow {
	const figure = target?.figure ?? 'camber';
	const bound = (value: number | null) => formatExact(value, OUTPUTS[figure].quantity, preferences);
	const travel = (value: number) => formatExact(value, 'length', preferences);
	const over = target?.at === 'travel' ? target : { from: -SPAN_MM, to: SPAN_MM, measure: 'peak' as const };
	return {
		id,
		figure,
		at: target?.at ?? 'ride',
		measure: over.measure,
		from: travel(over.from),
		to: travel(over.to),
		low: bound(target?.low ?? null),
		high: bound(target?.high ?? null),
		errors: {}
	};
}

type ReadRow = { target: Target } | { errors: TargetRow['errors'] };

/** Reads a row: the target in stored units, or what is wrong with which field. */
export function readRow(row: TargetRow, preferences: Preferences): ReadRow {
	const errors: TargetRow['errors'] = {};
	const read = (field: TargetField, empties: boolean): number | null => {
		if (empties && row[field].trim() === '') return null;
		const quantity = empties ? OUTPUTS[row.figure].quantity : 'length';
		const parsed = parseQuantity(row[field], quantity, preferences);
		if (parsed.ok) return parsed.value;
		errors[field] = parsed.message;
		return null;
	};
	const bounds = { figure: row.figure, low: read('low', true), high: read('high', true) };
	const made =
		row.at === 'ride'
			? { ...bounds, at: 'ride' }
			: { ...bounds, at: 'travel', measure: row.measure, from: read('from', false), to: read('to', false) };
	if (Object.keys(errors).length > 0) return { errors };
	const checked = targetSchema.safeParse(made);
	if (checked.success) return { target: checked.data };
	const [issue] = checked.error.issues;
	const named = issue?.path[0];
	const field: TargetField = named === 'from' || named === 'to' || named === 'high' ? named : 'low';
	return { errors: { [field]: issue?.message ?? 'Target: a lower or an upper bound.' } };
}
