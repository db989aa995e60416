import { useState } from 'react';
import type { BottomTableVersion, BottomTableView } from '@mereward/shared/surveys/bottom-table-contract';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Sheet } from '@/components/sheet';
import { keepBottomTable, useBottomTableThen } from '@/features/surveys/bottom-api';
import { BottomMatrix } from '@/features/surveys/bottom-matrix';
import { versionNote, versionTitle } from '@/features/surveys/bottom-table-words';
import { newId } from '@/lib/new-id';

type Props = { fisheryId: string; table: BottomTableView; zone: string };

/** Every version of the table, newest first; each opens as it was. */
export function BottomHistorySection({ fisheryId, table, zone }: Props) {
  const [shown, setShown] = useState<BottomTableVersion | null>(null);
  const then = useBottomTableThen(fisheryId, shown?.version ?? null);
  return (
    <Section title="History">
      <List label="Versions of the table">
        {table.history.map((made) => (
          <Row
            key={made.version}
            title={versionTitle(made)}
            note={versionNote(made, zone)}
            onPress={() => setShown(made)}
            end={made.version === table.inForce.version ? 'in force' : null}
          />
        ))}
      </List>
      {table.may.change && table.inForce.kind !== 'usual' ? (
        <Reset fisheryId={fisheryId} version={table.inForce.version} />
      ) : null}
      <Sheet open={shown !== null} onClose={() => setShown(null)} title={shown ? versionTitle(shown) : ''}>
        {shown ? (
          <Loaded query={then} waiting="Reading that version…">
            {({ feel }) => (
              <>
                <BottomMatrix feel={feel} map="substrate" />
                <BottomMatrix feel={feel} map="cover" />
              </>
            )}
          </Loaded>
        ) : null}
      </Sheet>
    </Section>
  );
}

function Reset({ fisheryId, version }: { fisheryId: string; version: number }) {
  const [id] = useState(newId);
  const [asking, setAsking] = useState(false);
  const reset = useMutation({
    mutationFn: () =>
      keepBottomTable(fisheryId, { id, after: version, feel: null, reason: 'Back to the built-in table' }),
    onSettled: () => setAsking(false),
  });
  return (
    <View style={{ alignItems: 'flex-start' }}>
      <ProblemNote problem={reset.error} />
      <Button label="Back to the built-in table" onPress={() => setAsking(true)} />
      <Confirm
        open={asking}
        title="Go back to the built-in table?"
        words="Every cast is read by the built-in table from now on. Your versions stay in the history. Published charts keep what they were made with."
        act="Go back to it"
        danger
        busy={reset.isPending}
        onAct={() => reset.mutate()}
        onClose={() => setAsking(false)}
      />
    </View>
  );
}
