/** The worker that works out answers, in a thread of its own. */
export function startWorker(): Worker {
	return new Worker(new URL('./answer.worker.ts', import.meta.url), { type: 'module' });
}
