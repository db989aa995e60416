import type { LeadCalibration } from '@mereward/db/entities/surveys/lead-calibration';
import type { Kit } from '@mereward/shared/surveys/contract';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { dayWords } from '@mereward/shared/time/civil-day';
import { dayAndClock } from '@mereward/shared/time/day-names';
import type { PaperBlock } from '../../pdf/paper-pages';
import type { SurveyReport } from './report-document';

/** Who surveyed when, in what weather, with what kit and which constants. */
export function visitBlocks({ visits, people, zone, leads, built }: SurveyReport): PaperBlock[] {
  return visits.flatMap(({ visit, casts }, i): PaperBlock[] => {
    const { weather, clarity, weedState, startedAt, endedAt } = visit;
    const wind = [
      weather.windForce === null ? '' : `wind force ${weather.windForce}`,
      weather.windFrom === null ? '' : `from ${weather.windFrom}`,
      weather.note,
    ];
    const logs = built.logs.filter(({ visitId }) => visitId === visit.id).length;
    const brought = [
      casts.length > 0 || logs === 0 ? `${casts.length} casts` : '',
      logs > 0 ? `${logs} ${logs === 1 ? 'log' : 'logs'} of soundings` : '',
    ];
    const until = endedAt ? ` to ${dayAndClock(endedAt.toISOString(), zone)}` : ', still open';
    return [
      { kind: 'words', words: `Visit ${i + 1}: ${visit.title}`, bold: true },
      {
        kind: 'facts',
        facts: [
          [
            'When',
            `${dayAndClock(startedAt.toISOString(), zone)}${until}; ${brought.filter(Boolean).join(', ')}`,
          ],
          ['Surveyor', `${people.get(visit.surveyorId) ?? 'not known'}, ${visit.competence}`],
          ['Weather', wind.filter(Boolean).join(', ') || 'not noted'],
          ['Water', [clarity, weedState].filter(Boolean).join('; ') || 'not noted'],
          ...(casts.length > 0 ? kitFacts(visit.kit) : []),
          ...(casts.length > 0 ? leadFacts(visit.kit, leads) : []),
        ],
      },
    ];
  });
}

const LINE = { braid: 'braid', mono: 'nylon', other: 'other line' } as const;
const SHAPE = { smooth_ball: 'smooth ball', ribbed: 'ribbed', pronged: 'pronged', other: 'other' } as const;

function kitFacts(kit: Kit): [string, string][] {
  const measured =
    kit.stickMeasured === 'centres'
      ? `between centres${kit.stickDiameterM === null ? ', their thickness not known' : `, sticks ${(kit.stickDiameterM * 1000).toFixed(0)} mm thick`}`
      : 'along the line';
  const taped = kit.stickCheckedOn === null ? 'not taped since' : `taped ${dayWords(kit.stickCheckedOn)}`;
  const reference = kit.wrapReference === 'lead_to_clip' ? 'lead to reel clip' : 'lead to rod tip';
  const stretch =
    kit.stretchShare === 0
      ? 'taken not to stretch'
      : `stretch ${(kit.stretchShare * 100).toFixed(1)} ± ${(kit.stretchSigmaShare * 100).toFixed(1)} %`;
  return [
    [
      'Distance sticks',
      `${stickWords(kit.stickSpacingM)} (${kit.stickSpacingM.toFixed(4)} m), measured ${measured}, ${taped}`,
    ],
    ['A count of wraps', `${reference}; ± ${kit.wrapSigmaShare} of a wrap unless the remainder was measured`],
    [
      'Rod',
      `${kit.rodLengthM} m, ${kit.lineAlongRodM} m of line along it, reel ${kit.reelHeightM} m above the water, ${kit.rodElevationDeg}° above level`,
    ],
    ['Line', `${LINE[kit.lineType]}, ${stretch}`],
    ['Lead', `${kit.leadG} g, ${SHAPE[kit.leadShape]}`],
    [
      'Float',
      `one pull ${(kit.pullM * 1000).toFixed(1)} mm; the float and its link add ${(kit.floatOffsetM * 1000).toFixed(0)} mm`,
    ],
    ['Compass', `${kit.declinationDeg.toFixed(1)}° from magnetic to true`],
  ];
}

/** The rate a calibrated lead falls at, and the soundings by float it was learnt from. */
function leadFacts(kit: Kit, leads: ReadonlyMap<string, LeadCalibration>): [string, string][] {
  const lead = kit.leadId ? leads.get(kit.leadId) : undefined;
  if (!lead)
    return [['Counted falls', 'kept as counts and not charted: no calibrated lead was named in the kit']];
  const { rateMPerS, rateSigmaMPerS, scatterM, spots } = lead.calibration;
  const learnt = lead.falls.map(({ seconds, depthM }) => `${seconds} s to ${depthM} m`).join(', ');
  return [
    [
      'Counted falls',
      `${lead.name}: ${rateMPerS.toFixed(2)} ± ${rateSigmaMPerS.toFixed(2)} m a second, one depth ± ${scatterM.toFixed(2)} m; from ${spots} spots read by float on ${dayWords(lead.calibratedOn)} (${learnt})`,
    ],
  ];
}
