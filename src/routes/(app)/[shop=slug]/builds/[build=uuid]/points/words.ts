import { axisWord, DATUM_AXES, moveToDatum, toDatum, type Datum, type DatumAxis, type Side } from '$lib/domain/datum';
import { formatDelta, formatQuantity } from '$lib/format';
import type { Vec3 } from '$lib/kinematics';
import type { ViewKey } from '$lib/drawing/projection';
import type { Preferences } from '$lib/schemas/preferences';

/** A place in the builder's datum and units: "618.0 out", "474.0 up", "22.0 aft". */
export function placeWords(point: Vec3, datum: Datum, side: Side, preferences: Preferences): Record<DatumAxis, string> {
	const place = toDatum([...point], datum, side);
	const said = (axis: DatumAxis) => `${formatQuantity(place[axis], 'length', preferences)} ${axisWord(axis, datum)}`;
	return { out: said('out'), up: said('up'), fore: said('fore') };
}

/** A move in the builder's words, the axes that did not move left out: "Δ +3.0 out −1.0 up". */
export function moveWords(move: Vec3, datum: Datum, side: Side, preferences: Preferences): string {
	const by = moveToDatum(move, datum, side);
	const parts = DATUM_AXES.filter((axis) => Math.abs(by[axis]) > 1e-6).map(
		(axis) => `${formatDelta(by[axis], 'length', preferences)} ${axisWord(axis, datum)}`
	);
	return parts.length ? `Δ ${parts.join('  ')}` : 'Δ 0';
}

/** Which axes of the datum a view shows: across the page and up it. */
export function viewAxes(view: ViewKey): { across: DatumAxis; up: DatumAxis } | null {
	if (view === 'front') return { across: 'out', up: 'up' };
	if (view === 'top') return { across: 'out', up: 'fore' };
	return view === 'side' ? { across: 'fore', up: 'up' } : null;
}
