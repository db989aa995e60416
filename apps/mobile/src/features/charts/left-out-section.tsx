import type { ChartReview } from '@mereward/shared/charts/contract';
import type { LeftOutView } from '@mereward/shared/charts/left-out-contract';
import { Button } from '@/components/button';
import { Disclosure } from '@/components/disclosure';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { usePutBack } from './left-out-api';
import { leftOutWords } from './left-out-words';

/** What a person left out of this chart, with why, and the way to any cast of it. */
export function LeftOutSection({ review }: { review: ChartReview }) {
  const { chart, leftOut, may, zone } = review;
  const out = leftOut.filter(({ putBack }) => putBack === null);
  const back = leftOut.filter(({ putBack }) => putBack !== null);
  return (
    <Section
      title="Left out of this chart"
      note="What was observed is kept, and other charts still use it. The survey report tells what was left out, by whom and why."
    >
      {out.length === 0 ? (
        <Text tone="inkSoft">Nobody has left anything out.</Text>
      ) : (
        <Out {...{ review, out }} />
      )}
      {back.length > 0 ? (
        <Disclosure title={`Put back: ${String(back.length)}`}>
          <List label="Put back">
            {back.map((each) => (
              <Row key={each.id} title={each.label} note={leftOutWords(each, zone)} />
            ))}
          </List>
        </Disclosure>
      ) : null}
      <LinkButton
        label={may.leaveOut ? 'Every cast: leave one out' : 'Every cast of this chart'}
        href={`/office/charts/${chart.id}/casts`}
      />
    </Section>
  );
}

function Out({ review: { chart, may, zone }, out }: { review: ChartReview; out: readonly LeftOutView[] }) {
  const putBack = usePutBack(chart.id);
  return (
    <>
      <ProblemNote problem={putBack.error} />
      <List label="Left out">
        {out.map((each) => (
          <Row
            key={each.id}
            title={each.label}
            note={leftOutWords(each, zone)}
            end={
              may.leaveOut ? (
                <Button
                  label="Put back"
                  spoken={`Put back: ${each.label}`}
                  kind="quiet"
                  busy={putBack.isPending && putBack.variables === each.id}
                  onPress={() => putBack.mutate(each.id)}
                />
              ) : undefined
            }
          />
        ))}
      </List>
    </>
  );
}
