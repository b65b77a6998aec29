import { createHash, randomBytes } from 'node:crypto';
import { v7 } from 'uuid';

/** A new row's id: UUIDv7, so that ids sort by the time they were made. */
export function newId(): string {
	return v7();
}

/** A short id for one request: it stands in the log and on an error page. */
export function newRequestId(): string {
	return randomBytes(6).toString('hex');
}

/** SHA-256 as hex: what the database keeps of a secret the person holds. */
export function sha256(text: string): string {
	return createHash('sha256').update(text).digest('hex');
}
