import { useState } from 'react';
import { View } from 'react-native';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { CastView, VisitView } from '@mereward/shared/surveys/contract';
import { Button } from '@/components/button';
import { Form } from '@/components/form';
import { Kept } from '@/components/kept';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { space } from '@/constants/layout';
import { useKeepCast, useUndoCast } from '@/features/surveys/api';
import { AimPart } from '@/features/surveys/aim-part';
import { CastCautions } from '@/features/surveys/cast-cautions';
import { CastSketch } from '@/features/surveys/cast-sketch';
import { closerIn, nextThrow, type CastTyped } from '@/features/surveys/cast-draft';
import { FeelPart } from '@/features/surveys/feel-part';
import { FloatPart } from '@/features/surveys/float-part';
import { LinePart } from '@/features/surveys/line-part';
import { LiveCall } from '@/features/surveys/live-call';
import { MorePart } from '@/features/surveys/more-part';
import { useCastForm } from '@/features/surveys/use-cast-form';

type Props = { lake: LakeView; visit: VisitView; casts: readonly CastView[] };

/** Aim, wraps, feel, float: one screen, the last cast carried forward, what it comes out as always in sight. */
export function CastForm({ lake, visit, casts }: Props) {
  const keep = useKeepCast(visit.id);
  const undo = useUndoCast(visit.id);
  const [kept, setKept] = useState<CastView | null>(null);
  const cast = useCastForm({
    lake,
    visit,
    casts,
    send: (input) => keep.mutateAsync(input),
    onKept: setKept,
  });
  const { form } = cast;
  const lineId = form.watch('lineId');
  const goOn = (next: (typed: CastTyped) => CastTyped) => form.reset(next(form.getValues()));
  const last = casts.at(-1);
  const takeBack = () => {
    if (!last) return;
    undo.mutate(last.id, { onSuccess: () => setKept(null) });
  };
  return (
    <Form label="Cast" onSubmit={form.submit}>
      <CastCautions visitId={visit.id} />
      {lineId === '' ? null : (
        <Note title="Same line, closer in">
          Wind in to where the lead now lies and read again: this belongs to the throw before.
          <Button label="A new throw instead" kind="quiet" onPress={() => goOn(nextThrow)} />
        </Note>
      )}
      <AimPart form={form} lake={lake} />
      <LinePart form={form} visit={visit} />
      <FeelPart form={form} />
      <FloatPart form={form} visit={visit} />
      <LiveCall reduced={cast.reduced} />
      <CastSketch lake={lake} casts={casts} surroundings={cast.surroundings} now={cast.reduced} />
      <MorePart form={form} />
      <ProblemNote problem={form.problem} />
      <ProblemNote problem={undo.error} />
      <Kept words={kept ? `Cast ${kept.seq} is kept.` : null} />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button
          label={`Keep cast ${(last?.seq ?? 0) + 1}`}
          kind="main"
          bank
          grow
          busy={form.busy}
          onPress={form.submit}
        />
        {last ? (
          <Button
            label="Same line, closer in"
            bank
            grow
            onPress={() => goOn((typed) => closerIn(typed, last.lineId))}
          />
        ) : null}
      </View>
      {last ? (
        <Button
          label={`Take back cast ${last.seq}`}
          kind="quiet"
          bank
          busy={undo.isPending}
          onPress={takeBack}
        />
      ) : null}
    </Form>
  );
}
