import type { Side } from '$lib/domain/datum';
import type { PointKey } from '$lib/domain/points';
import { createContext } from 'svelte';

export type { PointKey, Side };

/** One selection for all views and the table, and the pair the trammel is set to. */
export class Selection {
	/** The chosen point, or null. */
	point = $state<PointKey | null>(null);
	/** The point under the pointer, or null. */
	hovered = $state<PointKey | null>(null);
	/** Which corner is worked on. */
	side = $state<Side>('left');
	/** The two points the trammel stands on; null while it is folded. The second is null until it is picked. */
	trammel = $state<readonly [PointKey, PointKey | null] | null>(null);

	choose(point: PointKey | null): void {
		this.point = point;
	}

	/** Sets a leg of the trammel: the first, then the second, then it starts anew; the first again folds it. */
	setTrammel(point: PointKey): void {
		const now = this.trammel;
		if (now === null || now[1] !== null) this.trammel = [point, null];
		else this.trammel = now[0] === point ? null : [now[0], point];
	}

	foldTrammel(): void {
		this.trammel = null;
	}
}

export const [getSelection, setSelection] = createContext<Selection>();
