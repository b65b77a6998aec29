import { wholeTravel, type PreparedAxle } from './axle';
import type { LinkName } from './errors';
import { evaluateAt } from './evaluate';
import type { Side, Vec3 } from './geometry';
import * as at from './layout';
import { outOfReach } from './locate';
import { nearestLock } from './path';
import type { Prepared } from './prepared';

const DEGREES = 180 / Math.PI;
/** The two lowest points are level when their heights differ by less, as a part of the axle's size. */
const LEVEL = 1e-13;
/** Longest step of the shift, mm, and how much shorter than the way left to the end. */
const LONGEST_STEP = 4;
const PART_OF_REST = 0.25;
/** A rest under this, mm, is taken in one. */
const LAST_REST = 1e-7;
/** A travel this near to its end, mm, is the end: what is left is rounding. */
const ROUNDING = 1e-9;
/** A turning point of the roll is found to this, mm of shift. */
const FINEST = 1e-10;
/** The last roll told lies this far before the one found, degrees, so that it can be come to again. */
const BACK_OFF = 1e-9;

/** The ground's upward normal in body axes: (0, across, up), the sine and cosine of the roll. */
export interface Ground {
	readonly across: number;
	readonly up: number;
}

/** @param roll degrees */
export function groundAt(roll: number): Ground {
	return { across: Math.sin(roll / DEGREES), up: Math.cos(roll / DEGREES) };
}

export function vectorIn(row: Float64Array, slot: number): Vec3 {
	return [row[slot] as number, row[slot + 1] as number, row[slot + 2] as number];
}

/** Height of the disc's lowest point over the body's origin, and its rates with travel (mm/mm) and with roll (mm/rad). */
interface Height {
	readonly height: number;
	readonly perTravel: number;
	readonly perRoll: number;
}

/** n·w − r·√(1 − (n·s)²), n the ground's normal, w the wheel centre and s the spin axis; and its derivatives. */
function heightOf(p: Prepared, row: Float64Array, { across, up }: Ground): Height {
	const w = vectorIn(row, at.WHEEL_CENTRE);
	const s = vectorIn(row, at.SPIN);
	const t = vectorIn(row, at.TURN);
	const c = vectorIn(row, at.CONTACT);
	const v = vectorIn(row, at.CONTACT_MOVE);
	const lean = across * s[1] + up * s[2];
	const level = Math.sqrt(1 - lean * lean);
	const lever = (p.radius * lean) / level;
	const hubY = v[1] + t[2] * (w[0] - c[0]) - t[0] * (w[2] - c[2]);
	const leanRate = across * (t[2] * s[0] - t[0] * s[2]) + up * (t[0] * s[1] - t[1] * s[0]);
	return {
		height: across * w[1] + up * w[2] - p.radius * level,
		perTravel: across * hubY + up + lever * leanRate,
		perRoll: up * w[1] - across * w[2] + lever * (up * s[1] - across * s[2])
	};
}

/** Both wheels at travels heave + shift and heave − shift: their mean is the heave whatever the shift. */
export interface Pairing {
	readonly shift: number;
	readonly left: Float64Array;
	readonly right: Float64Array;
}

/** A pairing and the roll at which both its lowest points are level, degrees. */
interface Node extends Pairing {
	readonly roll: number;
	/** How the gap in height grows with the shift: the roll turns back where it passes 0. NaN at a dead centre. */
	readonly slope: number;
}

export interface Stop {
	readonly locks: LinkName;
	readonly side: Side;
}

/** One way of rolling from a level body: ends of the shift on that way, and the nodes walked so far, outward. */
interface Way {
	readonly end: number;
	readonly stop: Stop;
	readonly nodes: Node[];
	ended: Stop | null;
}

/** The rolls a pair of corners can take at a heave, walked by the shift, for which the roll is always well defined. */
export class RollPath {
	private readonly enough: number;
	/** The left wheel droops and the body's left side rises: positive rolls; and the other way. */
	private readonly positive: Way;
	private readonly negative: Way;

	/** @throws KinematicsError `out-of-reach` where the heave is beyond a corner's travel */
	constructor(
		readonly pair: PreparedAxle,
		readonly heave: number
	) {
		const { left, right } = pair;
		this.enough = LEVEL * (left.size + left.wheelHeight + left.halfTrack + right.halfTrack);
		const ends = { left: wholeTravel(left), right: wholeTravel(right) };
		for (const side of ['left', 'right'] as const) {
			const { low, high } = ends[side];
			const past = heave > high.value ? high : heave < low.value ? low : null;
			if (past) throw outOfReach('travel', heave, past.value, past.locks, side);
		}
		const start = this.node(0, 0);
		const down = Math.max(ends.left.low.value - heave, heave - ends.right.high.value);
		const up = Math.min(ends.left.high.value - heave, heave - ends.right.low.value);
		const downStop: Stop =
			down === ends.left.low.value - heave
				? { locks: ends.left.low.locks, side: 'left' }
				: { locks: ends.right.high.locks, side: 'right' };
		const upStop: Stop =
			up === ends.left.high.value - heave
				? { locks: ends.left.high.locks, side: 'left' }
				: { locks: ends.right.low.locks, side: 'right' };
		this.positive = { end: down, stop: downStop, nodes: [start], ended: null };
		this.negative = { end: up, stop: upStop, nodes: [start], ended: null };
	}

	private row(p: Prepared, asked: number): Float64Array {
		const { low, high } = wholeTravel(p);
		const nearest = Math.abs(asked - low.value) < Math.abs(asked - high.value) ? low.value : high.value;
		const travel = Math.abs(asked - nearest) <= ROUNDING ? nearest : asked;
		const row = new Float64Array(at.STATE_LENGTH);
		evaluateAt(p, travel, 0, row, 0);
		return row;
	}

	private pairing(shift: number): Pairing {
		const { left, right } = this.pair;
		return { shift, left: this.row(left, this.heave + shift), right: this.row(right, this.heave - shift) };
	}

	private gap({ left, right }: Pairing, roll: number): Height {
		const ground = groundAt(roll);
		const a = heightOf(this.pair.left, left, ground);
		const b = heightOf(this.pair.right, right, ground);
		return {
			height: a.height - b.height,
			perTravel: a.perTravel + b.perTravel,
			perRoll: a.perRoll - b.perRoll
		};
	}

	/** The roll for a shift: Newton; the gap grows with the roll by about the track, so it is safe from anywhere near. */
	private node(shift: number, near: number): Node {
		const pairing = this.pairing(shift);
		let roll = near;
		let last = Infinity;
		for (;;) {
			const gap = this.gap(pairing, roll);
			const size = Math.abs(gap.height);
			if (size <= this.enough || size >= last) return { ...pairing, roll, slope: gap.perTravel };
			last = size;
			roll -= (gap.height / gap.perRoll) * DEGREES;
		}
	}

	/** One step further on a way, or its end: of the travel, or where the roll turns back. */
	private walk(way: Way): void {
		const last = way.nodes[way.nodes.length - 1] as Node;
		const rest = way.end - last.shift;
		const size = Math.abs(rest);
		const whole = size <= LAST_REST;
		const shift = whole ? way.end : last.shift + Math.sign(rest) * Math.min(LONGEST_STEP, PART_OF_REST * size);
		const next = this.node(shift, last.roll);
		if (next.slope <= 0) {
			way.nodes.push(this.turningPoint(last, next));
			way.ended = this.stopAtTurn(way.nodes[way.nodes.length - 1] as Node);
			return;
		}
		way.nodes.push(next);
		if (whole) way.ended = way.stop;
	}

	private turningPoint(before: Node, after: Node): Node {
		let good = before;
		let bad = after;
		while (Math.abs(bad.shift - good.shift) > FINEST) {
			const middle = this.node((good.shift + bad.shift) / 2, good.roll);
			if (middle.slope > 0) good = middle;
			else bad = middle;
		}
		return good;
	}

	/** The wheel that no longer follows, and the link nearest to its dead centre there. */
	private stopAtTurn({ shift, roll, left, right }: Node): Stop {
		const ground = groundAt(roll);
		const fromLeft = heightOf(this.pair.left, left, ground).perTravel;
		const side = fromLeft < heightOf(this.pair.right, right, ground).perTravel ? 'left' : 'right';
		this.row(this.pair[side], this.heave + (side === 'left' ? shift : -shift));
		return { locks: nearestLock(this.pair[side]), side };
	}

	/** The pairing at a roll, or what stops the body short of it and the last roll it takes. */
	at(roll: number): Pairing | { last: number; stop: Stop } {
		const start = this.positive.nodes[0] as Node;
		const way = roll >= start.roll ? this.positive : this.negative;
		const outward = way === this.positive ? 1 : -1;
		let node = way.nodes[way.nodes.length - 1] as Node;
		while (!way.ended && (roll - node.roll) * outward > 0) {
			this.walk(way);
			node = way.nodes[way.nodes.length - 1] as Node;
		}
		const last = node.roll - outward * BACK_OFF;
		if (way.ended && (roll - node.roll) * outward > -BACK_OFF / 2) return { last, stop: way.ended };
		const past = way.nodes.findIndex((each) => (each.roll - roll) * outward >= 0);
		const after = way.nodes[past] as Node;
		return past === 0 ? after : this.between(way.nodes[past - 1] as Node, after, roll);
	}

	/** The shift for a roll between two nodes: Newton in a bracket; a step that no longer halves the gap halves that. */
	private between(one: Node, other: Node, roll: number): Pairing {
		let low = Math.min(one.shift, other.shift);
		let high = Math.max(one.shift, other.shift);
		let shift = one.shift + ((roll - one.roll) / (other.roll - one.roll)) * (other.shift - one.shift);
		let last = Infinity;
		for (;;) {
			const pairing = this.pairing(shift);
			const { height, perTravel } = this.gap(pairing, roll);
			const size = Math.abs(height);
			if (size <= this.enough) return pairing;
			if (height < 0) low = shift;
			else high = shift;
			let next = shift - height / perTravel;
			if (!(size < last / 2 && next > low && next < high)) next = (low + high) / 2;
			if (next <= low || next >= high) return pairing;
			last = size;
			shift = next;
		}
	}
}
