import { z } from 'zod';

const angle = (label: string, limit: number) => {
	const message = `${label}: degrees from −${limit} to ${limit}, or nothing.`;
	return z.number({ error: message }).min(-limit, message).max(limit, message).nullable().default(null);
};
const length = (label: string, low: number, high: number) => {
	const message = `${label}: mm from ${low} to ${high}, or nothing.`;
	return z.number({ error: message }).min(low, message).max(high, message).nullable().default(null);
};

/** Camber read at two steer angles of the turn plates; degrees. */
export const casterSweepSchema = z.object({
	steerA: z.number().min(-60).max(60),
	camberA: z.number().min(-45).max(45),
	steerB: z.number().min(-60).max(60),
	camberB: z.number().min(-45).max(45)
});

/** One wheel as measured or as set. Degrees, toe per wheel; packs in mm; turns counted from where they stood. */
export const wheelRecordSchema = z.object({
	camber: angle('Camber', 20),
	caster: angle('Caster', 30),
	toe: angle('Toe', 20),
	sweep: casterSweepSchema.nullable().default(null),
	frontPack: length('Front pack', 0, 100),
	rearPack: length('Rear pack', 0, 100),
	frontTurns: z.number().min(-50).max(50).nullable().default(null),
	rearTurns: z.number().min(-50).max(50).nullable().default(null),
	tieRodTurns: z.number().min(-50).max(50).nullable().default(null)
});
export type WheelRecord = z.infer<typeof wheelRecordSchema>;

/** Body of `POST …/records`: appended, never changed. `travel` mm and `rake` degrees (nose-down +) say how the car stood. */
export const recordInputSchema = z.object({
	requestId: z.uuid('requestId: a UUID made by the sender.'),
	kind: z.enum(['asFound', 'asSet'], { error: 'kind: asFound or asSet.' }),
	left: wheelRecordSchema,
	right: wheelRecordSchema,
	travel: length('Height against design', -300, 300),
	rake: angle('Rake', 10),
	note: z.string().trim().max(2000, 'Note: at most 2,000 characters.').default('')
});
export type RecordInput = z.infer<typeof recordInputSchema>;

/** A record as read: names the revision and the hash of the geometry it was taken against. */
export interface AlignmentRecord extends Omit<RecordInput, 'requestId'> {
	id: string;
	revisionLetter: string;
	revisionHash: string;
	createdAt: string;
	createdBy: string;
}
