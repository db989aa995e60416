import { useState } from 'react';
import type { BottomLearning } from '@mereward/shared/surveys/bottom-table-contract';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Disclosure } from '@/components/disclosure';
import { Facts } from '@/components/facts';
import { Field } from '@/components/field';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { acceptLearning, useBottomLearning } from '@/features/surveys/bottom-api';
import { classWords, COVERS, SUBSTRATES } from '@/features/surveys/bottom-class-words';
import { FEEL_PARTS, percentText, rowOf, type BottomClass } from '@/features/surveys/bottom-table-draft';
import { feelWords } from '@/features/surveys/feel-words';
import { figure } from '@/lib/format';
import { newId } from '@/lib/new-id';

type Props = { fisheryId: string; mayChange: boolean };

/** What the fishery's confirmed bottoms would make of its table, the counts beside; a person takes it up or leaves it. */
export function BottomLearningSection({ fisheryId, mayChange }: Props) {
  const learning = useBottomLearning(fisheryId);
  return (
    <Section
      title="From confirmed bottoms"
      note="Where a grab, a pronged lead, a drain-down or a diver said for certain what lies there, the casts near it teach the table."
    >
      <Loaded query={learning} waiting="Pairing casts with confirmed bottoms…">
        {(value) =>
          value.paired === 0 ? (
            <Text tone="inkSoft" style={{ maxWidth: MEASURE_PX }}>
              {value.confirmed === 0
                ? 'No bottom is confirmed yet that the table does not hold already. Confirm one from the bank.'
                : `${figure(value.confirmed)} confirmed, but no cast lies within reach of one. Cast over it, and it teaches the table.`}
            </Text>
          ) : (
            <Proposal value={value} {...{ fisheryId, mayChange }} />
          )
        }
      </Loaded>
    </Section>
  );
}

function Proposal({ value, fisheryId, mayChange }: Props & { value: BottomLearning }) {
  const changes = changesOf(value);
  return (
    <>
      <Facts
        facts={[
          { term: 'Confirmed bottoms', fact: figure(value.confirmed) },
          { term: 'Casts within reach', fact: figure(value.paired) },
          { term: 'By class', fact: countsWords(value) },
          { term: 'The table before', fact: `is worth ${figure(value.worthCasts)} casts for each class` },
        ]}
      />
      <Text size="small" tone="inkSoft" style={{ maxWidth: MEASURE_PX }}>
        {`${value.reachWords} Common practice, no published source.`}
      </Text>
      {changes.length === 0 ? (
        <Note kind="fine">The table in force says all of this already.</Note>
      ) : (
        <>
          <Disclosure title={`What would change: ${figure(changes.length)} figures`} open>
            <Table
              caption="The table in force and what was learnt, %"
              rows={changes}
              rowKey={({ key }) => key}
              filter={false}
              columns={[
                { key: 'what', head: 'Class and feel', value: ({ what }) => what },
                {
                  key: 'before',
                  head: 'In force',
                  figures: true,
                  value: ({ before }) => before,
                  show: ({ before }) => percentText(before),
                },
                {
                  key: 'learnt',
                  head: 'Learnt',
                  figures: true,
                  value: ({ learnt }) => learnt,
                  show: ({ learnt }) => percentText(learnt),
                },
              ]}
            />
          </Disclosure>
          {mayChange ? <Accept value={value} fisheryId={fisheryId} /> : null}
        </>
      )}
    </>
  );
}

const countsWords = ({ counts }: BottomLearning): string =>
  counts
    .filter(({ casts }) => casts > 0)
    .map(({ name, casts }) => `${classWords(name)} ${figure(casts)}`)
    .join(', ');

type Change = { key: string; what: string; before: number; learnt: number };

const SHOWN = 0.00005; // half of the last digit shown

/** The figures that would come out otherwise, the greatest change first. */
function changesOf({ before, learnt }: BottomLearning): Change[] {
  const classes: BottomClass[] = [
    ...SUBSTRATES.map(({ key }): BottomClass => ({ map: 'substrate', name: key })),
    ...COVERS.map(({ key }): BottomClass => ({ map: 'cover', name: key })),
  ];
  return classes
    .flatMap((of) =>
      FEEL_PARTS.flatMap(({ key: part }) => {
        const after = rowOf(learnt, of, part);
        return Object.entries(rowOf(before, of, part)).map(([feel, share]) => ({
          key: `${of.map}:${of.name}:${part}:${feel}`,
          what: `${classWords(of.name)}, ${feelWords(part, feel)}`,
          before: share,
          learnt: after[feel] ?? share,
        }));
      }),
    )
    .filter((change) => Math.abs(change.learnt - change.before) > SHOWN)
    .sort((a, b) => Math.abs(b.learnt - b.before) - Math.abs(a.learnt - a.before));
}

function Accept({ value, fisheryId }: { value: BottomLearning; fisheryId: string }) {
  const [id] = useState(newId);
  const [asking, setAsking] = useState(false);
  const [reason, setReason] = useState(`Learnt from ${String(value.paired)} casts over confirmed bottoms`);
  const accept = useMutation({
    mutationFn: () => acceptLearning(fisheryId, { id, after: value.after, digest: value.digest, reason }),
    onSettled: () => setAsking(false),
  });
  return (
    <View style={{ gap: space.small, alignItems: 'flex-start', maxWidth: MEASURE_PX }}>
      <ProblemNote problem={accept.error} />
      <Field label="Why" value={reason} onChange={setReason} />
      <Button
        label="Take it up"
        kind="main"
        disabled={reason.trim() === ''}
        onPress={() => setAsking(true)}
      />
      <Confirm
        open={asking}
        title="Put the learnt table in force?"
        words="Every cast, kept ones too, is read by it from now on. Published charts keep what they were made with. The version before stays in the history."
        act="Take it up"
        busy={accept.isPending}
        onAct={() => accept.mutate()}
        onClose={() => setAsking(false)}
      />
    </View>
  );
}
