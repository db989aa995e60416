import { useState } from 'react';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { CastView, KeepCast, VisitView } from '@mereward/shared/surveys/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { useStance } from '@/features/surveys/api';
import {
  CastDraft,
  EMPTY_CAST,
  incomplete,
  nextThrow,
  observationOf,
  typedAgain,
  type CastRead,
  type CastTyped,
} from '@/features/surveys/cast-draft';
import { useCastReduction } from '@/features/surveys/use-cast-reduction';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';

export type CastFormState = DraftForm<CastTyped, CastRead>;

type Terms = {
  lake: LakeView;
  visit: VisitView;
  casts: readonly CastView[];
  send: (cast: KeepCast) => Promise<CastView>;
  onKept: (cast: CastView) => void;
};

/** The form of one cast after another: carried forward, kept over a reload, reduced while it is typed. */
export function useCastForm({ lake, visit, casts, send, onKept }: Terms) {
  const [ids, setIds] = useState(freshIds);
  const last = casts.at(-1);
  const form: CastFormState = useDraftForm({
    form: `cast:${visit.id}`,
    schema: CastDraft,
    start: last
      ? typedAgain(last)
      : { ...EMPTY_CAST, pegId: lake.pegs[0]?.id ?? '', aim: lake.marks[0]?.id ?? '' },
    send: (read) => send(keepCast(read, ids)),
    onDone: (cast) => {
      setIds(freshIds());
      form.reset(nextThrow(form.getValues()));
      onKept(cast);
    },
  });
  const read = CastDraft.safeParse(form.watch());
  const peg = useStance(form.watch('pegId') || null);
  const surroundings = peg.data ? { lake, peg: peg.data, visit } : null;
  const observation = read.success ? observationOf(read.data) : null;
  return { form, surroundings, reduced: useCastReduction(surroundings, observation, casts) };
}

type Ids = { castId: string; lineId: string };
const freshIds = (): Ids => ({ castId: newId(), lineId: newId() });

/** The ids stay the same until the cast is kept, so that a second try after a lost answer keeps it once. */
function keepCast(read: CastRead, { castId, lineId }: Ids): KeepCast {
  const observation = observationOf(read);
  if (observation === null)
    throw new Problem('invalid', 'Something is still missing', {
      errors: incomplete(read).map(({ field, words }) => ({ pointer: `/${field}`, detail: words })),
    });
  return {
    id: castId,
    pegId: read.pegId,
    lineId: read.lineId === '' ? lineId : read.lineId,
    observedAt: new Date().toISOString(),
    observation,
  };
}
