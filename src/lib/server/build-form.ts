import { formatExact } from '../format';
import { parseQuantity } from '../parse';
import { buildInputSchema, FACT_NAMES, FACT_RANGES } from '../schemas/build';
import type { BuildFacts, BuildForm, BuildInput, FactName } from '../schemas/build';
import type { Preferences } from '../schemas/preferences';
import type { Quantity } from '../units';

/** The form's own name of a fact: the brake share is typed in percent. */
type FormField = Exclude<FactName, 'frontBrakeShare'> | 'frontBrakePercent' | 'datumHeight' | 'datumForeOrigin';

export interface FormError {
	field: FormField;
	message: string;
}

const fieldOf = (name: FactName): FormField => (name === 'frontBrakeShare' ? 'frontBrakePercent' : name);

function quantityOf(name: FactName): Quantity {
	if (name === 'frontBrakeShare') return 'percent';
	return /mass$/i.test(name) ? 'mass' : 'length';
}

/** A stored fact as the form shows it, in the person's units. */
function written(name: FactName, value: number | null, preferences: Preferences): string {
	const shown = value !== null && name === 'frontBrakeShare' ? value * 100 : value;
	return formatExact(shown, quantityOf(name), preferences);
}

/** A build as its form shows it to this person. */
export function fillBuildForm(build: BuildFacts, preferences: Preferences): BuildForm {
	const numbers = Object.fromEntries(
		FACT_NAMES.map((name) => [fieldOf(name), written(name, build[name], preferences)])
	) as Record<FormField, string>;
	return {
		...numbers,
		name: build.name,
		client: build.client ?? '',
		stage: build.stage,
		datumOrigin: build.datum.origin,
		datumHeight: formatExact(build.datum.height, 'length', preferences),
		datumForeAft: build.datum.foreAft,
		datumForeOrigin: formatExact(build.datum.foreOrigin, 'length', preferences),
		tyreSize: build.tyreSize,
		notes: build.notes ?? '',
		people: (build.people ?? []).map(({ id }) => id)
	};
}

/**
 * Reads the numbers of a build form as this person writes them. A field left as it was shown keeps its stored value to the
 * last digit. Errors name the form's field and what would be accepted.
 */
export function readBuildForm(
	form: BuildForm,
	preferences: Preferences,
	stored?: BuildFacts
): { ok: true; input: BuildInput } | { ok: false; errors: FormError[] } {
	const errors: FormError[] = [];
	const read = (field: FormField, quantity: Quantity, shown: string | null, kept: number | null): number | null => {
		const text = form[field];
		if (text === '') return null;
		if (text === shown) return kept;
		const result = parseQuantity(text, quantity, preferences);
		if (result.ok) return field === 'frontBrakePercent' ? result.value / 100 : result.value;
		errors.push({ field, message: result.message });
		return null;
	};
	const facts = Object.fromEntries(
		FACT_NAMES.map((name) => {
			const kept = stored?.[name] ?? null;
			const value = read(fieldOf(name), quantityOf(name), stored ? written(name, kept, preferences) : null, kept);
			if (value !== null && !isWithin(name, value))
				errors.push({ field: fieldOf(name), message: rangeOf(name, preferences) });
			return [name, value];
		})
	) as Record<FactName, number | null>;
	const datumLength = (field: 'datumHeight' | 'datumForeOrigin', kept: number | null) =>
		read(field, 'length', formatExact(kept, 'length', preferences), kept) ?? 0;
	const datum = {
		origin: form.datumOrigin,
		height: form.datumOrigin === 'ground' ? 0 : datumLength('datumHeight', stored?.datum.height ?? null),
		foreAft: form.datumForeAft,
		foreOrigin: datumLength('datumForeOrigin', stored?.datum.foreOrigin ?? null)
	};
	if (Math.abs(datum.height) > 2000)
		errors.push({ field: 'datumHeight', message: 'Datum height: at most 2 m from the ground.' });
	if (errors.length > 0) return { ok: false, errors };
	const { name, client, stage, tyreSize, notes } = form;
	return { ok: true, input: buildInputSchema.parse({ name, client, stage, tyreSize, notes, datum, ...facts }) };
}

function isWithin(name: FactName, value: number): boolean {
	const { low, high } = FACT_RANGES[name];
	return value >= low && value <= high;
}

function rangeOf(name: FactName, preferences: Preferences): string {
	const { low, high, label, unit } = FACT_RANGES[name];
	const quantity = quantityOf(name);
	const shown = [low, high].map((bound) => {
		const value = name === 'frontBrakeShare' ? bound * 100 : bound;
		return formatExact(Math.round(value * 100) / 100, quantity, preferences);
	});
	const word =
		name === 'frontBrakeShare'
			? '%'
			: quantity === 'mass'
				? preferences.force === 'lbf'
					? 'lb'
					: unit
				: preferences.length;
	return `${label}: from ${shown[0]?.slice(0, 8) ?? ''} to ${shown[1]?.slice(0, 8) ?? ''} ${word}.`;
}
