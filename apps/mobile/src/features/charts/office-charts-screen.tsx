import { View } from 'react-native';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
import { ChartStatusShape } from '@/features/charts/chart-status';
import { chartName, surveyedWords } from '@/features/charts/chart-words';
import { useLakeCharts } from '@/features/charts/review-api';
import { useMyLakes } from '@/features/fisheries/use-my-lakes';

/** Every lake's charts, drafts and all, for those who make and approve them. */
export function OfficeChartsScreen() {
  const { fisheries, lakes } = useMyLakes(['owner', 'manager', 'head_bailiff', 'office']);
  return (
    <Page title="Charts" width="wide" back={{ label: 'Office', href: '/office' }}>
      <Loaded
        query={fisheries}
        waiting="Reading the lakes…"
        empty={{
          when: () => lakes.length === 0,
          show: (
            <Empty
              title="No lake yet"
              action={<LinkButton label="Draw a lake" href="/office/lakes/new" kind="main" />}
            >
              A chart is made of a lake’s survey. Draw the lake first.
            </Empty>
          ),
        }}
      >
        {() => (
          <>
            <View style={{ alignItems: 'flex-start' }}>
              <LinkButton label="What anglers found otherwise" href="/office/charts/disagreements" />
            </View>
            {lakes.map((lake) => (
              <LakeCharts key={lake.id} lakeId={lake.id} name={lake.name} />
            ))}
          </>
        )}
      </Loaded>
    </Page>
  );
}

function LakeCharts({ lakeId, name }: { lakeId: string; name: string }) {
  const charts = useLakeCharts(lakeId);
  const draft = charts.data?.may.build ? (
    <LinkButton label="Draft a chart" href={`/office/charts/new?lakeId=${lakeId}`} />
  ) : null;
  return (
    <Section title={name} end={draft} bare>
      <Loaded
        query={charts}
        waiting="Reading the charts…"
        empty={{
          when: (list) => list.charts.length === 0,
          show: <Empty title="No chart yet">Survey the lake, then draft a chart from the visits.</Empty>,
        }}
      >
        {(list) => (
          <Table
            caption={`Charts of ${name}`}
            rows={list.charts}
            rowKey={({ id }) => id}
            href={({ id }) => `/office/charts/${id}`}
            columns={[
              { key: 'chart', head: 'Chart', value: chartName },
              {
                key: 'state',
                head: 'State',
                value: ({ status }) => status,
                show: ({ status }) => <ChartStatusShape status={status} />,
              },
              { key: 'surveyed', head: 'Surveyed', value: surveyedWords },
              { key: 'submitted', head: 'Submitted by', value: ({ submittedBy }) => submittedBy },
              { key: 'approved', head: 'Approved by', value: ({ approvedBy }) => approvedBy },
            ]}
          />
        )}
      </Loaded>
    </Section>
  );
}
