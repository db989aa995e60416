import type { GaugeBoardView, LakeView, RecordLevel } from '@mereward/shared/lakes/contract';
import {
  CastView,
  type CloseVisit,
  type KeepCast,
  type OpenVisit,
  type VisitView,
} from '@mereward/shared/surveys/contract';
import type { OutboxEntry, OutboxEvent } from '@/lib/outbox-event';
import { lakeKeys } from '@/features/lakes/api';
import { surveyKeys } from '@/features/surveys/survey-keys';

/** Within a visit nothing overtakes: its opening, its casts, what is taken back, its closing. */
export const visitGroup = (visitId: string): string => `visit:${visitId}`;

const onVisit = ({ id, lakeId }: Pick<VisitView, 'id' | 'lakeId'>) => ({
  group: visitGroup(id),
  touches: [[...surveyKeys.one(id)], [...surveyKeys.ofLake(lakeId)]],
});

/** A visit to be opened. `shown`: as the server would answer it. */
export const openingOf = (visit: OpenVisit, shown: VisitView, typed: unknown): OutboxEvent => ({
  id: visit.id,
  kind: 'open-visit',
  ...onVisit(shown),
  at: visit.startedAt,
  title: 'Visit opened',
  note: `${shown.title}, ${shown.lakeName}`,
  method: 'POST',
  path: `/lakes/${shown.lakeId}/visits`,
  body: visit,
  shown,
  again: { href: `/bank/surveys/new?lakeId=${shown.lakeId}`, typed },
});

export type CastMade = {
  visit: VisitView;
  cast: KeepCast;
  shown: CastView;
  /** All of it in words: were it refused for good, it can still be read off and made again by hand. */
  words: string;
  typed: unknown;
};

/** A cast to be kept. `shown`: with its reduction as this device works it out. */
export const keepingOf = ({ visit, cast, shown, words, typed }: CastMade): OutboxEvent => ({
  id: cast.id,
  kind: 'keep-cast',
  ...onVisit(visit),
  at: cast.observedAt,
  title: `Cast ${String(shown.seq)}`,
  note: `${visit.title}: ${words}`,
  method: 'POST',
  path: `/visits/${visit.id}/casts`,
  body: cast,
  shown,
  again: { href: `/bank/surveys/${visit.id}/cast`, typed },
});

/** A cast to be taken back that may be on the server already. */
export const undoingOf = (visit: VisitView, cast: CastView, at: string): OutboxEvent => ({
  id: `undo:${cast.id}`,
  kind: 'undo-cast',
  ...onVisit(visit),
  at,
  title: `Cast ${String(cast.seq)} taken back`,
  note: visit.title,
  method: 'DELETE',
  path: `/visits/${visit.id}/casts/${cast.id}`,
  body: null,
  shown: { castId: cast.id },
  again: null,
});

/** The lake of whatever belongs to a visit. */
export const lakeOf = ({ touches }: Pick<OutboxEvent, 'touches'>): string | null =>
  touches.find(([word, of]) => word === 'surveys' && of === 'lake')?.[2] ?? null;

/** A cast that its own visit does not take, for another visit of the same lake. It stays the same cast, made when it was. */
export const movedTo = (visit: VisitView, cast: OutboxEvent): OutboxEvent => {
  const now = onVisit(visit);
  const shown = CastView.safeParse(cast.shown).data;
  return {
    ...cast,
    group: now.group,
    touches: [...now.touches, ...cast.touches],
    note: `${visit.title}; moved from ${cast.note}`,
    path: `/visits/${visit.id}/casts`,
    shown: shown ? { ...shown, visitId: visit.id } : cast.shown,
    again: cast.again && { ...cast.again, href: `/bank/surveys/${visit.id}/cast` },
  };
};

/** A refused cast, and those that wait behind it in its visit and have not left yet: what can be moved together. */
export const castsFrom = <E extends OutboxEntry>(entries: readonly E[], first: E): E[] =>
  entries.filter(
    ({ kind, group, seq, state, attempts }) =>
      kind === 'keep-cast' &&
      group === first.group &&
      (seq === first.seq ||
        (seq > first.seq && (state === 'refused' || (state === 'waiting' && attempts === 0)))),
  );

/** A visit to be closed. */
export const closingOf = (visit: VisitView, closing: CloseVisit, typed: unknown): OutboxEvent => ({
  id: `close:${visit.id}`,
  kind: 'close-visit',
  ...onVisit(visit),
  at: closing.endedAt,
  title: 'Visit closed',
  note: visit.title,
  method: 'POST',
  path: `/visits/${visit.id}/close`,
  body: closing,
  shown: closing,
  again: { href: `/bank/surveys/${visit.id}/close`, typed },
});

const onBoard = (lake: LakeView, board: GaugeBoardView) => ({
  group: `board:${board.id}`,
  touches: [[...lakeKeys.one(lake.id)]],
  note: `${lake.details.name}, board ${board.details.code}`,
});

type LevelMade = { lake: LakeView; board: GaugeBoardView; reading: RecordLevel; typed: unknown };

/** What a board read, to be recorded. */
export const readingOf = ({ lake, board, reading, typed }: LevelMade): OutboxEvent => ({
  id: reading.id,
  kind: 'record-level',
  ...onBoard(lake, board),
  at: reading.at,
  title: `Level ${reading.levelText}`,
  method: 'POST',
  path: `/boards/${board.id}/readings`,
  body: reading,
  shown: null,
  again: { href: `/bank/levels/${lake.id}?boardId=${board.id}`, typed },
});

/** A misread level to be taken back that may be on the server already. */
export const takingBackOf = (
  { lake, board }: Pick<LevelMade, 'lake' | 'board'>,
  readingId: string,
  at: string,
): OutboxEvent => ({
  id: `undo:${readingId}`,
  kind: 'take-back-level',
  ...onBoard(lake, board),
  at,
  title: 'Level taken back',
  method: 'DELETE',
  path: `/readings/${readingId}`,
  body: null,
  shown: null,
  again: null,
});
