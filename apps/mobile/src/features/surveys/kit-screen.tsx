import { useState } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { z } from 'zod';
import { FormProvider } from 'react-hook-form';
import { Empty } from '@/components/empty';
import { Form } from '@/components/form';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { SaveBar } from '@/components/save-bar';
import { Text } from '@/components/text';
import { correctKit, useReadVisitAnew, useVisit } from '@/features/surveys/api';
import { KitDraft, kitOf, typedKit } from '@/features/surveys/kit-draft';
import { kitEffect, type KitEffect } from '@/features/surveys/kit-effect';
import { KitEffectPart } from '@/features/surveys/kit-effect-part';
import { KitPart } from '@/features/surveys/kit-part';
import { countWords } from '@/features/surveys/visit-words';
import { useDraftForm } from '@/hooks/use-draft-form';

/** Puts a constant of a visit right; every cast is reduced again, and what changed is told. */
export function KitScreen() {
  const { visitId } = useLocalSearchParams<{ visitId: string }>();
  const visit = useVisit(visitId);
  const [effect, setEffect] = useState<KitEffect | null>(null);
  const [held, setHeld] = useState<VisitWithCasts | null>(null);
  const back = { label: visit.data?.visit.title ?? 'Visit', href: `/bank/surveys/${visitId}` } as const;
  const value = held ?? visit.data;
  if (effect)
    return (
      <Page title="What changed" back={back} width="wide">
        <KitEffectPart effect={effect} visitId={visitId} />
      </Page>
    );
  if (value?.visit.may.correct)
    return (
      <KitForm key={value.visit.version} value={value} back={back} onBegin={setHeld} onDone={setEffect} />
    );
  return (
    <Page title="Correct the kit" back={back}>
      <Loaded query={visit} waiting="Reading the visit…">
        {() => (
          <Empty
            title="Not yours to correct"
            action={<LinkButton label="To the visit" href={back.href} bank />}
          >
            Managers and bailiffs correct a visit.
          </Empty>
        )}
      </Loaded>
    </Page>
  );
}

const Wanted = z.object({ kit: KitDraft });

type Props = {
  value: VisitWithCasts;
  back: { label: string; href: `/bank/surveys/${string}` };
  /** Keeps the form on what it was begun with while the visit is read anew. */
  onBegin: (value: VisitWithCasts) => void;
  onDone: (effect: KitEffect) => void;
};

function KitForm({ value, back, onBegin, onDone }: Props) {
  const { visit, casts } = value;
  const readAnew = useReadVisitAnew({ visitId: visit.id, lakeId: visit.lakeId });
  const form = useDraftForm({
    form: `kit:${visit.id}:${String(visit.version)}`,
    schema: Wanted,
    start: { kit: typedKit(visit.kit) },
    send: async ({ kit }) => {
      onBegin(value);
      await correctKit(visit.id, { kit: kitOf(kit), version: visit.version });
      return readAnew();
    },
    onDone: (after) => onDone(kitEffect(casts, after.casts)),
  });
  return (
    <Page
      title="Correct the kit"
      back={back}
      actions={
        <>
          <LinkButton label="Leave it" href={back.href} bank grow />
          <SaveBar form={form} act="Correct it" busyLabel="Reducing again…" />
        </>
      }
    >
      <Form label="Kit" onSubmit={form.submit}>
        <ProblemNote problem={form.problem} />
        <Text>
          {`${countWords(casts.length, 'cast')} will be reduced again with what stands here. What was observed stays as it is, and published charts keep what they were made from.`}
        </Text>
        <FormProvider {...form}>
          <KitPart lakeId={visit.lakeId} />
        </FormProvider>
      </Form>
    </Page>
  );
}
