import type { BottomFeel } from '@mereward/shared/surveys/bottom-table-contract';
import { Table } from '@/components/table';
import { COVERS, SUBSTRATES } from '@/features/surveys/bottom-class-words';
import { FEEL_PARTS, percentText, rowOf, type BottomClass } from '@/features/surveys/bottom-table-draft';
import { feelWords } from '@/features/surveys/feel-words';

type Row = { key: string; feel: string; part: string; shares: Record<string, number> };

/** Every class against every feel, per cent: how often each feel is met there. */
export function BottomMatrix({ feel, map }: { feel: BottomFeel; map: 'substrate' | 'cover' }) {
  const classes: { label: string; of: BottomClass }[] =
    map === 'substrate'
      ? SUBSTRATES.map(({ key, label }) => ({ label, of: { map: 'substrate', name: key } }))
      : COVERS.map(({ key, label }) => ({ label, of: { map: 'cover', name: key } }));
  const first = classes[0]?.of;
  const rows: Row[] = FEEL_PARTS.flatMap(({ key: part, label }) =>
    Object.keys(first ? rowOf(feel, first, part) : {}).map((name) => ({
      key: `${part}:${name}`,
      feel: feelWords(part, name),
      part: label,
      shares: Object.fromEntries(classes.map((each) => [each.label, rowOf(feel, each.of, part)[name] ?? 0])),
    })),
  );
  return (
    <Table
      caption={map === 'substrate' ? 'How each bottom feels, %' : 'How what lies on it feels, %'}
      rows={rows}
      rowKey={({ key }) => key}
      filter={false}
      csvName={`feels-${map}`}
      columns={[
        { key: 'feel', head: 'Feel', value: (row) => `${row.part}: ${row.feel}` },
        ...classes.map(({ label }) => ({
          key: label,
          head: label,
          figures: true,
          value: (row: Row) => row.shares[label] ?? 0,
          show: (row: Row) => percentText(row.shares[label] ?? 0),
        })),
      ]}
    />
  );
}
