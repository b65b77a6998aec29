/** How long ago, in words: "just now", "12 s ago", "5 min ago", "3 h ago", "2 days ago". Both in ms of one clock. */
export function ago(then: number, now: number): string {
	const seconds = Math.max(0, Math.floor((now - then) / 1000));
	if (seconds < 3) return 'just now';
	if (seconds < 60) return `${seconds} s ago`;
	const minutes = Math.floor(seconds / 60);
	if (minutes < 60) return `${minutes} min ago`;
	const hours = Math.floor(minutes / 60);
	if (hours < 24) return `${hours} h ago`;
	const days = Math.floor(hours / 24);
	return days === 1 ? '1 day ago' : `${days} days ago`;
}

/** "1 edit", "3 edits". */
export function counted(count: number, noun: string): string {
	return `${count} ${noun}${count === 1 ? '' : 's'}`;
}
