import { useLocalSearchParams, useRouter } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { toMetres } from '@mereward/shared/units/length';
import { z } from 'zod';
import { Empty } from '@/components/empty';
import { Form } from '@/components/form';
import { FormField } from '@/components/form-field';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { SaveBar } from '@/components/save-bar';
import { Text } from '@/components/text';
import { useLake } from '@/features/lakes/api';
import { useReadVisitAnew, useVisit } from '@/features/surveys/api';
import { closeVisitHere } from '@/features/surveys/keep-here';
import { boardReads, countWords } from '@/features/surveys/visit-words';
import { draftName, useAgain, type Again } from '@/hooks/use-again';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { figure } from '@/lib/format';
import { typedNumber } from '@/lib/typed-schemas';

/** Closes a visit with the board's last reading. */
export function CloseScreen() {
  const { visitId } = useLocalSearchParams<{ visitId: string }>();
  const visit = useVisit(visitId);
  const lake = useLake(visit.data?.visit.lakeId ?? '');
  const again = useAgain();
  if (visit.data?.visit.may.addCasts && lake.data && again)
    return <CloseForm value={visit.data} lake={lake.data} again={again} />;
  const href = `/bank/surveys/${visitId}` as const;
  return (
    <Page title="Close the visit" back={{ label: visit.data?.visit.title ?? 'Visit', href }}>
      <Loaded query={visit} waiting="Reading the visit…">
        {({ visit: it }) => (
          <Empty
            title={it.status === 'closed' ? 'This visit is closed' : 'Not yours to close'}
            action={<LinkButton label="To the visit" href={href} kind="main" bank />}
          >
            {it.status === 'closed'
              ? 'Its casts are reduced with both readings.'
              : 'Managers and bailiffs close a visit.'}
          </Empty>
        )}
      </Loaded>
    </Page>
  );
}

const MUCH_M = 0.05; // a chart asks that the level moved less than this over a visit

const CloseDraft = z.object({
  gauge: typedNumber({ what: 'The reading', min: -100, max: 300 }),
  endedAt: z.string(), // '' until it is first sent: a second try closes at the same moment
});

type FormProps = { value: VisitWithCasts; lake: LakeView; again: Again };

function CloseForm({ value: { visit }, lake, again }: FormProps) {
  const router = useRouter();
  const readAnew = useReadVisitAnew({ visitId: visit.id, lakeId: visit.lakeId });
  const board = lake.boards.find(({ id }) => id === visit.boardId);
  const unit = board?.details.unit ?? 'm';
  const href = `/bank/surveys/${visit.id}` as const;
  const form: DraftForm<z.input<typeof CloseDraft>, z.output<typeof CloseDraft>> = useDraftForm({
    form: draftName(`close:${visit.id}`, again),
    schema: CloseDraft,
    start: { ...again.over({ gauge: '', endedAt: '' }), ...(again.timeRefused ? { endedAt: '' } : {}) },
    send: async ({ gauge, endedAt }) => {
      const at = endedAt === '' ? new Date().toISOString() : endedAt;
      form.setValue('endedAt', at);
      const closing = { endedAt: at, gaugeEndM: toMetres(gauge, unit) };
      const waits = await closeVisitHere({ visit, closing, typed: form.getValues() }, again.instead);
      if (!waits) await readAnew().catch(() => undefined); // closed all the same; the visit is read again when there is a signal
    },
    onDone: () => router.replace(href),
  });
  const typed = CloseDraft.safeParse(form.watch());
  const movedM = typed.success ? toMetres(typed.data.gauge, unit) - visit.gaugeStartM : 0;
  return (
    <Page
      title="Close the visit"
      over={visit.lakeName}
      back={{ label: visit.title, href }}
      actions={<SaveBar form={form} act="Close the visit" busyLabel="Closing…" />}
    >
      <Form label="Close" onSubmit={form.submit}>
        <ProblemNote problem={form.problem} />
        <Text>
          {`${countWords(visit.castCount, 'cast')}. With a reading at both ends the level of each cast’s hour is known, and all are reduced again. No cast can be added afterwards.`}
        </Text>
        <FormField
          control={form.control}
          name="gauge"
          label={`Gauge board ${board?.details.code ?? ''} reads now, ${unit}`}
          hint={`It read ${boardReads(lake, visit.boardId, visit.gaugeStartM)} at the start.`}
          keypad="decimal"
          bank
        />
        {Math.abs(movedM) > MUCH_M ? (
          <Note
            kind="caution"
            title={`That is ${figure(Math.abs(movedM), 2)} m ${movedM > 0 ? 'more' : 'less'} than at the start`}
            live
          >
            A chart asks for at most 0.05 m over a visit. Read the board again before closing.
          </Note>
        ) : null}
      </Form>
    </Page>
  );
}
