import { GaugeBoard } from '@mereward/db/entities/lakes/gauge-board';
import type { PutBoard } from '@mereward/shared/lakes/contract';
import { boardFaults } from '@mereward/shared/lakes/water-level';
import { Problem } from '@mereward/shared/problems/problem';
import { orConflict } from '../conflict';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, mustRepeat, refuseFaults, staleVersion } from '../repeat';
import { findLake } from './found';
import { farFaults } from './marks';
import { PEG_CHANGERS } from './policy';

const CODE_TAKEN = 'Another board of this lake has this code';

type Place = { lakeId: string; boardId: string };

/** Makes (version null) or changes a gauge board. One board of a lake is the one its chart datum is read on. */
export async function putBoard(ctx: Ctx, place: Place, input: PutBoard): Promise<void> {
  const { tx, actor } = ctx;
  const lake = await findLake(tx, place.lakeId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'lake' }, PEG_CHANGERS);
  refuseFaults([...farFaults(lake, input.details.position, 'board'), ...boardFaults(input.details)]);
  await refuseSecondDatumBoard(ctx, place, input);
  if (input.version === null) await makeBoard(ctx, place, input);
  else await changeBoard(ctx, place, { ...input, version: input.version });
}

async function refuseSecondDatumBoard(
  { tx }: Ctx,
  { lakeId, boardId }: Place,
  input: PutBoard,
): Promise<void> {
  if (!input.details.isDatumBoard) return;
  const other = await tx.findOneBy(GaugeBoard, { lakeId, isDatumBoard: true });
  if (!other || other.id === boardId) return;
  throw new Problem('conflict', `${other.code} is the board this lake’s chart datum is read on`, {
    detail: `There is one. Change ${other.code} first; the datum then has to be given as this board reads.`,
  });
}

async function makeBoard({ tx, actor, now }: Ctx, place: Place, { details }: PutBoard): Promise<void> {
  const { lakeId, boardId: id } = place;
  const createdBy = accountOf(actor);
  const made = await insertOnce(tx, GaugeBoard, {
    id,
    lakeId,
    code: details.code,
    details,
    isDatumBoard: details.isDatumBoard,
    version: 1,
    createdBy,
    createdAt: now,
  });
  if (made) return;
  const kept = await tx.findOneBy(GaugeBoard, { id });
  if (!kept) throw new Problem('conflict', CODE_TAKEN, { detail: 'Give this board another code.' });
  if (kept.lakeId !== lakeId) throw notFound('gauge board');
  mustRepeat({ by: createdBy, content: details }, { by: kept.createdBy, content: kept.details });
}

async function changeBoard({ tx }: Ctx, place: Place, input: PutBoard & { version: number }): Promise<void> {
  const { lakeId, boardId: id } = place;
  const { details, version } = input;
  if (!(await tx.existsBy(GaugeBoard, { id, lakeId }))) throw notFound('gauge board');
  const change = { code: details.code, details, isDatumBoard: details.isDatumBoard, version: version + 1 };
  const update = tx.update(GaugeBoard, { id, lakeId, version }, change);
  const { affected } = await orConflict(
    orConflict(update, 'gauge_board_code', CODE_TAKEN),
    'gauge_board_datum',
    'Another board became the datum board meanwhile',
  );
  if (affected !== 1) throw staleVersion();
}
