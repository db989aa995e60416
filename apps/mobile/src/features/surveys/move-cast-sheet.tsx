import { useState } from 'react';
import type { Kit } from '@mereward/shared/surveys/contract';
import { useMutation } from '@tanstack/react-query';
import { Button } from '@/components/button';
import { Checkbox } from '@/components/checkbox';
import { ChoiceGrid } from '@/components/choice-grid';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Sheet } from '@/components/sheet';
import { Text } from '@/components/text';
import { useVisits } from '@/features/surveys/api';
import { castsFrom, lakeOf, movedTo, visitGroup } from '@/features/surveys/visit-events';
import { countWords, visitCountWords } from '@/features/surveys/visit-words';
import { clockHere } from '@/lib/format-time';
import { moveToEnd } from '@/lib/outbox';
import type { OutboxEntry } from '@/lib/outbox-event';
import { sendWaiting } from '@/lib/outbox-sender';

type Props = { entry: OutboxEntry; entries: readonly OutboxEntry[]; onClose: () => void };

/** Moves a cast that its visit does not take to another open visit of the same lake, those behind it too when wished. */
export function MoveCastSheet({ entry, entries, onClose }: Props) {
  const lakeId = lakeOf(entry) ?? '';
  const visits = useVisits(lakeId);
  const [chosen, setChosen] = useState<string | null>(null);
  const [together, setTogether] = useState(true);
  const [first, ...behind] = castsFrom(entries, entry);
  const moving = useMutation({ mutationFn: moveToEnd, onSuccess: () => void sendWaiting() });
  return (
    <Sheet open title={`Move “${entry.title}” to another visit`} onClose={onClose}>
      <Text>{entry.note}</Text>
      <Loaded query={visits} waiting="Reading the visits…">
        {({ visits: all }) => {
          const open = all.filter(
            ({ id, may, status }) => status === 'open' && may.addCasts && visitGroup(id) !== entry.group,
          );
          const own = all.find(({ id }) => visitGroup(id) === entry.group);
          const visit = open.find(({ id }) => id === chosen) ?? (open.length === 1 ? open[0] : undefined);
          if (open.length === 0)
            return (
              <>
                <Text>There is no other open visit of this lake. Open one, then move the cast into it.</Text>
                <LinkButton
                  label="Open a visit"
                  href={`/bank/surveys/new?lakeId=${lakeId}`}
                  kind="main"
                  bank
                />
              </>
            );
          const move = (): void => {
            if (!visit || !first) return;
            const casts = together ? [first, ...behind] : [first];
            moving.mutate(
              casts.map((each) => ({ entry: each, changed: movedTo(visit, each) })),
              { onSuccess: onClose },
            );
          };
          return (
            <>
              <ChoiceGrid
                label="To which visit"
                columns={1}
                choices={open.map((each) => ({
                  key: each.id,
                  label: each.title,
                  note: `${each.surveyor.name}, begun ${clockHere(each.startedAt)}, ${visitCountWords(each)}`,
                }))}
                value={visit?.id ?? null}
                onChange={setChosen}
              />
              {behind.length > 0 ? (
                <Checkbox
                  label={`Move the ${countWords(behind.length, 'cast')} behind it too`}
                  checked={together}
                  onChange={setTogether}
                />
              ) : null}
              {visit && (!own || !sameKit(own.kit, visit.kit)) ? (
                <Note kind="caution" title="Its kit may not be the same">
                  The count, the float and the lead are read with the kit of the visit a cast is in. Look at
                  the kit of “{visit.title}” first.
                </Note>
              ) : null}
              <ProblemNote problem={moving.error} />
              <Button
                label="Move it"
                kind="main"
                bank
                disabled={!visit}
                busy={moving.isPending}
                busyLabel="Moving…"
                onPress={move}
              />
            </>
          );
        }}
      </Loaded>
    </Sheet>
  );
}

/** Whether casts are read alike with both; when the sticks were last taped changes nothing. */
const sameKit = (one: Kit, other: Kit): boolean =>
  Object.entries(one).every(
    ([name, value]) => name === 'stickCheckedOn' || (other[name as keyof Kit] ?? null) === (value ?? null),
  );
