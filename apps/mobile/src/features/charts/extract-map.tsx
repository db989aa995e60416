import { useMemo, useState } from 'react';
import type { PegPageView, SpotView } from '@mereward/shared/charts/contract';
import { drawExtract } from '@mereward/shared/charts/drawing/extract-page';
import { extractParts } from '@mereward/shared/charts/drawing/extract-parts';
import { palettes } from '@mereward/shared/charts/drawing/palette';
import { PLAIN_SVG, toSvg } from '@mereward/shared/charts/drawing/to-svg';
import { View } from 'react-native';
import { useTheme } from '@/hooks/use-theme';
import { useThreeColumns } from '@/hooks/use-wide';
import { useChartUnits } from './use-chart-units';
import { SvgPicture } from '@/components/svg-picture';

const PHONE_HEIGHT_PX = 390;
const WIDE_HEIGHT_PX = 500;

type Props = { page: PegPageView; spot: SpotView | null; label: string };

/** The water before a peg, seen from the peg: it stands at the foot and its casts go up the page. */
export function ExtractMap({ page, spot, label }: Props) {
  const { extract } = page;
  const { name } = useTheme();
  const units = useChartUnits();
  const heightPx = useThreeColumns() ? WIDE_HEIGHT_PX : PHONE_HEIGHT_PX;
  const [widthPx, setWidthPx] = useState(0);
  const content = useMemo(() => (extract ? extractParts(page, extract) : null), [page, extract]);
  const svg = useMemo(() => {
    if (!extract || !content || widthPx === 0) return '';
    const spots = page.spots ?? [];
    const terms = { page, extract, parts: content, spots, chosen: spot, units, widthPx, heightPx };
    return toSvg(drawExtract(terms, palettes[name]), { ...PLAIN_SVG, idPrefix: 'extract' });
  }, [content, extract, name, page, spot, units, widthPx, heightPx]);
  if (!extract) return null;
  return (
    <View
      style={{ minHeight: heightPx, overflow: 'hidden' }}
      onLayout={({ nativeEvent }) => setWidthPx(Math.round(nativeEvent.layout.width))}
    >
      {svg ? <SvgPicture svg={svg} label={label} /> : null}
    </View>
  );
}
