import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { Problem } from '@mereward/shared/problems/problem';
import { useForm, type DefaultValues, type FieldValues, type UseFormReturn } from 'react-hook-form';
import type { z } from 'zod';
import { useKeptDraft } from '@/hooks/use-kept-draft';
import { focusFirstInvalid } from '@/lib/focus-first-invalid';
import { fieldErrors } from '@/lib/field-errors';

type Terms<In extends FieldValues, Out, Answer> = {
  /** Names the form among this person's drafts. For an edit add the thing's id and version: `lake:${id}:${version}`. */
  form: string;
  schema: z.ZodType<Out, In>;
  start: DefaultValues<In>;
  /** Names of fields never kept on the device, such as a password. */
  leaveOut?: readonly string[] | undefined;
  send: (value: Out) => Promise<Answer>;
  onDone?: ((answer: Answer) => void) | undefined;
};

export type DraftForm<In extends FieldValues, Out> = UseFormReturn<In, unknown, Out> & {
  submit: () => void;
  busy: boolean;
  /** What the last try to send was refused with, or null. */
  problem: unknown;
  /** True when the values came from an earlier, unfinished visit. */
  restored: boolean;
  startAfresh: () => void;
  /** What was refused has since come about by another way: nothing is wrong any more. */
  settled: () => void;
};

/**
 * A form whose values outlive a reload: kept on this device per form and per person while they are typed, cleared
 * once sent. To use it again for another thing call `startAfresh`. A refusal's own field errors land on the fields they point at. Show it with `DraftFormFrame`.
 */
export function useDraftForm<In extends FieldValues, Out, Answer>(
  terms: Terms<In, Out, Answer>,
): DraftForm<In, Out> {
  const { schema, start, send, onDone } = terms;
  const [problem, setProblem] = useState<unknown>(null);
  const draft = useKeptDraft({ form: terms.form, start, leaveOut: terms.leaveOut ?? [] });
  const form = useForm<In, unknown, Out>({ resolver: zodResolver(schema), defaultValues: draft.firstValues });
  draft.useKeeping(form);

  const refused = (fault: unknown): void => {
    setProblem(fault);
    if (!(fault instanceof Problem)) return;
    for (const { name, message } of fieldErrors<In>(fault, form.getValues()))
      form.setError(name, { message });
    focusFirstInvalid();
  };
  const accepted = async (value: Out): Promise<void> => {
    setProblem(null);
    try {
      const answer = await send(value);
      const sent = form.getValues();
      draft.settle({ ...start, ...sent });
      form.reset(sent);
      onDone?.(answer);
    } catch (fault) {
      refused(fault);
    }
  };
  const submit = form.handleSubmit(accepted, focusFirstInvalid);
  return {
    ...form,
    submit: () => void submit(),
    busy: form.formState.isSubmitting,
    problem,
    restored: draft.restored,
    settled: () => setProblem(null),
    startAfresh: () => {
      draft.settle(start);
      setProblem(null);
      form.reset(start);
    },
  };
}
