import type { LakeView } from '@mereward/shared/lakes/contract';
import type { CastView } from '@mereward/shared/surveys/contract';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { LinkButton } from '@/components/link-button';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
import { space } from '@/constants/layout';
import { castsText } from '@/features/surveys/api';
import { callWords } from '@/features/surveys/call-words';
import { GradeShape } from '@/features/surveys/grade-shape';
import { SendingShape } from '@/features/surveys/sending-shape';
import type { VisitShown } from '@/features/surveys/shown-visit';
import { spacingWords } from '@/features/surveys/spacing-words';
import { sideWords } from '@/features/surveys/aim-words';
import { figure } from '@/lib/format';
import { saveText } from '@/lib/save-file';

/** Every cast of the visit, newest first; a cast opens to how it was reduced. */
export function CastsSection({ value, lake }: { value: VisitShown; lake: LakeView }) {
  const { visit, casts, unsent, opening } = value;
  const save = useMutation({
    mutationFn: async () =>
      saveText(`casts-${visit.startedAt.slice(0, 10)}.csv`, await castsText(visit.id), 'text/csv'),
  });
  return (
    <Section
      title={`${figure(casts.length)} casts`}
      end={
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
          {visit.may.addCasts && opening === null ? (
            <LinkButton label="Bring a file" href={`/bank/surveys/${visit.id}/import`} bank />
          ) : null}
          {opening === null ? (
            <Button
              label="Casts as CSV"
              bank
              busy={save.isPending}
              busyLabel="Writing…"
              onPress={() => save.mutate()}
            />
          ) : null}
        </View>
      }
    >
      <ProblemNote problem={save.error} />
      <Table
        caption="Casts"
        rows={[...casts].reverse()}
        rowKey={({ id }) => id}
        href={({ id }) => `/bank/surveys/${visit.id}/casts/${id}`}
        columns={columnsOf(lake, visit.kit.stickSpacingM, unsent)}
      />
    </Section>
  );
}

const soundingOf = ({ reduced }: CastView) => (reduced.ok ? reduced.sounding : null);

function columnsOf(lake: LakeView, stickSpacingM: number, unsent: VisitShown['unsent']) {
  const pegs = new Map(lake.pegs.map(({ id, number }) => [id, number]));
  const marks = new Map(lake.marks.map(({ id, details }) => [id, details.code]));
  return [
    {
      key: 'seq',
      head: 'Cast',
      value: ({ seq }: CastView) => seq,
      show: (cast: CastView) => `Cast ${cast.seq}, peg ${pegs.get(cast.pegId) ?? ''}`,
    },
    {
      key: 'aim',
      head: 'Aim',
      value: ({ observation: { aim } }: CastView) =>
        aim.by === 'mark'
          ? `${marks.get(aim.markId) ?? 'a mark'} ${sideWords(aim.offsetDeg)}`
          : `compass ${aim.bearingDeg}°`,
    },
    {
      key: 'line',
      head: `Wraps of ${spacingWords(stickSpacingM)}`,
      value: ({ observation: { lineText, wrapsWhole } }: CastView) => lineText || String(wrapsWhole),
    },
    {
      key: 'bottom',
      head: 'Bottom',
      value: (cast: CastView) => {
        const sounding = soundingOf(cast);
        return sounding ? callWords(sounding) : cast.reduced.ok ? null : cast.reduced.reason;
      },
    },
    {
      key: 'depth',
      head: 'Depth at datum, m',
      figures: true,
      value: (cast: CastView) => soundingOf(cast)?.depthM ?? null,
      show: (cast: CastView) => depthCell(soundingOf(cast)),
    },
    {
      key: 'grade',
      head: 'Grade',
      value: (cast: CastView) => soundingOf(cast)?.grade ?? null,
      show: (cast: CastView) => {
        const grade = soundingOf(cast)?.grade;
        return grade ? <GradeShape grade={grade} /> : '–';
      },
    },
    ...(Object.keys(unsent).length > 0 ? [sendingColumn(unsent)] : []),
  ];
}

/** Shown while something of the visit is on this phone only. */
const sendingColumn = (unsent: VisitShown['unsent']) => ({
  key: 'sending',
  head: 'Sending',
  value: ({ id }: CastView) => unsent[id] ?? 'sent',
  show: ({ id }: CastView) => <SendingShape standing={unsent[id] ?? null} />,
});

function depthCell(sounding: ReturnType<typeof soundingOf>): string {
  if (!sounding || sounding.depthM === null) return 'not read';
  const within = sounding.depthSigmaM === null ? '' : ` ± ${figure(sounding.depthSigmaM, 2)}`;
  return `${figure(sounding.depthM, 2)}${within}`;
}
