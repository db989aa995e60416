import { useState } from 'react';
import { ChartList } from '@mereward/shared/charts/contract';
import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import { LakeView } from '@mereward/shared/lakes/contract';
import { useQueries } from '@tanstack/react-query';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { Waiting } from '@/components/waiting';
import { disagreementsOfLake } from '@/features/charts/disagreement-api';
import { officeTasks } from '@/features/charts/office-tasks';
import { reviewKeys } from '@/features/charts/review-api';
import { useFishery } from '@/features/fisheries/office-api';
import { OFFICE_ROLES, useMyFisheries } from '@/features/fisheries/use-my-fisheries';
import { lakeKeys } from '@/features/lakes/api';
import { api } from '@/lib/api';
import { useSession } from '@/lib/session';

/** The office: what wants doing, and where everything is kept. */
export function OfficeScreen() {
  const { all, mine } = useMyFisheries([...OFFICE_ROLES, 'head_bailiff']);
  return (
    <Page title="Office">
      <Loaded
        query={all}
        waiting="Reading the fishery…"
        empty={{
          when: () => mine.length === 0,
          show: (
            <Empty
              title="No fishery yet"
              action={<LinkButton label="Make a fishery" href="/me/fishery" kind="main" />}
            >
              If you own or run a water, make its fishery here. If you work at one, its owner can give you a
              role.
            </Empty>
          ),
        }}
      >
        {() => mine.map((fishery) => <FisheryOffice key={fishery.id} fishery={fishery} />)}
      </Loaded>
    </Page>
  );
}

function FisheryOffice({ fishery }: { fishery: FisheryListItem }) {
  const kept = useFishery(fishery.id);
  const { rolesAt } = useSession();
  const sells = rolesAt(fishery.id).some((role) => OFFICE_ROLES.some((each) => each === role));
  return (
    <>
      <Section title="What wants doing" bare>
        <Tasks fishery={fishery} />
      </Section>
      <Section title={fishery.name}>
        <List label={`Kept for ${fishery.name}`}>
          <Row title="Lakes" note={lakesWords(fishery)} href="/office/lakes" />
          <Row
            title="The board"
            note="Every peg against time: who has which, what is kept back, what is closed"
            href="/office/board"
          />
          <Row
            title="Bookings"
            note="A day’s tickets, by code or name; book for somebody"
            href={`/office/bookings?fisheryId=${fishery.id}`}
          />
          {sells ? (
            <Row
              title="Tickets and prices"
              note="Kinds of ticket, what they cost, the terms of letting"
              href={`/office/tickets?fisheryId=${fishery.id}`}
            />
          ) : null}
          {sells ? (
            <Row
              title="Money"
              note="Takings, receipts, refunds that wait, the ledger"
              href={`/office/payments?fisheryId=${fishery.id}`}
            />
          ) : null}
          <Row title="Charts" note="Drafts, approval, published versions" href="/office/charts" />
          {sells ? (
            <Row
              title="Rules"
              note="What holds on the banks, in versions; who has read it"
              href={`/office/rules?fisheryId=${fishery.id}`}
            />
          ) : null}
          <Row
            title="Closures"
            note="Close water, and find every booking a place"
            href={`/office/closures?fisheryId=${fishery.id}`}
          />
          <Row
            title="Notices"
            note="What visitors are told"
            href={`/office/notices?fisheryId=${fishery.id}`}
          />
          {kept.data?.may.readFeels ? (
            <Row
              title="How bottoms feel"
              note="What each bottom does to a lead; learnt from confirmed bottoms"
              href={`/office/bottom?fisheryId=${fishery.id}`}
            />
          ) : null}
          <Row
            title="Fishery and people"
            note="Details, roles, invitations"
            href={`/office/fishery?fisheryId=${fishery.id}`}
          />
        </List>
      </Section>
    </>
  );
}

function lakesWords({ lakes }: FisheryListItem): string {
  if (lakes.length === 0) return 'None yet: draw the first';
  const pegs = lakes.reduce((sum, lake) => sum + lake.pegs, 0);
  return `${lakes.map(({ name }) => name).join(', ')} · ${String(pegs)} ${pegs === 1 ? 'peg' : 'pegs'}`;
}

function Tasks({ fishery }: { fishery: FisheryListItem }) {
  const [nowMs] = useState(() => Date.now());
  const lakes = useQueries({
    queries: fishery.lakes.map(({ id }) => ({
      queryKey: lakeKeys.one(id),
      queryFn: () => api.get(`/lakes/${id}`, LakeView),
    })),
  });
  const charts = useQueries({
    queries: fishery.lakes.map(({ id }) => ({
      queryKey: reviewKeys.ofLake(id),
      queryFn: () => api.get(`/lakes/${id}/charts`, ChartList),
    })),
  });
  const reports = useQueries({ queries: fishery.lakes.map(({ id }) => disagreementsOfLake(id)) });
  if (fishery.lakes.length === 0)
    return (
      <Empty
        title="No lake yet"
        action={
          <LinkButton label="Draw a lake" href={`/office/lakes/new?fisheryId=${fishery.id}`} kind="main" />
        }
      >
        Everything starts with the shore of a lake.
      </Empty>
    );
  const fault = [...lakes, ...charts, ...reports].find(
    ({ error, data }) => error && data === undefined,
  )?.error;
  const waiting = [...lakes, ...charts, ...reports].some(({ isPending }) => isPending);
  const tasks = lakes.flatMap(({ data: lake }, i) =>
    lake
      ? officeTasks({
          lake,
          charts: charts[i]?.data?.charts ?? [],
          reports: reports[i]?.data?.disagreements ?? [],
          nowMs,
        })
      : [],
  );
  return (
    <>
      <ProblemNote problem={fault} />
      {waiting && !fault ? <Waiting words="Looking at each lake…" /> : null}
      {tasks.length > 0 ? (
        <List label="What wants doing">
          {tasks.map(({ key, title, note, href }) => (
            <Row key={key} title={title} note={note} href={href} />
          ))}
        </List>
      ) : null}
      {tasks.length === 0 && !waiting && !fault ? (
        <Text tone="inkSoft">Nothing waits: boards are read, and no chart stands open.</Text>
      ) : null}
    </>
  );
}
