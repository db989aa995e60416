import { useLocalSearchParams } from 'expo-router';
import type { ChangeWeight } from '@mereward/shared/rules/contract';
import { Disclosure } from '@/components/disclosure';
import { Empty } from '@/components/empty';
import { Loaded } from '@/components/loaded';
import { View } from 'react-native';
import { Page } from '@/components/page';
import { PaperButtons } from '@/components/paper-buttons';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useSheet, useSheets } from '@/features/rules/api';
import { RuleChangesList } from '@/features/rules/rule-changes-list';
import { RuleList } from '@/features/rules/rule-list';
import { sheetPapers, versionWords } from '@/features/rules/rule-words';
import { clockHere } from '@/lib/format-time';

const WEIGHT_WORDS: Readonly<Record<ChangeWeight, string>> = {
  minor: 'a wording put right',
  change: 'a change',
  safety: 'somebody’s safety hangs on it',
};

/** Every version of a fishery's rules that its reader may see, the newest first. */
export function RuleVersionsScreen() {
  const { fisheryId } = useLocalSearchParams<{ fisheryId: string }>();
  const sheets = useSheets(fisheryId);
  return (
    <Page title="Versions of the rules" back={{ label: 'Rules', href: `/water/rules/${fisheryId}` }}>
      <Loaded
        query={sheets}
        waiting="Reading the versions…"
        empty={{
          when: ({ versions }) => versions.length === 0,
          show: <Empty title="No version">You have accepted none here yet.</Empty>,
        }}
      >
        {({ versions }) => (
          <>
            {versions.map((version) => (
              <Section key={version.id} title={versionWords(version)}>
                <Text tone="inkSoft">
                  {[
                    clockHere(version.publishedAt),
                    WEIGHT_WORDS[version.weight],
                    version.words,
                    ...(version.readers === null ? [] : [`read by ${String(version.readers)}`]),
                  ].join(' · ')}
                </Text>
                <Disclosure title="Open it">
                  <OneSheet sheetId={version.id} />
                </Disclosure>
              </Section>
            ))}
          </>
        )}
      </Loaded>
    </Page>
  );
}

function OneSheet({ sheetId }: { sheetId: string }) {
  const sheet = useSheet(sheetId);
  return (
    <Loaded query={sheet} waiting="Reading the version…">
      {({ changes, rules, ...sheet }) => (
        <>
          <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
            <PaperButtons papers={sheetPapers(sheet)} />
          </View>
          {changes ? <RuleChangesList changes={changes} /> : null}
          <Disclosure title="All its rules" open={changes === null}>
            <RuleList rules={rules} />
          </Disclosure>
        </>
      )}
    </Loaded>
  );
}
