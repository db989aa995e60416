import { Account } from '@mereward/db/entities/accounts/account';
import { Session } from '@mereward/db/entities/accounts/session';
import { Problem } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { IsNull, LessThan, type EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { newSecret, secretHash } from './secret-token';

/** A sign-in lasts this long after its last use: many members come back every other month. */
export const SIGNED_IN_FOR_S = 90 * 24 * 3600;

/**
 * A refresh token works once. For this long after, the same one still brings a new one: its answer may have been
 * lost at the bank, or two windows may have asked at once. Later it can only be a copy, and the whole sign-in ends.
 */
export const LOST_ANSWER_S = 10;

/** An account and a fresh refresh token for it. */
export type Opened = { accountId: string; refreshToken: string };

/** What is needed to try a password, read before the slow work of trying. */
export async function knownBy(tx: EntityManager, email: string): Promise<Account | null> {
  return tx.findOneBy(Account, { email });
}

/** Opens a sign-in for an account whose password was just found right. */
export async function openSignIn({ tx, now }: Ctx, account: Account): Promise<Opened> {
  if (!account.emailVerifiedAt)
    throw new Problem('forbidden', 'This address is not confirmed yet', {
      detail: 'Open the link in the mail we sent you, or have it sent again.',
    });
  // Locked and read again: a password changed while this one was being tried must win.
  const still = await tx.findOne(Account, {
    where: { id: account.id, passwordHash: account.passwordHash },
    lock: { mode: 'pessimistic_read' },
  });
  if (!still) throw wrongPassword();
  await tx.delete(Session, { accountId: account.id, expiresAt: LessThan(now) });
  return addToken({ tx, now }, account.id, randomUUID());
}

export const wrongPassword = () =>
  new Problem('not-signed-in', 'That address and password don’t go together', {
    detail: 'Try again, or ask for a link to choose a new password.',
  });

async function addToken(
  { tx, now }: Pick<Ctx, 'tx' | 'now'>,
  accountId: string,
  familyId: string,
): Promise<Opened> {
  const { token, hash } = newSecret();
  await tx.insert(Session, {
    id: randomUUID(),
    accountId,
    familyId,
    tokenHash: hash,
    createdAt: now,
    expiresAt: new Date(now.getTime() + SIGNED_IN_FOR_S * 1000),
    usedAt: null,
    revokedAt: null,
  });
  return { accountId, refreshToken: token };
}

/**
 * Trades a refresh token for the next of its family; null when it opens nothing (any more). It answers rather than
 * throws, because finding a copy in use ends the family, and that must be committed.
 */
export async function renewSignIn(ctx: Ctx, token: string): Promise<Opened | null> {
  const { tx, now } = ctx;
  const session = await tx.findOne(Session, {
    where: { tokenHash: secretHash(token) },
    lock: { mode: 'pessimistic_write' },
  });
  if (!session || session.revokedAt || session.expiresAt <= now) return null;
  if (session.usedAt && now.getTime() - session.usedAt.getTime() > LOST_ANSWER_S * 1000) {
    await endFamily(ctx, session.familyId);
    return null;
  }
  if (!session.usedAt) await tx.update(Session, session.id, { usedAt: now });
  return addToken(ctx, session.accountId, session.familyId);
}

/** Ends the sign-in a refresh token belongs to; one that is not known has nothing to end. */
export async function signOut(ctx: Ctx, token: string): Promise<void> {
  const session = await ctx.tx.findOneBy(Session, { tokenHash: secretHash(token) });
  if (session) await endFamily(ctx, session.familyId);
}

const endFamily = ({ tx, now }: Ctx, familyId: string) =>
  tx.update(Session, { familyId, revokedAt: IsNull() }, { revokedAt: now });

/** Ends every sign-in of an account, access tokens already handed out included. */
export async function endEverySignIn({ tx, now }: Ctx, accountId: string): Promise<void> {
  await tx.update(Session, { accountId, revokedAt: IsNull() }, { revokedAt: now });
  await tx.update(Account, accountId, { tokensFrom: now });
}
