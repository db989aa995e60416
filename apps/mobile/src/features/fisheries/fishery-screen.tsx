import { useState } from 'react';
import type { FisheryView } from '@mereward/shared/fisheries/contract';
import { FormProvider } from 'react-hook-form';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { Facts } from '@/components/facts';
import { Kept } from '@/components/kept';
import { Loaded } from '@/components/loaded';
import { NewerNote } from '@/components/newer-note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { TypedFishery, typedFishery } from '@/features/fisheries/fishery-fields';
import { FisheryForm } from '@/features/fisheries/fishery-form';
import { changeFishery, useFishery } from '@/features/fisheries/office-api';
import { PeopleSections } from '@/features/fisheries/people-sections';
import { OFFICE_ROLES } from '@/features/fisheries/use-my-fisheries';
import { useDraftForm } from '@/hooks/use-draft-form';
import { useHeld } from '@/hooks/use-held';

/** A fishery's people and what it tells about itself. */
export function FisheryScreen() {
  const fishery = useChosenFishery([...OFFICE_ROLES, 'head_bailiff']);
  return (
    <Page
      title={fishery.chosen?.name ?? 'Fishery'}
      over="Fishery and people"
      back={{ label: 'Office', href: '/office' }}
    >
      <ChosenFishery
        {...fishery}
        none={<Empty title="No fishery">You keep no fishery. Its owner can give you a role.</Empty>}
      >
        {(fisheryId) => <Fishery fisheryId={fisheryId} />}
      </ChosenFishery>
    </Page>
  );
}

function Fishery({ fisheryId }: { fisheryId: string }) {
  const fishery = useFishery(fisheryId);
  return (
    <Loaded query={fishery} waiting="Reading the fishery…">
      {(value) => (
        <>
          {value.may.seePeople ? <PeopleSections fisheryId={fisheryId} /> : null}
          {value.may.change ? <Details now={value} /> : <ReadDetails fishery={value} />}
        </>
      )}
    </Loaded>
  );
}

function Details({ now }: { now: FisheryView }) {
  const { held, hold, newer } = useHeld(now);
  const [kept, setKept] = useState(false);
  return (
    <Section title="Details">
      {newer ? <NewerNote what="these details" onTake={() => hold(newer)} /> : null}
      <DetailsForm
        key={held.version}
        fishery={held}
        kept={kept}
        onKept={(fishery) => {
          hold(fishery);
          setKept(true);
        }}
      />
    </Section>
  );
}

type FormProps = { fishery: FisheryView; kept: boolean; onKept: (fishery: FisheryView) => void };

function DetailsForm({ fishery, kept, onKept }: FormProps) {
  const { id, version, details } = fishery;
  const form = useDraftForm({
    form: `fishery:${id}:${String(version)}`,
    schema: z.object({ details: TypedFishery }),
    start: { details: typedFishery(details) },
    send: ({ details: typed }) => changeFishery(id, { details: typed, version }),
    onDone: onKept,
  });
  return (
    <FormProvider {...form}>
      <DraftFormFrame
        form={form}
        label="Details of the fishery"
        act="Keep the details"
        busyLabel="Keeping…"
        beside={<Kept words={kept && !form.formState.isDirty ? 'The details are kept.' : null} />}
      >
        <FisheryForm />
      </DraftFormFrame>
    </FormProvider>
  );
}

function ReadDetails({ fishery: { details } }: { fishery: FisheryView }) {
  return (
    <Section title="Details" note="The owner or a manager changes these.">
      <Facts
        facts={[
          { term: 'Address', fact: details.address },
          { term: 'Duty phone', fact: details.dutyPhone },
          { term: 'Ambulance is met', fact: details.meetingPoint },
          { term: 'Office', fact: details.officeContact },
          { term: 'Opening', fact: details.opening },
          { term: 'Gate code', fact: details.gateCode },
        ]}
      />
    </Section>
  );
}
