import { OUTPUTS } from '../domain/outputs';
import { KERNEL_VERSION } from '../kinematics';
import type { CornerState } from '../kinematics';
import type { ReleasedFigures } from '../schemas/build';
import type { SolvedAxle } from './documents';

/** Every figure of both sides at ride height, with the version of the kernel that computed it: what a release keeps. */
export function releasedFigures({ left, right }: SolvedAxle): ReleasedFigures {
	return { kernelVersion: KERNEL_VERSION, left: read(left), right: read(right) };
}

function read(state: CornerState): Record<string, number | null> {
	return Object.fromEntries(Object.values(OUTPUTS).map((output) => [output.key, output.read(state)]));
}
