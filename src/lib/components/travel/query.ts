import type { Side } from '$lib/domain/datum';
import { FIGURE_KEYS, type FigureKey } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';
import type { SweepRange } from '$lib/kinematics';
import { rangeErrors, usualRange, type RangeErrors } from './range';

/** The figures shown until others are chosen. */
export const USUAL_FIGURES: readonly FigureKey[] = [
	'camber',
	'bumpSteer',
	'caster',
	'rollCentreHeight',
	'halfTrack',
	'kpi',
	'scrubRadius',
	'mechanicalTrail',
	'motionRatio'
];

/** What the address says of a page over travel. Lengths in it are mm whatever the person reads, so that a link means the same to all. */
export interface TravelQuery {
	range: SweepRange;
	/** What is wrong with the range in the address; the usual one stands in. */
	errors: RangeErrors;
	figures: readonly FigureKey[];
	side: Side;
	/** Whether the previous revision lies under it. */
	under: boolean;
	/** Page of the table, from 1. */
	page: number;
}

const isFigure = (name: string): name is FigureKey => (FIGURE_KEYS as readonly string[]).includes(name);

function readSpan(search: URLSearchParams, preferences: Preferences): Pick<TravelQuery, 'range' | 'errors'> {
	const usual = usualRange(preferences);
	const number = (name: 'from' | 'to' | 'step') => {
		const text = search.get(name);
		return text === null || text.trim() === '' ? usual[name] : Number(text);
	};
	const range = { from: number('from'), to: number('to'), step: number('step') };
	const errors = rangeErrors(range, preferences);
	const told = Object.entries(errors).map(([field, message]) => [field, `The address is not followed. ${message}`]);
	return told.length > 0 ? { range: usual, errors: Object.fromEntries(told) as RangeErrors } : { range, errors };
}

/** Reads an address; what it does not say is as usual, what cannot be is told in `errors` or left out. */
export function readQuery(
	search: URLSearchParams,
	preferences: Preferences,
	usual: readonly FigureKey[] = USUAL_FIGURES
): TravelQuery {
	const named = (search.get('show') ?? '').split(',').filter(isFigure);
	const page = Number(search.get('page') ?? 1);
	return {
		...readSpan(search, preferences),
		figures: named.length > 0 ? FIGURE_KEYS.filter((key) => named.includes(key)) : usual,
		side: search.get('side') === 'right' ? 'right' : 'left',
		under: search.get('under') !== 'none',
		page: Number.isSafeInteger(page) && page > 0 ? page : 1
	};
}

const trimmed = (mm: number): string => String(Math.round(mm * 1e4) / 1e4);

/** The parameters of a range for the address. */
export const rangeParameters = ({ from, to, step }: SweepRange): Record<string, string> => ({
	from: trimmed(from),
	to: trimmed(to),
	step: trimmed(step)
});

/** A choice of figures for the address; null (left out) where it is the usual one. */
export function figuresParameter(
	chosen: readonly FigureKey[],
	usual: readonly FigureKey[] = USUAL_FIGURES
): string | null {
	const same = chosen.length === usual.length && chosen.every((key) => usual.includes(key));
	return same ? null : FIGURE_KEYS.filter((key) => chosen.includes(key)).join(',');
}

/** The address's query with some parameters set, or taken out (null); "" or "?…". Commas stay readable. */
export function withParameters(search: URLSearchParams, changes: Readonly<Record<string, string | null>>): string {
	const next = new URLSearchParams(search);
	for (const [name, value] of Object.entries(changes)) {
		if (value === null) next.delete(name);
		else next.set(name, value);
	}
	const text = next.toString().replaceAll('%2C', ',');
	return text === '' ? '' : `?${text}`;
}
