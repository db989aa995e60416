import type { Palette } from '@mereward/shared/charts/drawing/palette';

/** What is written over the depth tints: dark on a light halo by day, light on a dark one where the ramp is dark. */
export const inksOver = ({ ramp, labelDark, labelLight }: Palette): { ink: string; halo: string } =>
  ramp.shallowLightness > 0.8 ? { ink: labelDark, halo: labelLight } : { ink: labelLight, halo: labelDark };
