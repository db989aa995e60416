import { useMemo, useState } from 'react';
import type { PegPageView, SpotView } from '@mereward/shared/charts/contract';
import { castMarks, spotMarks } from '@mereward/shared/charts/drawing/cast-marks';
import { drawMap } from '@mereward/shared/charts/drawing/draw-map';
import { extractParts, outlookView } from '@mereward/shared/charts/drawing/extract-parts';
import { northMarks, scaleBarMarks } from '@mereward/shared/charts/drawing/furniture';
import { palettes } from '@mereward/shared/charts/drawing/palette';
import { PLAIN_SVG, toSvg } from '@mereward/shared/charts/drawing/to-svg';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { View } from 'react-native';
import { useTheme } from '@/hooks/use-theme';
import { useThreeColumns } from '@/hooks/use-wide';
import { useChartUnits } from './use-chart-units';
import { isobathFigure } from '@mereward/shared/charts/depth-words';
import { spotCast } from './spot-cast';
import { SvgPicture } from '@/components/svg-picture';

const PHONE_HEIGHT_PX = 390;
const WIDE_HEIGHT_PX = 500;
const LEAST_REACH_M = 45;
const PAST_SPOT_M = 14;
const BEHIND_PX = 74; // for the peg's number and the scale

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
    const palette = palettes[name];
    const farthestM = Math.max(
      0,
      ...(page.spots ?? []).map(({ xM, yM }) => Math.hypot(xM - extract.originM.xM, yM - extract.originM.yM)),
    );
    const reachM = Math.max(LEAST_REACH_M, farthestM + PAST_SPOT_M);
    const outlook = { towards: 'up', reachM, behindPx: BEHIND_PX } as const;
    const view = outlookView(extract, outlook, { widthPx, heightPx });
    const cast = spot ? spotCast(extract.originM, spot, units.stickSpacingM) : null;
    const marks = drawMap(
      { ...content, spots: page.spots ?? [] },
      {
        palette,
        view,
        depthWords: (depthM) => isobathFigure(depthM, extract.contourStepM, units.length),
        selectedPegId: page.id,
        selectedSpotId: null,
      },
    );
    const chosen =
      spot && cast ? [...castMarks(cast, palette, view), ...spotMarks([spot], palette, spot.id)] : [];
    const bar = {
      x: 14,
      y: heightPx - 20,
      mostPx: view.widthPx * 0.28,
      stickSpacingM: units.stickSpacingM,
      sticks: stickWords(units.stickSpacingM),
    };
    const round = [
      ...scaleBarMarks(view, bar, palette),
      ...northMarks(view, { x: view.widthPx - 42, y: 42 }, palette),
    ];
    const layers = [{ view, atPx: { x: 0, y: 0 }, marks: [...marks, ...chosen] }, { marks: round }];
    return toSvg(
      { widthPx: view.widthPx, heightPx, ground: palette.paper, layers },
      { ...PLAIN_SVG, idPrefix: 'extract' },
    );
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
