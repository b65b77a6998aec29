import * as K from '../src/lib/kinematics';
import { TRUCK, ROAD } from '../tests/unit/kinematics/corners';
const base = K.solveCorner(TRUCK);
for (const t of [3.05, 1.52])
	for (const [f, r] of [
		[t, 0],
		[0, t],
		[t, t]
	] as const) {
		const s = K.applyAlignment(TRUCK, { kind: 'pivotShift' }, { front: f, rear: r, tieRod: 0 });
		console.log(
			t,
			f,
			r,
			'caster',
			(s.caster - base.caster).toFixed(3),
			'camber',
			(s.camber - base.camber).toFixed(3),
			'toe',
			s.toe.toFixed(3),
			s.contactPoint[2],
			s.travel
		);
	}
for (const kind of ['pivotShift', 'legLength'] as const) {
	const s = K.solveAlignment(ROAD, { kind }, { camber: -1, caster: 5, toe: 0.1 }, { travel: -12, rake: 0.5 });
	console.log(s.front, s.rear, s.tieRod, s.state.camber, s.state.caster, s.state.toe, s.state.travel);
}
for (const tg of [{ camber: -1 }, { caster: 5 }, { toe: 0.2 }, {}, { camber: -1, toe: 0 }]) {
	const s = K.solveAlignment(ROAD, { kind: 'legLength' }, tg);
	console.log(s.front, s.rear, s.tieRod, s.state.camber, s.state.caster, s.state.toe);
}
for (const tg of [
	{ camber: -60, caster: 5, toe: 0 },
	{ camber: -1, caster: 40, toe: 0 },
	{ camber: -1, caster: 4, toe: 80 },
	{ camber: 80 }
]) {
	const t = performance.now();
	try {
		K.solveAlignment(ROAD, { kind: 'legLength' }, tg);
		console.log('??');
	} catch (e) {
		console.log(String(e), (e as K.KinematicsError).at, performance.now() - t);
	}
}
const r = K.sweepRoll(ROAD, { from: -4, to: 4, step: 1 });
for (const s of r.states)
	console.log(
		s.roll,
		s.left.travel.toFixed(4),
		s.right.travel.toFixed(4),
		s.left.camberToGround.toFixed(4),
		s.right.camberToGround.toFixed(4),
		s.left.camber.toFixed(4),
		s.rollCentre
	);
console.log(K.solveCorner(ROAD).rollCentreHeight);
const t0 = performance.now();
const rr = K.sweepRoll(ROAD, { from: -50, to: 50, step: 1, heave: 10 });
console.log(rr.states.length, rr.lowLimit, rr.highLimit, performance.now() - t0);
const st = K.sweepSteer(ROAD, { from: -60, to: 60, step: 10 });
for (const s of st.states)
	console.log(
		s.rack,
		s.left.steerAngle.toFixed(4),
		s.right.steerAngle.toFixed(4),
		s.ackermann,
		s.reasons.ackermann,
		s.left.travel,
		s.right.points.lowerBall[1]
	);
const t1 = performance.now();
const ss = K.sweepSteer(ROAD, { from: -200, to: 200, step: 1, travel: 30 });
console.log(ss.states.length, ss.lowLimit, ss.highLimit, performance.now() - t1);
