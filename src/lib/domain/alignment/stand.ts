import type { Stance } from '../../kinematics';

/** How the car stands, by tape. mm, from the ground up to the same straight line of the frame. */
export interface MeasuredStand {
	readonly frontHeight: number | null;
	readonly rearHeight: number | null;
}

/** What those heights are in the design. mm */
export interface DesignStand {
	/** At the front axle. */
	readonly frontHeight: number | null;
	/** At the rear axle; the same as at the front where the frame line is level by design. */
	readonly rearHeight: number | null;
	readonly wheelbase: number | null;
}

export interface Stand extends Required<Stance> {
	/** What could not be told from the heights, in words. */
	readonly unknown: readonly string[];
}

/**
 * Travel and rake at which the car stands. A body that stands lower than design has its wheels up: travel + by as much.
 * Rake (nose-down +) is the slope of the frame line over the wheelbase against its slope in the design.
 */
export function standOf(measured: MeasuredStand, design: DesignStand): Stand {
	const unknown: string[] = [];
	const designFront = design.frontHeight;
	const designRear = design.rearHeight ?? designFront;
	let travel = 0;
	if (measured.frontHeight === null) unknown.push('No front height: taken at design ride height.');
	else if (designFront === null)
		unknown.push('The build has no ride height to compare with: taken at design ride height.');
	else travel = designFront - measured.frontHeight;
	let rake = 0;
	if (measured.frontHeight === null || measured.rearHeight === null)
		unknown.push('Not both heights: taken without rake.');
	else if (designFront === null || designRear === null || design.wheelbase === null) {
		unknown.push('Ride height and wheelbase of the build are needed for rake: taken without rake.');
	} else {
		const slope = (measured.rearHeight - measured.frontHeight) / design.wheelbase;
		const designSlope = (designRear - designFront) / design.wheelbase;
		rake = ((Math.atan(slope) - Math.atan(designSlope)) * 180) / Math.PI;
	}
	return { travel, rake, unknown };
}
