/** Spaces between things, in px; a step is about 1.5 of the one before. */
export const space = { hair: 4, small: 8, medium: 12, page: 16, large: 24, wide: 36, huge: 56 } as const;

/** Least side of anything to be touched: 48 px; 56 px on the bank, where hands are wet and it is dusk. */
export const target = { plain: 48, bank: 56 } as const;

/** Width from which the program uses a rail and stands things side by side, px. */
export const WIDE_FROM_PX = 768;

/** Width from which three columns fit, px. */
export const THREE_COLUMNS_FROM_PX = 1120;

/** A line of body text holds about 68 characters at this width, px. */
export const MEASURE_PX = 490;

export const radius = { small: 4, control: 8, sheet: 14 } as const;

/** How long anything moves, ms. */
export const MOTION_MS = 170;
