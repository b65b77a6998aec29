import { describe, expect, it } from 'vitest';
import {
	figuresParameter,
	rangeParameters,
	readQuery,
	USUAL_FIGURES,
	withParameters
} from '$lib/components/travel/query';
import { DEFAULT_PREFERENCES } from '$lib/schemas/preferences';

const mm = DEFAULT_PREFERENCES;
const read = (text: string) => readQuery(new URLSearchParams(text), mm);

describe('the address of a page over travel', () => {
	it('is as usual where it says nothing', () => {
		expect(read('')).toEqual({
			range: { from: -75, to: 75, step: 5 },
			errors: {},
			figures: USUAL_FIGURES,
			side: 'left',
			under: true,
			page: 1
		});
	});

	it('gives back what was written into it', () => {
		const range = { from: -63.5, to: 50.8, step: 3.175 };
		const text = withParameters(new URLSearchParams('rev=C'), {
			...rangeParameters(range),
			show: figuresParameter(['toe', 'camber']),
			side: 'right',
			under: 'none',
			page: '3'
		});
		expect(text).toBe('?rev=C&from=-63.5&to=50.8&step=3.175&show=camber,toe&side=right&under=none&page=3');
		expect(read(text)).toEqual({ range, errors: {}, figures: ['camber', 'toe'], side: 'right', under: false, page: 3 });
	});

	it('leaves the usual choice out', () => {
		expect(figuresParameter([...USUAL_FIGURES].reverse())).toBeNull();
		expect(withParameters(new URLSearchParams('show=toe'), { show: null })).toBe('');
	});

	it.each(['from=abc', 'from=-9000', 'to=NaN', 'step=0', 'step=1e-9', 'from=-400&to=400&step=0.5', 'from=Infinity'])(
		'tells what is wrong with %s and stands on the usual range',
		(text) => {
			const { range, errors } = read(text);
			expect(range).toEqual({ from: -75, to: 75, step: 5 });
			expect(Object.keys(errors)).not.toHaveLength(0);
		}
	);

	it.each(['show=', 'show=nonsense,__proto__,constructor', 'page=-1', 'page=1e99', 'page=two', 'side=up'])(
		'makes nothing of %s',
		(text) => {
			expect(read(text)).toEqual(read(''));
		}
	);
});
