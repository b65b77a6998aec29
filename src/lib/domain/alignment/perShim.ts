import { KinematicsError } from '../../kinematics';
import type { Shim } from '../../schemas/shims';
import { smallestStep, perTurn, threadOf } from './threads';
import { ANGLE_NAMES, changed, type Angles, type UpperAdjuster, type Wheel } from './wheel';

/** What one step more at a place does to this car, the tie rod left alone. Degrees; null where the linkage binds. */
export interface StepEffect {
	/** mm of pack or leg. */
	readonly growth: number;
	readonly front: Angles | null;
	readonly rear: Angles | null;
	readonly both: Angles | null;
}

/** Shims shown where the stock is empty: the two of which one is usual in inches and one in mm. */
const USUAL = [1, 25.4 / 16];

/** Thicknesses worth a row: those of the stock, thinnest first; for rod ends the half turn, or the turn of a sleeve. */
export function stepsOf(upper: UpperAdjuster, stock: readonly Shim[]): number[] {
	if (upper.kind === 'rodEnd') {
		const thread = threadOf(upper.thread);
		return thread ? [smallestStep(thread, upper.fitting) ?? perTurn(thread, upper.fitting)] : [];
	}
	const held = stock.filter((shim) => shim.count > 0).map((shim) => shim.thickness);
	return [...new Set(held.length > 0 ? held : USUAL)].sort((a, b) => a - b);
}

/** Degrees per shim (or half turn) at the front pivot, at the rear, and at both, from where the wheel stands. */
export function perStep(wheel: Wheel, growths: readonly number[]): StepEffect[] {
	return growths.map((growth) => ({
		growth,
		front: effect(wheel, growth, 0),
		rear: effect(wheel, 0, growth),
		both: effect(wheel, growth, growth)
	}));
}

function effect(wheel: Wheel, front: number, rear: number): Angles | null {
	try {
		const { angles } = changed(wheel, { front, rear, tieRod: 0 });
		const change = ANGLE_NAMES.map((name) => [name, angles[name] - wheel.now[name]] as const);
		return Object.fromEntries(change) as unknown as Angles;
	} catch (error) {
		if (error instanceof KinematicsError) return null;
		throw error;
	}
}
