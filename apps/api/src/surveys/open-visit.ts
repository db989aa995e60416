import { GaugeBoard } from '@mereward/db/entities/lakes/gauge-board';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { Problem } from '@mereward/shared/problems/problem';
import type { OpenVisit, VisitView } from '@mereward/shared/surveys/contract';
import { isDeepStrictEqual } from 'node:util';
import { accountOf, type Ctx } from '../ctx';
import { insertOnce, plain } from '../repeat';
import { refuseWrongClock } from '../wrong-clock';
import { CLOCK_OUT_MS } from './cast-time';
import { lakeFor } from './find-visit';
import { refuseWrongLead } from './kit-lead';
import { visitView } from './visit-view';

/** Opens a survey visit. Sent twice, it is opened once. */
export async function openVisit(ctx: Ctx, lakeId: string, input: OpenVisit): Promise<VisitView> {
  const { tx, actor, now } = ctx;
  const lake = await lakeFor(ctx, lakeId, 'keep');
  const visit = tx.create(SurveyVisit, {
    ...input,
    lakeId,
    surveyorId: accountOf(actor),
    startedAt: new Date(input.startedAt),
    endedAt: null,
    gaugeEndM: null,
    reducedWith: null,
    version: 1,
    receivedAt: now,
  });
  const known = await tx.findOneBy(SurveyVisit, { id: input.id });
  if (known) return visitView(ctx, { visit: sameVisit(known, visit), lake });
  const { startedAt: at } = visit;
  refuseWrongClock({ at, now, pointer: '/startedAt', what: 'visit', fastMs: CLOCK_OUT_MS });
  await refuseWrongLead(tx, lake.fisheryId, input.kit);
  const board = await tx.findOneBy(GaugeBoard, { id: input.boardId });
  if (board?.lakeId !== lakeId)
    throw wrongBoard('That gauge board is not on this lake. Choose one of its boards.');
  if (!board.isDatumBoard)
    throw wrongBoard(
      'Depths are brought to chart datum by the board that datum is read on. Read that board.',
    );
  if (await insertOnce(tx, SurveyVisit, visit)) return visitView(ctx, { visit, lake });
  const meanwhile = await tx.findOneByOrFail(SurveyVisit, { id: input.id }); // sent twice at once
  return visitView(ctx, { visit: sameVisit(meanwhile, visit), lake });
}

const wrongBoard = (detail: string): Problem =>
  new Problem('invalid', 'This board can’t level the visit', { errors: [{ pointer: '/boardId', detail }] });

/** What was sent at opening, to tell a repeat from another visit under the same id. */
function opening(visit: SurveyVisit): unknown[] {
  const { lakeId, surveyorId, boardId, title, competence, startedAt, gaugeStartM } = visit;
  return [lakeId, surveyorId, boardId, title, competence, startedAt.getTime(), gaugeStartM];
}

function sameVisit(known: SurveyVisit, sent: SurveyVisit): SurveyVisit {
  if (known.lakeId !== sent.lakeId)
    throw new Problem('not-found', 'There is no such survey visit on this lake');
  if (isDeepStrictEqual(plain(opening(known)), plain(opening(sent)))) return known;
  throw new Problem('conflict', 'A visit with this id was opened with other words', {
    detail: 'Nothing was changed. Open the visit that is there, or begin a new one.',
  });
}
