import type { PegPageView } from '@mereward/shared/charts/contract';
import { View } from 'react-native';
import { Heading } from '@/components/heading';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { usePegPage } from './api';
import { CardButton } from './card-button';
import { pegDetailsOf } from './peg-details';
import { OverheadNote } from './peg-hazards';
import { pegTitle } from './peg-words';
import { SpotDetail } from './spot-detail';
import { SpotsTable } from './spots-table';

type Props = { page: PegPageView; spotId: string | null; onSpot: (spotId: string) => void };

function Brief({ page, spotId, onSpot }: Props) {
  const spots = page.spots ?? [];
  const spot = spots.find(({ id }) => id === spotId) ?? spots[0];
  const water = { levelM: page.levelNow?.levelM ?? null, datumM: page.chart?.datumM ?? 0 };
  const details = pegDetailsOf(page);
  return (
    <View style={{ gap: space.page }}>
      <Heading level={2}>{pegTitle(page)}</Heading>
      {details ? <OverheadNote details={details} /> : null}
      {spots.length ? (
        <SpotsTable spots={spots} spotId={spot?.id ?? null} onSpot={onSpot} water={water} />
      ) : (
        <Text tone="inkSoft">{page.layerNotes.spots ?? 'No spots are written up for this peg yet.'}</Text>
      )}
      {spot ? <SpotDetail spot={spot} page={page} /> : null}
      <LinkButton label={`Open ${pegTitle(page)}`} href={`/water/pegs/${page.id}`} />
      <CardButton pegId={page.id} number={page.number} />
    </View>
  );
}

/** A peg beside the chart: its spots and the chosen one, and the way to its own page. */
export function PegBrief({ pegId, spotId, onSpot }: { pegId: string } & Pick<Props, 'spotId' | 'onSpot'>) {
  const page = usePegPage(pegId);
  return (
    <Loaded query={page} waiting="Reading the peg…">
      {(value) => <Brief page={value} spotId={spotId} onSpot={onSpot} />}
    </Loaded>
  );
}
