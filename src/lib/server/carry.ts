import { emptyAxle } from '../domain/axle';
import type { AxleDocument } from '../schemas/axle';
import type { BuildInput } from '../schemas/build';

/** The first draft of a build: no points yet, the facts already in their places. */
export function newDocument(facts: BuildInput): AxleDocument {
	const none = { ...facts, track: null, loadedRadius: null, wheelbase: null, cgHeight: null, frontBrakeShare: null };
	return carryFacts(emptyAxle(), none, facts);
}

/**
 * Takes changed facts of the build over into the document, each only where the document still holds the old fact or
 * nothing: what the builder has set in the geometry itself stays.
 */
export function carryFacts(document: AxleDocument, before: BuildInput, after: BuildInput): AxleDocument {
	const take = (held: number | null, name: 'track' | 'loadedRadius' | 'wheelbase' | 'cgHeight' | 'frontBrakeShare') =>
		before[name] !== after[name] && (held === null || held === before[name]) ? after[name] : held;
	const wheel = (held: AxleDocument['left']['wheel']) => ({
		...held,
		track: take(held.track, 'track'),
		loadedRadius: take(held.loadedRadius, 'loadedRadius')
	});
	const { left, right, vehicle } = document;
	return {
		...document,
		left: { ...left, wheel: wheel(left.wheel) },
		right: right === 'mirror' ? right : { ...right, wheel: wheel(right.wheel) },
		vehicle: {
			...vehicle,
			wheelbase: take(vehicle.wheelbase, 'wheelbase'),
			cgHeight: take(vehicle.cgHeight, 'cgHeight'),
			frontBrakeShare: take(vehicle.frontBrakeShare, 'frontBrakeShare')
		}
	};
}
