import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
import { OFFICE_ROLES, useMyFisheries } from '@/features/fisheries/use-my-fisheries';
import { useUnits } from '@/hooks/use-units';
import { area } from '@/lib/format';
import { useSession } from '@/lib/session';

/** The lakes of the reader's fisheries, to be kept. */
export function LakesScreen() {
  const { all, mine } = useMyFisheries([...OFFICE_ROLES, 'head_bailiff']);
  return (
    <Page title="Lakes" width="wide" back={{ label: 'Office', href: '/office' }}>
      <Loaded
        query={all}
        waiting="Reading the lakes…"
        empty={{
          when: () => mine.length === 0,
          show: (
            <Empty
              title="No fishery yet"
              action={<LinkButton label="To the office" href="/office" kind="main" />}
            >
              Lakes belong to a fishery. Make it first.
            </Empty>
          ),
        }}
      >
        {() => mine.map((fishery) => <FisheryLakes key={fishery.id} fishery={fishery} />)}
      </Loaded>
    </Page>
  );
}

function FisheryLakes({ fishery }: { fishery: FisheryListItem }) {
  const units = useUnits();
  const { rolesAt } = useSession();
  const mayAdd = rolesAt(fishery.id).some((role) => role === 'owner' || role === 'manager');
  const add = (
    <LinkButton label="Draw a lake" href={`/office/lakes/new?fisheryId=${fishery.id}`} kind="main" />
  );
  if (fishery.lakes.length === 0)
    return (
      <Section title={fishery.name} bare>
        <Empty title="No lake yet" action={mayAdd ? add : null}>
          {mayAdd
            ? 'Draw its shore by tapping, or read it from a file.'
            : 'The owner or a manager draws the lakes.'}
        </Empty>
      </Section>
    );
  return (
    <Section title={fishery.name} end={mayAdd ? add : null} bare>
      <Table
        caption={`Lakes of ${fishery.name}`}
        csvName="lakes"
        rows={fishery.lakes}
        rowKey={({ id }) => id}
        href={({ id }) => `/office/lakes/${id}`}
        columns={[
          { key: 'name', head: 'Lake', value: ({ name }) => name },
          {
            key: 'area',
            head: 'Water',
            value: ({ areaM2 }) => areaM2,
            show: ({ areaM2 }) => area(areaM2, units),
            figures: true,
          },
          { key: 'pegs', head: 'Pegs', value: ({ pegs }) => pegs, figures: true },
          { key: 'nights', head: 'Nights', value: ({ nights }) => (nights ? 'yes' : 'days only') },
          { key: 'chart', head: 'Chart', value: ({ chart }) => chart?.version ?? 'none published' },
        ]}
      />
    </Section>
  );
}
