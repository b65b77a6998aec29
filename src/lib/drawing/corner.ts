import type { DrawnCorner } from './scene';
import { tyreShape, type TyreShape } from './tyre';
import type { MarkKey, Places } from './linkage';
import { parseTyreSize } from '$lib/domain/tyres';
import { MM_PER_INCH } from '$lib/units';
import { entryOf, POINT_ORDER } from '$lib/domain/points';
import { POINT_NAMES, type CornerState, type Vec3 } from '$lib/kinematics';
import type { CornerEntry } from '$lib/schemas/axle';

/** The tyre as drawn: its loaded radius, and width and rim by the build's tyre size where that can be read. */
export interface DrawnTyre {
	shape: TyreShape;
	rimRadius: number | null;
}

const SOME_RADIUS = 300;

export function tyreOf(loadedRadius: number | null, size: string): DrawnTyre {
	const read = parseTyreSize(size);
	const radius = loadedRadius ?? (read ? read.freeDiameter / 2 : SOME_RADIUS);
	const rimRadius = read ? (read.rim * MM_PER_INCH) / 2 : null;
	return {
		shape: tyreShape(radius, read?.sectionWidth ?? null),
		rimRadius: rimRadius !== null && rimRadius < radius ? rimRadius : null
	};
}

/**
 * To a ten-thousandth of a mm, and of a unit vector a millionth of that: the last bits of a solved state are no
 * movement, and neither is a nought with a minus sign.
 */
function still(point: Vec3, parts = 1e4): Vec3 {
	const rounded = (value: number) => Math.round(value * parts) / parts + 0;
	return [rounded(point[0]), rounded(point[1]), rounded(point[2])];
}

/** A solved position of a corner, ready for the drawing. */
export function drawnState(state: CornerState, tyre: DrawnTyre): DrawnCorner {
	const places: Places = {};
	const { points, coilover } = state;
	for (const name of POINT_NAMES) places[name] = still(points[name]);
	if (coilover) {
		places.coiloverTop = still(coilover.top);
		places.coiloverBottom = still(coilover.bottom);
	}
	return {
		places,
		wheel: {
			centre: still(state.wheelCentre),
			spin: still(state.spinAxis, 1e9),
			contact: still(state.contactPoint),
			tyre: tyre.shape,
			rimRadius: tyre.rimRadius
		},
		rollCentre: state.rollCentreHeight,
		rollCentreByArms: state.rollCentreByArms
	};
}

/** A corner as it was typed, whole or not: marks where all three coordinates are there, the wheel where track and radius are. */
export function drawnEntry(corner: CornerEntry, side: 'left' | 'right', tyre: DrawnTyre): DrawnCorner {
	const places: Places = {};
	for (const key of POINT_ORDER) {
		const entry = entryOf(corner, key);
		if (entry && entry.every((value) => value !== null)) places[key as MarkKey] = entry as Vec3;
	}
	return { places, wheel: enteredWheel(corner, side, tyre), rollCentre: null, rollCentreByArms: null };
}

const RADIAN = Math.PI / 180;

/** The wheel from its entered figures alone, by the definitions of camber and toe: no linkage is needed to place it. */
function enteredWheel({ wheel }: CornerEntry, side: 'left' | 'right', tyre: DrawnTyre): DrawnCorner['wheel'] {
	const { track, loadedRadius, x, camber, toe } = wheel;
	if (track === null || loadedRadius === null) return null;
	const out = side === 'left' ? 1 : -1;
	const [c, t] = [camber * RADIAN, toe * RADIAN];
	const spin: Vec3 = [Math.cos(c) * Math.sin(t), out * Math.cos(c) * Math.cos(t), -Math.sin(c)];
	// From the contact point up in the wheel plane: the vertical less its part along the axle.
	const rise = Math.sqrt(1 - spin[2] * spin[2]);
	const up: Vec3 = [(-spin[2] * spin[0]) / rise, (-spin[2] * spin[1]) / rise, rise];
	const contact: Vec3 = [x, (out * track) / 2, 0];
	const centre: Vec3 = [contact[0] + up[0] * loadedRadius, contact[1] + up[1] * loadedRadius, up[2] * loadedRadius];
	return { centre, spin, contact, tyre: tyre.shape, rimRadius: tyre.rimRadius };
}
