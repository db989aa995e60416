import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Select } from '@/components/select';
import { FindAtFishery } from '@/features/bookings/find-at-fishery';
import { lastSearch, useFindChoice } from '@/features/bookings/use-find-choice';
import { useFisheries } from '@/features/fisheries/api';

/** Everybody's way to a ticket: which pegs are free, and what each is like. Nobody has to sign in to see it. */
export function FindPegScreen() {
  const fisheries = useFisheries();
  const [choice, change] = useFindChoice();
  const last = lastSearch.use();
  const all = fisheries.data?.fisheries ?? [];
  const wanted = choice.fisheryId ?? last.fisheryId;
  const chosen = all.find(({ id }) => id === wanted) ?? (all.length === 1 ? all[0] : undefined);
  return (
    <Page
      title="Tickets"
      width="wide"
      {...(chosen && all.length === 1 ? { over: chosen.name } : {})}
      end={<LinkButton label="My tickets" href="/tickets/mine" kind="quiet" />}
    >
      <Loaded
        query={fisheries}
        waiting="Reading the fisheries…"
        empty={{
          when: (value) => value.fisheries.length === 0,
          show: (
            <Empty title="No fishery is here yet" action={<LinkButton label="To the water" href="/water" />}>
              Tickets are found here once a fishery has made its lakes and its kinds of ticket.
            </Empty>
          ),
        }}
      >
        {({ fisheries: list }) =>
          chosen ? (
            <>
              {list.length > 1 ? (
                <Select
                  label="Fishery"
                  choices={list.map(({ id, name }) => ({ key: id, label: name }))}
                  value={chosen.id}
                  onChange={(fisheryId) => change(elsewhere(fisheryId))}
                />
              ) : null}
              <FindAtFishery key={chosen.id} fishery={chosen} choice={choice} change={change} />
            </>
          ) : (
            <ChooseFishery fisheries={list} onChoose={(fisheryId) => change({ fisheryId })} />
          )
        }
      </Loaded>
    </Page>
  );
}

/** At another fishery nothing of the old one's lakes, pegs and kinds is meant any more. */
const elsewhere = (fisheryId: string) => ({ fisheryId, kindId: null, start: null, pegId: null, party: [] });

type Choosing = { fisheries: readonly FisheryListItem[]; onChoose: (fisheryId: string) => void };

function ChooseFishery({ fisheries, onChoose }: Choosing) {
  return (
    <Section title="Where do you want to fish?" bare>
      <List label="Fisheries">
        {fisheries.map(({ id, name, lakes }) => (
          <Row
            key={id}
            title={name}
            note={lakes.map((lake) => lake.name).join(', ')}
            onPress={() => onChoose(id)}
          />
        ))}
      </List>
    </Section>
  );
}
