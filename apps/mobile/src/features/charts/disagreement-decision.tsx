import { useState } from 'react';
import type { DecideDisagreement, DisagreementForReview } from '@mereward/shared/charts/disagreement';
import { toMetres } from '@mereward/shared/units/length';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Checkbox } from '@/components/checkbox';
import { Field } from '@/components/field';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { space } from '@/constants/layout';
import { useUnits } from '@/hooks/use-units';
import { typedNumberOrNothing } from '@/lib/typed-schemas';
import { useDecide } from './disagreement-api';

type Props = { report: DisagreementForReview };

/** Accept or decline, or why this person may not. */
export function DisagreementDecision({ report }: Props) {
  const [choice, setChoice] = useState<'accept' | 'decline' | null>(null);
  const { may } = report;
  if (!may.decide)
    return may.whyNot ? (
      <Note kind="caution" title="Not yours to decide">
        {may.whyNot}
      </Note>
    ) : null;
  if (choice === 'accept') return <Accept report={report} onLeave={() => setChoice(null)} />;
  if (choice === 'decline') return <Decline report={report} onLeave={() => setChoice(null)} />;
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
      <Button label="Accept…" onPress={() => setChoice('accept')} />
      <Button label="Decline…" kind="quiet" onPress={() => setChoice('decline')} />
    </View>
  );
}

type Part = Props & { onLeave: () => void };

function Accept({ report, onLeave }: Part) {
  const { length: unit } = useUnits();
  const decide = useDecide({ lakeId: report.lakeId, id: report.id });
  const [again, setAgain] = useState(false);
  const [day, setDay] = useState(report.day);
  const [depth, setDepth] = useState('');
  const [reason, setReason] = useState('');
  const read = typedNumberOrNothing({
    min: 0.1,
    max: unit === 'm' ? 60 : 196,
    unit,
    what: 'The depth',
  }).safeParse(depth);
  const fault = read.success ? undefined : read.error.issues[0]?.message;
  const { bottom, snag, weed } = report.found;
  const onlyDepth = bottom === null && !snag && weed === null;
  const missing = again && onlyDepth && depth.trim() === '';
  const act = (): void => {
    if (!read.success) return;
    const depthM = read.data === null ? null : toMetres(read.data, unit);
    const decision: DecideDisagreement = {
      decision: 'accept',
      remeasured: again ? { day, depthM } : null,
      reason: reason.trim(),
    };
    decide.mutate(decision);
  };
  return (
    <View style={{ gap: space.medium }}>
      <Checkbox label="Our own staff measured it again" checked={again} onChange={setAgain} />
      {again ? (
        <>
          <Field label="On which day" picker="date" value={day} onChange={setDay} />
          <Field
            label={`Depth staff found, ${unit}`}
            hint="By float, of the water that day. It stands in place of the angler’s, as grade B."
            keypad="decimal"
            value={depth}
            onChange={setDepth}
            error={fault}
            optional={!onlyDepth}
          />
        </>
      ) : null}
      <Field label="A word to the angler" value={reason} onChange={setReason} lines={2} optional />
      <ProblemNote problem={decide.error} />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button
          label={again ? 'Accept as grade B' : `Accept as grade ${report.gradeIfAccepted}`}
          kind="main"
          busy={decide.isPending}
          busyLabel="Accepting…"
          disabled={missing || (again && !read.success)}
          onPress={act}
        />
        <Button label="Not yet" kind="quiet" onPress={onLeave} />
      </View>
    </View>
  );
}

function Decline({ report, onLeave }: Part) {
  const decide = useDecide({ lakeId: report.lakeId, id: report.id });
  const [reason, setReason] = useState('');
  return (
    <View style={{ gap: space.medium }}>
      <Field
        label="Why it is declined"
        hint="The angler reads it."
        value={reason}
        onChange={setReason}
        lines={2}
      />
      <ProblemNote problem={decide.error} />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button
          label="Decline it"
          kind="main"
          busy={decide.isPending}
          busyLabel="Declining…"
          disabled={reason.trim() === ''}
          onPress={() => decide.mutate({ decision: 'decline', reason: reason.trim() })}
        />
        <Button label="Not yet" kind="quiet" onPress={onLeave} />
      </View>
    </View>
  );
}
