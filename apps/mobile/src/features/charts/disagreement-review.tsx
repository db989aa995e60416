import { BOTTOM_WORDS } from '@mereward/shared/charts/bottom-words';
import type { DisagreementForReview } from '@mereward/shared/charts/disagreement';
import { dayWords } from '@mereward/shared/time/civil-day';
import { View } from 'react-native';
import { Disclosure } from '@/components/disclosure';
import { Facts } from '@/components/facts';
import { Heading } from '@/components/heading';
import { LinkButton } from '@/components/link-button';
import { StatusShape } from '@/components/status-shape';
import { List, Row } from '@/components/list';
import { Table } from '@/components/table';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useUnits } from '@/hooks/use-units';
import { useThreeColumns, useWide } from '@/hooks/use-wide';
import { figure, length, lengthWithin, percent } from '@/lib/format';
import { DisagreementDecision } from './disagreement-decision';
import { TakeBack } from './disagreement-take-back';
import { foundWords, STATUS_LOOKS } from './disagreement-words';

type Props = { report: DisagreementForReview };

const FACTS_PX = 560;

/** One report: what was found, what the chart says there, the casts it doubts, and what becomes of it. */
export function DisagreementReview({ report }: Props) {
  const units = useUnits();
  const { status, pegNumber, found, placeWords, day, reporter } = report;
  const wide = useThreeColumns();
  const title = `Peg ${pegNumber}: ${foundWords(found, units)}`;
  return (
    <View role="group" aria-label={title} style={{ gap: space.medium, paddingBottom: space.page }}>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', alignItems: 'center', gap: space.medium }}>
        <Heading level={3} style={{ flexGrow: 1 }}>
          {title}
        </Heading>
        <StatusShape {...STATUS_LOOKS[status]} />
      </View>
      <Text>{`${reporter}, ${dayWords(day)}, ${placeWords}.`}</Text>
      {found.note ? <Text>{`“${found.note}”`}</Text> : null}
      {status === 'waiting' ? (
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', columnGap: space.huge, rowGap: space.medium }}>
          <View style={{ flexGrow: 1, flexBasis: 340, minWidth: 0, maxWidth: FACTS_PX, gap: space.medium }}>
            <Compared report={report} />
            {wide ? <DisagreementDecision report={report} /> : null}
          </View>
          <View style={{ flexGrow: 1, flexBasis: 340, minWidth: 0 }}>
            <Doubted report={report} />
          </View>
          {wide ? null : <DisagreementDecision report={report} />}
        </View>
      ) : (
        <>
          <Text>{decidedWords(report)}</Text>
          {report.may.takeBack ? <TakeBack report={report} /> : null}
          <Disclosure title="What it was held against">
            <Compared report={report} />
            <Doubted report={report} />
          </Disclosure>
        </>
      )}
    </View>
  );
}

function decidedWords(report: DisagreementForReview): string {
  const { status, decidedBy, decidedAt, reason, grade, charts, takenBack, takenBackBy } = report;
  const on = (at: string | null): string => (at === null ? '' : ` on ${dayWords(at.slice(0, 10))}`);
  const as = grade === null ? '' : ` as grade ${grade}`;
  const said = reason ? ` ${reason}` : '';
  const where = charts.length
    ? ` In ${charts.map(({ version, title }) => (version ? `chart ${version}` : `the draft “${title}”`)).join(', ')}.`
    : status === 'accepted'
      ? ' In no chart yet: it counts in the next one built.'
      : '';
  const back = takenBack
    ? ` Taken back by ${takenBackBy ?? 'somebody'}${on(takenBack.at)}: ${takenBack.reason}`
    : '';
  return `${status === 'declined' ? 'Declined' : 'Accepted'}${as} by ${decidedBy ?? 'somebody'}${on(decidedAt)}.${said}${where}${back}`;
}

function Compared({ report }: Props) {
  const units = useUnits();
  const { chart, foundDepthM, foundSigmaM } = report;
  const spread = (depthM: number, sigmaM: number) => lengthWithin(depthM, 1.96 * sigmaM, units);
  return (
    <View style={{ gap: space.medium }}>
      <Facts
        facts={[
          {
            term: 'Found, at datum',
            fact: foundDepthM === null || foundSigmaM === null ? null : spread(foundDepthM, foundSigmaM),
          },
          { term: 'The gauge board', fact: report.found.depthM === null ? null : report.levelWords },
          {
            term: chart ? `Chart ${chart.version} says` : 'The chart',
            fact: chart ? chartedWords(chart, spread) : 'No chart of this water is published.',
          },
          { term: 'How far apart', fact: apartWords(report, (m) => length(m, units)) },
          { term: 'If accepted', fact: report.status === 'waiting' ? report.gradeWords : null },
        ]}
      />
      {chart ? (
        <LinkButton
          label="See the chart there"
          href={`/water/charts/${chart.id}?peg=${report.pegId}`}
          kind="quiet"
        />
      ) : null}
    </View>
  );
}

/** The casts nearest to the reported place: a table on a wide screen, a short list on a phone. */
function Doubted({ report: { nearest } }: Props) {
  const units = useUnits();
  const wide = useWide();
  const spread = (depthM: number, sigmaM: number) => lengthWithin(depthM, 1.96 * sigmaM, units);
  if (nearest.length === 0) return null;
  if (!wide)
    return (
      <List label="The casts nearest to it">
        {nearest.map(({ id, label, awayM, depthM, sigmaM, bottom, grade, observedOn, surveyor }) => (
          <Row
            key={id}
            title={`${label}: ${spread(depthM, sigmaM)}, ${BOTTOM_WORDS[bottom]}`}
            note={`${length(awayM, units)} away, grade ${grade}, ${dayWords(observedOn)}, ${surveyor}`}
          />
        ))}
      </List>
    );
  return (
    <Table
      caption="The casts nearest to it"
      rows={nearest}
      rowKey={({ id }) => id}
      columns={[
        { key: 'cast', head: 'Cast', value: ({ label }) => label },
        {
          key: 'away',
          head: 'Away',
          value: ({ awayM }) => awayM,
          show: ({ awayM }) => length(awayM, units),
          figures: true,
        },
        {
          key: 'depth',
          head: 'Depth',
          value: ({ depthM }) => depthM,
          show: ({ depthM, sigmaM }) => spread(depthM, sigmaM),
          figures: true,
        },
        { key: 'bottom', head: 'Bottom', value: ({ bottom }) => BOTTOM_WORDS[bottom] },
        { key: 'grade', head: 'Grade', value: ({ grade }) => grade },
        {
          key: 'day',
          head: 'Day',
          value: ({ observedOn }) => observedOn,
          show: ({ observedOn }) => dayWords(observedOn),
        },
        { key: 'by', head: 'By', value: ({ surveyor }) => surveyor },
      ]}
    />
  );
}

type Chart = NonNullable<DisagreementForReview['chart']>;

function chartedWords(
  { depthM, sigmaM, bottom, bottomConfidence }: Chart,
  spread: (depthM: number, sigmaM: number) => string,
): string {
  const depth = depthM === null || sigmaM === null ? 'not surveyed there' : spread(depthM, sigmaM);
  const bed = bottom && `${bottom}${bottomConfidence === null ? '' : ` (${percent(bottomConfidence)})`}`;
  return [depth, bed].filter(Boolean).join(', ');
}

function apartWords(
  { apartM, apartSigmas }: DisagreementForReview,
  words: (lengthM: number) => string,
): string | null {
  if (apartM === null || apartSigmas === null) return null;
  const way = apartM > 0 ? 'deeper' : 'shallower';
  const sigmas = Math.abs(apartSigmas);
  const weight = sigmas > 1.96 ? 'more than their errors allow' : 'within what their errors allow';
  return `${words(Math.abs(apartM))} ${way} than charted: ${figure(sigmas, 1)} σ, ${weight}`;
}
