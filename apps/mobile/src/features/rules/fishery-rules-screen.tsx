import { useLocalSearchParams } from 'expo-router';
import { changesWords } from '@mereward/shared/rules/rule-changes';
import type { RulesView, SheetView } from '@mereward/shared/rules/sheet-contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Empty } from '@/components/empty';
import { Kept } from '@/components/kept';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { PaperButtons } from '@/components/paper-buttons';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useAcknowledgeRules, useRules } from '@/features/rules/api';
import { RuleChangesList } from '@/features/rules/rule-changes-list';
import { RuleList } from '@/features/rules/rule-list';
import { METHOD_WORDS, sheetPapers, versionWords } from '@/features/rules/rule-words';
import { clockHere } from '@/lib/format-time';

/** The rules in force at a fishery, open to everybody and kept on the device. */
export function FisheryRulesScreen() {
  const { fisheryId } = useLocalSearchParams<{ fisheryId: string }>();
  const rules = useRules(fisheryId);
  return (
    <Page title="Rules" over={rules.data?.fisheryName} back={{ label: 'Water', href: '/water' }}>
      <Loaded
        query={rules}
        waiting="Reading the rules…"
        empty={{
          when: ({ sheet }) => sheet === null,
          show: <Empty title="No rules are published here">Ask the fishery what holds on its banks.</Empty>,
        }}
      >
        {(view) => (view.sheet ? <Sheet view={view} sheet={view.sheet} /> : null)}
      </Loaded>
    </Page>
  );
}

function Sheet({ view, sheet }: { view: RulesView; sheet: SheetView }) {
  const { since, read, may, fisheryId } = view;
  const news = since !== null && since.length > 0;
  return (
    <>
      <Text tone="inkSoft">{`${versionWords(sheet)}, in force since ${clockHere(sheet.publishedAt)}. Byelaws and notices on the bank beat this page.`}</Text>
      {read ? (
        <Kept
          words={`You have read ${versionWords(read).toLowerCase()}: ${METHOD_WORDS[read.method]}, ${clockHere(read.at)}.`}
        />
      ) : null}
      {news ? (
        <Section title="What changed since you read them" bare>
          <Note kind="caution">{changesWords(since)}</Note>
          <RuleChangesList changes={since} />
        </Section>
      ) : null}
      <Section title="All rules" bare={!news}>
        <RuleList rules={sheet.rules} />
      </Section>
      {may.acknowledge ? <Acknowledge fisheryId={fisheryId} sheet={sheet} /> : null}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <PaperButtons papers={sheetPapers(sheet)} />
        {may.versions ? (
          <LinkButton label="Earlier versions" href={`/water/rules/versions/${fisheryId}`} />
        ) : null}
      </View>
    </>
  );
}

function Acknowledge({ fisheryId, sheet }: { fisheryId: string; sheet: SheetView }) {
  const acknowledge = useAcknowledgeRules(fisheryId);
  const { major, minor } = sheet;
  return (
    <View style={{ gap: space.small, alignItems: 'flex-start' }}>
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
