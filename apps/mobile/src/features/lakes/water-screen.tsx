import type { ReactNode } from 'react';
import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import { Empty } from '@/components/empty';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { useFisheries } from '@/features/fisheries/api';
import { useUnits } from '@/hooks/use-units';
import { area } from '@/lib/format';

type Told = (fisheryId: string) => ReactNode;

function LakesOf({ fishery, first, told }: { fishery: FisheryListItem; first: boolean; told: Told }) {
  const units = useUnits();
  return (
    <Section title={fishery.name} bare={first}>
      {told(fishery.id)}
      {fishery.lakes.length ? (
        <List label={`Lakes of ${fishery.name}`}>
          {fishery.lakes.map(({ id, name, areaM2, pegs, nights, chart }) => (
            <Row
              key={id}
              title={name}
              note={`${area(areaM2, units)} · ${String(pegs)} ${pegs === 1 ? 'peg' : 'pegs'} · ${nights ? 'nights' : 'days only'}`}
              end={
                <Text size="small" tone="inkSoft">
                  {chart ? `chart ${chart.version}` : 'no chart yet'}
                </Text>
              }
              href={`/water/lakes/${id}`}
            />
          ))}
        </List>
      ) : (
        <Text tone="inkSoft">No lakes of this fishery are shown yet.</Text>
      )}
    </Section>
  );
}

/** Everybody's front door: fisheries and their lakes. `told` is what stands over a fishery's lakes. */
export function WaterScreen({ told }: { told: Told }) {
  const fisheries = useFisheries();
  return (
    <Page title="Water" under="Lakes, their charts and pegs">
      <Loaded
        query={fisheries}
        waiting="Reading the lakes…"
        empty={{
          when: (value) => value.fisheries.length === 0,
          show: (
            <Empty title="No lakes are shown here yet">
              Lakes, their charts and pegs appear here once a fishery has made them. If you run one, sign in
              and add it under Office.
            </Empty>
          ),
        }}
      >
        {({ fisheries: all }) =>
          all.map((fishery, i) => <LakesOf key={fishery.id} fishery={fishery} first={i === 0} told={told} />)
        }
      </Loaded>
    </Page>
  );
}
