import { dayAndClock, dayRange } from '@mereward/shared/time/day-names';
import { Grade } from '@mereward/shared/surveys/contract';
import { repeatAgreement } from '@mereward/shared/surveys/repeat-agreement';
import { REPEAT_WITHIN_M } from '@mereward/shared/surveys/peg-arc';
import { SIGMA } from '@mereward/shared/surveys/error-budget';
import { figure, percent } from '@mereward/shared/units/length-words';
import type { PaperBlock, PaperTable } from '../../pdf/paper-pages';
import type { SurveyReport } from './report-document';

type Facts = [string, string][];

export function coverageTable({ visits, coverage }: SurveyReport): PaperTable {
  const rows = visits.flatMap(({ site, visit }, i) =>
    (coverage[i] ?? []).map(({ pegId, share, repeatsShare, casts }) => [
      site.pegs.get(pegId)?.number ?? '',
      visit.title,
      String(casts),
      percent(share),
      percent(repeatsShare),
    ]),
  );
  const order = new Intl.Collator('en-GB', { numeric: true });
  return {
    heading: ['Peg', 'Visit', 'Casts', 'Of its arc', 'Repeats'],
    shares: [0.12, 0.46, 0.14, 0.14, 0.14],
    rows: rows.sort((a, b) => order.compare(a[0] ?? '', b[0] ?? '')),
  };
}

export function agreementFacts({ built, visits }: SurveyReport): Facts {
  const lineOf = new Map(visits.flatMap(({ casts }) => casts.map(({ id, lineId }) => [id, lineId] as const)));
  const { pairs, meanDifferenceM, withinShare, bottomPairs, bottomShare } = repeatAgreement(
    built.soundings.map((each) => ({ ...each, lineId: lineOf.get(each.id) ?? each.id })),
  );
  if (pairs === 0 || meanDifferenceM === null || withinShare === null)
    return [['Repeats', `no two throws came down within ${REPEAT_WITHIN_M} m of one another`]];
  return [
    ['Pairs of casts', `${pairs}, from different throws within ${REPEAT_WITHIN_M} m of one another`],
    ['Their depths differ by', `${meanDifferenceM.toFixed(2)} m on average, without sign`],
    [
      'Within their stated error',
      `${percent(withinShare)} of the pairs (1.96 of their joint σ; 95 % would be right on a flat bed)`,
    ],
    [
      'Bottom called the same',
      bottomShare === null ? 'no pair has two calls' : `${percent(bottomShare)} of ${bottomPairs} pairs`,
    ],
  ];
}

export function qualityFacts({ built: { quality, soundings, logs } }: SurveyReport): Facts {
  const grades = Grade.options.map(
    (grade) => `${grade} ${soundings.filter((each) => each.grade === grade).length}`,
  );
  const { variogram } = quality;
  return [
    [logs.length === 0 ? 'Grades' : 'Grades of casts', grades.join(', ')],
    [
      'Left out one by one',
      `mean error ${quality.meanErrorM.toFixed(3)} m, root mean square ${quality.rmseM.toFixed(3)} m over ${quality.soundings} soundings`,
    ],
    [
      'Stated error is honest',
      `standardised variance ${quality.standardisedVariance.toFixed(2)} (1 is right); ${percent(quality.coverage95)} of the soundings lie in their 95 % band`,
    ],
    [
      'Variogram',
      `${variogram.model}: nugget ${variogram.nugget.toFixed(4)} m², sill ${variogram.sill.toFixed(4)} m², range ${variogram.rangeM.toFixed(1)} m`,
    ],
    ['Why this surface', quality.words],
    [
      'Out of line',
      `${quality.flagged.length} soundings differ from their neighbours by more than 3.5 robust σ; they are used all the same`,
    ],
    [
      'Errors taken (one σ)',
      `aim at a mark ${SIGMA.aimAtMarkDeg}°, phone compass ${SIGMA.compassPhoneDeg}°, a marked remainder ${SIGMA.markedRemainderM} m, rod angle ${SIGMA.rodElevationDeg}°, float and link ${SIGMA.floatOffsetM} m, beside a marked origin ${SIGMA.besideMarkedOriginM} m. Common practice, no published source.`,
    ],
  ];
}

/** Those of grade D are kept for staff and build nothing. */
const mergedOf = (logs: SurveyReport['built']['logs']): number =>
  logs.reduce((sum, { grades }) => sum + grades.replaceAll('D', '').length, 0);

/** Reasons are told once each, with how many casts they kept out. */
export function usedFacts({ built: { leftOut, soundings, points, logs, reports } }: SurveyReport): Facts {
  const reasons = new Map<string, number>();
  for (const { why, byHand } of leftOut) if (!byHand) reasons.set(why, (reasons.get(why) ?? 0) + 1);
  const told = [...reasons]
    .sort(([, a], [, b]) => b - a)
    .map(([why, n]): [string, string] => [`${n} casts`, why]);
  return [
    ['Casts with a depth', `${soundings.length} in the chart`],
    ['Casts of the bottom only', `${points.length} in the chart`],
    ...(logs.length > 0
      ? [['Merged soundings of logs', `${figure(mergedOf(logs))} in the chart`] as [string, string]]
      : []),
    ...(reports.length > 0
      ? [['Reports of anglers', `${reports.length} in the chart`] as [string, string]]
      : []),
    ...(told.length > 0 ? told : [['Left out', 'none'] as [string, string]]),
  ];
}

/** What a person left out, with who, why and when. */
export function leftOutBlocks({ leftOut, zone }: SurveyReport): PaperBlock[] {
  if (leftOut.length === 0)
    return [{ kind: 'words', words: 'No person left anything out of this chart.', bold: false }];
  return [
    {
      kind: 'words',
      words:
        'Left out of this chart by a person. What was observed is kept, and stands in the table of casts:',
      bold: false,
    },
    {
      kind: 'table',
      table: {
        heading: ['What', 'Why', 'By', 'When'],
        shares: [0.26, 0.38, 0.18, 0.18],
        rows: leftOut.map(({ label, reason, by, at }) => [label, reason, by, dayAndClock(at, zone)]),
      },
    },
  ];
}

const signed = (value: number, decimals: number): string =>
  `${value > 0 ? '+' : ''}${figure(value, decimals)}`;

export function changeFacts({ earlier, built: { figures, soundings, logs }, chart }: SurveyReport): Facts {
  if (!earlier) return [['Version before', 'none: this is the first chart of this water']];
  const was = earlier.figures;
  const days =
    earlier.surveyedFrom && earlier.surveyedTo ? dayRange(earlier.surveyedFrom, earlier.surveyedTo) : '';
  const kept = chart.visitIds.filter((id) => earlier.visitIds.includes(id)).length;
  return [
    ['Version before', `${earlier.version ?? ''}, surveyed ${days}`],
    [
      'Visits',
      `${chart.visitIds.length}, of which ${kept} stood in the version before; ${earlier.visitIds.length - kept} of its visits are not used any more`,
    ],
    ['Soundings of casts', `${soundings.length}; ${earlier.casts} before`],
    ...(logs.length + earlier.merged > 0
      ? [
          ['Merged soundings of logs', `${figure(mergedOf(logs))}; ${figure(earlier.merged)} before`] as [
            string,
            string,
          ],
        ]
      : []),
    [
      'Datum',
      chart.datumM === earlier.datumM
        ? 'the same'
        : `${chart.datumM.toFixed(2)} m; ${earlier.datumM.toFixed(2)} m before`,
    ],
    ['Water surveyed', `${percent(figures.surveyedShare)}; ${percent(was.surveyedShare)} before`],
    ['Volume', `${figure(figures.volumeM3)} m³, ${signed(figures.volumeM3 - was.volumeM3, 0)} m³ since`],
    [
      'Mean depth',
      `${figures.meanDepthM.toFixed(2)} m, ${signed(figures.meanDepthM - was.meanDepthM, 2)} m since`,
    ],
    [
      'Greatest depth',
      `${figures.greatestDepthM.toFixed(2)} m, ${signed(figures.greatestDepthM - was.greatestDepthM, 2)} m since`,
    ],
    [
      'How to read this',
      'volumes and means change with how much of the water was surveyed, not with the bed alone',
    ],
  ];
}
