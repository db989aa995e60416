import { contrastOf, hexOf, mixed } from './colour';
import type { Palette, Ramp } from './palette';

/** A shallow lake stays pale: the ramp's deep end stands for at least this depth, metres. */
const LEAST_FULL_DEPTH_M = 3;
const READABLE = 4.5;

/** The depth tint at share `t` of the ramp, from straw at the shore (0) to peat-ink (1). */
export function tintAt(t: number, ramp: Ramp): string {
  const share = Math.min(1, Math.max(0, t));
  return hexOf({
    lightness: ramp.shallowLightness + (ramp.deepLightness - ramp.shallowLightness) * share,
    chroma: (0.035 + 0.045 * Math.sin(Math.PI * share)) * ramp.chromaShare,
    hueDeg: 100 + 125 * share,
  });
}

/** One tint for the water between two isobaths. */
export type Band = { fromM: number; tint: string };

/** The bands of a chart: from the surface, then one from each level on. Levels rise; metres. */
export function bandsOf(levelsM: readonly number[], ramp: Ramp): Band[] {
  const fullM = Math.max(LEAST_FULL_DEPTH_M, levelsM.at(-1) ?? 0);
  return [0, ...levelsM].map((fromM) => ({ fromM, tint: tintAt(fromM / fullM, ramp) }));
}

/** The band a depth lies in; the first for the surface and above it. */
export function bandAt(bands: readonly Band[], depthM: number): Band {
  let found = bands[0];
  if (!found) throw new RangeError('A chart has at least one band.');
  for (const band of bands) if (band.fromM <= depthM) found = band;
  return found;
}

/** Ink for figures and glyphs on a tint, and the halo that keeps them readable where a line crosses. */
export type LabelInk = { ink: string; halo: string };

/**
 * Dark ink on light water, light ink on dark water, whichever stands out more. In the middle of the ramp neither
 * reaches 4.5:1 on the tint itself, so the halo is the tint moved away from the ink until it does.
 */
export function labelInkOn(tint: string, palette: Palette): LabelInk {
  const { labelDark, labelLight } = palette;
  const dark = contrastOf(labelDark, tint) >= contrastOf(labelLight, tint);
  const ink = dark ? labelDark : labelLight;
  const away = dark ? '#FFFFFF' : '#000000';
  for (let share = 0; share <= 1; share += 0.05) {
    const halo = mixed(tint, away, share);
    if (contrastOf(ink, halo) >= READABLE) return { ink, halo };
  }
  return { ink, halo: away };
}

const SHAPE_CONTRAST = 3.2;

/** Ink for pattern glyphs on a tint: as quiet as a shape may be (a little over 3:1), so that figures stand out. */
export function glyphInkOn(tint: string, palette: Palette): string {
  const { ink } = labelInkOn(tint, palette);
  for (let share = 0.95; share > 0; share -= 0.05) {
    const quiet = mixed(ink, tint, share);
    if (contrastOf(quiet, tint) >= SHAPE_CONTRAST) return quiet;
  }
  return ink;
}

const LINE_CONTRAST = 2.2;

/** Ink for a hairline on a tint: dark, until the water is so deep that a dark line would be lost in it. */
export function lineInkOn(tint: string, { labelDark, labelLight }: Palette): string {
  return contrastOf(labelDark, tint) >= LINE_CONTRAST ? labelDark : mixed(tint, labelLight, 0.6);
}
