import type { LakeView } from '@mereward/shared/lakes/contract';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
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
