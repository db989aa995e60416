/** The longer side of a photo's two sizes, px. */
export const LARGE_PX = 1600;
export const SMALL_PX = 400;
