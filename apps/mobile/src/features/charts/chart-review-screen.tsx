import { useLocalSearchParams } from 'expo-router';
import { View } from 'react-native';
import { space } from '@/constants/layout';
import type { ChartReview } from '@mereward/shared/charts/contract';
import { Facts } from '@/components/facts';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { BuildSection } from '@/features/charts/build-section';
import { ChartLogsSection } from '@/features/charts/chart-logs-section';
import { ChartStatusShape } from '@/features/charts/chart-status';
import { chartName, surveyedWords } from '@/features/charts/chart-words';
import { layersPaper, sheetPapers, staffPapers } from '@/features/charts/chart-papers';
import { CheckList } from '@/features/charts/check-list';
import { LeftOutSection } from '@/features/charts/left-out-section';
import { PaperButtons } from '@/components/paper-buttons';
import { QualityReport } from '@/features/charts/quality-report';
import { ReviewActions } from '@/features/charts/review-actions';
import { ReviewMap } from '@/features/charts/review-map';
import { useChartReview } from '@/features/charts/review-api';
import { SoundingMisses } from '@/features/charts/sounding-misses';

const READING_PX = 720; // a report's lines stay short on a wide sheet

/** One chart before the staff: how it was built, what the checks say, how good it is, and the next deed. */
export function ChartReviewScreen() {
  const { chartId } = useLocalSearchParams<{ chartId: string }>();
  const review = useChartReview(chartId);
  const chart = review.data?.chart;
  return (
    <Page
      title={chart ? chartName(chart) : 'Chart'}
      width="wide"
      {...(review.data ? { over: review.data.lakeName } : {})}
      back={{ label: 'Charts', href: '/office/charts' }}
      {...(chart ? { end: <ChartStatusShape status={chart.status} /> } : {})}
    >
      <Loaded query={review} waiting="Reading the chart…">
        {(value) => <Review review={value} />}
      </Loaded>
    </Page>
  );
}

function papersOf({ chart: { id, version }, lakeName, logs }: ChartReview) {
  const named = { id, version, lakeName, ...(logs.length > 0 ? { surveyedBy: 'both' as const } : {}) };
  return [...sheetPapers(named), ...staffPapers(named), layersPaper(named)];
}

/** What works and seasons after the casts took out of the chart. */
function EndedSection({ ended }: Pick<ChartReview, 'ended'>) {
  const counted = (casts: number, what: string): string[] =>
    casts === 0 ? [] : [`${what} of ${String(casts)} ${casts === 1 ? 'cast' : 'casts'}`];
  return (
    <Section title="What no longer counts" note="Happened after the casts were made.">
      <List label="Events">
        {ended.map(({ eventId, words, cover, substrate, depth }) => (
          <Row
            key={eventId}
            title={words}
            note={`Left out: ${[...counted(cover, 'what lay there'), ...counted(substrate, 'the bottom'), ...counted(depth, 'the depth')].join(', ')}`}
          />
        ))}
      </List>
    </Section>
  );
}

function Review({ review }: { review: ChartReview }) {
  const { chart, checks, quality } = review;
  const built = chart.build?.state === 'done';
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.large }}>
      <View style={{ flexGrow: 1, flexBasis: 340, minWidth: 0, maxWidth: READING_PX, gap: space.large }}>
        <Facts
          facts={[
            { term: 'Surveyed', fact: surveyedWords(chart) },
            { term: 'Submitted by', fact: chart.submittedBy ?? '' },
            { term: 'Approved by', fact: chart.approvedBy ?? '' },
            {
              term: 'Bottom read by',
              fact: quality
                ? review.bottomTable === 0
                  ? 'the built-in table of feels'
                  : `version ${String(review.bottomTable)} of the fishery’s table of feels`
                : '',
            },
          ]}
        />
        <BuildSection review={review} />
        {checks.length > 0 ? (
          <Section
            title="Checks before publishing"
            note="What a failed check names is put right in the survey; then build again."
          >
            <CheckList checks={checks} />
          </Section>
        ) : null}
        <ChartLogsSection chartId={chart.id} logs={review.logs} mayLeaveOut={review.may.leaveOut} />
        {quality ? <SoundingMisses review={review} /> : null}
        {built || review.leftOut.length > 0 ? <LeftOutSection review={review} /> : null}
        {quality ? (
          <Section title="How good it is" note={quality.words}>
            <QualityReport quality={quality} />
          </Section>
        ) : null}
        {review.ended.length > 0 ? <EndedSection ended={review.ended} /> : null}
        {review.may.approveWhyNot ? (
          <Note kind="caution" title="Not yours to approve">
            {review.may.approveWhyNot}
          </Note>
        ) : null}
        <ReviewActions review={review} />
      </View>
      {built ? (
        <View style={{ flexGrow: 2, flexBasis: 340, minWidth: 0 }}>
          <ReviewMap chartId={chart.id} />
          <Section title="Papers" note="As they would stand with this chart published.">
            <PaperButtons papers={papersOf(review)} />
          </Section>
        </View>
      ) : null}
    </View>
  );
}
