import { useState } from 'react';
import type { LeadList, LeadView } from '@mereward/shared/surveys/lead-contract';
import { dayWords } from '@mereward/shared/time/civil-day';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Disclosure } from '@/components/disclosure';
import { Empty } from '@/components/empty';
import { Facts } from '@/components/facts';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { useLeads, usePutLeadAway } from '@/features/surveys/bottom-api';
import { leadWords, rateWords } from '@/features/surveys/lead-words';
import { useUnits } from '@/hooks/use-units';
import { figure, length } from '@/lib/format';

const ON_THE_BANK = ['owner', 'manager', 'head_bailiff', 'bailiff'] as const;

/** Leads whose fall was counted over known depths: how fast each falls, and which visits threw it. */
export function LeadsScreen() {
  const fishery = useChosenFishery(ON_THE_BANK);
  return (
    <Page title="Leads" over={fishery.chosen?.name} back={{ label: 'Bank', href: '/bank' }}>
      <Text style={{ maxWidth: MEASURE_PX }}>
        How fast a lead falls hangs on its weight, its shape, the line and the hand. Count it over spots read
        by float, and its counts become depths with their own error. A lead nobody calibrated only has counts.
      </Text>
      <ChosenFishery
        {...fishery}
        bank
        none={<Empty title="No fishery">Its owner can give you a role that surveys.</Empty>}
      >
        {(fisheryId) => <Leads fisheryId={fisheryId} />}
      </ChosenFishery>
    </Page>
  );
}

function Leads({ fisheryId }: { fisheryId: string }) {
  const leads = useLeads(fisheryId);
  return (
    <Loaded query={leads} waiting="Reading the leads…">
      {(list) => (
        <>
          {list.may.calibrate ? (
            <LinkButton
              label="Calibrate a lead"
              kind="main"
              href={`/bank/leads/new?fisheryId=${fisheryId}`}
              bank
            />
          ) : null}
          {list.leads.length === 0 ? (
            <Empty title="No lead is calibrated yet">
              {list.may.calibrate
                ? 'Read three spots or more by float, count the lead’s fall at each, and enter both here.'
                : 'Managers and bailiffs calibrate leads.'}
            </Empty>
          ) : null}
          {list.leads.map((lead) => (
            <Lead key={lead.id} lead={lead} {...{ list, fisheryId }} />
          ))}
        </>
      )}
    </Loaded>
  );
}

function Lead({ lead, list, fisheryId }: { lead: LeadView; list: LeadList; fisheryId: string }) {
  const units = useUnits();
  const { calibration, usedBy } = lead;
  return (
    <Section title={lead.putAway ? `${lead.name} (put away)` : lead.name} note={leadWords(lead)}>
      <Facts
        facts={[
          { term: 'Falls', fact: rateWords(calibration) },
          {
            term: 'One depth is good to',
            fact: `± ${length(calibration.scatterM, units, 2)}, and more the longer the count`,
          },
          { term: 'Learnt', fact: `on ${figure(calibration.spots)} spots, ${dayWords(lead.calibratedOn)}` },
          { term: 'By', fact: lead.by },
          { term: 'Note', fact: lead.note },
          {
            term: 'Thrown on',
            fact: usedBy.map(({ title, lakeName }) => `${title}, ${lakeName}`).join('; '),
          },
        ]}
      />
      <Disclosure title="The counts it was learnt from">
        <Table
          caption={`Counts of ${lead.name}`}
          rows={lead.falls.map((fall, i) => ({ ...fall, number: i + 1 }))}
          rowKey={({ number }) => String(number)}
          columns={[
            {
              key: 'number',
              head: 'Spot',
              value: ({ number }) => number,
              show: ({ number }) => `Spot ${number}`,
            },
            { key: 'depth', head: 'Known depth, m', figures: true, value: ({ depthM }) => depthM },
            { key: 'seconds', head: 'Counted, s', figures: true, value: ({ seconds }) => seconds },
            {
              key: 'miss',
              head: 'Rate says, m',
              figures: true,
              value: ({ seconds }) => seconds * calibration.rateMPerS,
              show: ({ seconds }) => figure(seconds * calibration.rateMPerS, 2),
            },
          ]}
        />
      </Disclosure>
      {list.may.calibrate && !lead.putAway ? <PutAway lead={lead} fisheryId={fisheryId} /> : null}
    </Section>
  );
}

function PutAway({ lead, fisheryId }: { lead: LeadView; fisheryId: string }) {
  const [asking, setAsking] = useState(false);
  const putAway = usePutLeadAway(fisheryId);
  return (
    <View style={{ alignItems: 'flex-start', gap: space.small }}>
      <ProblemNote problem={putAway.error} />
      <Button label="Put it away" kind="quiet" bank onPress={() => setAsking(true)} />
      <Confirm
        open={asking}
        title={`Put “${lead.name}” away?`}
        words="It is no longer offered for a kit. Visits that threw it keep its rate and their depths."
        act="Put it away"
        busy={putAway.isPending}
        onAct={() => putAway.mutate(lead.id, { onSettled: () => setAsking(false) })}
        onClose={() => setAsking(false)}
      />
    </View>
  );
}
