import { LakePlaceKind } from '@mereward/shared/lakes/place-contract';
import { chartCaution } from '@mereward/shared/charts/cautions';
import { ageWords } from '@mereward/shared/charts/chart-age';
import type { ChartView } from '@mereward/shared/charts/contract';
import { layerReasons } from '@mereward/shared/charts/layer-reasons';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { GRADE_LIMITS } from '@mereward/shared/surveys/grade';
import { dayWords } from '@mereward/shared/time/civil-day';
import { dayAndClock, dayRange } from '@mereward/shared/time/day-names';
import { USUAL_SPACING_M } from '@mereward/shared/units/wraps';

/** What only the staff's copy tells: whose work it is. */
export type SheetPeople = { surveyors: readonly string[]; approvedBy: string | null };

/** The right-hand lines of the head: which chart, when it was surveyed, at what level. */
export function sheetHead(chart: ChartView): string[] {
  const depths = chart.depth === null ? [] : [`Depths in metres below datum ${chart.datumM.toFixed(2)} m`];
  return [
    `Surveyed ${dayRange(chart.surveyedFrom, chart.surveyedTo)}. ${ageWords(chart.age, chart.changes)}.`,
    ...depths,
    levelWords(chart),
  ];
}

export const versionWords = ({ version, status }: ChartView): string => {
  if (version === null) return 'Draft, not published';
  if (status === 'superseded') return `Chart ${version}, replaced by a newer one`;
  return status === 'withdrawn' ? `Chart ${version}, withdrawn` : `Chart ${version}`;
};

function levelWords({ levelNow, datumM, zone }: ChartView): string {
  if (!levelNow)
    return 'No level has been read: look at the board, and add or take off what it differs from datum.';
  const more = levelNow.levelM - datumM;
  const change =
    Math.abs(more) < 0.005
      ? 'the depths are as charted'
      : `${Math.abs(more).toFixed(2)} m ${more > 0 ? 'more' : 'less'} water than charted`;
  return `Board ${levelNow.boardCode} read ${levelNow.boardReadsM.toFixed(2)} m on ${dayAndClock(levelNow.at, zone)}: ${change}.`;
}

/** "place within 2 m, depth within 0.3 m": how far off 19 in 20 of a grade are at most. */
function within95(grade: 'A' | 'B' | 'C'): string {
  const { positionM, depthM } = GRADE_LIMITS.find((each) => each.grade === grade)!.within95;
  return `place within ${positionM} m, depth within ${depthM} m`;
}

/** How to read what is drawn. Only of the layers that are there. */
export function sheetKey(chart: ChartView): string[] {
  const { isobaths, contourStepM, soundings, substrate } = chart;
  return [
    ...(isobaths
      ? [
          `Isobaths every ${Number(contourStepM.toFixed(3))} m, each fifth heavier; figures are metres below datum. Drawn from casts of grade A and B alone, and only where somebody cast: ruled paper is water nobody surveyed.`,
        ]
      : []),
    ...(soundings
      ? [
          `${soundings.some(({ ofLog }) => ofLog) ? 'Soundings' : 'Casts'} as points, with their depth where it has room: full, grade A (${within95('A')}, 19 in 20) or B (${within95('B')}); hollow, C (${within95('C')})${soundings.some(({ grade }) => grade === 'D') ? ' or D (more, or something missing: for staff only)' : ''}.`,
        ]
      : []),
    ...(substrate
      ? [
          'Bottom by pattern and letters, thinner where it is less sure; a dotted line is the limit of one kind.',
        ]
      : []),
    'Pegs: a bar with a head is open, a ring limited, a cross closed. Triangles are far-bank marks.',
    ...placeWords(chart),
  ];
}

const SIGNS: Readonly<Record<LakePlaceKind, string>> = {
  parking: 'P is parking',
  gate: 'a barred sign a gate',
  throw_line: 'two rings a throw line',
  hazard: 'a diamond a hazard',
  overhead_line:
    'a broken line with bolts an overhead line: nobody fishes within 30 m of it unless the fishery says so',
};

/** What the signs of the places on it mean; nothing for kinds that aren't there. */
function placeWords({ places = [] }: ChartView): string[] {
  const kinds = LakePlaceKind.options.filter((kind) => places.some((place) => place.kind === kind));
  if (kinds.length === 0) return [];
  const words = kinds.map((kind) => SIGNS[kind]).join(', ');
  return [`${words.charAt(0).toUpperCase()}${words.slice(1)}.`];
}

/** What the sheet must not be used for. */
export const sheetCaution = (chart: ChartView): string =>
  `${chartCaution(chart)} Not for navigation. Byelaws and notices on the bank come before this sheet.`;

type Printed = { chart: ChartView; people: SheetPeople | null; printedOn: string };

/** What isn't on this copy and why, whose work it is for those who may know, and when it was printed. */
export function sheetFoot({ chart, people, printedOn }: Printed): string {
  const missing = layerReasons(chart.layerNotes).map((words) => `Not on this copy: ${words}`);
  const surveyors = people?.surveyors ?? [];
  return [
    ...missing,
    `${chart.fisheryName}, ${versionWords(chart)}.`,
    surveyors.length > 0 ? `Surveyed by ${surveyors.join(', ')}.` : '',
    people?.approvedBy ? `Approved by ${people.approvedBy}.` : '',
    `Printed ${dayWords(printedOn)}.`,
  ]
    .filter(Boolean)
    .join(' ');
}

export const scaleLine = (scale: number, paper: string): string =>
  `Scale 1:${scale.toLocaleString('en-GB').replaceAll(',', '\u2009')} on ${paper} printed at its full size, not “fitted to the page”: one centimetre is ${Number((scale / 100).toFixed(2))} m, one wrap of ${stickWords(USUAL_SPACING_M)} is ${((USUAL_SPACING_M / scale) * 1000).toFixed(1)} mm. Lay a ruler along the bar before you trust it.`;
