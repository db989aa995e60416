import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import type { TicketTypeView } from '@mereward/shared/tickets/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { NewerNote } from '@/components/newer-note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { useFishery } from '@/features/fisheries/office-api';
import { OFFICE_ROLES } from '@/features/fisheries/use-my-fisheries';
import { changeTicketType, useTicketTypes, useWithdrawTicketType } from '@/features/tickets/office-api';
import { typedTicketType } from '@/features/tickets/ticket-type-draft';
import { TicketTypeEditor } from '@/features/tickets/ticket-type-editor';
import { useHeld } from '@/hooks/use-held';

/** One kind of ticket, changed or taken off sale. */
export function TicketTypeScreen() {
  const { ticketTypeId } = useLocalSearchParams<{ ticketTypeId: string }>();
  const { chosen } = useChosenFishery(OFFICE_ROLES);
  const types = useTicketTypes(chosen?.id ?? '');
  const type = types.data?.ticketTypes.find(({ id }) => id === ticketTypeId);
  return (
    <Page
      title={type?.details.name ?? 'Kind of ticket'}
      width="wide"
      back={{ label: 'Tickets and prices', href: '/office/tickets' }}
    >
      <Loaded
        query={types}
        waiting="Reading the ticket…"
        empty={{
          when: () => !type?.may.change,
          show: (
            <Empty
              title="No such kind of ticket on sale"
              action={<LinkButton label="Tickets and prices" href="/office/tickets" />}
            >
              It may have been taken off sale, or it is not yours to change.
            </Empty>
          ),
        }}
      >
        {() => (chosen && type ? <Change fishery={chosen} now={type} /> : null)}
      </Loaded>
    </Page>
  );
}

function Change({ fishery, now }: { fishery: FisheryListItem; now: TicketTypeView }) {
  const about = useFishery(fishery.id);
  const { held, hold, newer } = useHeld(now);
  const router = useRouter();
  const list = `/office/tickets?fisheryId=${fishery.id}` as const;
  return (
    <Loaded query={about} waiting="Reading the fishery…">
      {(value) => (
        <>
          {newer ? <NewerNote what="this kind of ticket" onTake={() => hold(newer)} /> : null}
          <TicketTypeEditor
            key={held.version}
            draft={`ticket-type:${held.id}:${String(held.version)}`}
            fishery={fishery}
            about={value}
            start={typedTicketType(held.details)}
            act="Keep the changes"
            send={(details) => changeTicketType(held.id, { details, version: held.version })}
            onDone={() => router.replace(list)}
            beside={<LinkButton label="Leave it" href={list} />}
          />
          <Withdraw type={held} onDone={() => router.replace(list)} />
        </>
      )}
    </Loaded>
  );
}

function Withdraw({ type, onDone }: { type: TicketTypeView; onDone: () => void }) {
  const [asking, setAsking] = useState(false);
  const withdraw = useWithdrawTicketType();
  return (
    <Section
      title="Take it off sale"
      note="Tickets already sold are good all the same, at the price they were sold for."
    >
      <View style={{ alignItems: 'flex-start' }}>
        <Button label="Take it off sale" onPress={() => setAsking(true)} />
      </View>
      <ProblemNote problem={withdraw.error} />
      <Confirm
        open={asking}
        title={`Take “${type.details.name}” off sale?`}
        words="Nobody can buy it from now on. It can’t be put back; a new kind of the same name can be made."
        act="Take it off sale"
        danger
        busy={withdraw.isPending}
        onClose={() => setAsking(false)}
        onAct={() => withdraw.mutate(type.id, { onSettled: () => setAsking(false), onSuccess: onDone })}
      />
    </Section>
  );
}
