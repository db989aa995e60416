import { useState } from 'react';
import { BottomFeel, type BottomTableView } from '@mereward/shared/surveys/bottom-table-contract';
import { useWatch } from 'react-hook-form';
import { View } from 'react-native';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Field } from '@/components/field';
import { FormField } from '@/components/form-field';
import { Heading } from '@/components/heading';
import { Select } from '@/components/select';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { keepBottomTable } from '@/features/surveys/bottom-api';
import { COVERS, SUBSTRATES } from '@/features/surveys/bottom-class-words';
import {
  editedFeel,
  FADES,
  FEEL_PARTS,
  readRow,
  rowKey,
  rowOf,
  TableDraft,
  typedRow,
  type BottomClass,
  type FeelPart,
  type TableTyped,
} from '@/features/surveys/bottom-table-draft';
import { feelWords } from '@/features/surveys/feel-words';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';
import { Problem } from '@mereward/shared/problems/problem';

type Props = { fisheryId: string; table: BottomTableView; onKept: () => void };

const CLASSES = [
  ...SUBSTRATES.map(({ key, label }) => ({ key: `substrate:${key}`, label: `Bottom: ${label}` })),
  ...COVERS.map(({ key, label }) => ({ key: `cover:${key}`, label: `On it: ${label}` })),
];

function classOf(key: string): BottomClass {
  const substrate = SUBSTRATES.find((each) => key === `substrate:${each.key}`);
  if (substrate) return { map: 'substrate', name: substrate.key };
  const cover = COVERS.find((each) => key === `cover:${each.key}`);
  return { map: 'cover', name: cover?.key ?? 'clear' };
}

/** Edits the table one class at a time; each row is held against 100 % as it is typed. */
export function BottomTableForm({ fisheryId, table, onKept }: Props) {
  const [id] = useState(newId);
  const { version } = table.inForce;
  const form: DraftForm<TableTyped, TableTyped> = useDraftForm({
    form: `bottom-table:${fisheryId}:${String(version)}`,
    schema: TableDraft,
    start: { id, rows: {}, fade: {}, reason: '' },
    send: async (read) => {
      const edited = editedFeel(table.feel, read, (feel) => BottomFeel.parse(feel));
      if (!edited.ok) throw new Problem('invalid', 'A row is not right yet', { detail: edited.words });
      return keepBottomTable(fisheryId, {
        id: read.id,
        after: version,
        feel: edited.feel,
        reason: read.reason,
      });
    },
    onDone: onKept,
  });
  const [chosen, setChosen] = useState(CLASSES[0]?.key ?? '');
  return (
    <DraftFormFrame form={form} label="Table of feels" act="Put it in force" busyLabel="Keeping…">
      <Select label="Which class" choices={CLASSES} value={chosen} onChange={setChosen} />
      {FEEL_PARTS.map(({ key, label }) => (
        <Row
          key={`${chosen}:${key}`}
          form={form}
          table={table}
          of={classOf(chosen)}
          part={key}
          label={label}
        />
      ))}
      <Fading form={form} table={table} />
      <FormField
        control={form.control}
        name="reason"
        label="Why"
        hint="Kept with the version, such as “grabs of April say our clay lands soft”."
        lines={2}
      />
    </DraftFormFrame>
  );
}

type RowProps = {
  form: DraftForm<TableTyped, TableTyped>;
  table: BottomTableView;
  of: BottomClass;
  part: FeelPart;
  label: string;
};

function Row({ form, table, of, part, label }: RowProps) {
  const rows = useWatch({ control: form.control, name: 'rows' });
  const key = rowKey(of, part);
  const before = rowOf(table.feel, of, part);
  const typed = rows[key] ?? typedRow(before);
  const read = readRow(typed, before);
  const write = (feel: string, text: string): void =>
    form.setValue('rows', { ...rows, [key]: { ...typed, [feel]: text } }, { shouldDirty: true });
  return (
    <View role="group" aria-label={label} style={{ gap: space.small }}>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', alignItems: 'center', gap: space.medium }}>
        <Heading level={3} style={{ flexGrow: 1 }}>
          {label}
        </Heading>
        <View role="status">
          {read.ok ? (
            <StatusShape shape="triangle" tone="reed" word="adds up to 100 %" size="small" />
          ) : (
            <StatusShape shape="diamond" tone="amber" word={read.words} size="small" />
          )}
        </View>
      </View>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium }}>
        {Object.keys(before).map((feel) => (
          <View key={feel} style={{ flexBasis: 132, flexGrow: 1, maxWidth: 210 }}>
            <Field
              label={`${feelWords(part, feel)} %`}
              value={typed[feel] ?? ''}
              onChange={(text) => write(feel, text)}
              keypad="decimal"
            />
          </View>
        ))}
      </View>
    </View>
  );
}

function Fading({ form, table }: Pick<RowProps, 'form' | 'table'>) {
  const fade = useWatch({ control: form.control, name: 'fade' });
  return (
    <View role="group" aria-label="How fast covers fade" style={{ gap: space.small }}>
      <Heading level={3}>How fast covers fade</Heading>
      <Text tone="inkSoft">
        Months after which weed or litter once felt counts half as much in a chart. Common practice, no
        published source.
      </Text>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium }}>
        {FADES.map(({ key, label }) => (
          <View key={key} style={{ flexBasis: 132, flexGrow: 1, maxWidth: 210 }}>
            <Field
              label={`${label}, months`}
              value={fade[key] ?? String(table.feel.fadeMonths[key])}
              onChange={(text) => form.setValue('fade', { ...fade, [key]: text }, { shouldDirty: true })}
              keypad="decimal"
            />
          </View>
        ))}
      </View>
    </View>
  );
}
