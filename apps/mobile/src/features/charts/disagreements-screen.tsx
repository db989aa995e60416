import { Empty } from '@/components/empty';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { MEASURE_PX } from '@/constants/layout';
import { useMyLakes } from '@/features/fisheries/use-my-lakes';
import { useLakeDisagreements } from './disagreement-api';
import { DisagreementReview } from './disagreement-review';

/** What anglers found otherwise than charted, lake by lake, each beside the soundings it doubts. */
export function DisagreementsScreen() {
  const { fisheries, lakes } = useMyLakes(['owner', 'manager', 'head_bailiff', 'office']);
  return (
    <Page
      title="Not as charted"
      over="What anglers found"
      width="wide"
      back={{ label: 'Charts', href: '/office/charts' }}
    >
      <Text tone="inkSoft" style={{ maxWidth: MEASURE_PX }}>
        A report never alters a published chart. Accepted, it is evidence in the next one made: a float at a
        marked place as a point (grade C), anything else for staff (D), and in the contours (B) only once
        staff have measured it again.
      </Text>
      <Loaded
        query={fisheries}
        waiting="Reading the lakes…"
        empty={{
          when: () => lakes.length === 0,
          show: <Empty title="No lake yet">Reports come in once a lake has a chart.</Empty>,
        }}
      >
        {() => lakes.map(({ id, name }) => <LakeReports key={id} lakeId={id} name={name} />)}
      </Loaded>
    </Page>
  );
}

function LakeReports({ lakeId, name }: { lakeId: string; name: string }) {
  const reports = useLakeDisagreements(lakeId);
  return (
    <Section title={name}>
      <Loaded
        query={reports}
        waiting="Reading the reports…"
        empty={{
          when: ({ disagreements }) => disagreements.length === 0,
          show: <Text tone="inkSoft">Nobody has told of anything here.</Text>,
        }}
      >
        {({ disagreements }) =>
          disagreements.map((each) => <DisagreementReview key={each.id} report={each} />)
        }
      </Loaded>
    </Section>
  );
}
