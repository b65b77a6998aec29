import { RateLimiterMySQL, RateLimiterRes } from 'rate-limiter-flexible';
import { database } from '../db';
import { sha256 } from '../ids';
import { attemptsStore } from './attempts-store';

/**
 * How many attempts are let through. Every count ends by itself: nobody is locked out for good. A browser the person
 * has signed in from before counts apart, so that a stranger guessing at an address does not keep its owner out.
 */
const LIMITS = {
	account: { points: 10, duration: 15 * 60 },
	device: { points: 10, duration: 15 * 60 },
	address: { points: 50, duration: 15 * 60 },
	signUp: { points: 40, duration: 60 * 60 }
} as const;
type Kind = keyof typeof LIMITS;

const limiters = new Map<Kind, RateLimiterMySQL>();

function limiter(kind: Kind): RateLimiterMySQL {
	const known = limiters.get(kind);
	if (known) return known;
	const sequelize = database();
	const made = new RateLimiterMySQL({
		storeClient: attemptsStore(sequelize),
		storeType: 'pool',
		dbName: sequelize.getDatabaseName(),
		tableName: 'attempts',
		tableCreated: true,
		keyPrefix: kind,
		...LIMITS[kind]
	});
	limiters.set(kind, made);
	return made;
}

/** Counts one attempt under a key (kept as a hash). Gives 0 when it may go on, else the seconds to wait. */
export async function countAttempt(kind: Kind, key: string): Promise<number> {
	try {
		await limiter(kind).consume(sha256(key));
		return 0;
	} catch (refusal) {
		if (refusal instanceof RateLimiterRes) return Math.max(1, Math.ceil(refusal.msBeforeNext / 1000));
		throw refusal;
	}
}

/** Forgets the attempts under a key: the right password was given. */
export async function forgetAttempts(kind: Kind, key: string): Promise<void> {
	await limiter(kind).delete(sha256(key));
}

/** Takes back one counted attempt: it turned out to be a good one. */
export async function takeBackAttempt(kind: Kind, key: string): Promise<void> {
	await limiter(kind).reward(sha256(key));
}
