import { z } from 'zod';

/** One thickness on the shelf. `thickness` in mm; `unit` says how the shop names it. */
export const shimSchema = z.object({
	thickness: z
		.number({ error: 'Thickness: a number of mm.' })
		.min(0.05, 'Thickness: 0.05 to 25 mm.')
		.max(25, 'Thickness: 0.05 to 25 mm.'),
	unit: z.enum(['mm', 'in'], { error: 'Unit: mm or in.' }),
	count: z
		.number({ error: 'Count: a whole number.' })
		.int('Count: a whole number.')
		.min(0, 'Count: 0 to 10,000.')
		.max(10000, 'Count: 0 to 10,000.')
});
export type Shim = z.infer<typeof shimSchema>;

/** Body of `PUT …/shims`: the whole shelf. `version` is the one that was read, so that two windows do not undo each other. */
export const shimStockSchema = z.object({
	version: z.number().int().min(0),
	items: z
		.array(shimSchema)
		.max(200, 'At most 200 thicknesses.')
		.refine(
			(items) => new Set(items.map((item) => `${item.unit} ${item.thickness.toFixed(4)}`)).size === items.length,
			'Each thickness once.'
		)
});
export type ShimStockInput = z.infer<typeof shimStockSchema>;

export interface ShimStock {
	version: number;
	items: Shim[];
	updatedAt: string | null;
	updatedBy: string | null;
}
