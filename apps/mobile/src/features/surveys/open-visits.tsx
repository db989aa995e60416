import type { VisitView } from '@mereward/shared/surveys/contract';
import { useQueries } from '@tanstack/react-query';
import { View } from 'react-native';
import { LinkButton } from '@/components/link-button';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { visitsQuery } from '@/features/surveys/api';
import { visitCountWords } from '@/features/surveys/visit-words';
import { themed } from '@/hooks/themed';
import { useOutbox } from '@/lib/outbox';

const useStyles = themed((c) => ({
  visit: {
    gap: space.medium,
    padding: space.page,
    borderWidth: 1,
    borderColor: c.rule,
    borderRadius: 8,
    backgroundColor: c.sheet,
  },
  acts: { flexDirection: 'row', flexWrap: 'wrap', gap: space.small },
}));

/** Visits that are being made: the next cast is one press away. Nothing is shown when there is none. */
export function OpenVisits({ lakeIds }: { lakeIds: readonly string[] }) {
  const { entries } = useOutbox();
  const answers = useQueries({ queries: lakeIds.map((lakeId) => visitsQuery(lakeId, entries)) });
  const open = answers.flatMap(({ data }) => (data?.visits ?? []).filter(({ status }) => status === 'open'));
  if (open.length === 0) return null;
  return (
    <Section title={open.length === 1 ? 'Open visit' : 'Open visits'} bare>
      {open.map((visit) => (
        <OpenVisit key={visit.id} visit={visit} />
      ))}
    </Section>
  );
}

function OpenVisit({ visit }: { visit: VisitView }) {
  const styles = useStyles();
  return (
    <View style={styles.visit}>
      <View>
        <Text weight="semibold">{visit.title}</Text>
        <Text size="small" tone="inkSoft">
          {`${visit.lakeName} · ${visit.surveyor.name} · ${visitCountWords(visit)}`}
        </Text>
      </View>
      <View style={styles.acts}>
        <LinkButton label="Look at it" href={`/bank/surveys/${visit.id}`} bank grow />
        {visit.may.addCasts ? (
          <LinkButton label="Next cast" href={`/bank/surveys/${visit.id}/cast`} kind="main" bank grow />
        ) : null}
      </View>
    </View>
  );
}
