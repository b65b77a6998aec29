import { solveCorner, sweepBump } from '../src/lib/kinematics';
import { TRUCK, ROAD } from '../tests/unit/kinematics/corners';
const s = solveCorner(TRUCK, { travel: 0, rack: 0 });
console.log(JSON.stringify(s));
for (const on of ['lowerArm', 'upperArm', 'upright'] as const) {
	const g = {
		...ROAD,
		coilover: { ...ROAD.coilover!, on, bottom: on === 'upperArm' ? ([0, 520, 440] as const) : ROAD.coilover!.bottom }
	};
	for (const [t, r] of [
		[0, 0],
		[40, 0],
		[-60, 10],
		[30, -25]
	]) {
		const h = 1e-2;
		const a = solveCorner(g, { travel: t! - h, rack: r }),
			b = solveCorner(g, { travel: t! + h, rack: r }),
			c = solveCorner(g, { travel: t, rack: r });
		const d = (f: (s: typeof a) => number) => (f(b) - f(a)) / 2 / h;
		const rows: [string, number, number][] = [
			['camberRate', c.camberRate!, d((s) => s.camber)],
			['toeRate', c.toeRate!, d((s) => s.toe)],
			['casterRate', c.casterRate!, d((s) => s.caster)],
			['halfTrackRate', c.halfTrackRate!, d((s) => s.halfTrack)],
			['MR', c.motionRatio!, -d((s) => s.coiloverLength!)],
			['MRrate', c.motionRatioRate!, d((s) => s.motionRatio!)],
			['z', 1, d((s) => s.wheelCentre[2])]
		];
		const k = g.coilover.rate!,
			F = g.coilover.forceAtRide!,
			L0 = Math.hypot(...[0, 1, 2].map((i) => g.coilover.top[i]! - g.coilover.bottom[i]!));
		const E = (s: typeof a) => {
			const x = L0 - s.coiloverLength!;
			return F * x + 0.5 * k * x * x;
		};
		const hh = 0.5;
		const A = solveCorner(g, { travel: t! - hh, rack: r }),
			B = solveCorner(g, { travel: t! + hh, rack: r });
		rows.push(['wheelRate', c.wheelRate!, (E(A) + E(B) - 2 * E(c)) / hh / hh]);
		console.log(on, t, r, rows.map(([n, x, y]) => `${n} ${x.toPrecision(7)} ${(x - y).toExponential(1)}`).join(' | '));
	}
}
const sw = sweepBump(ROAD, { from: -400, to: 400, step: 10 });
console.log(sw.states.length, sw.lowLimit, sw.highLimit);
const sw2 = sweepBump(TRUCK, { from: -500, to: 500, step: 10 });
console.log(sw2.states.length, sw2.lowLimit, sw2.highLimit);
for (const [g, sw_] of [
	[ROAD, sw],
	[TRUCK, sw2]
] as const)
	for (const l of [sw_.lowLimit!, sw_.highLimit!].filter(Boolean)) {
		const s = solveCorner(g, { travel: l.value });
		console.log(l, s.wheelCentre[2] - solveCorner(g).wheelCentre[2] - l.value, s.camber, s.camberRate);
		try {
			solveCorner(g, { travel: l.value + Math.sign(l.value) * 1e-6 });
			console.log('!');
		} catch (e) {
			console.log(String(e));
		}
	}
