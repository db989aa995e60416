import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Mark } from '@mereward/db/entities/lakes/mark';
import { geodesicBetween } from '@mereward/shared/geometry/geodesic';
import type { PutMark } from '@mereward/shared/lakes/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { orConflict } from '../conflict';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, mustRepeat, refuseFaults, staleVersion } from '../repeat';
import { findLake, originOfLake } from './found';
import { PEG_CHANGERS } from './policy';

const CODE_TAKEN = 'Another mark of this lake has this code';

type Place = { lakeId: string; markId: string };

/** Makes (version null) or changes a far-bank mark. */
export async function putMark(ctx: Ctx, { lakeId, markId }: Place, input: PutMark): Promise<void> {
  const { tx, actor } = ctx;
  const lake = await findLake(tx, lakeId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'lake' }, PEG_CHANGERS);
  refuseFaults(farFaults(lake, input.details.position, 'mark'));
  if (input.version === null) return makeMark(ctx, { lakeId, markId }, input);
  if (!(await tx.existsBy(Mark, { id: markId, lakeId }))) throw notFound('mark');
  const change = { code: input.details.code, details: input.details, version: input.version + 1 };
  const { affected } = await orConflict(
    tx.update(Mark, { id: markId, lakeId, version: input.version }, change),
    'mark_code',
    CODE_TAKEN,
  );
  if (affected !== 1) throw staleVersion();
}

async function makeMark({ tx, actor, now }: Ctx, place: Place, { details }: PutMark): Promise<void> {
  const createdBy = accountOf(actor);
  const { lakeId, markId: id } = place;
  const row = { id, lakeId, code: details.code, details, version: 1, createdBy, createdAt: now };
  if (await insertOnce(tx, Mark, row)) return;
  const kept = await tx.findOneBy(Mark, { id });
  if (!kept) throw new Problem('conflict', CODE_TAKEN, { detail: 'Give this mark another code.' });
  if (kept.lakeId !== lakeId) throw notFound('mark');
  mustRepeat({ by: createdBy, content: details }, { by: kept.createdBy, content: kept.details });
}

/** A church tower may serve as a mark from far off; beyond this nobody on the bank sees it. */
const FAR_M = 10_000;

/** A place that can't belong to this lake, most often because longitude and latitude were swapped. */
export function farFaults(lake: Lake, position: [number, number], what: string) {
  const { distanceM } = geodesicBetween(originOfLake(lake), position);
  if (distanceM <= FAR_M) return [];
  const words = `This ${what} would lie ${Math.round(distanceM / 1000)} km from the lake. Look whether longitude and latitude are the right way round.`;
  return [{ field: 'position', words }];
}
