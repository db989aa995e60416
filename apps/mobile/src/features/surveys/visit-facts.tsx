import type { LakeView } from '@mereward/shared/lakes/contract';
import type { Kit, VisitView } from '@mereward/shared/surveys/contract';
import { Facts } from '@/components/facts';
import { LinkButton } from '@/components/link-button';
import { Section } from '@/components/section';
import { spacingWords } from '@/features/surveys/spacing-words';
import { boardReads } from '@/features/surveys/visit-words';
import { figure } from '@/lib/format';
import { clockTime, dayAndTime, dayName } from '@/lib/format-time';

type Props = { visit: VisitView; lake: LakeView };

/** When, who, at what water. */
export function VisitFacts({ visit, lake }: Props) {
  return (
    <Facts
      facts={[
        { term: 'When', fact: whenWords(visit, lake.zone) },
        { term: 'Surveyor', fact: `${visit.surveyor.name}, ${visit.competence}` },
        { term: 'Gauge board', fact: gaugeWords(visit, lake) },
        { term: 'Wind', fact: windWords(visit) },
        { term: 'Weather', fact: visit.weather.note },
        { term: 'Water', fact: visit.clarity },
        { term: 'Weed', fact: visit.weedState },
        { term: 'For the chart', fact: visit.consentToPublish ? 'may be published' : 'not to be published' },
      ]}
    />
  );
}

/** With what the casts were made, and the way to put it right. */
export function VisitKit({ visit }: Pick<Props, 'visit'>) {
  return (
    <Section
      title="Kit"
      end={
        visit.may.correct ? (
          <LinkButton label="Correct the kit" href={`/bank/surveys/${visit.id}/kit`} bank />
        ) : null
      }
    >
      <Facts facts={kitFacts(visit.kit)} />
    </Section>
  );
}

const whenWords = ({ startedAt, endedAt }: VisitView, zone: string): string =>
  endedAt === null
    ? `since ${dayAndTime(startedAt, zone)}`
    : `${dayAndTime(startedAt, zone)} to ${clockTime(endedAt, zone, zone)}`;

function gaugeWords(visit: VisitView, lake: LakeView): string {
  const reads = (levelM: number) => boardReads(lake, visit.boardId, levelM);
  const datum = `chart datum ${reads(visit.datumM)}`;
  return visit.gaugeEndM === null
    ? `${reads(visit.gaugeStartM)} at the start · ${datum}`
    : `${reads(visit.gaugeStartM)} to ${reads(visit.gaugeEndM)} · ${datum}`;
}

function windWords({ weather: { windForce, windFrom } }: VisitView): string {
  const parts = [windForce === null ? '' : `force ${windForce}`, windFrom === null ? '' : `from ${windFrom}`];
  return parts.filter(Boolean).join(' ');
}

const LINE_WORDS = { braid: 'braid', mono: 'nylon', other: 'other line' } as const;
const LEAD_WORDS = { smooth_ball: 'smooth', ribbed: 'ribbed', pronged: 'pronged', other: 'other' } as const;

function kitFacts(kit: Kit) {
  const taped = kit.stickMeasured === 'centres' ? 'between centres' : 'along the line';
  const checked =
    kit.stickCheckedOn === null ? 'tape check not noted' : `checked ${dayName(kit.stickCheckedOn)}`;
  const stretch = kit.lineType === 'braid' ? '' : `, stretch ${figure(kit.stretchShare * 100, 1)} %`;
  return [
    { term: 'Wraps of', fact: `${spacingWords(kit.stickSpacingM)}, taped ${taped}, ${checked}` },
    { term: 'Read', fact: kit.wrapReference === 'lead_to_clip' ? 'lead to clip' : 'lead to rod tip' },
    { term: 'Float', fact: `pulls of ${spacingWords(kit.pullM)}, set-up ${figure(kit.floatOffsetM, 2)} m` },
    {
      term: 'Rod',
      fact: `${spacingWords(kit.rodLengthM)}, ${figure(kit.lineAlongRodM, 2)} m of line along it, reel ${figure(kit.reelHeightM, 1)} m up`,
    },
    {
      term: 'Line and lead',
      fact: `${LINE_WORDS[kit.lineType]}${stretch}; ${figure(kit.leadG)} g ${LEAD_WORDS[kit.leadShape]}`,
    },
  ];
}
