import type { PointName } from '../kinematics';
import type { AxleDocument, PointEntry } from '../schemas/axle';
import { emptyAxle } from './axle';

/**
 * An invented corner of a road car, in the kernel's axes, mm: track 1480, rack ahead of the axle. Solves over ±90 mm with about
 * −0.5° of camber an inch of bump and bump steer under 0.05° (checked in tests/unit/domain/example.test.ts).
 */
const POINTS: Readonly<Record<PointName, Readonly<PointEntry>>> = {
	upperFront: [95, 404, 491],
	upperRear: [-125, 412, 482],
	upperBall: [-16, 622, 507],
	lowerFront: [140, 318, 210],
	lowerRear: [-170, 324, 213],
	lowerBall: [10, 668, 205],
	tieRodInner: [125, 351, 254],
	tieRodOuter: [128, 684, 254]
};

/** The example with everything typed: for the drawing on an empty page, for demos and tests. A fresh copy each time. */
export function exampleAxle(): AxleDocument {
	const axle = emptyAxle();
	for (const [name, point] of Object.entries(POINTS)) axle.left.points[name as PointName] = [...point];
	axle.left.wheel = { track: 1480, x: 0, loadedRadius: 310, camber: -0.5, toe: 0.1 };
	axle.left.coilover = {
		top: [-10, 452, 560],
		bottom: [-6, 578, 218],
		on: 'lowerArm',
		rate: 45,
		forceAtRide: 4400,
		openLength: 440,
		closedLength: 290
	};
	axle.vehicle = {
		wheelbase: 2560,
		cgHeight: 510,
		frontBrakeShare: 0.62,
		frontBrakes: 'upright',
		sprungCornerMass: 310,
		tyreRate: 200
	};
	return axle;
}

/** The example without coil-over and vehicle data: the points and the wheel alone. */
export function examplePoints(): AxleDocument {
	return { ...exampleAxle(), left: { ...exampleAxle().left, coilover: null }, vehicle: emptyAxle().vehicle };
}
