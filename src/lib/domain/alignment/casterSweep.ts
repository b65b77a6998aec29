const RADIANS = Math.PI / 180;

/** Camber read with the wheel steered: degrees. `steer` is the turn plate's angle, + to the left. */
export interface SweepReading {
	readonly steer: number;
	readonly camber: number;
}

export type SweepCaster =
	| {
			readonly ok: true;
			/** Exact for this kpi, degrees. */
			readonly caster: number;
			/** What the shop rule would say, degrees; null where it has no factor for these angles. */
			readonly shopRule: number | null;
			/** That factor: 1.5 at ±20°, 2 at ±14.5°. */
			readonly factor: number | null;
	  }
	| { readonly ok: false; readonly message: string };

/** Angles closer than this say nothing about caster, degrees. */
export const LEAST_SWEEP = 5;
/** How near a pair of angles must be to ±20 or ±14.5 for the shop rule, degrees. */
const NEAR_ENOUGH = 0.25;
const SHOP_RULES = [
	{ steer: 20, factor: 1.5 },
	{ steer: 14.5, factor: 2 }
];

/**
 * Caster from camber read at any two steer angles of one wheel, for a known kpi. The spin axis s keeps its angle to the
 * steering axis, which is along (−tan caster, −tan kpi, 1) (x forward, y outboard, z up), and steered by δ towards the
 * outside it is s = (−cos γ sin δ', cos γ cos δ', −sin γ). Equal products of the two readings are linear in tan caster:
 * tan caster · (cos γ₁ sin δ₁ − cos γ₂ sin δ₂) = sin γ₁ − sin γ₂ + tan kpi · (cos γ₁ cos δ₁ − cos γ₂ cos δ₂).
 * Neglects that the body settles a little as the wheels are steered.
 * @param kpi degrees, of the wheel as it stands straight ahead
 */
export function casterFromSweep(side: 'left' | 'right', a: SweepReading, b: SweepReading, kpi: number): SweepCaster {
	const wrong = [a, b].find(({ steer, camber }) => !(Math.abs(steer) <= 60) || !(Math.abs(camber) <= 45));
	if (wrong) return { ok: false, message: 'Steer angles are from −60 to 60° and camber from −45 to 45°.' };
	if (Math.abs(a.steer - b.steer) < LEAST_SWEEP) {
		return {
			ok: false,
			message: `The two steer angles must lie at least ${LEAST_SWEEP}° apart: read camber once to each side.`
		};
	}
	// Towards the outside: a left wheel steered to the left.
	const out = side === 'left' ? 1 : -1;
	const [one, two] = [parts(a, out), parts(b, out)];
	const rise = Math.sin(a.camber * RADIANS) - Math.sin(b.camber * RADIANS);
	const tangent = (rise + Math.tan(kpi * RADIANS) * (one.cosine - two.cosine)) / (one.sine - two.sine);
	const rule = SHOP_RULES.find(
		({ steer }) =>
			Math.abs(Math.abs(a.steer) - steer) <= NEAR_ENOUGH &&
			Math.abs(Math.abs(b.steer) - steer) <= NEAR_ENOUGH &&
			a.steer * b.steer < 0
	);
	const gained = (a.camber - b.camber) * Math.sign(a.steer - b.steer) * out;
	return {
		ok: true,
		caster: Math.atan(tangent) / RADIANS,
		factor: rule?.factor ?? null,
		shopRule: rule ? rule.factor * gained : null
	};
}

function parts({ steer, camber }: SweepReading, out: number): { sine: number; cosine: number } {
	const [delta, gamma] = [steer * out * RADIANS, camber * RADIANS];
	return { sine: Math.cos(gamma) * Math.sin(delta), cosine: Math.cos(gamma) * Math.cos(delta) };
}
