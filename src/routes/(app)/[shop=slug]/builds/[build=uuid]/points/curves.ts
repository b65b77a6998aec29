import { OUTPUTS } from '$lib/domain/outputs';
import { formatQuantity } from '$lib/format';
import type { FigureKey } from '$lib/schemas/axle';
import type { Preferences } from '$lib/schemas/preferences';

/** The curves beside the front view, most wanted first; as many as there is room for. */
export const CURVES: readonly FigureKey[] = ['camber', 'bumpSteer', 'rollCentreHeight', 'caster'];

export const quantityText = (value: number | null, key: FigureKey, preferences: Preferences): string =>
	formatQuantity(value, OUTPUTS[key].quantity, preferences);
