/**
 * Parameters of a fast-check run. The seed changes from run to run so that new corners are met, and is printed so that
 * a failure can be had again with FC_SEED.
 */
const given = Number(process.env.FC_SEED);
export const SEED = Number.isInteger(given) && process.env.FC_SEED ? given : Date.now() % 2_147_483_647;

/** fast-check parameters for `runs` corners; failures name the seed and the path. */
export const runs = (numRuns: number): { numRuns: number; seed: number; endOnFailure: boolean } => ({
	numRuns,
	seed: SEED,
	endOnFailure: true
});
