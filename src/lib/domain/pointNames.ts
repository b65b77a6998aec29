import type { Side } from './datum';
import type { PointKey } from './points';

/** What a name in a pasted list means. */
export interface NamedPoint {
	key: PointKey;
	/** Where the name says it. */
	side: Side | null;
}

/** Short forms that no rule of words below would tell. Tails of "pivot", "bolt" and the like are taken off before. */
const SHORT: Readonly<Record<string, PointKey>> = {
	uf: 'upperFront',
	ufp: 'upperFront',
	ucaf: 'upperFront',
	uaf: 'upperFront',
	uif: 'upperFront',
	ufi: 'upperFront',
	ur: 'upperRear',
	urp: 'upperRear',
	ucar: 'upperRear',
	uar: 'upperRear',
	uir: 'upperRear',
	uri: 'upperRear',
	ub: 'upperBall',
	ubj: 'upperBall',
	uob: 'upperBall',
	uo: 'upperBall',
	lf: 'lowerFront',
	lfp: 'lowerFront',
	lcaf: 'lowerFront',
	laf: 'lowerFront',
	lif: 'lowerFront',
	lfi: 'lowerFront',
	lr: 'lowerRear',
	lrp: 'lowerRear',
	lcar: 'lowerRear',
	lar: 'lowerRear',
	lir: 'lowerRear',
	lri: 'lowerRear',
	lb: 'lowerBall',
	lbj: 'lowerBall',
	lob: 'lowerBall',
	lo: 'lowerBall',
	tri: 'tieRodInner',
	itr: 'tieRodInner',
	ti: 'tieRodInner',
	itre: 'tieRodInner',
	tro: 'tieRodOuter',
	otr: 'tieRodOuter',
	to: 'tieRodOuter',
	tre: 'tieRodOuter',
	otre: 'tieRodOuter',
	cot: 'coiloverTop',
	cob: 'coiloverBottom'
};

const short = (text: string): PointKey | undefined => (Object.hasOwn(SHORT, text) ? SHORT[text] : undefined);

const WORDS: readonly (readonly [RegExp, string])[] = [
	[/^(upper|top|up|uca|ua|u)$/, 'upper'],
	[/^(lower|bottom|low|lca|la|bot)$/, 'lower'],
	[/^(front|fwd|forward|fore|f|fr|frt|leading)$/, 'front'],
	[/^(rear|back|aft|rearward|rr|trailing)$/, 'rear'],
	[/^(ball|balljoint|bj|balljnt|outer|outboard|upright|knuckle|o)$/, 'outer'],
	[/^(inner|inboard|chassis|frame|body|in|i)$/, 'inner'],
	[/^(tie|tierod|tierods|track|trackrod|toe|toelink|steering|tr)$/, 'tie'],
	[/^(rack|rackend)$/, 'rack'],
	[/^(coil|coilover|coilovers|spring|shock|damper|strut)$/, 'coil'],
	[/^(left|lh|lhs)$/, 'left'],
	[/^(right|rh|rhs)$/, 'right']
];

/** "UpperFrontPivot", "upper_front-pivot", "tie-rod (inner)" → plain words. */
function wordsOf(name: string): string[] {
	return name
		.replace(/([a-z])([A-Z])/g, '$1 $2')
		.toLowerCase()
		.replace(/[^a-z0-9]+/g, ' ')
		.trim()
		.split(' ')
		.filter((word) => word !== '');
}

/** The links whose points are told by front, rear and outer. */
function pointOfArm(arm: 'upper' | 'lower', said: ReadonlySet<string>): PointKey | null {
	if (said.has('front') === said.has('rear')) return said.has('outer') || said.has('ball') ? `${arm}Ball` : null;
	return said.has('ball') ? null : said.has('front') ? `${arm}Front` : `${arm}Rear`;
}

/** In the trade the outer end is "the tie-rod end"; the inner one is the rack end. Common practice, no source. */
function pointOfTieRod(said: ReadonlySet<string>): PointKey | null {
	if (said.has('inner')) return said.has('outer') ? null : 'tieRodInner';
	if (said.has('rack')) return said.has('outer') ? null : 'tieRodInner';
	return said.has('outer') || said.has('end') || said.has('arm') ? 'tieRodOuter' : null;
}

function keyOf(words: readonly string[]): PointKey | null {
	const said = new Set(words.map((word) => WORDS.find(([pattern]) => pattern.test(word))?.[1] ?? word));
	if (said.has('joint') && words.includes('ball')) said.add('ball');
	if (words.some((word) => /^(ball|balljoint|bj)$/.test(word))) said.add('ball');
	const [upper, lower] = [said.has('upper'), said.has('lower')];
	if (said.has('coil')) return upper === lower ? null : upper ? 'coiloverTop' : 'coiloverBottom';
	if (said.has('rack') || said.has('tie')) return pointOfTieRod(said);
	// "uca r": in a list of arms a lone r is the rear one.
	if (said.has('r') && !said.has('front')) said.add('rear');
	return upper === lower ? null : pointOfArm(upper ? 'upper' : 'lower', said);
}

/** Words that say nothing of which point it is. */
const EMPTY =
	/^(pivot|pivots|bolt|point|pt|pickup|mount|mounting|bush|bushing|centre|center|control|a|of|the|at|no|joint)$/;

/** The point that a name or abbreviation means, as builders write them: "UF", "upper arm, front pivot", "LBJ", "rack end", "shock top". Null where it is none or not clear. */
export function readPointName(name: string): NamedPoint | null {
	const words = wordsOf(name);
	const side = words.some((word) => /^(left|lh|lhs)$/.test(word))
		? 'left'
		: words.some((word) => /^(right|rh|rhs)$/.test(word))
			? 'right'
			: null;
	const telling = words.filter((word) => !/^(left|lh|lhs|right|rh|rhs)$/.test(word));
	const compact = telling.filter((word) => !EMPTY.test(word)).join('');
	const key = short(compact) ?? short(telling.join('')) ?? keyOf(telling);
	return key ? { key, side } : null;
}
