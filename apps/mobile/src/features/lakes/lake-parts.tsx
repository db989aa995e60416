import type { LakeView } from '@mereward/shared/lakes/contract';
import { PLACE_WORDS } from '@mereward/shared/lakes/place-contract';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
import { Text } from '@/components/text';
import { permanenceWord } from '@/features/lakes/mark-fields';
import { figure } from '@/lib/format';
import { ago } from '@/lib/format-time';

type Props = { lake: LakeView };

/** The gauge boards of a lake with their newest readings. */
export function BoardsSection({ lake }: Props) {
  const add = lake.may.changePegs ? (
    <LinkButton label="Add a board" href={`/office/lakes/${lake.id}/boards/new`} />
  ) : null;
  if (lake.boards.length === 0)
    return (
      <Section title="Gauge boards">
        <Empty title="No gauge board yet" action={add}>
          Depths are told for today from a board’s reading. A painted mark on a pier will do.
        </Empty>
      </Section>
    );
  return (
    <Section title="Gauge boards" end={add}>
      <Table
        caption={`Gauge boards of ${lake.details.name}`}
        rows={lake.boards}
        rowKey={({ id }) => id}
        href={({ id }) => `/office/lakes/${lake.id}/boards/${id}`}
        columns={[
          { key: 'code', head: 'Board', value: ({ details }) => details.code },
          {
            key: 'datum',
            head: 'Datum board',
            value: ({ details }) => (details.isDatumBoard ? 'yes' : 'no'),
          },
          {
            key: 'level',
            head: 'Reads',
            value: ({ readings }) => readings[0]?.levelM ?? null,
            show: ({ readings: [newest] }) => (newest ? `${figure(newest.levelM, 2)} m` : 'no reading yet'),
            figures: true,
          },
          {
            key: 'at',
            head: 'Read',
            value: ({ readings }) => readings[0]?.at ?? null,
            show: ({ readings: [newest] }) => (newest ? ago(Date.parse(newest.at), Date.now()) : ''),
          },
        ]}
      />
    </Section>
  );
}

/** The far-bank marks of a lake. */
export function MarksSection({ lake }: Props) {
  const add = lake.may.changePegs ? (
    <LinkButton label="Add a mark" href={`/office/lakes/${lake.id}/marks/new`} />
  ) : null;
  if (lake.marks.length === 0)
    return (
      <Section title="Far-bank marks">
        <Empty title="No far-bank mark yet" action={add}>
          Casts are aimed at a chimney, a tree or a pole that stays where it is.
        </Empty>
      </Section>
    );
  return (
    <Section title="Far-bank marks" end={add}>
      <Table
        caption={`Far-bank marks of ${lake.details.name}`}
        csvName="marks"
        rows={lake.marks}
        rowKey={({ id }) => id}
        {...(lake.may.changePegs
          ? { href: ({ id }: { id: string }) => `/office/lakes/${lake.id}/marks/${id}` as const }
          : {})}
        columns={[
          { key: 'code', head: 'Mark', value: ({ details }) => details.code },
          { key: 'name', head: 'What it is', value: ({ details }) => details.name },
          { key: 'lasting', head: 'How lasting', value: ({ details }) => permanenceWord(details.permanence) },
          {
            key: 'sure',
            head: 'Sure to',
            value: ({ details }) => details.sigmaM,
            show: ({ details }) => `± ${figure(details.sigmaM, details.sigmaM < 1 ? 2 : 1)} m`,
            figures: true,
          },
          { key: 'photos', head: 'Photos', value: ({ photos }) => photos.length, figures: true },
        ]}
      />
    </Section>
  );
}

/** What is drawn at a lake beside pegs, boards and marks; and pegs whose own sheet says less of an overhead line. */
export function PlacesSection({ lake }: Props) {
  const places = lake.details.places ?? [];
  const add = lake.may.change ? (
    <LinkButton label="Add a place" href={`/office/lakes/${lake.id}/places/new`} />
  ) : null;
  if (places.length === 0)
    return (
      <Section title="Places">
        <Empty title="Nothing drawn yet" action={add}>
          Parking, gates, throw lines, hazards and overhead lines stand on the chart, the cards and the pegs’
          pages.
        </Empty>
      </Section>
    );
  const disputes = lake.pegs.filter(({ overheadDispute }) => overheadDispute);
  return (
    <Section title="Places" end={add}>
      {disputes.map(({ id, number, overheadDispute }) => (
        <Note key={id} kind="danger" title={`Peg ${number}: two answers about an overhead line`}>
          <Text>{overheadDispute}</Text>
          <LinkButton label={`Peg ${number}’s own sheet`} href={`/office/lakes/${lake.id}/pegs/${id}`} />
        </Note>
      ))}
      <Table
        caption={`Places of ${lake.details.name}`}
        csvName="places"
        rows={places}
        rowKey={({ id }) => id}
        {...(lake.may.change
          ? { href: ({ id }: { id: string }) => `/office/lakes/${lake.id}/places/${id}` as const }
          : {})}
        columns={[
          { key: 'kind', head: 'Kind', value: ({ kind }) => PLACE_WORDS[kind] },
          { key: 'name', head: 'Name', value: ({ name }) => name },
          { key: 'who', head: 'Shown to', value: ({ audience }) => AUDIENCE_WORDS[audience] },
          { key: 'note', head: 'Note', value: ({ note }) => note },
        ]}
      />
    </Section>
  );
}

const AUDIENCE_WORDS = { public: 'everybody', members: 'members and staff', staff: 'staff' } as const;
