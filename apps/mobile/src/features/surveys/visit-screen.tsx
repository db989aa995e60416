import { useLocalSearchParams } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { space } from '@/constants/layout';
import { useLake } from '@/features/lakes/api';
import { useStances, useVisit } from '@/features/surveys/api';
import { CastsSection } from '@/features/surveys/casts-section';
import { CoverageSection } from '@/features/surveys/coverage-section';
import { LogsSection } from '@/features/surveys/logs-section';
import { SendingNote } from '@/features/surveys/sending-note';
import type { VisitShown } from '@/features/surveys/shown-visit';
import { VisitFacts, VisitKit } from '@/features/surveys/visit-facts';
import { useThreeColumns } from '@/hooks/use-wide';

/** One survey visit: what it was made with, how well it covers each peg, its casts. */
export function VisitScreen() {
  const { visitId } = useLocalSearchParams<{ visitId: string }>();
  const visit = useVisit(visitId);
  const lake = useLake(visit.data?.visit.lakeId ?? '');
  useStances(visit.data?.visit.may.addCasts ? visit.data.visit.lakeId : '');
  const it = visit.data?.visit;
  return (
    <Page
      title={it?.title ?? 'Survey visit'}
      over={it?.lakeName}
      back={{ label: 'Bank', href: '/bank' }}
      width="wide"
      end={
        it ? (
          it.status === 'open' ? (
            <StatusShape shape="ring" tone="water" word="open" />
          ) : (
            <StatusShape shape="square" tone="inkSoft" word="closed" />
          )
        ) : null
      }
      actions={
        it?.may.addCasts ? (
          <>
            <LinkButton label="Close the visit" href={`/bank/surveys/${visitId}/close`} bank grow />
            <LinkButton label="Next cast" href={`/bank/surveys/${visitId}/cast`} kind="main" bank grow />
          </>
        ) : null
      }
    >
      <Loaded query={visit} waiting="Reading the visit…">
        {(value) => (
          <>
            <SendingNote value={value} />
            <Loaded query={lake} waiting="Reading the lake…">
              {(its) => <Visit value={value} lake={its} />}
            </Loaded>
          </>
        )}
      </Loaded>
    </Page>
  );
}

function Visit({ value, lake }: { value: VisitShown; lake: LakeView }) {
  const { visit, casts, opening } = value;
  const beside = useThreeColumns();
  const facts = <VisitFacts visit={visit} lake={lake} />;
  const kit = <VisitKit visit={visit} />;
  const made =
    casts.length > 0 ? (
      <CastsSection value={value} lake={lake} />
    ) : (
      <Section title="Casts">
        <NoCasts value={value} />
      </Section>
    );
  const coverage = casts.length > 0 ? <CoverageSection value={value} lake={lake} bare={beside} /> : null;
  const logs = opening === null ? <LogsSection visitId={visit.id} zone={lake.zone} /> : null; // not there yet
  if (!beside)
    return (
      <>
        {facts}
        {coverage}
        {kit}
        {made}
        {logs}
      </>
    );
  return (
    <>
      <View style={{ flexDirection: 'row', gap: space.huge }}>
        <View style={{ flex: 1, minWidth: 0, gap: space.large }}>
          {facts}
          {kit}
        </View>
        <View style={{ flex: 1, minWidth: 0 }}>{coverage}</View>
      </View>
      {made}
      {logs}
    </>
  );
}

function NoCasts({ value: { visit, opening } }: { value: VisitShown }) {
  return (
    <Empty
      title="No casts yet"
      action={
        visit.may.addCasts && opening === null ? (
          <LinkButton label="Bring casts from a file" href={`/bank/surveys/${visit.id}/import`} bank />
        ) : null
      }
    >
      {visit.may.addCasts
        ? 'Make the first cast, or bring a file of casts written down elsewhere.'
        : 'Nothing was cast on this visit.'}
    </Empty>
  );
}
