import { describe, expect, it } from 'vitest';
import { changesBetween, movedColumns } from '$lib/components/compare/changes';
import { added, choices, choicesAt, entriesOf, newestOf, replaced } from '$lib/components/compare/entries';
import { figureRows, targetRows } from '$lib/components/compare/figures';
import { solveDocument, stateAt } from '$lib/components/travel/solve';
import { rightEntry } from '$lib/domain/difference';
import { exampleAxle, examplePoints } from '$lib/domain/example';
import type { AxleDocument, Target } from '$lib/schemas/axle';
import type { RevisionSummary } from '$lib/schemas/build';
import { DEFAULT_PREFERENCES } from '$lib/schemas/preferences';

const mm = DEFAULT_PREFERENCES;
const inch = { ...mm, length: 'in' } as const;
const given = (letter: string | null, document = exampleAxle()) => ({ letter, note: `of ${letter}`, document });
const changed = (recipe: (document: AxleDocument) => void): AxleDocument => {
	const document = exampleAxle();
	recipe(document);
	return document;
};

describe('what is compared', () => {
	it('keeps the order chosen, and gives the newest the first look', () => {
		const entries = entriesOf([given('C'), given(null), given('AA'), given('B')], null);
		expect(entries.map(({ key }) => key)).toEqual(['C', 'draft', 'AA', 'B']);
		expect(entries.map(({ seriesIndex }) => seriesIndex)).toEqual([2, 0, 1, 3]);
		expect(newestOf(entries)?.name).toBe('the draft');
	});

	it('takes the draft as it stands on this page', () => {
		const here = changed((document) => (document.left.wheel.camber = -2));
		const [draft, kept] = entriesOf([given(null), given('B')], here);
		expect(draft?.document).toBe(here);
		expect(kept?.document.left.wheel.camber).toBe(-0.5);
	});

	it('offers every geometry once', () => {
		const revision = (letter: string, note: string) => ({ letter, note }) as RevisionSummary;
		const all = choices(
			[revision('B', 'Upper arm twenty-eight shorter, and a long story about it'), revision('A', '')],
			true
		);
		expect(all.map(({ label }) => label)).toEqual(['Draft', 'B · Upper arm twenty-eight shorter, a…', 'A']);
		expect(choicesAt(all, ['B', 'draft'], 0).map(({ value }) => value)).toEqual(['B', 'A']);
		expect(replaced(['B', 'draft'], 0, 'A')).toEqual(['A', 'draft']);
		expect(added(['B', 'draft'], all)).toEqual(['B', 'draft', 'A']);
		expect(added(['A', 'B', 'draft'], all)).toEqual(['A', 'B', 'draft']);
		expect(added(['A', 'B', 'C', 'D'], all)).toEqual(['A', 'B', 'C', 'D']);
	});
});

describe('what changed', () => {
	const table = { origin: 'rail', height: 260, foreAft: 'aft', foreOrigin: 10 } as const;
	const moved = changed((document) => {
		const [x, y, z] = document.left.points.upperBall as [number, number, number];
		document.left.points.upperBall = [x - 6, y + 3, z];
	});

	it('tells a point’s move in the builder’s words, and its distance', () => {
		const { moved: rows, others, same } = changesBetween(exampleAxle(), moved, table, mm);
		// 6 mm back is +6 where aft is positive; √(6² + 3²) = 6.708.
		expect(rows).toEqual([
			{
				key: 'left upperBall',
				name: 'upper ball joint',
				by: { out: '+3.0', up: '–', fore: '+6.0' },
				total: '6.7',
				reason: null
			}
		]);
		expect(movedColumns(table).map(({ word }) => word)).toEqual(['out', 'up', 'aft']);
		expect(others).toEqual([]);
		expect(same).toBe(false);
		expect(changesBetween(exampleAxle(), moved, table, inch).moved[0]?.total).toBe('0.264');
	});

	it('counts out as outboard on the right side too, and names the side there', () => {
		const own = (document: AxleDocument) => ({ ...document, right: rightEntry(document) });
		const { moved: rows } = changesBetween(own(exampleAxle()), own(moved), table, mm);
		expect(rows.map(({ name }) => name)).toEqual(['left, upper ball joint', 'right, upper ball joint']);
		expect(rows[0]?.by).toEqual(rows[1]?.by);
	});

	it('gives a dash and the reason where a place is not typed', () => {
		const half = changed((document) => (document.left.points.tieRodInner = [1, null, 2]));
		const [row] = changesBetween(exampleAxle(), half, table, mm).moved;
		expect(row?.by).toEqual({ out: '–', up: '–', fore: '–' });
		expect(row?.total).toBe('–');
		expect(row?.reason).not.toBeNull();
	});

	it('tells fields and targets in words', () => {
		const target: Target = { figure: 'camber', at: 'ride', low: -1, high: -0.5 };
		const other = changed((document) => {
			document.left.wheel.track = 1500;
			if (document.left.coilover) document.left.coilover.on = 'upperArm';
			document.targets = [target];
		});
		const { others } = changesBetween(exampleAxle(), other, table, mm);
		expect(others).toContain('Track: 1480.0 → 1500.0 mm');
		expect(others).toContain('Coil-over stands on: lower arm → upper arm');
		expect(others).toContain('Target set: Camber −1.00 to −0.50°');
		expect(changesBetween(other, exampleAxle(), table, mm).others).toContain(
			'Target taken out: Camber −1.00 to −0.50°'
		);
	});

	it('says so where nothing differs', () => {
		expect(changesBetween(exampleAxle(), exampleAxle(), table, mm)).toEqual({ moved: [], others: [], same: true });
	});
});

describe('figures side by side', () => {
	const range = { from: -75, to: 75, step: 25 };
	const state = (key: string, document: AxleDocument, travel = 0) => {
		const { solved } = solveDocument(document, 'left', range);
		return {
			key,
			ride: solved?.ride ?? null,
			now: solved && stateAt(solved.geometry, travel),
			why: solved ? null : `${key} cannot be solved.`
		};
	};
	const leaned = changed((document) => (document.left.wheel.camber = -1.25));

	it('counts differences from the first, signed, and only what is seen differs', () => {
		const rows = figureRows([state('B', exampleAxle()), state('C', leaned)], true, mm);
		const camber = rows.find(({ key }) => key === 'camber');
		expect(camber?.cells.map(({ text, delta }) => [text, delta])).toEqual([
			['−0.50', null],
			['−1.25', '−0.75']
		]);
		expect(camber?.differs).toBe(true);
		const toe = rows.find(({ key }) => key === 'toe');
		expect(toe?.cells[1]?.delta).toBe('0.00');
		expect(toe?.differs).toBe(false);
	});

	it('leaves bump steer out at ride height, where it is nothing by its definition', () => {
		const at = (travel: number, atRide: boolean) =>
			figureRows([state('B', exampleAxle(), travel)], atRide, mm).map(({ key }) => key);
		expect(at(0, true)).not.toContain('bumpSteer');
		expect(at(25, false)).toContain('bumpSteer');
	});

	it('shows the rest beside one that cannot be solved or lacks a figure', () => {
		const broken = changed((document) => (document.left.points.upperBall = [null, 1, 2]));
		const rows = figureRows([state('B', exampleAxle()), state('C', broken), state('D', examplePoints())], true, mm);
		const ratio = rows.find(({ key }) => key === 'motionRatio');
		expect(ratio?.cells.map(({ text, delta, reason }) => [text === '–', delta, reason !== null])).toEqual([
			[false, null, false],
			[true, '–', true],
			[true, '–', true]
		]);
		expect(ratio?.differs).toBe(true);
		expect(ratio?.cells[1]?.reason).toBe('C cannot be solved.');
	});

	it('judges every target of any of them, once', () => {
		const aim: Target = { figure: 'camber', at: 'ride', low: -1, high: 0 };
		const same: Target = { high: 0, low: -1, at: 'ride', figure: 'camber' };
		const steer: Target = {
			figure: 'bumpSteer',
			at: 'travel',
			from: -25,
			to: 25,
			measure: 'peak',
			low: null,
			high: 0.001
		};
		const judged = (document: AxleDocument) => ({
			document,
			evaluation: solveDocument(document, 'left', range).solved?.evaluation ?? null,
			why: null
		});
		const rows = targetRows(
			[judged({ ...exampleAxle(), targets: [aim] }), judged({ ...leaned, targets: [same, steer] })],
			mm
		);
		expect(rows.map(({ words }) => words)).toEqual([
			'Camber −1.00 to 0.00°',
			'Bump steer, peak over −25.0 to +25.0 mm, at most 0.00°'
		]);
		// −1.25 lies 0.25 outside a band 1 wide: more than the fifth that counts as near.
		expect(rows[0]?.cells.map(({ text, verdict, own }) => [text, verdict, own])).toEqual([
			['−0.50', 'pass', true],
			['−1.25', 'miss', true]
		]);
		expect(rows[1]?.cells.map(({ own }) => own)).toEqual([false, true]);
	});
});
