import type { Thread } from '$lib/domain/alignment/threads';

interface Named {
	/** "left front". */
	readonly name: string;
	/** One line beside the name: what to do. */
	readonly note: string;
}

/** What is drawn for one end of one upper arm. */
export type EndDrawing =
	| (Named & {
			readonly kind: 'pack';
			/** mm each, from the bracket out. */
			readonly shims: readonly number[];
			readonly unknown: boolean;
			readonly tail: number | null;
			readonly outboard: boolean;
	  })
	| (Named & {
			readonly kind: 'rod';
			readonly thread: Thread;
			readonly turns: number | null;
			readonly engaged: number | null;
			readonly way: string;
	  });
