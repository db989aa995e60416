import { ageWords } from '@mereward/shared/charts/chart-age';
import { BOTTOM_WORDS } from '@mereward/shared/charts/bottom-words';
import { eventWords } from '@mereward/shared/surveys/bottom-ending';
import { dayWords } from '@mereward/shared/time/civil-day';
import type { BottomEventKind, EventEnds } from '@mereward/shared/surveys/bottom-event-contract';
import type { BuiltReport } from '../built';
import type { PaperBlock } from '../../pdf/paper-pages';
import type { SurveyReport } from './report-document';

/** An event of the lake as a report tells it; `counted` says what it took out of this very chart. */
export type ToldEvent = {
  id: string;
  kind: BottomEventKind;
  area: unknown;
  happenedOn: string;
  ends: readonly EventEnds[];
  note: string;
};

/** What an angler told, as far as the report says it: where, and on what day it was taken up. Nobody's name. */
export type ToldReport = BuiltReport & {
  peg: string;
  place: string;
  acceptedOn: string | null;
  takenBackOn: string | null;
};

const ENDS: Readonly<Record<EventEnds, string>> = {
  cover: 'weed, leaves and snags',
  substrate: 'the bottom’s kind',
  depth: 'depths',
};

/** What dates the chart: what it left out for an event, and what has happened since its last day on the water. */
export function eventsBlocks({ chart, built, events, ageNow }: SurveyReport): PaperBlock[] {
  const since = events.filter(({ happenedOn }) => chart.surveyedTo !== null && happenedOn > chart.surveyedTo);
  const taken = built.ended.map(({ words, cover, substrate, depth }) => [
    words,
    [
      cover > 0 ? `${ENDS.cover} of ${cover}` : '',
      substrate > 0 ? `${ENDS.substrate} of ${substrate}` : '',
      depth > 0 ? `${ENDS.depth} of ${depth}` : '',
    ]
      .filter(Boolean)
      .join(', '),
  ]);
  const told = since.map((event) => [
    eventWords(event),
    event.ends.map((each) => ENDS[each]).join(', '),
    event.note,
  ]);
  return [
    words(ageNow === null ? 'The chart has no day yet.' : `Today: ${ageWords(ageNow.age, ageNow.changes)}.`),
    ...(taken.length === 0
      ? [words('No event before it was built took anything out of this chart.')]
      : [
          words('Recorded before the chart was built. Of casts made earlier it no longer counts:'),
          table(['Event', 'No longer counts (casts)'], [0.55, 0.45], taken),
        ]),
    ...(told.length === 0
      ? [words('Nothing is recorded as having happened to the bottom since the last day of the survey.')]
      : [
          words('Happened since the last day of the survey, so the chart no longer tells of it:'),
          table(['Event', 'Ends what is known of', 'Note'], [0.4, 0.3, 0.3], told),
        ]),
  ];
}

/** What anglers found otherwise and the fishery accepted: each a point of the chart with a grade of its own. */
export function acceptedBlocks({ accepted }: SurveyReport): PaperBlock[] {
  if (accepted.length === 0) return [words('No report of an angler stands in this chart.')];
  const rows = accepted.map((each) => [
    each.peg,
    dayWords(each.observedOn),
    each.place,
    each.depthM === null ? '–' : each.depthM.toFixed(2),
    each.sigmaM === null ? '–' : each.sigmaM.toFixed(2),
    each.bottom === 'unknown' ? 'not known' : BOTTOM_WORDS[each.bottom],
    each.grade,
    [
      each.acceptedOn === null ? '' : dayWords(each.acceptedOn),
      each.takenBackOn === null ? '' : `taken back ${dayWords(each.takenBackOn)}`,
    ]
      .filter(Boolean)
      .join('; '),
  ]);
  return [
    words(
      'What anglers found otherwise and the office or the head bailiff accepted. Each stands beside the casts with an error and a grade of its own; nobody decides a report of their own.',
    ),
    table(
      ['Peg', 'Found on', 'Where', 'At datum m', '± m', 'Bottom', 'Grade', 'Accepted'],
      [0.07, 0.14, 0.29, 0.1, 0.07, 0.12, 0.07, 0.14],
      rows,
    ),
  ];
}

const words = (text: string): PaperBlock => ({ kind: 'words', words: text });
const table = (
  heading: readonly string[],
  shares: readonly number[],
  rows: readonly (readonly string[])[],
): PaperBlock => ({ kind: 'table', table: { heading, shares, rows } });
