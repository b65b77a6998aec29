import type { Preferences } from './schemas/preferences';

/** What kind of number a figure is; decides its unit and decimals. Stored units stand beside each. */
export type Quantity =
	| 'length' // mm
	| 'angle' // °
	| 'anglePerLength' // °/mm
	| 'lengthPerLength' // mm/mm
	| 'ratio'
	| 'percent' // 0…100
	| 'rate' // N/mm
	| 'force' // N
	| 'mass' // kg
	| 'frequency'; // Hz

/** Exact by definition: international inch and pound, standard gravity (ISO 80000-3, -4). */
export const MM_PER_INCH = 25.4;
export const INCHES_PER_FOOT = 12;
export const KG_PER_POUND = 0.45359237;
export const NEWTONS_PER_POUND = KG_PER_POUND * 9.80665;
export const MINUTES_PER_DEGREE = 60;

/** A rate over travel is shown per this much travel: a figure per single millimetre is too small to read. */
const TRAVEL_STEP_MM = 10;

type UnitChoice = Pick<Preferences, 'length' | 'force'>;

/** Stored value × this = shown value. */
export function displayFactor(quantity: Quantity, { length, force }: UnitChoice): number {
	switch (quantity) {
		case 'length':
			return length === 'mm' ? 1 : 1 / MM_PER_INCH;
		case 'anglePerLength':
			return length === 'mm' ? TRAVEL_STEP_MM : MM_PER_INCH;
		case 'rate':
			return force === 'N' ? 1 : MM_PER_INCH / NEWTONS_PER_POUND;
		case 'force':
			return force === 'N' ? 1 : 1 / NEWTONS_PER_POUND;
		case 'mass':
			return force === 'N' ? 1 : 1 / KG_PER_POUND;
		default:
			return 1;
	}
}

/** A stored value in the person's unit, unrounded. */
export function toDisplay(value: number, quantity: Quantity, choice: UnitChoice): number {
	return value * displayFactor(quantity, choice);
}

/** A value in the person's unit as it is stored. */
export function fromDisplay(value: number, quantity: Quantity, choice: UnitChoice): number {
	return value / displayFactor(quantity, choice);
}

/** The unit as it stands beside a figure; empty for a bare ratio. */
export function unitLabel(quantity: Quantity, { length, force }: UnitChoice): string {
	switch (quantity) {
		case 'length':
			return length;
		case 'angle':
			return '°';
		case 'anglePerLength':
			return length === 'mm' ? '°/10 mm' : '°/in';
		case 'lengthPerLength':
			return length === 'mm' ? 'mm/mm' : 'in/in';
		case 'percent':
			return '%';
		case 'rate':
			return force === 'N' ? 'N/mm' : 'lb/in';
		case 'force':
			return force === 'N' ? 'N' : 'lb';
		case 'mass':
			return force === 'N' ? 'kg' : 'lb';
		case 'frequency':
			return 'Hz';
		default:
			return '';
	}
}
