import type { Locator, Page } from '@playwright/test';
import type { PointKey } from '../../../src/lib/domain/points';

/** A point's mark in one of the views of the drawing sheet. */
export function markOf(
	page: Page,
	view: 'Front view' | 'Side view' | 'Top view' | 'Orbit view',
	key: PointKey
): Locator {
	return page.getByRole('group', { name: view, exact: true }).locator(`[data-mark="${key}"]`);
}

/** Where a mark stands on the screen: the middle of its ring. */
export async function centreOf(mark: Locator): Promise<{ x: number; y: number }> {
	const box = await mark.locator('.ring').boundingBox();
	if (!box) throw new Error('The mark is not drawn.');
	return { x: box.x + box.width / 2, y: box.y + box.height / 2 };
}
