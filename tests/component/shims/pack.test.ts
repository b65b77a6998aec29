import PackSheet from '$lib/components/shims/PackSheet.svelte';
import ShimStack from '$lib/components/shims/ShimStack.svelte';
import { layStack, PARTS, sharedEnlargement, spread } from '$lib/components/shims/stack';
import { formatThickness, formatTurns } from '$lib/components/shims/words';
import { threadOf } from '$lib/domain/alignment/threads';
import { SHEET_PX_PER_MM } from '$lib/drawing/scale';
import { DEFAULT_PREFERENCES, type Preferences } from '$lib/schemas/preferences';
import { render, screen, within } from '@testing-library/svelte';
import fc from 'fast-check';
import type { Component } from 'svelte';
import { beforeAll, describe, expect, it, vi } from 'vitest';
import Frame from '../../support/Frame.svelte';

// jsdom lays nothing out; the sheet is given its width.
beforeAll(() => {
	vi.stubGlobal(
		'ResizeObserver',
		class {
			observe() {}
			unobserve() {}
			disconnect() {}
		}
	);
});

const SHIMS = [3, 25.4 / 16, 0.5, 0.5];

function draw(given: Record<string, unknown>, preferences: Partial<Preferences> = {}) {
	return render(Frame, {
		props: {
			part: ShimStack as unknown as Component<Record<string, unknown>>,
			given: { name: 'left front', shims: SHIMS, tail: 6, outboard: true, width: 520, ...given },
			preferences: { ...DEFAULT_PREFERENCES, ...preferences }
		}
	});
}

/** The figures above the pack, left to right. */
function figures(): string[] {
	const pack = screen.getByRole('group', { name: /^left front/ });
	return [...pack.querySelectorAll<SVGTextElement>('text.text-table')]
		.sort((a, b) => Number(a.getAttribute('x')) - Number(b.getAttribute('x')))
		.map((text) => text.textContent.trim());
}

describe('the pack drawn', () => {
	it('gives every shim its own dimension, and one to the whole', () => {
		draw({});
		expect(figures()).toEqual(['3.00', '1.59', '0.50', '0.50']);
		expect(screen.getByRole('img', { name: 'left front, whole pack: 5.59 mm' })).toBeInTheDocument();
		expect(
			screen.getByRole('group', { name: /4 shims, 3.00, 1.59, 0.50, 0.50, together 5.59 mm/ })
		).toBeInTheDocument();
	});

	it('stacks from the bracket out: the other way round where the shaft sits inboard', () => {
		draw({ outboard: false });
		expect(figures()).toEqual(['0.50', '0.50', '1.59', '3.00']);
		expect(screen.getByText('← inboard')).toBeInTheDocument();
	});

	it('names inch shims by their fraction where fractions are wanted', () => {
		draw({ shims: [25.4 / 8, 25.4 / 32, 0.762] }, { length: 'in', inches: 'fraction' });
		expect(figures()).toEqual(['1/8', '1/32', '0.030']);
	});

	it('shows thread past the nut, and none where none is left', () => {
		const { container, unmount } = draw({ tail: 6 });
		expect(container.querySelector('[data-part="thread"]')).not.toBeNull();
		unmount();
		expect(draw({ tail: 0 }).container.querySelector('[data-part="thread"]')).toBeNull();
	});

	it('says that no shim is in', () => {
		draw({ shims: [] });
		expect(
			screen.getByRole('group', { name: 'left front: no shims, the shaft sits on its bracket.' })
		).toBeInTheDocument();
	});

	it('draws a pack of unknown pieces as one block with the whole alone', () => {
		draw({ shims: [4], unknown: true });
		expect(figures()).toEqual([]);
		expect(
			screen.getByRole('group', { name: 'left front: a pack of 4.00 mm, its pieces not known.' })
		).toBeInTheDocument();
	});
});

describe('the sheet', () => {
	it('draws four ends at one stated scale with a title block', () => {
		const ends = ['left front', 'right front', 'left rear', 'right rear'].map((name, index) => ({
			kind: 'pack',
			name,
			note: '+1.00 mm from now',
			shims: Array<number>(index + 1).fill(1.5),
			unknown: false,
			tail: 5,
			outboard: true
		}));
		const title = {
			build: 'Wren coupe',
			shop: 'Harrow Lane',
			letter: 'C',
			after: 'B',
			date: '1 Dec 2026',
			drawnBy: 'I. Calder',
			unit: 'mm',
			angle: 'third'
		};
		render(Frame, {
			props: {
				part: PackSheet as unknown as Component<Record<string, unknown>>,
				given: { ends, title, fixed: 720 },
				preferences: DEFAULT_PREFERENCES
			}
		});
		const block = screen.getByRole('group', { name: 'Title block' });
		expect(within(block).getByText(/^\d(\.5)?:1 · mm$/)).toBeInTheDocument();
		expect(within(block).getByText('C')).toBeInTheDocument();
		expect(screen.getAllByRole('group', { name: /^(left|right) (front|rear): / })).toHaveLength(4);
	});

	it('draws a rod end with what to turn and what stays engaged', () => {
		const end = {
			kind: 'rod',
			name: 'left front',
			note: '',
			thread: threadOf('5/8-18'),
			turns: 1.5,
			engaged: 17.2,
			way: 'out, anticlockwise seen from the eye'
		};
		render(Frame, {
			props: {
				part: PackSheet as unknown as Component<Record<string, unknown>>,
				given: {
					ends: [end],
					title: {
						build: 'W',
						shop: 'H',
						letter: null,
						after: null,
						date: '',
						drawnBy: '',
						unit: 'mm',
						angle: 'third'
					},
					fixed: 720
				},
				preferences: DEFAULT_PREFERENCES
			}
		});
		expect(
			screen.getByRole('group', { name: /1½ turns out, anticlockwise seen from the eye. 17.20 mm engaged/ })
		).toBeInTheDocument();
	});
});

describe('the layout of a pack', () => {
	it('is true to scale, every part beside the next', () => {
		fc.assert(
			fc.property(
				fc.array(fc.double({ min: 0.1, max: 5, noNaN: true }), { maxLength: 9 }),
				fc.boolean(),
				fc.integer({ min: 320, max: 900 }),
				(shims, outboard, width) => {
					const stack = layStack({ shims, tail: 6, outboard, width });
					const px = stack.enlargement * SHEET_PX_PER_MM;
					stack.shims.forEach(({ w }, index) => expect(w).toBeCloseTo((shims[index] ?? 0) * px, 9));
					expect(stack.bracket.w).toBeCloseTo(PARTS.bracket * px, 9);
					const chain = [stack.head, stack.bracket, ...stack.shims, stack.foot, stack.washer, stack.nut, stack.tail];
					const ordered = outboard ? chain : [...chain].reverse();
					ordered.slice(1).forEach((part, index) => {
						const before = ordered[index];
						expect(part.x).toBeCloseTo((before?.x ?? NaN) + (before?.w ?? NaN), 6);
					});
				}
			)
		);
	});

	it('takes the largest enlargement at which every pack of the sheet fits', () => {
		const one = { shims: [3, 2], tail: 6, outboard: true };
		const wide = sharedEnlargement([{ ...one, width: 700 }]);
		expect(
			sharedEnlargement([
				{ ...one, width: 700 },
				{ ...one, shims: [5, 5, 5], width: 340 }
			])
		).toBeLessThan(wide);
		const layout = layStack({ ...one, width: 700 });
		expect(layout.tail.x + layout.tail.w).toBeLessThanOrEqual(700);
		expect(layout.head.x).toBeGreaterThanOrEqual(0);
	});

	it('spreads figures so that none lies on another, in order, inside the sheet', () => {
		const labels = fc.array(
			fc.record({ at: fc.double({ min: 0, max: 360, noNaN: true }), width: fc.integer({ min: 20, max: 36 }) }),
			{ maxLength: 8 }
		);
		fc.assert(
			fc.property(labels, (wishes) => {
				const sorted = [...wishes].sort((a, b) => a.at - b.at);
				const placed = spread(sorted, 8, 0, 360);
				placed.forEach((label, index) => {
					expect(label.from).toBe(sorted[index]?.at);
					expect(label.x - label.width / 2).toBeGreaterThanOrEqual(-1e-6);
					expect(label.x + label.width / 2).toBeLessThanOrEqual(360 + 1e-6);
					const before = placed[index - 1];
					if (before) expect(label.x - label.width / 2).toBeGreaterThanOrEqual(before.x + before.width / 2 + 8 - 1e-6);
				});
			})
		);
	});
});

describe('words of the pack', () => {
	it('writes thicknesses as a micrometer reads them', () => {
		expect(formatThickness(25.4 / 32, DEFAULT_PREFERENCES)).toBe('0.79');
		expect(formatThickness(0.762, { ...DEFAULT_PREFERENCES, length: 'in' })).toBe('0.030');
		expect(formatThickness(null, DEFAULT_PREFERENCES)).toBe('–');
	});

	it('writes half turns as halves', () => {
		expect(formatTurns(1.5, DEFAULT_PREFERENCES)).toBe('1½');
		expect(formatTurns(-0.5, DEFAULT_PREFERENCES)).toBe('−½');
		expect(formatTurns(2, DEFAULT_PREFERENCES)).toBe('2');
		expect(formatTurns(0.351, DEFAULT_PREFERENCES)).toBe('0.35');
	});
});
