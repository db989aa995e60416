import { useState } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { ColumnMapping, ImportDone, VisitView } from '@mereward/shared/surveys/contract';
import { useMutation } from '@tanstack/react-query';
import { Button } from '@/components/button';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { Waiting } from '@/components/waiting';
import { previewImport, useImportCasts, useVisit } from '@/features/surveys/api';
import { ImportPreviewPart } from '@/features/surveys/import-preview-part';
import { countWords } from '@/features/surveys/visit-words';
import { figure } from '@/lib/format';
import { pickTextFile } from '@/lib/pick-file';
import type { PickedText } from '@/lib/picked';

const MOST_LETTERS = 4_000_000;

/** Brings casts written down elsewhere into a visit: all rows or none. */
export function ImportScreen() {
  const { visitId } = useLocalSearchParams<{ visitId: string }>();
  const visit = useVisit(visitId);
  if (visit.data?.visit.may.addCasts) return <Import visit={visit.data.visit} />;
  const href = `/bank/surveys/${visitId}` as const;
  return (
    <Page title="Casts from a file" back={{ label: visit.data?.visit.title ?? 'Visit', href }}>
      <Loaded query={visit} waiting="Reading the visit…">
        {({ visit: it }) => (
          <Empty
            title={it.status === 'closed' ? 'This visit is closed' : 'Not yours to add to'}
            action={<LinkButton label="To the visit" href={href} kind="main" bank />}
          >
            Casts are brought into a visit while it is open.
          </Empty>
        )}
      </Loaded>
    </Page>
  );
}

function Import({ visit }: { visit: VisitView }) {
  const [file, setFile] = useState<PickedText | null>(null);
  const [tooLarge, setTooLarge] = useState<string | null>(null);
  const preview = useMutation({
    mutationFn: (asked: { file: PickedText; mapping: ColumnMapping | null }) =>
      previewImport(visit.id, inputOf(asked.file, asked.mapping)),
  });
  const bring = useImportCasts(visit.id);
  const choose = async (): Promise<void> => {
    const chosen = await pickTextFile('.csv,.txt,.tsv');
    if (!chosen) return;
    bring.reset();
    const large = chosen.text.length > MOST_LETTERS;
    setTooLarge(large ? chosen.name : null);
    setFile(large ? null : chosen);
    if (!large) preview.mutate({ file: chosen, mapping: null });
  };
  const found = file && preview.data ? preview.data : null;
  const ready = found && found.errors.length === 0 && !found.alreadyImported && !bring.data;
  return (
    <Page
      title="Casts from a file"
      over={visit.lakeName}
      back={{ label: visit.title, href: `/bank/surveys/${visit.id}` }}
      width="wide"
      actions={
        <>
          <Button
            label={file ? 'Another file' : 'Choose a file'}
            kind={file ? 'plain' : 'main'}
            bank
            grow
            busy={preview.isPending && !found}
            onPress={() => void choose()}
          />
          {file && ready ? (
            <Button
              label={`Bring in ${countWords(found.rows, 'cast')}`}
              kind="main"
              bank
              grow
              busy={bring.isPending}
              busyLabel="Reducing…"
              onPress={() => bring.mutate(inputOf(file, found.mapping))}
            />
          ) : null}
        </>
      }
    >
      {bring.data ? <Brought done={bring.data} visitId={visit.id} /> : null}
      <ProblemNote problem={bring.error} />
      {tooLarge ? (
        <Note kind="danger" title={`${tooLarge} is larger than 4 MB`} live>
          Nothing was read. Bring it in parts of at most 5,000 rows.
        </Note>
      ) : null}
      {file ? null : <HowTo />}
      {file && preview.isPending && !found ? <Waiting words={`Reading ${file.name}…`} /> : null}
      <ProblemNote problem={preview.error} />
      {file && found && !bring.data ? (
        <ImportPreviewPart
          name={file.name}
          preview={found}
          reading={preview.isPending}
          onMap={(mapping) => preview.mutate({ file, mapping })}
        />
      ) : null}
    </Page>
  );
}

const inputOf = ({ name, text }: PickedText, mapping: ColumnMapping | null) => ({
  filename: name.slice(-200),
  text,
  mapping,
});

const HowTo = () => (
  <>
    <Text>
      A table saved as CSV, one cast a row under one heading: the peg, the far-bank mark or a compass bearing,
      and the wraps at least. A visit’s own “Casts as CSV” shows every column.
    </Text>
    <Text tone="inkSoft">
      You see how each row is read before anything is kept. Rows are reduced with this visit’s kit, and the
      file is taken whole or not at all.
    </Text>
  </>
);

function Brought({ done, visitId }: { done: ImportDone; visitId: string }) {
  return (
    <>
      <Note
        kind={done.alreadyImported ? 'plain' : 'fine'}
        title={
          done.alreadyImported
            ? 'Nothing was added: this file is in the visit already'
            : `${figure(done.added)} casts were added and reduced`
        }
        live
      />
      <LinkButton label="To the visit" href={`/bank/surveys/${visitId}`} kind="main" bank />
    </>
  );
}
