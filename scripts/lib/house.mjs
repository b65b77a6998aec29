import { realpathSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

/** The project's folder, wherever it was cloned and wherever the command was typed. */
export const root = realpathSync(path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..', '..'));

/** Everything a start keeps: the private database, dumps. */
export const dataFolder = path.join(root, '.data');

/** A condition the person can mend: shown as its message alone, never with a stack trace. */
export class HouseError extends Error {
	name = 'HouseError';
}

/** Prints one line of progress. */
export function say(line) {
	process.stdout.write(`${line}\n`);
}

/** The message for an error: ours as it is, a full disk and refused access named, the rest with its stack. */
export function inWords(error) {
	if (error instanceof HouseError) return error.message;
	if (error?.code === 'ENOSPC') return diskFull(error.path);
	if (['EACCES', 'EPERM', 'EROFS'].includes(error?.code))
		return `No permission to write ${error.path ?? 'here'}. Run this as the user who owns the project folder.`;
	return error?.stack ?? String(error);
}

/** The one message for a full disk. */
export function diskFull(where) {
	return `The disk is full${where ? ` (while writing ${where})` : ''}. Free some space, then run the command again.`;
}

/** The last lines of a program's output. */
export function lastLines(text, count = 12) {
	return text.trimEnd().split('\n').slice(-count).join('\n');
}

/** Whether a program's output says that the disk is full. */
export function saysDiskFull(output) {
	return /No space left on device|ENOSPC|Errcode: 28|error: 28\b|enough free space|Disk (got )?full|table '.*' is full/i.test(
		output
	);
}
