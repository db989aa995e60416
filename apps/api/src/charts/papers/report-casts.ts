import { BOTTOM_WORDS } from '@mereward/shared/charts/bottom-words';
import { clockIn } from '@mereward/shared/time/day-names';
import { civilDay, dayWords } from '@mereward/shared/time/civil-day';
import type { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import type { BuiltSounding } from '../built';
import type { ChartVisit } from '../chart-casts';
import type { PaperBlock } from '../../pdf/paper-pages';
import type { SurveyReport } from './report-document';

const HEADING = [
  'Peg',
  'Seq',
  'Time',
  'Aim',
  'Line',
  'Length m',
  'Lands',
  'Drags',
  'Came back',
  'Pulls',
  'As read m',
  'At datum m',
  '± m',
  'Bottom',
  'Grade',
  'Flags, note, or why it is not charted',
];
const SHARES = [
  0.04, 0.03, 0.04, 0.085, 0.08, 0.045, 0.06, 0.09, 0.075, 0.04, 0.045, 0.05, 0.035, 0.065, 0.04, 0.18,
];

/** Every cast of every visit, as observed and as charted. */
export function castsBlocks({ visits, built, zone }: SurveyReport): PaperBlock[] {
  const charted = new Map(built.soundings.map((each) => [each.id, each]));
  const whyNot = new Map(built.leftOut.map(({ id, why }) => [id, why]));
  const clock = clockIn(zone);
  return visits.flatMap((each, i): PaperBlock[] => {
    if (each.casts.length === 0) return []; // a boat's day: its log is told of elsewhere
    const rows = each.casts.map((cast) => [
      ...observed(each, cast),
      ...reduced(charted.get(cast.id)),
      remarks(cast, whyNot.get(cast.id)),
    ]);
    const timed = rows.map((row, at) => {
      const cast = each.casts[at];
      return cast ? [...row.slice(0, 2), clock.format(cast.observedAt), ...row.slice(2)] : row;
    });
    const day = dayWords(civilDay(each.visit.startedAt, zone));
    const title = `Casts of visit ${i + 1}: ${each.visit.title}, ${day} (${rows.length})`;
    return [{ kind: 'table', wide: true, table: { title, heading: HEADING, shares: SHARES, rows: timed } }];
  });
}

const spaced = (code: string | null): string => (code ?? '').replaceAll('_', ' ');

function observed({ site }: ChartVisit, { pegId, seq, observation: seen }: SurveyCast): string[] {
  const { aim } = seen;
  const turned =
    aim.by === 'mark' && aim.offsetDeg !== 0
      ? ` ${aim.offsetDeg > 0 ? '+' : '−'}${Math.abs(aim.offsetDeg)}°`
      : '';
  const at =
    aim.by === 'mark' ? `${site.marks.get(aim.markId)?.code ?? '?'}${turned}` : `${aim.bearingDeg}° magnetic`;
  const length = seen.wrapsWhole * site.visit.kit.stickSpacingM + seen.remainderM;
  return [
    site.pegs.get(pegId)?.number ?? '',
    String(seq),
    at,
    seen.lineText || `${seen.wrapsWhole}`,
    length.toFixed(2),
    spaced(seen.drop),
    spaced(seen.drag),
    (seen.cameBack ?? []).map(spaced).join(', '),
    [seen.pulls, seen.pullsAgain].filter((pulls) => pulls !== null).join(' / '),
  ];
}

function reduced(sounding: BuiltSounding | undefined): string[] {
  if (!sounding) return ['', '', '', '', ''];
  return [
    sounding.depthAsReadM.toFixed(2),
    sounding.depthM.toFixed(2),
    sounding.sigmaM.toFixed(2),
    sounding.bottom === 'unknown' ? 'not known' : BOTTOM_WORDS[sounding.bottom],
    sounding.grade,
  ];
}

const remarks = ({ observation: { flags, note } }: SurveyCast, whyNot: string | undefined): string =>
  [flags.map(spaced).join(', '), note, whyNot].filter(Boolean).join('. ');
