import { QueryClient } from '@tanstack/svelte-query';
import { ApiProblem } from './api';

/** A refusal will not turn into an answer by asking again; a lost connection or a server fault may. */
export function worthRetrying(failures: number, error: Error): boolean {
	if (error instanceof ApiProblem && error.status < 500) return false;
	return failures < 2;
}

/** The query client of one page load: made in the root layout's component, never at module level (a server has many people). */
export function createQueryClient(browser: boolean): QueryClient {
	return new QueryClient({
		defaultOptions: {
			queries: { enabled: browser, staleTime: 30_000, retry: worthRetrying, refetchOnWindowFocus: true },
			mutations: { retry: false }
		}
	});
}
