import { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { WaterArea } from '@mereward/db/entities/lakes/water-area';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import { toPlane } from '@mereward/shared/geometry/plane';
import { signedAreaM2 } from '@mereward/shared/geometry/polygon';
import type { PutWaterArea, WaterAreaDetails } from '@mereward/shared/lakes/peg-water-contract';
import { pegWaters } from '@mereward/shared/lakes/peg-waters';
import { Problem } from '@mereward/shared/problems/problem';
import type { EntityManager } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, mustRepeat, refuseFaults, staleVersion } from '../repeat';
import { findLake, originOfLake } from './found';
import { LAKE_CHANGERS } from './policy';

type At = { lakeId: string; areaId: string };

/** A lake needs no more borders than this, and each is laid over the whole water. */
const MOST_AREAS = 200;

/** Makes (version null) or changes a drawn area and lays it on top of the others. */
export async function putWaterArea(ctx: Ctx, { lakeId, areaId }: At, input: PutWaterArea): Promise<void> {
  const { tx, actor, now } = ctx;
  const lake = await heldLake(ctx, lakeId);
  const createdBy = accountOf(actor);
  const { details, version } = input;
  await refuse(tx, lake, details);
  const row = { pegId: details.pegId, place: await nextPlace(tx, lakeId), details };
  if (version !== null) {
    const at = { id: areaId, lakeId };
    if (!(await tx.existsBy(WaterArea, at))) throw notFound('drawn area');
    const { affected } = await tx.update(WaterArea, { ...at, version }, { ...row, version: version + 1 });
    if (affected !== 1) throw staleVersion();
    return;
  }
  const kept = await tx.findOneBy(WaterArea, { id: areaId });
  if (!kept) {
    await refuseTooMany(tx, lakeId);
    const made = { id: areaId, lakeId, ...row, version: 1, createdBy, createdAt: now };
    if (await insertOnce(tx, WaterArea, made)) return;
    throw notFound('drawn area'); // another lake took the id this instant
  }
  if (kept.lakeId !== lakeId) throw notFound('drawn area');
  mustRepeat({ by: createdBy, content: details }, { by: kept.createdBy, content: kept.details });
}

/** Takes a drawn area away. Taken away twice, it is gone once. */
export async function removeWaterArea(ctx: Ctx, { lakeId, areaId }: At): Promise<void> {
  await heldLake(ctx, lakeId);
  await ctx.tx.delete(WaterArea, { id: areaId, lakeId });
}

/** The lake, held until the deed is done: of two areas drawn at once one is the later, and lies on top. */
async function heldLake({ tx, actor }: Ctx, lakeId: string): Promise<Lake> {
  const lake = await findLake(tx, lakeId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'lake' }, LAKE_CHANGERS);
  return tx.findOneOrFail(Lake, { where: { id: lakeId }, lock: { mode: 'for_no_key_update' } });
}

const nextPlace = async (tx: EntityManager, lakeId: string): Promise<number> =>
  ((await tx.maximum(WaterArea, 'place', { lakeId })) ?? 0) + 1;

async function refuseTooMany(tx: EntityManager, lakeId: string): Promise<void> {
  if ((await tx.countBy(WaterArea, { lakeId })) < MOST_AREAS) return;
  throw new Problem('conflict', `This lake has ${MOST_AREAS} drawn areas already`, {
    detail: 'Take away those that lie under others, then draw this one again.',
  });
}

async function refuse(tx: EntityManager, lake: Lake, { pegId, ring }: WaterAreaDetails): Promise<void> {
  if (pegId !== null && !(await tx.existsBy(Peg, { id: pegId, lakeId: lake.id })))
    refuseFaults([{ field: 'pegId', words: 'This lake has no such peg. Choose one of its own.' }]);
  const origin = originOfLake(lake);
  const drawn = ring.map((place) => toPlane(origin, place));
  if (Math.abs(signedAreaM2(drawn)) < 1)
    refuseFaults([{ field: 'ring', words: 'The area is smaller than a square metre: draw round it.' }]);
  const outline = outlineInPlane(origin, lake.details.outline);
  const { area } = pegWaters(outline, [], [{ peg: null, ring: drawn }]);
  if (!area.includes(0))
    refuseFaults([
      { field: 'ring', words: 'No water of this lake lies in the area. Draw it over the water.' },
    ]);
}
