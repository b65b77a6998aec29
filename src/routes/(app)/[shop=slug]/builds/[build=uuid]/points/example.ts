import { emptyAxle } from '$lib/domain/axle';
import type { AxleDocument, PointEntry } from '$lib/schemas/axle';

/** An invented corner, drawn faintly on a sheet without points so that the views say what they will show. mm. */
const POINTS: Record<keyof AxleDocument['left']['points'], PointEntry> = {
	upperFront: [95, 345, 440],
	upperRear: [-125, 340, 428],
	upperBall: [-20, 610, 468],
	lowerFront: [150, 235, 205],
	lowerRear: [-150, 240, 200],
	lowerBall: [2, 655, 185],
	tieRodInner: [-118, 270, 236],
	tieRodOuter: [-132, 635, 228]
};

/** The example as a document of its own. */
export const EXAMPLE: AxleDocument = (() => {
	const axle = emptyAxle();
	return { ...axle, left: { points: POINTS, wheel: { track: 1420, x: 0, loadedRadius: 295, camber: -0.5, toe: 0.05 }, coilover: null } };
})();
