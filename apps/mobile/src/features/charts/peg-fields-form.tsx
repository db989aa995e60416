import { useState, type ReactNode } from 'react';
import type { LakeView, PegView } from '@mereward/shared/lakes/contract';
import { FormProvider } from 'react-hook-form';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { PegPlaces } from '@/features/charts/peg-places';
import { changePeg, makePeg } from '@/features/lakes/office-api';
import { NEW_PEG, TypedPeg, typedPeg } from '@/features/lakes/peg-fields';
import { PegForm } from '@/features/lakes/peg-form';
import { useDraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';

const Wanted = z.object({ details: TypedPeg });

type Props = {
  lake: LakeView;
  /** Null makes a new one. */
  peg: PegView | null;
  onDone: (peg: PegView) => void;
  beside: ReactNode;
};

/** A peg's whole form with its places on the lake. */
export function PegFieldsForm({ lake, peg, onDone, beside }: Props) {
  const [fresh] = useState(newId);
  const id = peg?.id ?? fresh;
  const form = useDraftForm({
    form: `peg:${lake.id}:${peg ? `${id}:${String(peg.version)}` : 'new'}`,
    schema: Wanted,
    start: { details: peg ? typedPeg(peg.details) : NEW_PEG },
    send: ({ details }) =>
      peg ? changePeg(id, { details, version: peg.version }) : makePeg(lake.id, { id, details }),
    onDone,
  });
  return (
    <FormProvider {...form}>
      <DraftFormFrame form={form} label="Peg" act="Keep the peg" busyLabel="Keeping…" beside={beside}>
        <PegForm places={<PegPlaces lake={lake} pegId={id} />} />
      </DraftFormFrame>
    </FormProvider>
  );
}
