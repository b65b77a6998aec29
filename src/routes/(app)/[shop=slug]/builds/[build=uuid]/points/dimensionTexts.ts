import { OUTPUTS } from '$lib/domain/outputs';
import type { DimensionKey, DimensionText } from '$lib/drawing/figures';
import { formatQuantity } from '$lib/format';
import type { CornerState } from '$lib/kinematics';
import type { CornerEntry, FigureKey } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';
import { spokenFigure, type FigureRow } from './figures';

export interface Dimensioned {
	/** The state drawn, and the same corner at ride height. */
	state: CornerState;
	ride: CornerState;
	wheel: CornerEntry['wheel'];
	rows: readonly FigureRow[];
	preferences: Preferences;
	readOnly: boolean;
}

/**
 * What the dimensions of the drawing say. Verdicts belong to ride height and are left out elsewhere; so is typing of
 * camber and toe, which are entered at ride height.
 */
export function dimensionTexts({
	state,
	ride,
	wheel,
	rows,
	preferences,
	readOnly
}: Dimensioned): Partial<Record<DimensionKey, DimensionText>> {
	const atRide = state === ride;
	const shown = (value: number | null, key: FigureKey) => formatQuantity(value, OUTPUTS[key].quantity, preferences);
	const figure = (key: FigureKey, typed = false, label = OUTPUTS[key].short): DimensionText | undefined => {
		const value = OUTPUTS[key].read(state, ride);
		if (value === null) return undefined;
		const row = rows.find((one) => one.key === key);
		const degrees = OUTPUTS[key].quantity === 'angle' && preferences.angle === 'decimal' ? '°' : '';
		return {
			text: `${label} ${shown(value, key)}${degrees}`,
			name: row && atRide ? spokenFigure(row) : `${OUTPUTS[key].label} ${shown(value, key)}`,
			verdict: atRide ? (row?.verdict ?? null) : null,
			editable: typed && atRide && !readOnly
		};
	};
	const length = (value: number | null, name: string, label: string): DimensionText | undefined => {
		if (value === null) return undefined;
		const text = formatQuantity(value, 'length', preferences);
		return { text: label + text, name: `${name} ${text}`, verdict: null, editable: !readOnly };
	};
	const toe = figure('toe', true);
	return {
		camber: figure('camber', true),
		kpi: figure('kpi'),
		scrubRadius: figure('scrubRadius'),
		rollCentreHeight: figure('rollCentreHeight', false, 'RC'),
		track: length(wheel.track, 'track', 'track '),
		loadedRadius: length(wheel.loadedRadius, 'loaded radius', ''),
		caster: figure('caster'),
		mechanicalTrail: figure('mechanicalTrail'),
		toe: toe && { ...toe, note: 'per wheel' }
	};
}
