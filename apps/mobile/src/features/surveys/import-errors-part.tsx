import type { ImportRowError } from '@mereward/shared/surveys/contract';
import { useState } from 'react';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { List, Row } from '@/components/list';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { space } from '@/constants/layout';
import { columnWord } from '@/features/surveys/column-words';
import { countWords } from '@/features/surveys/visit-words';
import { csvOf } from '@/lib/csv';
import { saveText } from '@/lib/save-file';

const AT_FIRST = 12;

/** Every fault of a file, row by row, to be put right in it; nothing is taken until there is none. */
export function ImportErrors({ name, errors }: { name: string; errors: readonly ImportRowError[] }) {
  const [all, setAll] = useState(false);
  const shown = all ? errors : errors.slice(0, AT_FIRST);
  const save = () =>
    void saveText(
      `${name.replace(/\.[^.]*$/, '')}-faults.csv`,
      csvOf(
        ['row', 'column', 'value', 'what is wrong'],
        errors.map(({ row, column, value, detail }) => [row, column, value, detail]),
      ),
      'text/csv',
    );
  return (
    <>
      <Note
        kind="danger"
        title={`${name}: ${countWords(errors.length, 'fault')}, so nothing can be taken`}
        live
      >
        Put them right in the file and choose it again, or choose the columns again below. Nothing was kept.
      </Note>
      <Section title="Faults" end={<Button label="Faults as CSV" bank onPress={save} />}>
        <List label="Faults">
          {shown.map((error) => (
            <Row
              key={`${error.row} ${error.column} ${error.detail}`}
              title={error.detail}
              note={whereWords(error)}
            />
          ))}
        </List>
        {errors.length > shown.length ? (
          <View style={{ gap: space.small, alignItems: 'flex-start' }}>
            <Button label={`Show all ${errors.length}`} kind="quiet" bank onPress={() => setAll(true)} />
          </View>
        ) : null}
      </Section>
    </>
  );
}

function whereWords({ row, column, value }: ImportRowError): string {
  const parts = [`Row ${row}`, columnWord(column), value === '' ? '' : `“${value}”`];
  return parts.filter(Boolean).join(' · ');
}
