import { SHEET_PX_PER_MM } from '$lib/drawing/scale';

/** A rod end in its leg, mm; `thread` is its outside diameter. Eye and leg are of a usual size for the thread, not of this car. */
export interface RodEndSpec {
	readonly diameter: number;
	readonly pitch: number;
	/** Thread inside the leg, mm; null where it is not known. */
	readonly engaged: number | null;
	readonly width: number;
}

export interface RodEndLayout {
	readonly enlargement: number;
	readonly pxPerMm: number;
	/** Left end, face and half height of the leg, px. */
	readonly leg: { readonly x: number; readonly face: number; readonly half: number };
	readonly nut: { readonly x: number; readonly w: number; readonly half: number };
	readonly thread: { readonly x: number; readonly w: number; readonly half: number };
	/** Thread inside the leg, drawn hidden. */
	readonly inside: { readonly x: number; readonly w: number; readonly half: number };
	readonly eye: { readonly x: number; readonly outer: number; readonly ball: number; readonly bore: number };
}

const ENLARGEMENTS = [3, 2.5, 2, 1.5, 1, 0.75] as const;

/** Where the parts of a rod end stand on the page, the eye outboard at the right. */
export function layRodEnd({ diameter, pitch, engaged, width }: RodEndSpec): RodEndLayout {
	const inside = Math.max(engaged ?? 1.2 * diameter, 0);
	const leg = Math.max(inside + diameter * 0.6, 2 * diameter);
	const [nut, shown, neck, eye] = [
		diameter * 0.5,
		Math.max(4 * pitch, diameter * 0.5),
		diameter * 0.35,
		diameter * 1.15
	];
	const length = leg + nut + shown + neck + 2 * eye;
	const enlargement = ENLARGEMENTS.find((n) => length * n * SHEET_PX_PER_MM <= width - 20) ?? 0.75;
	const px = enlargement * SHEET_PX_PER_MM;
	const start = (width - length * px) / 2;
	const face = start + leg * px;
	return {
		enlargement,
		pxPerMm: px,
		leg: { x: start, face, half: 0.75 * diameter * px },
		nut: { x: face, w: nut * px, half: 0.8 * diameter * px },
		thread: { x: face + nut * px, w: (shown + neck) * px, half: (diameter / 2) * px },
		inside: { x: face - inside * px, w: inside * px, half: (diameter / 2) * px },
		eye: {
			x: face + (nut + shown + neck + eye) * px,
			outer: eye * px,
			ball: 0.72 * diameter * px,
			bore: (diameter / 2) * px
		}
	};
}

/** A V profile on both edges of a shank and its slanted lines, px. */
export function shankThread(
	x: number,
	w: number,
	middle: number,
	half: number,
	pitch: number
): { outline: string; slants: string } {
	const turns = Math.max(1, Math.round(w / pitch));
	const step = w / turns;
	const root = half - Math.min(pitch * 0.5, half * 0.18);
	const upper: string[] = [];
	const lower: string[] = [];
	let slants = '';
	for (let i = 0; i < turns; i++) {
		const at = x + i * step;
		upper.push(`${at} ${middle - root}`, `${at + step / 2} ${middle - half}`);
		lower.push(`${at} ${middle + half}`, `${at + step / 2} ${middle + root}`);
		slants += `M${at + step / 2} ${middle - half}L${at} ${middle + half}`;
	}
	upper.push(`${x + w} ${middle - root}`);
	lower.push(`${x + w} ${middle + half}`);
	return { outline: `M${upper.join('L')}L${lower.reverse().join('L')}Z`, slants };
}
