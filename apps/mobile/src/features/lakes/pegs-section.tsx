import { useState } from 'react';
import type { LakeView, PegListItem } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { Table } from '@/components/table';
import { space } from '@/constants/layout';
import { PegOrder } from '@/features/lakes/peg-order';
import { figure } from '@/lib/format';

const STATUS = {
  open: { shape: 'triangle', tone: 'reed', word: 'open' },
  limited: { shape: 'diamond', tone: 'amber', word: 'limited' },
  closed: { shape: 'cross', tone: 'brick', word: 'closed' },
} as const;

const LINE_WORDS: Readonly<Record<PegListItem['overheadFishing'], string | null>> = {
  ok: null,
  restricted: 'restricted, or not looked at',
  no_fishing: 'no fishing: overhead line',
};

/** The pegs of a lake in walking order. */
export function PegsSection({ lake }: { lake: LakeView }) {
  const [ordering, setOrdering] = useState(false);
  const { pegs, may } = lake;
  const add = may.changePegs ? (
    <LinkButton label="Add a peg" href={`/office/lakes/${lake.id}/pegs/new`} kind="main" />
  ) : null;
  if (pegs.length === 0)
    return (
      <Section title="Pegs">
        <Empty title="No peg yet" action={add}>
          Place each peg by its origin mark; casts are reduced from there.
        </Empty>
      </Section>
    );
  const walked = pegs.map((peg, i) => ({ ...peg, place: i + 1 }));
  return (
    <Section
      title="Pegs"
      note="In the order they are walked."
      end={
        may.changePegs ? (
          <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
            {pegs.length > 1 && !ordering ? (
              <Button label="Change the order" onPress={() => setOrdering(true)} />
            ) : null}
            {add}
          </View>
        ) : null
      }
    >
      {ordering ? (
        <PegOrder lake={lake} onDone={() => setOrdering(false)} />
      ) : (
        <Table
          caption={`Pegs of ${lake.details.name}`}
          csvName="pegs"
          rows={walked}
          rowKey={({ id }) => id}
          href={({ id }) => `/office/lakes/${lake.id}/pegs/${id}`}
          columns={[
            {
              key: 'number',
              head: 'Peg',
              value: ({ number, name }) => (name ? `${number} ${name}` : number),
            },
            { key: 'place', head: 'Walked', value: ({ place }) => place, figures: true },
            {
              key: 'status',
              head: 'State',
              value: ({ status }) => status,
              show: ({ status }) => <StatusShape {...STATUS[status]} size="small" />,
            },
            { key: 'why', head: 'Why', value: ({ statusReason }) => statusReason || null },
            {
              key: 'line',
              head: 'Overhead line',
              value: ({ overheadFishing }) => LINE_WORDS[overheadFishing],
            },
            {
              key: 'parking',
              head: 'From parking',
              value: ({ fromParkingM }) => fromParkingM,
              show: ({ fromParkingM }) => (fromParkingM === null ? '' : `${figure(fromParkingM)} m`),
              figures: true,
            },
          ]}
        />
      )}
    </Section>
  );
}
