import { answerAxle, type AxleTask, type SideAnswer } from '$lib/domain/alignment/answer';

/** An alignment is worked out beside the page: a scarce stock can take seconds. */
export type WorkerAnswer = { ok: true; answers: SideAnswer[] } | { ok: false; message: string };

function work(task: AxleTask): WorkerAnswer {
	try {
		return { ok: true, answers: answerAxle(task) };
	} catch (error) {
		return { ok: false, message: error instanceof Error ? error.message : String(error) };
	}
}

self.addEventListener('message', (event: MessageEvent<AxleTask>) => self.postMessage(work(event.data)));
