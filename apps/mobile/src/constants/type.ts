import { Platform } from 'react-native';

/** Type sizes, px. Body is 17 on a phone and 15 in dense tables on a wide screen. */
export const size = { tiny: 13, small: 15, body: 17, lead: 20, title: 26, figure: 34 } as const;

const lineOf = (px: number): number => Math.round(px * (px >= 26 ? 1.18 : px >= 20 ? 1.28 : 1.42));

export type SizeName = keyof typeof size;
export type WeightName = 'regular' | 'semibold';

/** On the web one variable face does every weight; on a phone's own system each weight is a face. */
export const face = Platform.select({
  web: {
    regular: { fontFamily: 'SourceSans', fontWeight: '400' },
    semibold: { fontFamily: 'SourceSans', fontWeight: '600' },
  },
  default: {
    regular: { fontFamily: 'SourceSans3_400Regular', fontWeight: 'normal' },
    semibold: { fontFamily: 'SourceSans3_600SemiBold', fontWeight: 'normal' },
  },
} as const);

/** Text style of a size and weight. The face's figures all have one width, so columns of them line up. */
export const typeOf = (name: SizeName, weight: WeightName = 'regular') => ({
  ...face[weight],
  fontSize: size[name],
  lineHeight: lineOf(size[name]),
});
