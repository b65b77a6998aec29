import { parseLength, parseNumber } from '$lib/parse';
import type { Preferences } from '$lib/schemas/preferences';
import type { Shim, ShimStock } from '$lib/schemas/shims';
import { formatExact, formatInchFraction } from '$lib/format';
import { MM_PER_INCH } from '$lib/units';

/** A row as it is typed; text stays as typed until it is kept. */
export interface ShelfRow {
	readonly id: number;
	thickness: string;
	unit: Shim['unit'];
	count: string;
	errors: { thickness?: string; count?: string };
}

/** Thicknesses to begin an empty shelf with. */
const USUAL: Record<Shim['unit'], readonly number[]> = {
	mm: [0.5, 1, 1.5, 2, 3],
	in: [1, 2, 4, 8].map((parts) => (parts / 64) * MM_PER_INCH)
};

/** A shim in its own unit, as its maker names it: a fraction where it is a 64th of an inch. */
export function thicknessText({ thickness, unit }: Pick<Shim, 'thickness' | 'unit'>, preferences: Preferences): string {
	const parts = (thickness / MM_PER_INCH) * 64;
	if (unit === 'in' && Math.abs(parts - Math.round(parts)) < 1e-6) return formatInchFraction(thickness);
	return formatExact(thickness, 'length', { ...preferences, length: unit, inches: 'decimal' });
}

/** The shelf while it is edited. */
export class Shelf {
	rows = $state<ShelfRow[]>([]);
	/** The version that was read; a write names it. */
	version = $state(0);
	#next = 0;
	#kept = $state('');

	/** Whether anything typed is not kept yet. */
	readonly changed = $derived.by(() => this.#fingerprint() !== this.#kept);

	constructor(stock: ShimStock, preferences: Preferences) {
		this.adopt(stock, preferences);
	}

	/** Takes what the server holds. */
	adopt(stock: ShimStock, preferences: Preferences): void {
		this.version = stock.version;
		this.rows = stock.items.map((item) => ({
			id: this.#next++,
			thickness: thicknessText(item, preferences),
			unit: item.unit,
			count: String(item.count),
			errors: {}
		}));
		this.#kept = this.#fingerprint();
	}

	add(unit: Shim['unit']): number {
		const id = this.#next++;
		this.rows.push({ id, thickness: '', unit, count: '', errors: {} });
		return id;
	}

	/** Usual thicknesses, none of them counted yet. */
	begin(unit: Shim['unit'], preferences: Preferences): void {
		for (const thickness of USUAL[unit]) {
			const text = thicknessText({ thickness, unit }, preferences);
			this.rows.push({ id: this.#next++, thickness: text, unit, count: '0', errors: {} });
		}
	}

	remove(id: number): void {
		this.rows = this.rows.filter((row) => row.id !== id);
	}

	/** What is typed, in stored units; null where something cannot be read, the reasons beside it. */
	read(preferences: Preferences): Shim[] | null {
		const seen: string[] = [];
		const items = this.rows.map((row) => {
			row.errors = {};
			const thickness = parseLength(row.thickness, { ...preferences, length: row.unit });
			const count = parseNumber(row.count, preferences);
			if (!thickness.ok) row.errors.thickness = thickness.message;
			else if (thickness.mm < 0.05 || thickness.mm > 25)
				row.errors.thickness = 'Thickness: 0.05 to 25 mm (0.002 to 0.98 in).';
			if (!count.ok || !Number.isInteger(count.value) || count.value < 0 || count.value > 10_000) {
				row.errors.count = 'Count: a whole number, 0 to 10,000.';
			}
			if (!thickness.ok || !count.ok) return null;
			const key = `${row.unit} ${thickness.mm.toFixed(4)}`;
			if (seen.includes(key)) row.errors.thickness = 'This thickness is on the shelf already: add to its count.';
			seen.push(key);
			return { thickness: thickness.mm, unit: row.unit, count: count.value };
		});
		const faults = this.rows.some(({ errors }) => errors.thickness ?? errors.count);
		return faults ? null : items.filter((item) => item !== null);
	}

	#fingerprint(): string {
		return JSON.stringify(this.rows.map(({ thickness, unit, count }) => [thickness.trim(), unit, count.trim()]));
	}
}
