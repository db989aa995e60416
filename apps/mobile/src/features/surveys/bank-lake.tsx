import { useState } from 'react';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { VisitList } from '@mereward/shared/surveys/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useFishery } from '@/features/fisheries/office-api';
import { useLake } from '@/features/lakes/api';
import { useStances, useVisits } from '@/features/surveys/api';
import { countWords, visitCountWords, dayAt, levelWords } from '@/features/surveys/visit-words';

const AT_FIRST = 3;

type Props = { lakeId: string; fisheryId: string; name: string };

/** One lake on the bank: its level, what may be done there, its surveys newest first. */
export function BankLake({ lakeId, fisheryId, name }: Props) {
  const lake = useLake(lakeId);
  const visits = useVisits(lakeId);
  useFishery(fisheryId); // its duty phone and gate stand on the emergency card
  useStances(visits.data?.may.open ? lakeId : ''); // a visit may be opened once the signal is gone
  return (
    <Section title={name}>
      <Loaded query={lake} waiting="Reading the level…">
        {(value) => <Acts lake={value} maySurvey={visits.data?.may.open ?? false} />}
      </Loaded>
      <Loaded
        query={visits}
        waiting="Reading the surveys…"
        empty={{
          when: (list) => list.visits.length === 0,
          show: <Text tone="inkSoft">Not surveyed yet. Open a visit to begin.</Text>,
        }}
      >
        {(list) => <Visits list={list} zone={lake.data?.zone ?? 'Europe/London'} name={name} />}
      </Loaded>
    </Section>
  );
}

function Acts({ lake, maySurvey }: { lake: LakeView; maySurvey: boolean }) {
  return (
    <>
      <Text>{levelWords(lake)}</Text>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        {lake.may.recordLevel && lake.boards.length > 0 ? (
          <LinkButton label="Record the level" href={`/bank/levels/${lake.id}`} bank grow />
        ) : null}
        {maySurvey ? (
          <>
            <LinkButton label="Open a visit" href={`/bank/surveys/new?lakeId=${lake.id}`} bank grow />
            <LinkButton label="Confirm a bottom" href={`/bank/confirmed/${lake.id}`} bank grow />
          </>
        ) : null}
      </View>
    </>
  );
}

function Visits({ list, zone, name }: { list: VisitList; zone: string; name: string }) {
  const [all, setAll] = useState(false);
  const shown = all ? list.visits : list.visits.slice(0, AT_FIRST);
  const more = list.visits.length - shown.length;
  return (
    <>
      <List label={`Surveys of ${name}`}>
        {shown.map((visit) => (
          <Row
            key={visit.id}
            title={visit.title}
            note={`${dayAt(visit.startedAt, zone)} · ${visit.surveyor.name} · ${visitCountWords(visit)}`}
            href={`/bank/surveys/${visit.id}`}
            end={visit.status === 'open' ? <StatusShape shape="ring" tone="water" word="open" /> : 'closed'}
          />
        ))}
      </List>
      {more > 0 ? (
        <Button label={`${countWords(more, 'more survey')}`} kind="quiet" bank onPress={() => setAll(true)} />
      ) : null}
    </>
  );
}
