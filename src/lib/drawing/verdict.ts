/** How a figure stands to its target; the word stands in text, the mark on the sheet. */
export type Verdict = 'pass' | 'near' | 'miss' | 'unknown';

/** Path data of the marks ✓ ~ ✕ in a box of 9 px about its centre: the sheet's face has no such signs of its own. */
export const VERDICT_PATHS: Record<Verdict, string> = {
	pass: 'M-4 0.5L-1.2 3.5L4 -3.5',
	near: 'M-4.5 1C-3 -2.6 -1.4 -1.6 0 0S3 2.6 4.5 -1',
	miss: 'M-3.4 -3.4L3.4 3.4M-3.4 3.4L3.4 -3.4',
	unknown: 'M-3 0H3'
};

/** Stroke classes on dye. */
export const VERDICT_STROKES: Record<Verdict, string> = {
	pass: 'stroke-dye-pass',
	near: 'stroke-dye-near',
	miss: 'stroke-dye-miss',
	unknown: 'stroke-steel-3'
};

/** Room a mark takes after a figure (px). */
export const VERDICT_ROOM = 15;
