import { RateLimiterMemory, RateLimiterRes } from 'rate-limiter-flexible';
import { z } from 'zod';
import { KERNEL_VERSION, KinematicsError, POINT_NAMES, sweepBump } from '../kinematics';
import type { SignedInPerson } from '../schemas/auth';
import { refuse, refuseFields } from './problem';

export const BUMP_BODY_LIMIT = 64 * 1024;
export const BUMP_STATES_LIMIT = 2001;

// Computing holds the process, so this count is per process, in memory.
const limiter = new RateLimiterMemory({ points: 60, duration: 60 });

const mm = z.number({ error: 'a number of mm is expected' }).min(-10_000).max(10_000);
const place = z.tuple([mm, mm, mm], { error: 'three numbers of mm are expected: x forward, y left, z up' });
const optional = z.number().nullable().optional();

const geometry = z.object({
	points: z.object(
		Object.fromEntries(POINT_NAMES.map((name) => [name, place])) as Record<(typeof POINT_NAMES)[number], typeof place>
	),
	wheel: z.object({ track: mm, x: mm, loadedRadius: mm, camber: z.number(), toe: z.number() }),
	coilover: z
		.object({
			top: place,
			bottom: place,
			on: z.enum(['lowerArm', 'upperArm', 'upright']),
			rate: optional,
			forceAtRide: optional,
			openLength: optional,
			closedLength: optional
		})
		.nullable()
		.optional(),
	vehicle: z
		.object({
			wheelbase: optional,
			cgHeight: optional,
			frontBrakeShare: optional,
			frontBrakes: z.enum(['upright', 'inboard']).nullable().optional(),
			sprungCornerMass: optional,
			tyreRate: optional
		})
		.nullable()
		.optional()
});

/** Body of `POST /api/v1/kinematics/bump`: a corner in the axes of the kernel, mm and degrees, and the range of travel. */
export const bumpSchema = z
	.object({
		geometry,
		from: z.number().min(-1000).max(1000),
		to: z.number().min(-1000).max(1000),
		step: z.number().positive('step: above 0 mm'),
		rack: z.number().min(-1000).max(1000).default(0)
	})
	.refine(({ from, to, step }) => Math.abs(to - from) / step + 1 <= BUMP_STATES_LIMIT, {
		path: ['step'],
		message: `step: at most ${BUMP_STATES_LIMIT} states; take a larger step or a shorter range`
	});
export type BumpRequest = z.infer<typeof bumpSchema>;

/** Counts one computation of a person; 429 with the seconds to wait when there were too many. */
export async function limitBump(person: SignedInPerson): Promise<void> {
	try {
		await limiter.consume(person.id);
	} catch (refusal) {
		if (!(refusal instanceof RateLimiterRes)) throw refusal;
		refuse(429, 'Too many computations in a minute; wait a little.', {
			retryAfter: Math.max(1, Math.ceil(refusal.msBeforeNext / 1000))
		});
	}
}

/** The sweep with the kernel's version; geometry that cannot be solved is a 422 that names the point or link. */
export function runBump({ geometry, ...range }: BumpRequest) {
	try {
		const { states, lowLimit, highLimit } = sweepBump(geometry, range);
		return { kernelVersion: KERNEL_VERSION, states, lowLimit: lowLimit ?? null, highLimit: highLimit ?? null };
	} catch (failure) {
		if (!(failure instanceof KinematicsError)) throw failure;
		refuseFields([{ field: `geometry.${failure.at}`, message: failure.message }]);
	}
}
