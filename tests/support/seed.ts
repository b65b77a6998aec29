/**
 * Parameters of a fast-check run. The seed is the same from run to run, so that a change is judged by itself and not by
 * the corners it happened to meet; FC_SEED=random draws new corners, FC_SEED=<number> those of an earlier run. It is printed.
 */
const STANDING_SEED = 20_260_101;
const given = process.env.FC_SEED;
export const SEED =
	given === 'random'
		? Date.now() % 2_147_483_647
		: given && Number.isInteger(Number(given))
			? Number(given)
			: STANDING_SEED;

/** fast-check parameters for `runs` corners; failures name the seed and the path. */
export const runs = (numRuns: number): { numRuns: number; seed: number; endOnFailure: boolean } => ({
	numRuns,
	seed: SEED,
	endOnFailure: true
});
