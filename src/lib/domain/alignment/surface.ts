import { KinematicsError } from '../../kinematics';
import type { PackSide } from './pack';
import { changedHoldingToe, type Wheel } from './wheel';

/** A target of the pack search: degrees on the gauge. */
export interface Aim {
	readonly value: number;
	readonly tolerance: number;
}

export interface SurfaceTask {
	readonly wheel: Wheel;
	/** Packs in the brackets now, mm. */
	readonly frontNow: number;
	readonly rearNow: number;
	readonly maxPack: number;
	readonly camber: Aim;
	readonly caster: Aim;
	/** Toe kept by the tie rod, degrees; null: the tie rod stays. */
	readonly toe: number | null;
}

/** Nodes each way. The figures are analytic over a box small against the arms: at seven the fit is true to about 1e-9°. */
const NODES = 7;
const MOST_HALVINGS = 5;

type Range = readonly [number, number];

/** One figure over the box of packs as a tensor of Chebyshev polynomials: `coefficients[front order][rear order]`. */
type Fit = readonly (readonly number[])[];

/**
 * How far a wheel is off its targets for any packs, from the kernel: camber and caster with toe held are computed at
 * Chebyshev nodes over the whole box of packs and interpolated between.
 * @returns null where no packs near the present ones can be assembled
 */
export function packSide(task: SurfaceTask): PackSide | null {
	let front: Range = [0, Math.max(task.maxPack, 1e-3)];
	let rear: Range = front;
	for (let halving = 0; halving <= MOST_HALVINGS; halving++) {
		const fits = fitOver(task, front, rear);
		if (fits) return sideOver(task, fits, front, rear);
		front = towards(front, task.frontNow);
		rear = towards(rear, task.rearNow);
	}
	return null;
}

/** Half the range, kept around the present pack: what the linkage cannot reach lies at the far ends. */
function towards([low, high]: Range, now: number): Range {
	const middle = Math.min(Math.max(now, low), high);
	return [middle - (middle - low) / 2, middle + (high - middle) / 2];
}

const nodes = Array.from({ length: NODES }, (_, i) => Math.cos((Math.PI * (i + 0.5)) / NODES));
const order = Array.from({ length: NODES }, (_, i) => i);
const fromUnit = ([low, high]: Range, x: number) => (low + high + x * (high - low)) / 2;
const toUnit = ([low, high]: Range, value: number) => (2 * value - low - high) / (high - low);

function fitOver(task: SurfaceTask, front: Range, rear: Range): readonly [Fit, Fit] | null {
	try {
		const angles = nodes.map((f) =>
			nodes.map((r) => {
				const by = [fromUnit(front, f) - task.frontNow, fromUnit(rear, r) - task.rearNow] as const;
				return changedHoldingToe(task.wheel, ...by, task.toe).angles;
			})
		);
		const of = (name: 'camber' | 'caster') => transform(angles.map((row) => row.map((at) => at[name])));
		return [of('camber'), of('caster')];
	} catch (error) {
		if (error instanceof KinematicsError) return null;
		throw error;
	}
}

/** Values at the nodes to coefficients, both ways: the discrete Chebyshev transform. */
function transform(values: readonly (readonly number[])[]): Fit {
	const once = (row: readonly number[]) =>
		order.map((k) => {
			const sum = row.reduce((total, value, i) => total + value * Math.cos((Math.PI * k * (i + 0.5)) / NODES), 0);
			return ((k === 0 ? 1 : 2) / NODES) * sum;
		});
	const alongRear = values.map(once);
	return transpose(transpose(alongRear).map(once));
}

function transpose(rows: readonly (readonly number[])[]): number[][] {
	return order.map((j) => rows.map((row) => row[j] ?? 0));
}

/** Σ c_k T_k(x), by Clenshaw's recurrence. */
function series(coefficients: readonly number[], x: number): number {
	let [one, two] = [0, 0];
	for (let k = coefficients.length - 1; k > 0; k--) [one, two] = [(coefficients[k] ?? 0) + 2 * x * one - two, one];
	return (coefficients[0] ?? 0) + x * one - two;
}

function sideOver(task: SurfaceTask, fits: readonly [Fit, Fit], front: Range, rear: Range): PackSide {
	const aims = [task.camber, task.caster] as const;
	const tall = fits.map(transpose);
	// |T_k'| ≤ k² on the interval (Markov), so this bounds the slope of the fit.
	const steepness = Math.max(
		...fits.map((fit, figure) => {
			const slope = fit.flat().reduce((sum, c, at) => sum + Math.abs(c) * (at % NODES) ** 2, 0);
			return (2 * slope) / (rear[1] - rear[0]) / (aims[figure]?.tolerance ?? 1);
		})
	);
	return {
		steepness,
		front,
		rear,
		along: (frontPack) => {
			const x = toUnit(front, frontPack);
			const [camber = [], caster = []] = tall.map((columns) => columns.map((column) => series(column, x)));
			return (rearPack) => {
				const y = toUnit(rear, rearPack);
				return Math.max(
					Math.abs(series(camber, y) - task.camber.value) / task.camber.tolerance,
					Math.abs(series(caster, y) - task.caster.value) / task.caster.tolerance
				);
			};
		}
	};
}
