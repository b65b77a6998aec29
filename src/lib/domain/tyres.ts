import { MM_PER_INCH } from '../units';

/** A tyre read from its size designation. mm; `rim` as written, in inches. */
export interface TyreSize {
	/** The size in its usual spelling: "205/55R16". */
	readonly label: string;
	readonly sectionWidth: number;
	/** Section height over section width, percent. */
	readonly aspect: number;
	readonly rim: number;
	/** Unloaded. */
	readonly freeDiameter: number;
}

export type ReadTyre = { ok: true; tyre: TyreSize } | { ok: false; message: string };

/** Of the free radius. Common practice, no source (0.94 to 0.97 are met); better measured with the car's weight on the tyre. */
export const LOADED_PART = 0.955;

const SIZE = /^(?:P|LT)?\s*(\d{3})\s*\/\s*(\d{2,3})\s*(?:Z?R|[DB-])?\s*(\d{2}(?:\.5)?)(?:C|LT)?(?:\s+\(?\d{2,3}.*)?$/i;
const ACCEPTED = 'Write a tyre size such as 205/55R16: width in mm, aspect, rim in inches.';

/** A metric tyre size, such as 205/55R16, P215/65 R 17 or 205/55ZR16 91W. The free diameter is rim + 2 · width · aspect (ISO size designation). */
export function readTyreSize(text: string): ReadTyre {
	const match = SIZE.exec(text.trim());
	if (!match) return { ok: false, message: ACCEPTED };
	const [sectionWidth, aspect, rim] = match.slice(1).map(Number) as [number, number, number];
	if (sectionWidth < 105 || sectionWidth > 455)
		return { ok: false, message: 'Tyre width: 105 to 455 mm, such as 205 in 205/55R16.' };
	if (aspect < 20 || aspect > 105)
		return { ok: false, message: 'Tyre aspect: 20 to 105 percent, such as 55 in 205/55R16.' };
	if (rim < 8 || rim > 30) return { ok: false, message: 'Rim: 8 to 30 inches, such as 16 in 205/55R16.' };
	const freeDiameter = rim * MM_PER_INCH + (2 * sectionWidth * aspect) / 100;
	return { ok: true, tyre: { label: `${sectionWidth}/${aspect}R${rim}`, sectionWidth, aspect, rim, freeDiameter } };
}

/** The tyre of a size, or null where it is not one. */
export function parseTyreSize(text: string): TyreSize | null {
	const read = readTyreSize(text);
	return read.ok ? read.tyre : null;
}

/** A loaded radius to begin with, mm, to whole mm: common practice, no source; the measured one is better. */
export function proposedLoadedRadius({ freeDiameter }: Pick<TyreSize, 'freeDiameter'>): number {
	return Math.round((freeDiameter / 2) * LOADED_PART);
}
