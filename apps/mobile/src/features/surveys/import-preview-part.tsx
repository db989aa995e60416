import { CAST_COLUMNS, type ColumnMapping, type ImportPreview } from '@mereward/shared/surveys/contract';
import { View } from 'react-native';
import { List, Row } from '@/components/list';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { Select } from '@/components/select';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { COLUMN_WORDS, mappedTo } from '@/features/surveys/column-words';
import { ImportErrors } from '@/features/surveys/import-errors-part';
import { countWords } from '@/features/surveys/visit-words';

const NONE = 'none';

type Props = {
  name: string;
  preview: ImportPreview;
  reading: boolean;
  onMap: (mapping: ColumnMapping) => void;
};

/** How a file would be read: its faults first, then which column is which, then rows in our words. */
export function ImportPreviewPart({ name, preview, reading, onMap }: Props) {
  const { errors, rows, alreadyImported } = preview;
  return (
    <>
      {alreadyImported ? (
        <Note title={`${name} is in this visit already`} live>
          Bringing it again would add nothing.
        </Note>
      ) : errors.length > 0 ? (
        <ImportErrors name={name} errors={errors} />
      ) : (
        <Note kind="fine" title={`${name}: ${countWords(rows, 'row')}, every one can be read`} live>
          Look whether the rows below say what was meant. Nothing is kept yet.
        </Note>
      )}
      <Section title="How the first rows are read">
        <List label="Rows">
          {preview.sample.map(({ row, words, cells }) => (
            <Row
              key={row}
              title={words === '' ? 'Cannot be read' : words}
              note={`Row ${row}: ${cells.join(' | ')}`}
            />
          ))}
        </List>
        {rows > preview.sample.length ? (
          <Text
            size="small"
            tone="inkSoft"
          >{`and ${countWords(rows - preview.sample.length, 'row')} more`}</Text>
        ) : null}
      </Section>
      <Section title="Which column is which" {...(reading ? { note: 'Reading again…' } : {})}>
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium }}>
          {CAST_COLUMNS.map((column) => (
            <View key={column} style={{ flexGrow: 1, flexBasis: 230, maxWidth: 490 }}>
              <Select
                label={COLUMN_WORDS[column]}
                bank
                choices={[
                  { key: NONE, label: 'not in the file' },
                  ...preview.heading.map((heading, at) => ({
                    key: String(at),
                    label: heading === '' ? `column ${at + 1}` : heading,
                  })),
                ]}
                value={String(preview.mapping[column] ?? NONE)}
                onChange={(key) =>
                  onMap(mappedTo(preview.mapping, column, key === NONE ? null : Number(key)))
                }
              />
            </View>
          ))}
        </View>
      </Section>
    </>
  );
}
