import { BOTTOM_WORDS } from '@mereward/shared/charts/bottom-words';
import type { PegPageView, SpotView } from '@mereward/shared/charts/contract';
import { depthNow, depthShown } from '@mereward/shared/charts/depth-words';
import {
  aimWords,
  bottomCaption,
  depthCaption,
  ownCountWords,
  provenance,
} from '@mereward/shared/charts/spot-figures';
import { View } from 'react-native';
import { Figure } from '@/components/figure';
import { Heading } from '@/components/heading';
import { Note } from '@/components/note';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { useChartUnits } from './use-chart-units';
import { length } from '@/lib/format';
import { capital } from './peg-words';
import { SectionList } from './section-list';
import { SectionPicture } from './section-picture';

type Props = { spot: SpotView; page: Pick<PegPageView, 'chart' | 'levelNow' | 'rigCaution'> };

/** One spot in large figures: how to reach it, how deep today, what bottom, how sure, and the bed on the way. */
export function SpotDetail({ spot, page }: Props) {
  const units = useChartUnits();
  const datumM = page.chart?.datumM ?? 0;
  const water = { levelM: page.levelNow?.levelM ?? null, datumM };
  const shown = spot.depthM === null ? null : depthShown(spot.depthM, water);
  const raisedM = water.levelM === null ? 0 : water.levelM - datumM;
  return (
    <View style={{ gap: space.medium }}>
      <Heading level={2}>{`${ownCountWords(spot, units)}, ${aimWords(spot)}`}</Heading>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', columnGap: space.wide, rowGap: space.medium }}>
        {shown ? (
          <Figure
            figure={depthNow(shown.depthM, units.length)}
            caption={depthCaption(spot, shown.when, units)}
          />
        ) : null}
        {spot.bottom ? (
          <Figure figure={capital(BOTTOM_WORDS[spot.bottom])} caption={bottomCaption(spot)} />
        ) : null}
      </View>
      <Text style={{ maxWidth: MEASURE_PX }}>{`${spot.words}.`}</Text>
      <Text size="small" tone="inkSoft" style={{ maxWidth: MEASURE_PX }}>
        {provenance(spot)}
      </Text>
      {spot.water && !spot.water.own ? <Note kind="caution">{spot.water.words}</Note> : null}
      {spot.note ? <Text style={{ maxWidth: MEASURE_PX }}>{spot.note}</Text> : null}
      {spot.section?.length ? (
        <>
          <SectionPicture
            points={spot.section}
            raisedM={raisedM}
            markLineOutM={spot.lineOutM}
            label={`The bed on the way to ${spot.name}; the list below says the same.`}
          />
          <Text size="small" tone="inkSoft">
            {levelWords(raisedM, water.levelM !== null, (m) => length(m, units, 2))}
          </Text>
          <SectionList points={spot.section} raisedM={raisedM} />
        </>
      ) : null}
      {spot.presentation ? (
        <Note title="What suits this bottom">
          <Text>{spot.presentation}</Text>
          <Text weight="semibold">{page.rigCaution}</Text>
        </Note>
      ) : null}
    </View>
  );
}

function levelWords(raisedM: number, known: boolean, words: (lengthM: number) => string): string {
  if (!known) return 'The bed along this cast, in wraps, at chart datum.';
  if (Math.abs(raisedM) < 0.005) return 'The bed along this cast, in wraps. The water stands at chart datum.';
  return `The bed along this cast, in wraps. The water stands ${words(Math.abs(raisedM))} ${raisedM < 0 ? 'below' : 'above'} chart datum.`;
}
