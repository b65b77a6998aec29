import type { CornerGeometry } from '../../src/lib/kinematics';

/**
 * A general solver to measure the kernel against: Newton on the six loop equations (five link lengths and the wheel
 * centre's height) for the upright's place and rotation vector, forward-difference Jacobian, warm start, plain arrays.
 * Positions only. `solve(travel)` gives the number of steps it took.
 */
export function generalSolver(geometry: CornerGeometry): { solve(travel: number): number } {
	const p = geometry.points;
	const { track, x, loadedRadius, camber } = geometry.wheel;
	const lean = (camber * Math.PI) / 180;
	const hub = [x, track / 2 - loadedRadius * Math.sin(-lean), loadedRadius * Math.cos(lean)];
	const links = [
		[p.lowerFront, p.lowerBall],
		[p.lowerRear, p.lowerBall],
		[p.upperFront, p.upperBall],
		[p.upperRear, p.upperBall],
		[p.tieRodInner, p.tieRodOuter]
	] as const;
	const lengths = links.map(([a, b]) => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]));
	const state = [0, 0, 0, 0, 0, 0];
	const moved = [0, 0, 0];

	/** Turns about the ride-height wheel centre by the rotation vector (Rodrigues), then moves. */
	function place(q: number[], point: readonly number[]): void {
		const [rx, ry, rz] = [q[3] as number, q[4] as number, q[5] as number];
		const angle = Math.hypot(rx, ry, rz);
		const s = angle < 1e-12 ? 1 : Math.sin(angle) / angle;
		const c = angle < 1e-12 ? 0.5 : (1 - Math.cos(angle)) / (angle * angle);
		const [px, py, pz] = [0, 1, 2].map((i) => (point[i] as number) - (hub[i] as number)) as [number, number, number];
		const dot = rx * px + ry * py + rz * pz;
		const cos = Math.cos(angle);
		moved[0] = (hub[0] as number) + (q[0] as number) + px * cos + s * (ry * pz - rz * py) + c * dot * rx;
		moved[1] = (hub[1] as number) + (q[1] as number) + py * cos + s * (rz * px - rx * pz) + c * dot * ry;
		moved[2] = (hub[2] as number) + (q[2] as number) + pz * cos + s * (rx * py - ry * px) + c * dot * rz;
	}

	function residuals(q: number[], travel: number, out: number[]): void {
		links.forEach(([a, b], k) => {
			place(q, b);
			const length = Math.hypot((moved[0] as number) - a[0], (moved[1] as number) - a[1], (moved[2] as number) - a[2]);
			out[k] = length - (lengths[k] as number);
		});
		out[5] = (q[2] as number) - travel;
	}

	/** Gaussian elimination with partial pivoting on a 6 × 7 row-major array. */
	function eliminate(m: number[]): void {
		for (let c = 0; c < 6; c++) {
			let best = c;
			for (let r = c + 1; r < 6; r++)
				if (Math.abs(m[r * 7 + c] as number) > Math.abs(m[best * 7 + c] as number)) best = r;
			for (let k = c; k < 7; k++) [m[c * 7 + k], m[best * 7 + k]] = [m[best * 7 + k] as number, m[c * 7 + k] as number];
			for (let r = 0; r < 6; r++) {
				if (r === c) continue;
				const factor = (m[r * 7 + c] as number) / (m[c * 7 + c] as number);
				for (let k = c; k < 7; k++) m[r * 7 + k] = (m[r * 7 + k] as number) - factor * (m[c * 7 + k] as number);
			}
		}
	}

	const now: number[] = [0, 0, 0, 0, 0, 0];
	const shifted: number[] = [0, 0, 0, 0, 0, 0];
	const matrix: number[] = new Array<number>(42).fill(0);
	return {
		solve(travel) {
			for (let step = 1; step <= 30; step++) {
				residuals(state, travel, now);
				if (Math.max(...now.map(Math.abs)) < 1e-10) return step;
				for (let c = 0; c < 6; c++) {
					const kept = state[c] as number;
					const h = c < 3 ? 1e-5 : 1e-8;
					state[c] = kept + h;
					residuals(state, travel, shifted);
					state[c] = kept;
					for (let r = 0; r < 6; r++) matrix[r * 7 + c] = ((shifted[r] as number) - (now[r] as number)) / h;
				}
				for (let r = 0; r < 6; r++) matrix[r * 7 + 6] = -(now[r] as number);
				eliminate(matrix);
				for (let c = 0; c < 6; c++)
					state[c] = (state[c] as number) + (matrix[c * 7 + 6] as number) / (matrix[c * 8] as number);
			}
			throw new Error(`The general solver did not settle at ${travel} mm.`);
		}
	};
}
