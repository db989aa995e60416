import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import { useFieldArray, useWatch } from 'react-hook-form';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Empty } from '@/components/empty';
import { Form } from '@/components/form';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { SaveBar } from '@/components/save-bar';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useMyFisheries } from '@/features/fisheries/use-my-fisheries';
import { calibrateLead } from '@/features/surveys/bottom-api';
import {
  LeadDraft,
  MOST_FALLS,
  typedCalibration,
  type LeadRead,
  type LeadTyped,
} from '@/features/surveys/lead-draft';
import { LEAD_SHAPES, LINE_TYPES, rateWords } from '@/features/surveys/lead-words';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';

const SURVEYORS = ['manager', 'head_bailiff', 'bailiff'] as const;
const BACK = { label: 'Leads', href: '/bank/leads' } as const;

/** Enters a lead's counted falls over spots of known depth. */
export function NewLeadScreen() {
  const { fisheryId } = useLocalSearchParams<{ fisheryId?: string }>();
  const { all, mine } = useMyFisheries(SURVEYORS);
  const chosen = mine.find(({ id }) => id === fisheryId) ?? mine[0];
  if (chosen) return <LeadForm key={chosen.id} fishery={chosen} />;
  return (
    <Page title="Calibrate a lead" back={BACK}>
      <Loaded query={all} waiting="Reading the fishery…">
        {() => <Empty title="Not yours to calibrate">Managers and bailiffs calibrate leads.</Empty>}
      </Loaded>
    </Page>
  );
}

const EMPTY_ROW = { depthM: '', seconds: '' };

function LeadForm({ fishery }: { fishery: FisheryListItem }) {
  const router = useRouter();
  const [id] = useState(newId);
  const [today] = useState(() => new Date().toISOString().slice(0, 10));
  const form: DraftForm<LeadTyped, LeadRead> = useDraftForm({
    form: `lead:${fishery.id}`,
    schema: LeadDraft,
    start: {
      name: '',
      leadG: '85',
      leadShape: 'smooth_ball',
      lineType: 'braid',
      calibratedOn: today,
      note: '',
      falls: [EMPTY_ROW, EMPTY_ROW, EMPTY_ROW],
    },
    leaveOut: ['calibratedOn'],
    send: (read) => calibrateLead(fishery.id, { id, ...read }),
    onDone: () => {
      form.startAfresh();
      router.replace(`/bank/leads?fisheryId=${fishery.id}`);
    },
  });
  const { control } = form;
  return (
    <Page
      title="Calibrate a lead"
      over={fishery.name}
      back={BACK}
      actions={<SaveBar form={form} act="Keep the lead" busyLabel="Keeping…" />}
    >
      <Form label="Lead" onSubmit={form.submit}>
        <ProblemNote problem={form.problem} />
        <FormField
          control={control}
          name="name"
          label="Name"
          hint="Such as “three-ounce ball, orange tape”."
          bank
        />
        <FormField control={control} name="leadG" label="Lead, grams" keypad="decimal" bank />
        <FormChoice control={control} name="leadShape" label="Its shape" choices={LEAD_SHAPES} columns={4} />
        <FormChoice control={control} name="lineType" label="Line" choices={LINE_TYPES} columns={3} />
        <FormField control={control} name="calibratedOn" label="Counted on" picker="date" bank />
        <FallRows form={form} />
        <FormField control={control} name="note" label="Note" optional bank />
      </Form>
    </Page>
  );
}

function FallRows({ form }: { form: DraftForm<LeadTyped, LeadRead> }) {
  const { control } = form;
  const { fields, append } = useFieldArray({ control, name: 'falls' });
  const falls = useWatch({ control, name: 'falls' });
  const comes = typedCalibration(falls);
  return (
    <Section
      title="Spots of known depth"
      note="Read each spot by float first. Then count from the splash until the lead is felt to land, on a line held the same way each time."
    >
      {fields.map((field, i) => (
        <View
          key={field.id}
          role="group"
          aria-label={`Spot ${i + 1}`}
          style={{ flexDirection: 'row', gap: space.medium }}
        >
          <View style={{ flex: 1 }}>
            <FormField
              control={control}
              name={`falls.${i}.depthM`}
              label={`Spot ${i + 1}: depth, m`}
              keypad="decimal"
              bank
            />
          </View>
          <View style={{ flex: 1 }}>
            <FormField
              control={control}
              name={`falls.${i}.seconds`}
              label="Counted, s"
              keypad="decimal"
              bank
            />
          </View>
        </View>
      ))}
      {fields.length < MOST_FALLS ? (
        <View style={{ alignItems: 'flex-start' }}>
          <Button label="One more spot" bank onPress={() => append(EMPTY_ROW)} />
        </View>
      ) : null}
      <Note
        kind={comes.ok ? 'fine' : 'plain'}
        title={comes.ok ? rateWords(comes.calibration) : 'Not yet'}
        live
      >
        {comes.ok
          ? `From ${comes.calibration.spots} spots. One depth by it is good to ± ${comes.calibration.scatterM.toFixed(2)} m and more the longer the count; never better than grade C.`
          : comes.words}
      </Note>
      <Text size="small" tone="inkSoft">
        A hand times a fall to about 0.2 s (common practice, no published source), so the error is never taken
        smaller than that.
      </Text>
    </Section>
  );
}
