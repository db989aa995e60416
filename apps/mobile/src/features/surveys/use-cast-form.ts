import { useEffect, useRef } from 'react';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { castWords } from '@mereward/shared/surveys/cast-words';
import type { CastView, KeepCast, VisitView } from '@mereward/shared/surveys/contract';
import type { Reducing } from '@mereward/shared/surveys/reducing-contract';
import { useStance } from '@/features/surveys/api';
import {
  CastDraft,
  closerIn,
  EMPTY_CAST,
  incomplete,
  isBegun,
  nextThrow,
  observationOf,
  typedAgain,
  type CastRead,
  type CastTyped,
} from '@/features/surveys/cast-draft';
import { keepCastHere, type Kept } from '@/features/surveys/keep-here';
import { marksAhead } from '@/features/surveys/marks-ahead';
import { useCastReduction } from '@/features/surveys/use-cast-reduction';
import type { CastMade } from '@/features/surveys/visit-events';
import { draftName, type Again } from '@/hooks/use-again';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';

export type CastFormState = DraftForm<CastTyped, CastRead>;

type Terms = {
  lake: LakeView;
  visit: VisitView;
  casts: readonly CastView[];
  reducing: Reducing | null;
  again: Again;
  onKept: (kept: Kept<CastView>) => void;
};

/** The form of one cast after another: carried forward, kept over a reload, reduced while it is typed. */
export function useCastForm({ lake, visit, casts, reducing, again, onKept }: Terms) {
  const goesCloserIn = useRef(false);
  const last = casts.at(-1);
  const start = again.over(last ? typedAgain(last) : firstCast(lake));
  const form: CastFormState = useDraftForm({
    form: draftName(`cast:${visit.id}`, again),
    schema: CastDraft,
    start: { ...start, castId: '', ...(again.timeRefused ? { sentAt: '' } : {}) },
    send: (read) => sendOnce(form, keepCast(read), (cast) => keepCastHere(made(cast), again.instead)),
    onDone: (kept) => {
      const { value: cast } = kept;
      const typed = form.getValues();
      form.reset(goesCloserIn.current ? closerIn(typedAgain(cast), cast.lineId) : nextThrow(typed));
      onKept(kept);
    },
  });
  const made = (cast: KeepCast): CastMade => {
    const reduced = reducedHere.current ?? {
      ok: false,
      reason: 'Not worked out on this phone',
      remedy: '',
      steps: [],
    };
    const shown = {
      ...cast,
      visitId: visit.id,
      seq: (last?.seq ?? 0) + 1,
      reduced: { ...reduced, steps: [] },
    };
    return { visit, cast, shown, words: wordsOf(lake, cast), typed: form.getValues() };
  };
  useKeptMeanwhile(form, casts, onKept);
  const typed = form.watch();
  const read = CastDraft.safeParse(typed);
  const peg = useStance(typed.pegId || null);
  const surroundings = peg.data ? { lake, peg: peg.data, visit, reducing } : null;
  const observation = read.success ? observationOf(read.data) : null;
  const reduced = useCastReduction(surroundings, observation, casts);
  const reducedHere = useRef(reduced);
  useEffect(() => {
    reducedHere.current = reduced;
  }, [reduced]);
  const keep = (): void => {
    goesCloserIn.current = false;
    form.submit();
  };
  const keepThenCloserIn = (): void => {
    goesCloserIn.current = true;
    form.submit();
  };
  return {
    form,
    begun: isBegun(typed),
    keep,
    keepThenCloserIn,
    surroundings,
    reduced,
  };
}

function wordsOf(lake: LakeView, { pegId, observation }: KeepCast): string {
  const { aim } = observation;
  const mark = aim.by === 'mark' ? lake.marks.find(({ id }) => id === aim.markId) : undefined;
  const peg = lake.pegs.find(({ id }) => id === pegId)?.number ?? '';
  return castWords(observation, { peg, mark: mark?.details.name ?? null });
}

/** The first cast of a visit: from the first peg of the walk, over the mark straight out of it. */
function firstCast(lake: LakeView): CastTyped {
  const pegId = lake.pegs[0]?.id ?? '';
  return { ...EMPTY_CAST, pegId, aim: marksAhead(lake, pegId)[0]?.id ?? '' };
}

/** A cast whose answer was lost is known by its id once the visit is read again: the form goes on to the next. */
function useKeptMeanwhile(form: CastFormState, casts: readonly CastView[], onKept: Terms['onKept']): void {
  const { busy, reset, getValues, settled } = form;
  useEffect(() => {
    const typed = getValues();
    const kept = typed.castId === '' ? undefined : casts.find(({ id }) => id === typed.castId);
    if (busy || !kept) return;
    reset(nextThrow(typed));
    settled();
    onKept({ value: kept, waits: false });
  }, [busy, casts, getValues, reset, settled, onKept]);
}

type Send = (cast: KeepCast) => Promise<Kept<CastView>>;

/**
 * Sends under the id and time of the first try, which are kept with the draft: a second try after a lost answer
 * keeps the cast once. A refusal says that nothing was kept under them, so the next try is a cast of its own.
 */
async function sendOnce(form: CastFormState, cast: CastToKeep, send: Send): Promise<Kept<CastView>> {
  const { castId, sentAt } = idsOf(form);
  try {
    return await send({ ...cast, id: castId, lineId: cast.lineId || castId, observedAt: sentAt });
  } catch (fault) {
    if (fault instanceof Problem && (fault.kind === 'invalid' || fault.kind === 'conflict'))
      setIds(form, { castId: '', sentAt: '' });
    throw fault;
  }
}

type Ids = { castId: string; sentAt: string };

function idsOf(form: CastFormState): Ids {
  const { castId, sentAt } = form.getValues();
  if (castId !== '') return { castId, sentAt };
  return setIds(form, { castId: newId(), sentAt: sentAt || new Date().toISOString() });
}

function setIds(form: CastFormState, ids: Ids): Ids {
  form.setValue('castId', ids.castId);
  form.setValue('sentAt', ids.sentAt);
  return ids;
}

type CastToKeep = Omit<KeepCast, 'id' | 'observedAt'>;

function keepCast(read: CastRead): CastToKeep {
  const observation = observationOf(read);
  if (observation === null)
    throw new Problem('invalid', 'Something is still missing', {
      errors: incomplete(read).map(({ field, words }) => ({ pointer: `/${field}`, detail: words })),
    });
  return { pegId: read.pegId, lineId: read.lineId, observation };
}
