import { useState, type ReactNode } from 'react';
import { useRouter } from 'expo-router';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { View } from 'react-native';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { CastView } from '@mereward/shared/surveys/contract';
import { Button } from '@/components/button';
import { Form } from '@/components/form';
import { Kept } from '@/components/kept';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { AimPart } from '@/features/surveys/aim-part';
import { CastCautions } from '@/features/surveys/cast-cautions';
import { reducingOf } from '@/features/surveys/cast-site-of';
import { closerIn, nextThrow, typedAgain } from '@/features/surveys/cast-draft';
import { CastSketch } from '@/features/surveys/cast-sketch';
import { undoCastHere } from '@/features/surveys/keep-here';
import { FeelPart } from '@/features/surveys/feel-part';
import { FloatPart } from '@/features/surveys/float-part';
import { LinePart } from '@/features/surveys/line-part';
import { LiveCall } from '@/features/surveys/live-call';
import { MorePart } from '@/features/surveys/more-part';
import {
  placesOf,
  suggestedTyped,
  type SuggestedCast,
  type SuggestTerms,
} from '@/features/surveys/cast-suggestion';
import { bringIntoSight } from '@/lib/bring-into-sight';
import { useCastForm } from '@/features/surveys/use-cast-form';
import type { VisitShown } from '@/features/surveys/shown-visit';
import { surveyKeys } from '@/features/surveys/survey-keys';
import type { Again } from '@/hooks/use-again';
import { useThreeColumns } from '@/hooks/use-wide';
import { visitGauge } from '@/features/surveys/visit-words';

type Props = {
  lake: LakeView;
  value: VisitShown;
  again: Again;
  /** Proposes casts from the peg one stands on; one that is taken fills aim and wraps. */
  suggest?: ((terms: SuggestTerms) => ReactNode) | undefined;
};

/** Aim, wraps, feel, float: one screen, the last cast carried forward, the call and the two acts under the thumb. */
export function CastForm({ lake, value, again, suggest }: Props) {
  const { visit, casts } = value;
  const router = useRouter();
  const queries = useQueryClient();
  const undo = useMutation({
    mutationFn: (cast: CastView) => undoCastHere(visit, cast, new Date().toISOString()),
    onSuccess: () => queries.invalidateQueries({ queryKey: surveyKeys.one(visit.id) }),
  });
  const [said, setSaid] = useState<string | null>(null);
  const cast = useCastForm({
    lake,
    visit,
    casts,
    reducing: reducingOf(value),
    again,
    onKept: ({ value: { seq: kept }, waits }) => {
      if (again.instead !== null) router.replace('/waiting');
      setSaid(waits ? `Cast ${kept} is kept on this phone and waits to be sent.` : `Cast ${kept} is kept.`);
      bringIntoSight('main-cast');
    },
  });
  const { form } = cast;
  const beside = useThreeColumns();
  const last = casts.at(-1);
  const seq = (last?.seq ?? 0) + 1;
  const closer = form.watch('lineId') !== '';
  const goCloserIn = () => {
    if (cast.begun) cast.keepThenCloserIn();
    else if (last) {
      form.reset(closerIn(typedAgain(last), last.lineId));
      bringIntoSight('main-cast');
    }
  };
  const take = (proposed: SuggestedCast): void => {
    const typed = suggestedTyped(proposed, lake, visit.kit);
    if (typed) form.reset({ ...nextThrow(form.getValues()), ...typed });
  };
  const takeBack = (taken: CastView) =>
    undo.mutate(taken, { onSuccess: () => setSaid(`Cast ${taken.seq} is taken back.`) });
  return (
    <Page
      title={`Cast ${seq}`}
      over={visitGauge(lake, visit)}
      back={{ label: visit.title, href: `/bank/surveys/${visit.id}` }}
      width={beside ? 'wide' : 'reading'}
      actions={
        <>
          {form.problem ? (
            <View style={{ width: '100%' }}>
              <ProblemNote problem={form.problem} />
            </View>
          ) : null}
          <LiveCall reduced={cast.reduced} />
          {last || cast.begun ? (
            <View style={{ flexGrow: 1 }}>
              <Button
                label={cast.begun ? 'Keep, closer in' : 'Same line, closer in'}
                bank
                disabled={form.busy}
                onPress={goCloserIn}
              />
            </View>
          ) : null}
          <View style={{ flexGrow: 1 }}>
            <Button
              label={`Keep cast ${seq}`}
              kind="main"
              bank
              busy={form.busy}
              busyLabel="Keeping…"
              onPress={cast.keep}
            />
          </View>
        </>
      }
    >
      <Form label="Cast" onSubmit={cast.keep}>
        <CastCautions visitId={visit.id} />
        <ProblemNote problem={undo.error} />
        {said ? <Kept words={said} /> : null}
        {closer ? (
          <View style={{ flexDirection: 'row', alignItems: 'center', gap: space.small }}>
            <Text size="small" style={{ flex: 1 }}>
              Same line, closer in: wind in to these wraps and read again.
            </Text>
            <Button
              label="New throw"
              kind="quiet"
              bank
              onPress={() => form.reset(nextThrow(form.getValues()))}
            />
          </View>
        ) : null}
        <View
          nativeID="main-cast"
          style={{ flexDirection: beside ? 'row' : 'column', gap: beside ? space.huge : space.page }}
        >
          <View style={beside ? { flex: 1, minWidth: 0 } : undefined}>
            <AimPart form={form} lake={lake} />
            {suggest?.({ lake, pegId: form.watch('pegId'), made: placesOf(casts), onTake: take })}
            <LinePart form={form} visit={visit} />
            <FeelPart form={form} />
            <FloatPart form={form} visit={visit} />
            <MorePart form={form} />
          </View>
          <View style={beside ? { flex: 1, minWidth: 0, gap: space.page } : { gap: space.page }}>
            <Warnings reduced={cast.reduced} />
            <CastSketch lake={lake} casts={casts} surroundings={cast.surroundings} now={cast.reduced} />
          </View>
        </View>
        {last ? (
          <View style={{ alignItems: 'flex-start', gap: space.small }}>
            <Button
              label={`Take back cast ${last.seq}`}
              bank
              busy={undo.isPending}
              busyLabel="Taking back…"
              onPress={() => takeBack(last)}
            />
          </View>
        ) : null}
      </Form>
    </Page>
  );
}

function Warnings({ reduced }: { reduced: ReturnType<typeof useCastForm>['reduced'] }) {
  if (!reduced?.ok || reduced.sounding.warnings.length === 0) return null;
  return (
    <Note kind="caution" title="About this cast">
      {reduced.sounding.warnings.map((words) => (
        <Text key={words} size="small">
          {words}
        </Text>
      ))}
    </Note>
  );
}
