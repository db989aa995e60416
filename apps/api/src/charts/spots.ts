import { Spot } from '@mereward/db/entities/charts/spot';
import type { PutSpot } from '@mereward/shared/charts/contract';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import { toPlane } from '@mereward/shared/geometry/plane';
import { insideOutline } from '@mereward/shared/geometry/polygon';
import { distanceToShoreM } from '@mereward/shared/geometry/shore-distance';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Problem } from '@mereward/shared/problems/problem';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { findPeg, originOfLake } from '../lakes/found';
import { CHART_BUILDERS } from '../lakes/policy';
import { insertOnce, mustRepeat, staleVersion } from '../repeat';

/** Makes a spot of a peg, or changes it when its version is sent along. */
export async function putSpot(
  ctx: Ctx,
  at: { pegId: string; spotId: string },
  input: PutSpot,
): Promise<{ version: number }> {
  const { tx, actor, now } = ctx;
  const { lake } = await findPeg(tx, at.pegId);
  const createdBy = accountOf(actor);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'peg' }, CHART_BUILDERS);
  refuseOnLand(lake, input.details.position);
  const { details } = input;
  if (input.version === null) {
    const made = await insertOnce(tx, Spot, {
      id: at.spotId,
      pegId: at.pegId,
      details,
      version: 1,
      createdBy,
      createdAt: now,
    });
    if (made) return { version: 1 };
    const kept = await tx.findOneBy(Spot, { id: at.spotId });
    if (kept?.pegId !== at.pegId) throw notFound('spot');
    mustRepeat({ by: createdBy, content: details }, { by: kept.createdBy, content: kept.details });
    return { version: kept.version };
  }
  const kept = await tx.findOne(Spot, {
    where: { id: at.spotId, pegId: at.pegId },
    lock: { mode: 'pessimistic_write' },
  });
  if (!kept) throw notFound('spot');
  if (kept.version !== input.version) throw staleVersion();
  await tx.update(Spot, { id: at.spotId }, { details, version: kept.version + 1 });
  return { version: kept.version + 1 };
}

function refuseOnLand(lake: Lake, position: [number, number]): void {
  const outline = outlineInPlane(originOfLake(lake), lake.details.outline);
  const place = toPlane(originOfLake(lake), position);
  if (insideOutline(outline, place)) return;
  const detail = `This place is ${distanceToShoreM(outline, place).toFixed(1)} m outside the water. Choose one on it.`;
  throw new Problem('invalid', 'A spot lies on the water', {
    errors: [{ pointer: '/details/position', detail }],
  });
}

/** Takes a spot away. Taken away twice, it is gone once. */
export async function removeSpot({ tx, actor }: Ctx, at: { pegId: string; spotId: string }): Promise<void> {
  const { lake } = await findPeg(tx, at.pegId);
  accountOf(actor);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'peg' }, CHART_BUILDERS);
  await tx.delete(Spot, { id: at.spotId, pegId: at.pegId });
}
