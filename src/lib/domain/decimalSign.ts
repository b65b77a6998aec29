import type { Preferences } from '../schemas/preferences';

type Numbers = Preferences['numbers'];

const SIGN_OF: Readonly<Record<Numbers, '.' | ','>> = { point: '.', comma: ',' };
const OTHER: Readonly<Record<Numbers, Numbers>> = { point: 'comma', comma: 'point' };

/** The plain number at the head of a cell: "12.5" of "12.5 mm". */
function headOf(cell: string): string {
	return /^[-+−–—]?\s*([\d.,]+)/.exec(cell)?.[1] ?? '';
}

/** Which decimal sign one number shows beyond doubt, or `either` where its one sign may part thousands, or null for none. */
function shownBy(number: string): Numbers | 'either' | null {
	const signs = number.replace(/\d/g, '');
	if (signs === '') return null;
	const last = signs.at(-1) === '.' ? 'point' : 'comma';
	// Both signs: the last one is the decimal. One sign twice: it parts thousands.
	if (signs.length > 1) return new Set(signs).size > 1 ? last : OTHER[last];
	const [whole = '', decimals = ''] = number.split(SIGN_OF[last]);
	return decimals.length === 3 && /^[1-9]\d{0,2}$/.test(whole) ? 'either' : last;
}

/**
 * The decimal sign of a list, or null where it has to be asked: numbers that show both, or only ones like "12,375" against
 * the person's own sign.
 */
export function decimalOf(cells: readonly string[], preferred: Numbers): Numbers | null {
	const heads = cells.map(headOf).filter((head) => head !== '');
	const shown = heads.map(shownBy);
	const [point, comma] = [shown.includes('point'), shown.includes('comma')];
	if (point && comma) return null;
	if (point || comma) return point ? 'point' : 'comma';
	const doubtful = heads.some((head, i) => shown[i] === 'either' && !head.includes(SIGN_OF[preferred]));
	return doubtful ? null : preferred;
}

/** A cell without the signs that part thousands, once the decimal sign is known: "1,234.5" → "1234.5". */
export function plainDecimal(cell: string, decimal: Numbers): string {
	const head = headOf(cell);
	const group = SIGN_OF[OTHER[decimal]];
	const parts = head.split(SIGN_OF[decimal]);
	const grouped = (parts[0] ?? '').split(group);
	const isGrouped = parts.length <= 2 && grouped.length > 1 && /^\d{1,3}$/.test(grouped[0] ?? '');
	if (!isGrouped || !grouped.slice(1).every((three) => /^\d{3}$/.test(three)) || grouped[0] === '0') return cell;
	return cell.replace(head, [grouped.join(''), ...parts.slice(1)].join(SIGN_OF[decimal]));
}
