/**
 * A sheet's pixel is a printer's point (1/72 in): 1224 × 852 on the screen prints on A3, and the stated scale is
 * true on the paper. A screen has no millimetres of its own.
 */
export const SHEET_PX_PER_MM = 72 / 25.4;

/** Scales a drawing may have, largest first, as the denominator of 1:n. The same ratios serve inches (1/4, 1/8). */
export const SCALES = [2, 2.5, 3, 4, 5, 6, 8, 10] as const;
export type Scale = (typeof SCALES)[number];

/** Pixels of the sheet for one mm of the car at 1:n. */
export const pxPerMm = (scale: Scale): number => SHEET_PX_PER_MM / scale;

/** The largest scale for which `fits(pixels a mm)` holds; the smallest one where none does. */
export function chooseScale(fits: (pxPerMm: number) => boolean): Scale {
	return SCALES.find((scale) => fits(pxPerMm(scale))) ?? SCALES[SCALES.length - 1] ?? 10;
}

/** How a scale is written: "1:5", and "1:5 × 2.4" in a view that is zoomed. */
export function scaleText(scale: Scale, zoom = 1): string {
	const ratio = `1:${scale}`;
	return Math.abs(zoom - 1) < 0.005 ? ratio : `${ratio} × ${zoom.toFixed(zoom < 10 ? 1 : 0)}`;
}
