import { hash, verify } from '@node-rs/argon2';
import { randomBytes } from 'node:crypto';

// OWASP's argon2id minimum: 19 MiB, two passes, one lane. The package's default algorithm is argon2id.
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1, outputLen: 32 };

/** The stored form of a password: argon2id with a salt of its own. */
export function hashPassword(password: string): Promise<string> {
	return hash(password.normalize('NFKC'), COST);
}

/** True when the password matches; a hash that cannot be read never matches. */
export async function verifyPassword(stored: string, password: string): Promise<boolean> {
	try {
		return await verify(stored, password.normalize('NFKC'));
	} catch {
		return false;
	}
}

let standIn: Promise<string> | null = null;

/** A hash no password matches: an unknown address costs the same one verification as a known one. */
export function standInHash(): Promise<string> {
	standIn ??= hashPassword(randomBytes(32).toString('base64'));
	return standIn;
}
