import { BOTTOM_WORDS } from '@mereward/shared/charts/bottom-words';
import type { PegPageView, SpotView } from '@mereward/shared/charts/contract';
import { countWords, depthTodayM, depthWords, stickWords } from '@mereward/shared/charts/spot-words';
import { PegDetails } from '@mereward/shared/lakes/contract';
import { BOTTOM_ABBREVIATION } from '@mereward/shared/surveys/bottom-abbreviation';
import { dayWords } from '@mereward/shared/time/civil-day';

export type CardLine = { label: string; words: string };

const yes = (label: string, words: string): CardLine[] => (words === '' ? [] : [{ label, words }]);

/** The facts of a peg's card, those that are known. */
export function factLines({ details: unread, lake }: PegPageView): CardLine[] {
  const details = PegDetails.parse(unread);
  const { access, platform, parking, stepFree } = details;
  const metres = (lengthM: number | null, after: string) => (lengthM === null ? '' : `${lengthM} m ${after}`);
  const walk = [
    metres(access.fromParkingM, 'from parking'),
    access.surface,
    access.steepest,
    steps(access.steps),
    access.gates,
  ];
  const size =
    platform.widthM !== null && platform.lengthM !== null ? `${platform.widthM} × ${platform.lengthM} m` : '';
  return [
    ...yes('Stand', details.originMark),
    ...yes('This peg’s water', details.waterWords),
    ...yes('Way', joined(walk)),
    ...yes(
      'Without steps',
      stepFree.kind === 'unknown' ? '' : joined([STEP_FREE[stepFree.kind], stepFree.facts]),
    ),
    ...yes('Parking', joined([parking.bay, parking.vehicleLimit, parking.winterClosure])),
    ...yes('Platform', platform.kind === 'none' ? 'none' : joined([platform.kind, size, platform.state])),
    ...yes('Room for', joined([many(details.people, 'person', 'people'), many(details.rods, 'rod', 'rods')])),
    ...yes('Tackle', details.tackleLimits),
    ...yes('Hazards', details.hazards.join('; ')),
    ...yes('Signal', lake.phoneSignal),
  ];
}

const STEP_FREE = {
  measured_suitable: 'measured and suitable for a wheelchair',
  assisted: 'with help',
  not_suitable: 'not suitable for a wheelchair',
} as const;

const joined = (parts: readonly string[]): string => parts.filter(Boolean).join('; ');
const many = (count: number, one: string, more: string): string => `${count} ${count === 1 ? one : more}`;
const steps = (count: number | null): string =>
  count === null ? '' : count === 0 ? 'no steps' : many(count, 'step', 'steps');

/** What to say to whoever comes to help, and where they come in. */
export function emergencyLines({ details: unread, lake, fishery, number }: PegPageView): CardLine[] {
  const { emergency } = PegDetails.parse(unread);
  return [
    ...yes('Say', emergency.sayThis || `Peg ${number}, ${lake.name}, ${fishery.name}`),
    ...yes('Grid reference', emergency.gridReference),
    ...yes('Ambulance gate', emergency.ambulanceGate || lake.emergencyAccess),
    ...yes('Meet at', fishery.meetingPoint),
    ...yes('Throw line', emergency.throwLine),
    ...yes('Duty phone', fishery.dutyPhone),
  ];
}

export const SPOT_HEADING = ['', 'Spot', 'Aim', 'Wraps', 'Depth', 'Bottom', 'Grade', 'Surveyed'] as const;

/** One row of the spots' table. Depths stand at datum, since a print outlives the day's level. */
export function spotCells(spot: SpotView, number: number): string[] {
  const abbreviation = spot.bottom === null ? null : BOTTOM_ABBREVIATION[spot.bottom];
  const bottom = spot.bottom === null ? '–' : BOTTOM_WORDS[spot.bottom];
  return [
    `${number}`,
    spot.name,
    aimWords(spot),
    countWords(spot.wrapsWhole, spot.remainderM).replace(/ wraps?/, ''),
    spot.depthM === null ? '–' : depthWords(spot.depthM),
    abbreviation === null ? bottom : `${abbreviation} · ${bottom}`,
    spot.grade ?? '–',
    spot.surveyedOn === null ? '–' : dayWords(spot.surveyedOn),
  ];
}

function aimWords({ mark, bearingDeg }: SpotView): string {
  const bearing = `${Math.round(bearingDeg) % 360}°`;
  if (!mark) return bearing;
  const side =
    Math.abs(mark.offsetDeg) < 0.05
      ? ''
      : ` ${Math.abs(mark.offsetDeg)}° ${mark.offsetDeg > 0 ? 'right' : 'left'}`;
  return `${mark.code}${side} (${bearing})`;
}

/** What the marks' codes in the table stand for. */
export function markLine(spots: readonly SpotView[]): string {
  const names = new Map(spots.flatMap(({ mark }) => (mark ? [[mark.code, mark.name] as const] : [])));
  const aims = [...names].map(([code, name]) => `${code} is the ${name}.`);
  return [...aims, 'Bearings are true. Depths are below the level stated, to a tenth of a metre.'].join(' ');
}

/** Which layers this card leaves out, and why. */
export function missingLine({ layerNotes: { depth, bottom, spots } }: PegPageView): string {
  const missing = [
    { layer: 'depths', why: depth },
    { layer: 'bottom', why: bottom },
    { layer: 'spots', why: spots },
  ].filter(({ why }) => why !== null);
  const reasons = [...new Set(missing.map(({ why }) => why))];
  return missing.length === 0
    ? ''
    : `Not on this card: ${missing.map(({ layer }) => layer).join(', ')}. ${reasons.join(' ')}`;
}

/** Which sticks and which end the wraps of the table mean. */
export function stickLine(spots: readonly SpotView[]): string {
  if (spots.length === 0) return '';
  const kinds = new Map(
    spots.map((spot) => [`${stickWords(spot.stickSpacingM)}, ${REFERENCE[spot.wrapReference]}`, spot]),
  );
  const [only] = [...kinds.keys()];
  if (kinds.size === 1 && only)
    return `Wraps are ${only}. On other sticks, or on line that stretches, measure again.`;
  return `Wraps are each survey’s own: ${[...kinds.keys()].join('; ')}.`;
}

const REFERENCE = { lead_to_rod_tip: 'lead to rod tip', lead_to_clip: 'lead to reel clip' } as const;

/** The level that depths stand at, and how to have today's. */
export function levelLine({ chart, levelNow, layerNotes }: PegPageView): string {
  if (!chart || layerNotes.depth !== null) return '';
  const at = `Depths are at level ${chart.datumM.toFixed(2)} m on the lake’s board.`;
  if (!levelNow)
    return `${at} Read the board: as much as it stands higher or lower, the water is deeper or shallower.`;
  const change = depthTodayM(0, levelNow.levelM, chart.datumM);
  const way =
    Math.abs(change) < 0.005
      ? 'the same'
      : `${Math.abs(change).toFixed(2)} m ${change > 0 ? 'more' : 'less'}`;
  return `${at} When this was printed it stood at ${levelNow.boardReadsM.toFixed(2)} m: ${way} water.`;
}
