import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { originOf, outlineFromRings, type OutlineReading } from '@mereward/shared/geometry/outline';
import type { ChangeLake, LakeDetails, MakeLake } from '@mereward/shared/lakes/contract';
import { lakePlaceFaults } from '@mereward/shared/lakes/lake-places';
import { Problem } from '@mereward/shared/problems/problem';
import { orConflict } from '../conflict';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, mustRepeat, refuseFaults, staleVersion } from '../repeat';
import { findLake, originOfLake } from './found';
import { LAKE_CHANGERS } from './policy';

const NAME_TAKEN = 'Another lake of this fishery has this name';

/** Makes a lake. The origin of its plane is set here and kept for ever, so that no position ever moves. */
export async function makeLake(ctx: Ctx, fisheryId: string, input: MakeLake): Promise<void> {
  const { tx, actor, now } = ctx;
  if (!(await tx.existsBy(Fishery, { id: fisheryId }))) throw notFound('fishery');
  allowOnly(actor, { fisheryId, what: 'fishery' }, LAKE_CHANGERS);
  const { details, areaM2 } = checked(input.details);
  const [originLon, originLat] = originOf(details.outline);
  refuseFaults(
    lakePlaceFaults(details.places ?? [], { origin: [originLon, originLat], outline: details.outline }),
  );
  const createdBy = accountOf(actor);
  const made = await insertOnce(tx, Lake, {
    id: input.id,
    fisheryId,
    name: details.name,
    details,
    originLon,
    originLat,
    areaM2,
    datumM: details.datumM,
    version: 1,
    createdBy,
    createdAt: now,
  });
  if (made) return;
  const kept = await tx.findOneBy(Lake, { id: input.id });
  if (!kept) throw new Problem('conflict', NAME_TAKEN, { detail: 'Choose another name.' });
  if (kept.fisheryId !== fisheryId) throw notFound('lake');
  mustRepeat({ by: createdBy, content: details }, { by: kept.createdBy, content: kept.details });
}

/**
 * Changes a lake. Charts already published keep the datum and the outline they were made with; a change that says nothing
 * of places, as an older client's, leaves them.
 */
export async function changeLake({ tx, actor }: Ctx, lakeId: string, input: ChangeLake): Promise<void> {
  const lake = await findLake(tx, lakeId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'lake' }, LAKE_CHANGERS);
  const { places = lake.details.places } = input.details;
  const { details, areaM2 } = checked({ ...input.details, ...(places ? { places } : {}) });
  refuseFaults(lakePlaceFaults(places ?? [], { origin: originOfLake(lake), outline: details.outline }));
  const change = { name: details.name, details, areaM2, datumM: details.datumM, version: input.version + 1 };
  const { affected } = await orConflict(
    tx.update(Lake, { id: lakeId, version: input.version }, change),
    'lake_name',
    NAME_TAKEN,
  );
  if (affected !== 1) throw staleVersion();
}

/** The details with their outline as it can be kept: mended where only one mending makes sense, else refused. */
function checked(details: LakeDetails): { details: LakeDetails; areaM2: number } {
  const { outline, areaM2, findings }: OutlineReading = outlineFromRings(details.outline.coordinates);
  if (outline && areaM2 !== null) return { details: { ...details, outline }, areaM2 };
  const refused = findings.filter(({ kind }) => kind === 'refused');
  refuseFaults(refused.map(({ words }) => ({ field: 'outline', words })));
  throw new Problem('invalid', 'The outline encloses no water', {
    detail: 'Nothing was saved. Draw the shore again, all round the water.',
  });
}
