import { useMemo } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { LakeView, PegView } from '@mereward/shared/lakes/contract';
import { castWords } from '@mereward/shared/surveys/cast-words';
import type { CastView, SoundingView, VisitWithCasts } from '@mereward/shared/surveys/contract';
import { gradeMeans } from '@mereward/shared/surveys/grade';
import { Empty } from '@/components/empty';
import { Facts } from '@/components/facts';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { useLake } from '@/features/lakes/api';
import { useStance, useVisit } from '@/features/surveys/api';
import { callWords, depthWords } from '@/features/surveys/call-words';
import { reducingOf } from '@/features/surveys/cast-site-of';
import { GradeShape } from '@/features/surveys/grade-shape';
import { ReductionSteps } from '@/features/surveys/reduction-steps';
import { useKeptReduction } from '@/features/surveys/use-cast-reduction';
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
        {(value) =>
          cast ? (
            <Loaded query={lake} waiting="Reading the lake…">
              {(its) => <Cast cast={cast} lake={its} of={value} />}
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

type CastProps = { cast: CastView; lake: LakeView; of: VisitWithCasts };

function Cast({ cast, lake, of }: CastProps) {
  const { observation, reduced } = cast;
  const { aim } = observation;
  const mark = aim.by === 'mark' ? lake.marks.find(({ id }) => id === aim.markId) : undefined;
  const peg = lake.pegs.find(({ id }) => id === cast.pegId);
  const stance = useStance(cast.pegId);
  return (
    <>
      <Text>
        {castWords(observation, { peg: peg?.number ?? '', mark: mark?.details.name ?? null })}
        {`. ${dayAndTime(cast.observedAt, lake.zone)}.`}
      </Text>
      {observation.note ? <Note title="Note">{observation.note}</Note> : null}
      {reduced.ok ? (
        <>
          <Sounding sounding={reduced.sounding} />
          {of.visit.may.correct ? (
            <LinkButton
              label="Confirm what lies here"
              href={`/bank/confirmed/${lake.id}?castId=${cast.id}&cast=${encodeURIComponent(`cast ${cast.seq} from peg ${peg?.number ?? ''}`)}`}
              bank
            />
          ) : null}
        </>
      ) : (
        <Note kind="caution" title={reduced.reason}>
          {reduced.remedy}
        </Note>
      )}
      <Section title="How did you get this?">
        <Loaded query={stance} waiting="Working it out…">
          {(peg) => <Steps cast={cast} peg={peg} lake={lake} of={of} />}
        </Loaded>
      </Section>
    </>
  );
}

function Steps({ cast, lake, of, peg }: CastProps & { peg: PegView }) {
  const { visit, casts } = of;
  const surroundings = useMemo(
    () => ({ lake, peg, visit, reducing: reducingOf(of) }),
    [lake, peg, visit, of],
  );
  const reduced = useKeptReduction(surroundings, cast, casts);
  return <ReductionSteps steps={reduced?.steps ?? []} />;
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
          { term: 'That is', fact: gradeMeans(sounding.grade) },
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
