import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { FisheryRole } from '@mereward/db/entities/fisheries/fishery-role';
import { Invitation } from '@mereward/db/entities/fisheries/invitation';
import type { AccountView } from '@mereward/shared/accounts/contract';
import { mailedLink } from '@mereward/shared/accounts/mailed-links';
import { ROLE_WORDS } from '@mereward/shared/accounts/role-words';
import type { InvitationShown, InvitationView, Invite } from '@mereward/shared/fisheries/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { IsNull } from 'typeorm';
import { accountView } from '../accounts/queries';
import { newSecret, secretHash } from '../accounts/secret-token';
import { accountOf, type Ctx } from '../ctx';
import { invitationMessage } from '../mail/messages';
import { post } from '../mail/send';
import { actorNow, admit, lockRoles } from './found';
import { givableRoles } from './policy';

const OPEN_DAYS = 14;

/** Invites an address to a role by mail. Inviting it to the same again ends the earlier link and sends a new one. */
export async function invite(ctx: Ctx, fisheryId: string, input: Invite): Promise<InvitationView> {
  const { tx, now, publicUrl } = ctx;
  const fishery = await lockRoles(tx, fisheryId);
  const actor = await actorNow(ctx, fisheryId);
  admit(actor, fisheryId, givableRoles(actor, fisheryId).includes(input.role));
  const invitedBy = accountOf(actor);
  await refuseHeld(ctx, fisheryId, input);
  await tx.update(
    Invitation,
    { fisheryId, ...input, acceptedAt: IsNull(), withdrawnAt: IsNull() },
    { withdrawnAt: now },
  );
  const { token, hash } = newSecret();
  const id = randomUUID();
  const expiresAt = new Date(now.getTime() + OPEN_DAYS * 24 * 3600 * 1000);
  await tx.insert(Invitation, {
    id,
    fisheryId,
    ...input,
    tokenHash: hash,
    invitedBy,
    createdAt: now,
    expiresAt,
  });
  const { name } = await tx.findOneByOrFail(Account, { id: invitedBy });
  const words = {
    email: input.email,
    fishery: fishery.name,
    role: ROLE_WORDS[input.role],
    invitedBy: name,
    days: OPEN_DAYS,
  };
  await post(ctx, invitationMessage(words, mailedLink(publicUrl, 'invitation', token)));
  return { id, ...input, state: 'waiting', expiresAt: expiresAt.toISOString() };
}

async function refuseHeld({ tx }: Ctx, fisheryId: string, { email, role }: Invite): Promise<void> {
  const account = await tx.findOneBy(Account, { email });
  if (!account || !(await tx.existsBy(FisheryRole, { fisheryId, accountId: account.id, role }))) return;
  throw new Problem('conflict', `This person is ${ROLE_WORDS[role]} here already`, {
    detail: 'Nothing was sent.',
  });
}

/** Withdraws an invitation that nobody has taken up; its link opens nothing any more. */
export async function withdrawInvitation(ctx: Ctx, fisheryId: string, id: string): Promise<void> {
  const { tx, now } = ctx;
  await lockRoles(tx, fisheryId);
  const actor = await actorNow(ctx, fisheryId);
  const row = await tx.findOneBy(Invitation, { id, fisheryId });
  admit(actor, fisheryId, givableRoles(actor, fisheryId).length > 0);
  if (!row) throw new Problem('not-found', 'There is no such invitation');
  admit(actor, fisheryId, givableRoles(actor, fisheryId).includes(row.role));
  if (row.acceptedAt)
    throw new Problem('conflict', 'This invitation was taken up already', {
      detail: 'Take the role away under the person’s name instead.',
    });
  if (!row.withdrawnAt) await tx.update(Invitation, id, { withdrawnAt: now });
}

const closed = () =>
  new Problem('not-found', 'This invitation is not open any more', {
    detail: 'It was taken up, withdrawn or has run out. Ask the fishery for a new one.',
  });

/** What an invitation says to whoever holds its link. */
export async function invitationShown({ tx, now }: Ctx, token: string): Promise<InvitationShown> {
  const row = await tx.findOneBy(Invitation, { tokenHash: secretHash(token) });
  if (!row || row.acceptedAt || row.withdrawnAt || row.expiresAt <= now) throw closed();
  const fishery = await tx.findOneByOrFail(Fishery, { id: row.fisheryId });
  return { fisheryName: fishery.name, role: row.role, email: row.email };
}

/** Takes an invitation up for the account that asks; taken up by the same one twice, it is done already. */
export async function acceptInvitation(ctx: Ctx, token: string): Promise<AccountView> {
  const { tx, actor, now } = ctx;
  const accountId = accountOf(actor);
  const row = await tx.findOne(Invitation, {
    where: { tokenHash: secretHash(token) },
    lock: { mode: 'pessimistic_write' },
  });
  if (!row || row.withdrawnAt || (!row.acceptedAt && row.expiresAt <= now)) throw closed();
  const account = await tx.findOneByOrFail(Account, { id: accountId });
  if (account.email !== row.email)
    throw new Problem('forbidden', 'This invitation is for another address', {
      detail: `You are signed in as ${account.email}. Sign in with the address it was mailed to.`,
    });
  if (!row.acceptedAt) {
    const { fisheryId, role, invitedBy } = row;
    await tx.update(Invitation, row.id, { acceptedAt: now });
    await tx
      .createQueryBuilder()
      .insert()
      .into(FisheryRole)
      .values({ fisheryId, accountId, role, givenBy: invitedBy, givenAt: now })
      .orIgnore()
      .execute();
  }
  return accountView(tx, accountId);
}
