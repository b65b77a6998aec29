import { z } from 'zod';

/** How one person reads and types: units, number format and theme. Stored values stay mm, degrees, newtons. */
export const preferencesSchema = z.strictObject({
	length: z.enum(['mm', 'in'], { error: 'Lengths: mm or in.' }),
	inches: z.enum(['decimal', 'fraction'], { error: 'Inches as: decimal or fraction.' }),
	angle: z.enum(['decimal', 'minutes'], { error: 'Angles: decimal or minutes.' }),
	force: z.enum(['N', 'lbf'], { error: 'Forces: N or lbf.' }),
	numbers: z.enum(['point', 'comma'], { error: 'Decimal sign: point or comma.' }),
	theme: z.enum(['system', 'light', 'dark', 'daylight'], { error: 'Theme: system, light, dark or daylight.' })
});
export type Preferences = z.infer<typeof preferencesSchema>;

/** What changes: only the keys given. */
export const preferencesPatchSchema = preferencesSchema.partial();

export const DEFAULT_PREFERENCES: Preferences = {
	length: 'mm',
	inches: 'decimal',
	angle: 'decimal',
	force: 'N',
	numbers: 'point',
	theme: 'system'
};
