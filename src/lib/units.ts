import type { Preferences } from './schemas/preferences';

/** Exact by definition (international inch and foot, 1959). */
export const MM_PER_INCH = 25.4;
export const MM_PER_FOOT = 304.8;
export const MM_PER_CM = 10;
export const MM_PER_M = 1000;
/** Exact: 0.45359237 kg (the pound) · 9.80665 m/s² (standard gravity). */
export const KG_PER_LB = 0.45359237;
export const STANDARD_GRAVITY = 9.80665;
export const N_PER_LBF = KG_PER_LB * STANDARD_GRAVITY;
/** A spring rate of 1 lb/in in N/mm. */
export const N_PER_MM_PER_LB_PER_IN = N_PER_LBF / MM_PER_INCH;
export const DEGREES_PER_RADIAN = 180 / Math.PI;
export const MINUTES_PER_DEGREE = 60;

/** What a number is. Stored as degrees, mm, °/mm, mm/mm, –, %, N/mm, Hz, N, kg. */
export const QUANTITIES = [
	'angle',
	'length',
	'anglePerLength',
	'lengthPerLength',
	'ratio',
	'percent',
	'rate',
	'frequency',
	'force',
	'mass'
] as const;
export type Quantity = (typeof QUANTITIES)[number];

/** What of a person's preferences decides a unit. Masses go with forces: kg with N, lb with lbf. */
export type UnitChoice = Pick<Preferences, 'length' | 'angle' | 'force'>;

/**
 * The shown number for one stored: angles stay degrees (degrees and minutes are a way of writing them); rates over travel are
 * shown per 10 mm or per inch, in minutes where angles are.
 */
function factor(quantity: Quantity, { length, angle, force }: UnitChoice): number {
	const inches = length === 'in';
	switch (quantity) {
		case 'length':
			return inches ? 1 / MM_PER_INCH : 1;
		case 'anglePerLength':
			return (inches ? MM_PER_INCH : 10) * (angle === 'minutes' ? MINUTES_PER_DEGREE : 1);
		case 'lengthPerLength':
			return inches ? 1 : 10;
		case 'rate':
			return force === 'lbf' ? 1 / N_PER_MM_PER_LB_PER_IN : 1;
		case 'force':
			return force === 'lbf' ? 1 / N_PER_LBF : 1;
		case 'mass':
			return force === 'lbf' ? 1 / KG_PER_LB : 1;
		default:
			return 1;
	}
}

/** A stored value in the unit in which the person reads it. */
export function toDisplay(stored: number, quantity: Quantity, units: UnitChoice): number {
	if (quantity === 'length' && units.length === 'in') return stored / MM_PER_INCH;
	return stored * factor(quantity, units);
}

/** A value in the person's unit as it is stored. Inverse of `toDisplay`. */
export function fromDisplay(shown: number, quantity: Quantity, units: UnitChoice): number {
	if (quantity === 'length' && units.length === 'in') return shown * MM_PER_INCH;
	return shown / factor(quantity, units);
}

/**
 * Toe of one wheel as a length: how much nearer the rim's front edge is than its rear edge, over the diameter at which it is
 * measured. Exact for a flat disc: D · sin(toe).
 */
export function toeAsLength(toeDegrees: number, diameterMm: number): number {
	return diameterMm * Math.sin(toeDegrees / DEGREES_PER_RADIAN);
}

/** Toe of one wheel in degrees from the length over a diameter, or null where the length is longer than the diameter. */
export function toeFromLength(lengthMm: number, diameterMm: number): number | null {
	const sine = lengthMm / diameterMm;
	return Math.abs(sine) <= 1 ? Math.asin(sine) * DEGREES_PER_RADIAN : null;
}
