import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { FisheryRole } from '@mereward/db/entities/fisheries/fishery-role';
import type { ChangeFishery, FisheryView, MakeFishery } from '@mereward/shared/fisheries/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { accountOf, type Actor, type Ctx } from '../ctx';
import { insertOnce, mustRepeat, staleVersion } from '../repeat';
import { actorNow, admit, fisheryFound } from './found';
import {
  givableRoles,
  mayAddLakes,
  mayChangeFishery,
  mayReadFeels,
  maySeeGateCode,
  maySeePeople,
} from './policy';

/** Makes a fishery; whoever makes it is its first owner. */
export async function makeFishery(ctx: Ctx, { id, details }: MakeFishery): Promise<FisheryView> {
  const { tx, actor, now } = ctx;
  const createdBy = accountOf(actor);
  const { name, zone } = details;
  const row = { id, name, zone, details, version: 1, createdBy, createdAt: now };
  if (await insertOnce(tx, Fishery, row)) {
    await tx.insert(FisheryRole, {
      fisheryId: id,
      accountId: createdBy,
      role: 'owner',
      givenBy: null,
      givenAt: now,
    });
    return fisheryView(await actorNow(ctx, id), row);
  }
  const kept = await fisheryFound(tx, id);
  if (kept.createdBy !== createdBy) throw new Problem('not-found', 'There is no such fishery');
  mustRepeat({ by: createdBy, content: details }, { by: kept.createdBy, content: kept.details });
  return fisheryView(await actorNow(ctx, id), kept);
}

export async function changeFishery(ctx: Ctx, id: string, input: ChangeFishery): Promise<FisheryView> {
  const { tx, actor } = ctx;
  await fisheryFound(tx, id);
  admit(actor, id, mayChangeFishery(actor, id));
  const { details, version } = input;
  const { name, zone } = details;
  const { affected } = await tx.update(
    Fishery,
    { id, version },
    { name, zone, details, version: version + 1 },
  );
  if (affected !== 1) throw staleVersion();
  return fisheryView(actor, await fisheryFound(tx, id));
}

/** What this reader is told of a fishery. */
export function fisheryView(
  actor: Actor,
  { id, details, version }: Pick<Fishery, 'id' | 'details' | 'version'>,
): FisheryView {
  return {
    id,
    details: maySeeGateCode(actor, id) ? details : { ...details, gateCode: '' },
    version,
    may: {
      change: mayChangeFishery(actor, id),
      invite: givableRoles(actor, id).length > 0,
      addLakes: mayAddLakes(actor, id),
      seePeople: maySeePeople(actor, id),
      readFeels: mayReadFeels(actor, id),
    },
  };
}
