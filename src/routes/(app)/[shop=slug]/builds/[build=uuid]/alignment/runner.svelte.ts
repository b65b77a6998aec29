import type { AxleTask, SideAnswer } from '$lib/domain/alignment/answer';
import type { WorkerAnswer } from './answer.worker';
import { startWorker } from './startWorker';

/** Works out answers in a worker, always the newest task: an older one that still runs is stopped. */
export class AnswerRunner {
	/** The newest answer that was finished; stays while the next is worked out. */
	answers = $state.raw<readonly SideAnswer[] | null>(null);
	working = $state(false);
	/** An unexpected failure, in the error's words. */
	failure = $state<string | null>(null);
	#worker: Worker | null = null;
	#stopped = $state(false);

	get stopped(): boolean {
		return this.#stopped;
	}

	ask(task: AxleTask | null): void {
		if (this.working) this.#end();
		this.#stopped = false;
		this.failure = null;
		if (!task) {
			this.answers = null;
			this.working = false;
			return;
		}
		this.working = true;
		this.#ready().postMessage(task);
	}

	/** Leaves the last answer as it is. */
	stop(): void {
		this.#end();
		this.working = false;
		this.#stopped = true;
	}

	dispose(): void {
		this.#end();
	}

	#ready(): Worker {
		if (this.#worker) return this.#worker;
		const worker = startWorker();
		worker.addEventListener('message', (event: MessageEvent<WorkerAnswer>) => {
			this.working = false;
			if (event.data.ok) this.answers = event.data.answers;
			else this.failure = event.data.message;
		});
		worker.addEventListener('error', (event) => {
			this.working = false;
			this.failure = event.message || 'The answer could not be worked out.';
		});
		this.#worker = worker;
		return worker;
	}

	#end(): void {
		this.#worker?.terminate();
		this.#worker = null;
	}
}
