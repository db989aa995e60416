import type { RulesToReadView } from '@mereward/shared/rules/sheet-contract';
import { changesWords } from '@mereward/shared/rules/rule-changes';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Disclosure } from '@/components/disclosure';
import { Kept } from '@/components/kept';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useAcknowledgeRules, useRulesToRead, useWitnessReading } from '@/features/rules/api';
import { RuleChangesList } from '@/features/rules/rule-changes-list';
import { RuleList } from '@/features/rules/rule-list';
import { readingWords, versionWords } from '@/features/rules/rule-words';
import { dayAndTime } from '@/lib/format-time';

type Props = {
  bookingId: string;
  zone: string;
  /** On the bank: a bailiff reads the rules out, or has them signed. */
  witness?: boolean | undefined;
};

/** The rules of one booking: what changed since they were last read, and the act of having read them. */
export function RulesToRead({ bookingId, zone, witness = false }: Props) {
  const rules = useRulesToRead(bookingId);
  return (
    <Loaded query={rules} waiting="Reading the rules…">
      {(view) => <ToRead view={view} zone={zone} witness={witness} />}
    </Loaded>
  );
}

function ToRead({ view, zone, witness }: { view: RulesToReadView; zone: string; witness: boolean }) {
  const { sheet, since, needed, readings } = view;
  if (!sheet) return <Text tone="inkSoft">This fishery has published no rules here.</Text>;
  const newest = readings[0];
  const told = since !== null && since.length > 0;
  return (
    <View style={{ gap: space.medium }}>
      {needed ? (
        <Note kind="caution" title={view.words}>
          {told
            ? `${changesWords(since)} since they were last read.`
            : `${versionWords(sheet)}, ${String(sheet.rules.length)} rules.`}
        </Note>
      ) : null}
      {needed && told ? (
        <>
          <RuleChangesList changes={since} />
          <Disclosure title={`All rules, ${versionWords(sheet).toLowerCase()}`}>
            <RuleList rules={sheet.rules} />
          </Disclosure>
        </>
      ) : (
        <Disclosure title={`${versionWords(sheet)}: ${String(sheet.rules.length)} rules`} open={needed}>
          <RuleList rules={sheet.rules} />
        </Disclosure>
      )}
      {needed ? <Text tone="inkSoft">Byelaws and notices on the bank beat this page.</Text> : null}
      {needed && view.may.acknowledge && !witness ? <Acknowledge view={view} /> : null}
      {needed && view.may.witness && witness ? <Witness view={view} /> : null}
      {!needed && newest ? (
        <Kept
          words={`${versionWords(newest.version)}: ${readingWords(newest)}, ${dayAndTime(newest.deviceAt, zone)}.`}
        />
      ) : null}
    </View>
  );
}

function Acknowledge({ view: { fisheryId, sheet } }: { view: RulesToReadView }) {
  const acknowledge = useAcknowledgeRules(fisheryId);
  if (!sheet) return null;
  const { major, minor } = sheet;
  return (
    <View style={{ gap: space.small }}>
      <ProblemNote problem={acknowledge.error} />
      <Button
        label="I have read the rules and will keep them"
        kind="main"
        busy={acknowledge.isPending}
        busyLabel="Keeping…"
        onPress={() => acknowledge.mutate({ major, minor })}
      />
    </View>
  );
}

function Witness({ view: { bookingId, sheet } }: { view: RulesToReadView }) {
  const witness = useWitnessReading(bookingId);
  if (!sheet) return null;
  const { major, minor } = sheet;
  const keep = (method: 'verbal' | 'paper') => witness.mutate({ version: { major, minor }, method });
  return (
    <View style={{ gap: space.small }}>
      <Text>Read what changed aloud, word for word. You are kept as the witness, with the time.</Text>
      <ProblemNote problem={witness.error} />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button
          label="I read them out"
          kind="main"
          bank
          grow
          busy={witness.isPending}
          onPress={() => keep('verbal')}
        />
        <Button
          label="They signed on paper"
          bank
          grow
          disabled={witness.isPending}
          onPress={() => keep('paper')}
        />
      </View>
    </View>
  );
}
