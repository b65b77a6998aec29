import { coordinateFromDatum, coordinateToDatum, DATUM_AXES, PLACE_OF, type Datum, type Side } from '$lib/domain/datum';
import type { MarkKey } from '$lib/drawing/linkage';
import type { Vec3 } from '$lib/kinematics';
import type { AxleDocument } from '$lib/schemas/axle';

/**
 * A place moved by `move` (mm, kernel axes), every coordinate that moves set to whole steps of the builder's datum, so
 * that what is dragged reads as a round figure. Coordinates that do not move keep their last digit.
 */
export function movedTo(from: Vec3, move: Vec3, step: number, datum: Datum, side: Side): Vec3 {
	const to: [number, number, number] = [...from];
	for (const axis of DATUM_AXES) {
		const place = PLACE_OF[axis];
		if (Math.abs(move[place]) < 1e-9) continue;
		const shown = coordinateToDatum(axis, from[place] + move[place], datum, side) ?? 0;
		to[place] = coordinateFromDatum(axis, Math.round(shown / step) * step, datum, side) ?? from[place];
	}
	return to;
}

/** A place moved by exactly one key press: the step is added, nothing is rounded but the last bits. */
export function nudged(from: Vec3, move: Vec3): Vec3 {
	const sum = (k: 0 | 1 | 2) => Math.round((from[k] + move[k]) * 1e9) / 1e9;
	return [sum(0), sum(1), sum(2)];
}

/** Writes a point's place into a document. Nothing happens where the corner has no such point. */
export function writePlace(document: AxleDocument, side: Side, key: MarkKey, place: Vec3): void {
	const corner = side === 'right' && document.right !== 'mirror' ? document.right : document.left;
	const next: [number, number, number] = [...place];
	if (key === 'coiloverTop' || key === 'coiloverBottom') {
		if (corner.coilover) corner.coilover[key === 'coiloverTop' ? 'top' : 'bottom'] = next;
	} else corner.points[key] = next;
}
