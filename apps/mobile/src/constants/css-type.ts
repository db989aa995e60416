import type { CSSProperties } from 'react';
import { typeOf, type SizeName, type WeightName } from '@/constants/type';

/** The same text style for an element of the browser's own, whose line height wants its unit. */
export function cssType(name: SizeName, weight: WeightName = 'regular'): CSSProperties {
  const { lineHeight, ...rest } = typeOf(name, weight);
  return { ...rest, lineHeight: `${String(lineHeight)}px` };
}
