import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { useFishery } from '@/features/fisheries/office-api';
import { OFFICE_ROLES } from '@/features/fisheries/use-my-fisheries';
import { makeTicketType } from '@/features/tickets/office-api';
import { TEMPLATES } from '@/features/tickets/ticket-choices';
import { fromTemplate } from '@/features/tickets/ticket-type-draft';
import { TicketTypeEditor, useToday } from '@/features/tickets/ticket-type-editor';
import { newId } from '@/lib/new-id';

/** Makes a kind of ticket, begun from a template. */
export function NewTicketTypeScreen() {
  const { all, chosen } = useChosenFishery(OFFICE_ROLES);
  return (
    <Page
      title="A new kind of ticket"
      width="wide"
      back={{ label: 'Tickets and prices', href: '/office/tickets' }}
    >
      <Loaded
        query={all}
        waiting="Reading the fishery…"
        empty={{
          when: () => chosen === undefined,
          show: <Empty title="Not yours to set">The owner, a manager or the office sets tickets.</Empty>,
        }}
      >
        {() => (chosen ? <New key={chosen.id} fishery={chosen} /> : null)}
      </Loaded>
    </Page>
  );
}

function New({ fishery }: { fishery: FisheryListItem }) {
  const about = useFishery(fishery.id);
  if (fishery.lakes.length === 0)
    return (
      <Empty
        title="No lake yet"
        action={<LinkButton label="Draw a lake" href="/office/lakes/new" kind="main" />}
      >
        A ticket is for a lake. Draw the lake first.
      </Empty>
    );
  return (
    <Loaded query={about} waiting="Reading the fishery…">
      {(value) => <NewForm fishery={fishery} about={value} />}
    </Loaded>
  );
}

type Props = Pick<Parameters<typeof TicketTypeEditor>[0], 'fishery' | 'about'>;

function NewForm({ fishery, about }: Props) {
  const { template } = useLocalSearchParams<{ template?: string }>();
  const name = TEMPLATES.find(({ key }) => key === template)?.key ?? 'day';
  const router = useRouter();
  const [id] = useState(newId);
  const today = useToday(about.details.zone);
  const list = `/office/tickets?fisheryId=${fishery.id}` as const;
  return (
    <TicketTypeEditor
      key={name}
      draft={`ticket-type:${fishery.id}:${name}`}
      fishery={fishery}
      about={about}
      start={fromTemplate(TICKET_TEMPLATES[name], {
        today,
        lakeIds: fishery.lakes.map((lake) => lake.id),
        vatRegistered: about.details.vatStatus === 'registered',
      })}
      act="Put it on sale"
      send={(details) => makeTicketType(fishery.id, { id, details })}
      onDone={() => router.replace(list)}
      beside={<LinkButton label="Leave it" href={list} />}
    />
  );
}
