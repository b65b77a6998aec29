import { formatExact, formatQuantity, unitLabel } from '$lib/format';
import type { SweepRange } from '$lib/kinematics';
import { parseLength } from '$lib/parse';
import type { Preferences } from '$lib/schemas/preferences';
import { MM_PER_INCH } from '$lib/units';

/** What the travel page accepts: how far each way and how fine, mm, and how many states at most. */
export const FARTHEST_MM = 400;
export const FINEST_MM = 0.1;
export const MOST_STATES = 401;

export type RangeField = 'from' | 'to' | 'step';
export const RANGE_FIELDS: readonly RangeField[] = ['from', 'to', 'step'];
export type RangeErrors = Partial<Record<RangeField, string>>;
export type ReadRange = { ok: true; range: SweepRange } | { ok: false; errors: RangeErrors };

type Writing = Pick<Preferences, 'length' | 'inches' | 'numbers' | 'angle' | 'force'>;

/** What the page opens with: ±75 mm by 5, or ±3 in by a quarter. */
export function usualRange({ length }: Pick<Preferences, 'length'>): SweepRange {
	return length === 'mm'
		? { from: -75, to: 75, step: 5 }
		: { from: -3 * MM_PER_INCH, to: 3 * MM_PER_INCH, step: MM_PER_INCH / 4 };
}

/** How many states a sweep over a range has, both ends counted. */
export function statesIn({ from, to, step }: SweepRange): number {
	const steps = (to - from) / step;
	const whole = Math.floor(steps + 1e-9);
	return whole + 1 + (steps - whole > 1e-9 ? 1 : 0);
}

/** What is wrong with a range, in the person's units, by field; empty where it is accepted. mm. */
export function rangeErrors({ from, to, step }: SweepRange, preferences: Writing): RangeErrors {
	const shown = (mm: number) => formatQuantity(mm, 'length', preferences);
	const unit = unitLabel('length', preferences);
	const farthest = shown(FARTHEST_MM);
	const errors: RangeErrors = {};
	if (!(from <= 0 && from >= -FARTHEST_MM)) errors.from = `Droop: from 0 to ${farthest} ${unit} below ride height.`;
	if (!(to >= 0 && to <= FARTHEST_MM)) errors.to = `Bump: from 0 to ${farthest} ${unit} above ride height.`;
	if (!(step >= FINEST_MM)) errors.step = `Step: ${shown(FINEST_MM)} ${unit} or more.`;
	if (errors.from || errors.to || errors.step) return errors;
	const span = to - from;
	if (span < 1) return { to: `Travel: at least ${shown(1)} ${unit} from droop to bump.` };
	if (step > span) return { step: `Step: at most the whole travel, ${shown(span)} ${unit}.` };
	const count = statesIn({ from, to, step });
	if (count <= MOST_STATES) return {};
	// Rounded up to what is shown, so that typing what is said is accepted.
	const inch = preferences.inches === 'fraction' ? MM_PER_INCH / 32 : MM_PER_INCH / 1000;
	const decimals = preferences.length === 'in' ? inch : 0.1;
	const least = Math.ceil(span / (MOST_STATES - 1) / decimals - 1e-9) * decimals;
	return {
		step: `${count} positions are too many: a step of ${shown(least)} ${unit} or more keeps to ${MOST_STATES}.`
	};
}

/** Typed texts as a range, mm. A droop typed without its sign is taken as droop. */
export function readRange(texts: Record<RangeField, string>, preferences: Writing): ReadRange {
	const errors: RangeErrors = {};
	const read = (field: RangeField): number => {
		const answer = parseLength(texts[field], preferences);
		if (answer.ok) return answer.mm;
		errors[field] = answer.message;
		return NaN;
	};
	const [from, to, step] = [read('from'), read('to'), read('step')];
	if (Object.keys(errors).length > 0) return { ok: false, errors };
	const range = { from: -Math.abs(from) + 0, to, step };
	const wrong = rangeErrors(range, preferences);
	return Object.keys(wrong).length > 0 ? { ok: false, errors: wrong } : { ok: true, range };
}

/** A range as its fields show it. */
export function rangeTexts(range: SweepRange, preferences: Preferences): Record<RangeField, string> {
	const exact = (mm: number) => formatExact(mm, 'length', preferences).replace('-', '\u2212');
	return { from: exact(range.from), to: exact(range.to), step: exact(range.step) };
}
