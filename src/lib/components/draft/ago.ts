import { formatDate } from '$lib/format';

/** How long ago, in words: "just now", "12 s ago", "5 min ago", "3 h ago", "on 1 Dec 2026". Both in ms of one clock. */
export function ago(then: number, now: number): string {
	const seconds = Math.max(0, Math.floor((now - then) / 1000));
	if (seconds < 3) return 'just now';
	if (seconds < 60) return `${seconds} s ago`;
	const minutes = Math.floor(seconds / 60);
	if (minutes < 60) return `${minutes} min ago`;
	const hours = Math.floor(minutes / 60);
	if (hours < 24) return `${hours} h ago`;
	return `on ${formatDate(then)}`;
}

/** A name at the head of a line, as it stands inside a sentence. */
export function inSentence(name: string): string {
	return /^[A-Z][a-z]/.test(name) ? name.charAt(0).toLowerCase() + name.slice(1) : name;
}

/** "1 edit", "3 edits". */
export function counted(count: number, noun: string): string {
	return `${count} ${noun}${count === 1 ? '' : 's'}`;
}
