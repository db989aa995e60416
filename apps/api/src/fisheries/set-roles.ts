import { FisheryRole } from '@mereward/db/entities/fisheries/fishery-role';
import type { Role } from '@mereward/shared/accounts/contract';
import { ROLE_WORDS } from '@mereward/shared/accounts/role-words';
import type { PeopleView, SetRoles } from '@mereward/shared/fisheries/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { accountOf, type Ctx } from '../ctx';
import { actorNow, admit, heldBy, lockRoles, type RoleHolder } from './found';
import { givableRoles } from './policy';
import { peopleView } from './queries';

/** Sets the whole list of one person's roles. An empty list takes them out; invite them to have them back. */
export async function setRoles(ctx: Ctx, whose: RoleHolder, input: SetRoles): Promise<PeopleView> {
  const { tx, now } = ctx;
  const { fisheryId } = whose;
  await lockRoles(tx, fisheryId);
  const actor = await actorNow(ctx, fisheryId);
  const givable = givableRoles(actor, fisheryId);
  admit(actor, fisheryId, givable.length > 0);
  const before = await heldBy(tx, whose);
  if (before.size === 0)
    throw new Problem('not-found', 'This person holds no role here', {
      detail: 'Invite them by mail first.',
    });
  const wished = new Set(input.roles);
  const added = [...wished].filter((role) => !before.has(role));
  const taken = [...before].filter((role) => !wished.has(role));
  refuseBeyond([...added, ...taken], givable);
  for (const role of taken) await tx.delete(FisheryRole, { ...whose, role });
  const givenBy = accountOf(actor);
  for (const role of added) await tx.insert(FisheryRole, { ...whose, role, givenBy, givenAt: now });
  await keepAnOwner(ctx, fisheryId);
  const after = await actorNow(ctx, fisheryId);
  if (givableRoles(after, fisheryId).length > 0) return peopleView({ ...ctx, actor: after }, fisheryId);
  return { people: [], invitations: [], mayGive: [] }; // they took their own right to see the others
}

function refuseBeyond(changed: readonly Role[], givable: readonly Role[]): void {
  const beyond = changed.find((role) => !givable.includes(role));
  if (beyond)
    throw new Problem('forbidden', `Your roles don’t allow you to give or take “${ROLE_WORDS[beyond]}”`, {
      detail: 'Nothing was changed. An owner can do it.',
    });
}

async function keepAnOwner({ tx }: Ctx, fisheryId: string): Promise<void> {
  if (await tx.existsBy(FisheryRole, { fisheryId, role: 'owner' })) return;
  throw new Problem('conflict', 'A fishery keeps at least one owner', {
    detail: 'Nothing was changed. Make somebody else an owner first.',
  });
}
