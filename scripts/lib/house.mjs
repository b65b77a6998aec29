import { fileURLToPath } from 'node:url';
import path from 'node:path';

/** The project's folder, wherever it was cloned and wherever the command was typed. */
export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..', '..');

/** A condition the person can mend: shown as its message alone, never with a stack trace. */
export class HouseError extends Error {
	name = 'HouseError';
}

/** Prints one line of progress. */
export function say(line) {
	process.stdout.write(`${line}\n`);
}

/** Prints why a command gives up, in words where we know them. */
export function complain(error) {
	process.stderr.write(`\n${inWords(error)}\n`);
}

/** The message for an error: ours as it is, a full disk and refused access named, the rest with its stack. */
export function inWords(error) {
	if (error instanceof HouseError) return error.message;
	if (error?.code === 'ENOSPC') return diskFull(error.path);
	if (error?.code === 'EACCES' || error?.code === 'EPERM' || error?.code === 'EROFS')
		return `No permission to write ${error.path ?? 'here'}. Run this as the user who owns the project folder.`;
	return error?.stack ?? String(error);
}

/** The one message for a full disk. */
export function diskFull(where) {
	return `The disk is full${where ? ` (while writing ${where})` : ''}. Free some space, then run the command again.`;
}
