import { emptyCoilover } from '$lib/domain/axle';
import { rightEntry } from '$lib/domain/difference';
import { entryOf } from '$lib/domain/points';
import { mergedPoint, type PasteResult } from '$lib/domain/pointsCsv';
import type { AxleDocument } from '$lib/schemas/axle';

/**
 * Puts pasted points into a document that may be changed. Points of a mirrored right side make it an entry of its own,
 * points of a coil-over make one; an empty coordinate keeps what stood there.
 */
export function putPoints(document: AxleDocument, points: PasteResult['points']): void {
	for (const { side, key, point } of points) {
		if (side === 'right' && document.right === 'mirror') document.right = rightEntry(plain(document));
		const corner = side === 'left' ? document.left : document.right;
		if (corner === 'mirror') continue;
		if (key.startsWith('coilover')) corner.coilover ??= emptyCoilover();
		const entry = entryOf(corner, key);
		if (!entry) continue;
		const merged = mergedPoint(entry, point);
		merged.forEach((value, place) => (entry[place] = value));
	}
}

/** A document that is being changed is a proxy; what is cloned must be plain. */
function plain(document: AxleDocument): AxleDocument {
	return JSON.parse(JSON.stringify(document)) as AxleDocument;
}
