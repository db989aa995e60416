import { Peg } from '@mereward/db/entities/lakes/peg';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import type { ChangePeg, MakePeg, OrderPegs, PegDetails } from '@mereward/shared/lakes/contract';
import { overheadDispute } from '@mereward/shared/lakes/lake-places';
import { pegFaults } from '@mereward/shared/lakes/peg-rules';
import { Problem } from '@mereward/shared/problems/problem';
import { orConflict } from '../conflict';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, mustRepeat, refuseFaults, staleVersion } from '../repeat';
import { findLake, findPeg, originOfLake } from './found';
import { PEG_CHANGERS } from './policy';

const NUMBER_TAKEN = 'Another peg of this lake has this number';

/** Makes a peg, last in walking order. */
export async function makePeg({ tx, actor, now }: Ctx, lakeId: string, input: MakePeg): Promise<void> {
  const lake = await findLake(tx, lakeId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'lake' }, PEG_CHANGERS);
  refuse(input.details, lake);
  const createdBy = accountOf(actor);
  const last = await tx.maximum(Peg, 'walkingOrder', { lakeId });
  const made = await insertOnce(tx, Peg, {
    id: input.id,
    lakeId,
    number: input.details.number,
    walkingOrder: (last ?? 0) + 1,
    details: input.details,
    version: 1,
    createdBy,
    createdAt: now,
  });
  if (made) return;
  const kept = await tx.findOneBy(Peg, { id: input.id });
  if (!kept) throw new Problem('conflict', NUMBER_TAKEN, { detail: 'Give this peg another number.' });
  if (kept.lakeId !== lakeId) throw notFound('peg');
  mustRepeat({ by: createdBy, content: input.details }, { by: kept.createdBy, content: kept.details });
}

export async function changePeg({ tx, actor }: Ctx, pegId: string, input: ChangePeg): Promise<void> {
  const { lake } = await findPeg(tx, pegId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'peg' }, PEG_CHANGERS);
  refuse(input.details, lake);
  const change = { number: input.details.number, details: input.details, version: input.version + 1 };
  const { affected } = await orConflict(
    tx.update(Peg, { id: pegId, version: input.version }, change),
    'peg_number',
    NUMBER_TAKEN,
  );
  if (affected !== 1) throw staleVersion();
}

/** Sets the order in which the pegs are walked; every peg of the lake is named once. */
export async function orderPegs({ tx, actor }: Ctx, lakeId: string, { pegIds }: OrderPegs): Promise<void> {
  const lake = await findLake(tx, lakeId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'lake' }, PEG_CHANGERS);
  const pegs = await tx.find(Peg, { select: { id: true }, where: { lakeId } });
  const named = new Set(pegIds);
  if (named.size !== pegIds.length || named.size !== pegs.length || pegs.some(({ id }) => !named.has(id)))
    throw new Problem('invalid', 'The order must name every peg of this lake once', {
      detail: 'A peg may have been added meanwhile: reload and put them in order again.',
      errors: [{ pointer: '/pegIds', detail: `This lake has ${pegs.length} pegs.` }],
    });
  await tx.query(
    `UPDATE peg SET walking_order = walked.place
       FROM unnest($1::uuid[]) WITH ORDINALITY AS walked (id, place)
      WHERE peg.id = walked.id AND peg.lake_id = $2`,
    [pegIds, lakeId],
  );
}

/** A peg's sheet may say more of an overhead line than the lake's drawing, and never less. */
function refuse(details: PegDetails, lake: Lake): void {
  const origin = originOfLake(lake);
  const { outline, places } = lake.details;
  const dispute = overheadDispute(details, { places, origin });
  refuseFaults([
    ...pegFaults(details, { origin, outline }),
    ...(dispute === null ? [] : [{ field: 'overheadLine/kind', words: dispute }]),
  ]);
}
