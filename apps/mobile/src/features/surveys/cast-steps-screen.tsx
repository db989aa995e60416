import { useLocalSearchParams } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { castWords } from '@mereward/shared/surveys/cast-words';
import type { CastView, SoundingView } from '@mereward/shared/surveys/contract';
import { Empty } from '@/components/empty';
import { Facts } from '@/components/facts';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { useLake } from '@/features/lakes/api';
import { useVisit } from '@/features/surveys/api';
import { callWords, depthWords } from '@/features/surveys/call-words';
import { GradeShape } from '@/features/surveys/grade-shape';
import { ReductionSteps } from '@/features/surveys/reduction-steps';
import { GRADE_WORDS } from '@/features/surveys/visit-words';
import { useUnits } from '@/hooks/use-units';
import { figure, length } from '@/lib/format';
import { dayAndTime } from '@/lib/format-time';

/** One cast: as it was observed, what it comes out as, and how that was worked out. */
export function CastStepsScreen() {
  const { visitId, castId } = useLocalSearchParams<{ visitId: string; castId: string }>();
  const visit = useVisit(visitId);
  const lake = useLake(visit.data?.visit.lakeId ?? '');
  const cast = visit.data?.casts.find(({ id }) => id === castId);
  return (
    <Page
      title={cast ? `Cast ${cast.seq}` : 'Cast'}
      over={visit.data?.visit.lakeName}
      back={{ label: visit.data?.visit.title ?? 'Visit', href: `/bank/surveys/${visitId}` }}
    >
      <Loaded query={visit} waiting="Reading the visit…">
        {() =>
          cast ? (
            <Loaded query={lake} waiting="Reading the lake…">
              {(its) => <Cast cast={cast} lake={its} />}
            </Loaded>
          ) : (
            <Empty
              title="This cast is not in the visit"
              action={<LinkButton label="To the visit" href={`/bank/surveys/${visitId}`} kind="main" bank />}
            >
              It may have been taken back.
            </Empty>
          )
        }
      </Loaded>
    </Page>
  );
}

function Cast({ cast, lake }: { cast: CastView; lake: LakeView }) {
  const { observation, reduced } = cast;
  const { aim } = observation;
  const mark = aim.by === 'mark' ? lake.marks.find(({ id }) => id === aim.markId) : undefined;
  const peg = lake.pegs.find(({ id }) => id === cast.pegId);
  return (
    <>
      <Text>
        {castWords(observation, { peg: peg?.number ?? '', mark: mark?.details.name ?? null })}
        {`. ${dayAndTime(cast.observedAt, lake.zone)}.`}
      </Text>
      {observation.note ? <Note title="Note">{observation.note}</Note> : null}
      {reduced.ok ? (
        <Sounding sounding={reduced.sounding} />
      ) : (
        <Note kind="caution" title={reduced.reason}>
          {reduced.remedy}
        </Note>
      )}
      <Section title="How did you get this?">
        <ReductionSteps steps={reduced.steps} />
      </Section>
    </>
  );
}

function Sounding({ sounding }: { sounding: SoundingView }) {
  const units = useUnits();
  const { ellipse } = sounding;
  return (
    <>
      <Facts
        facts={[
          { term: 'Bottom', fact: callWords(sounding) },
          { term: 'Depth', fact: depthWords(sounding, units) },
          { term: 'Grade', fact: <GradeShape grade={sounding.grade} /> },
          { term: 'That is', fact: GRADE_WORDS[sounding.grade] },
          { term: 'Because', fact: sounding.gradeReasons.join('; ') },
          {
            term: 'Where',
            fact: `${length(sounding.rangeM, units)} out on ${figure(sounding.bearingDeg, 1)}° true`,
          },
          {
            term: '95 % of it',
            fact: `within ${length(ellipse.semiMajorM, units)} by ${length(ellipse.semiMinorM, units)}`,
          },
        ]}
      />
      {sounding.warnings.length > 0 || sounding.askAgain ? (
        <Note kind="caution" title="About this cast">
          {sounding.askAgain ? (
            <Text>Landing, drag and what came back don’t agree. Cast again 1–2 m away.</Text>
          ) : null}
          {sounding.warnings.map((words) => (
            <Text key={words}>{words}</Text>
          ))}
        </Note>
      ) : null}
    </>
  );
}
