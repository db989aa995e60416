import { useMemo } from 'react';
import { BOTTOM_GLYPHS, type Patterned } from '@mereward/shared/charts/drawing/bottom-glyphs';
import type { BottomArea } from '@mereward/shared/charts/drawing/bottom-areas';
import type { Ground } from '@mereward/shared/charts/drawing/ground';
import { palettes, type Palette } from '@mereward/shared/charts/drawing/palette';
import { placeSwatchSvg, type DrawnPlace } from '@mereward/shared/charts/drawing/place-marks';
import { swatchSvg } from '@mereward/shared/charts/drawing/swatch';
import { bandsOf } from '@mereward/shared/charts/drawing/tint';
import { LakePlaceKind, PLACE_WORDS } from '@mereward/shared/lakes/place-contract';
import { View } from 'react-native';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';
import { useChartUnits } from './use-chart-units';
import { isobathFigure } from '@mereward/shared/charts/depth-words';
import { SvgPicture } from '@/components/svg-picture';

/** The tints and the depths they begin at. */
function Tints({ ground, palette }: { ground: Ground; palette: Palette }) {
  const { length } = useChartUnits();
  const { colours } = useTheme();
  const bands = bandsOf(ground.levelsM, palette.ramp);
  const every = Math.max(1, Math.ceil(bands.length / 6));
  return (
    <View aria-hidden style={{ flexDirection: 'row', maxWidth: 420 }}>
      {bands.map(({ fromM, tint }, i) => (
        <View key={fromM} style={{ flex: 1 }}>
          <View
            style={{ height: 14, backgroundColor: tint, borderColor: colours.rule, borderBottomWidth: 1 }}
          />
          <Text size="tiny" tone="inkSoft">
            {i % every === 0 ? isobathFigure(fromM, ground.stepM, length) : ''}
          </Text>
        </View>
      ))}
      <Text size="tiny" tone="inkSoft" style={{ alignSelf: 'flex-end', paddingLeft: space.hair }}>
        {length}
      </Text>
    </View>
  );
}

function Swatch({ kind, palette }: { kind: Patterned; palette: Palette }) {
  const { words, abbreviation } = BOTTOM_GLYPHS[kind];
  const svg = useMemo(() => swatchSvg(kind, palette), [kind, palette]);
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', gap: space.hair }}>
      <SvgPicture svg={svg} />
      <Text size="small">{abbreviation === words ? words : `${words} (${abbreviation})`}</Text>
    </View>
  );
}

/** What stands at the lake, kind by kind, by its sign and by name. */
function Places({ places, palette }: { places: readonly DrawnPlace[]; palette: Palette }) {
  const kinds = LakePlaceKind.options.flatMap((kind) => {
    const names = places.filter((place) => place.kind === kind).map(({ name }) => name);
    return names.length > 0 ? [{ kind, names, svg: placeSwatchSvg(kind, palette) }] : [];
  });
  return (
    <View style={{ gap: space.hair }}>
      {kinds.map(({ kind, names, svg }) => (
        <View key={kind} style={{ flexDirection: 'row', alignItems: 'center', gap: space.hair }}>
          <SvgPicture svg={svg} />
          <Text size="small" style={{ flexShrink: 1 }}>{`${PLACE_WORDS[kind]}: ${names.join(', ')}`}</Text>
        </View>
      ))}
    </View>
  );
}

type Props = {
  ground: Ground;
  bottom: readonly BottomArea[];
  places?: readonly DrawnPlace[] | undefined;
};

/** How to read the chart: depth tints, the pattern of every bottom that is on it, and what stands at the lake. */
export function ChartKey({ ground, bottom, places = [] }: Props) {
  const { name } = useTheme();
  const palette = palettes[name];
  return (
    <View style={{ gap: space.small }}>
      {ground.depth ? <Tints ground={ground} palette={palette} /> : null}
      {bottom.length ? (
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', columnGap: space.page, rowGap: space.hair }}>
          {bottom.map(({ kind }) => (
            <Swatch key={kind} kind={kind} palette={palette} />
          ))}
        </View>
      ) : null}
      {places.length ? <Places places={places} palette={palette} /> : null}
    </View>
  );
}
