import { EmailToken } from '@mereward/db/entities/accounts/email-token';
import { Problem } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { LessThan, MoreThan } from 'typeorm';
import type { Ctx } from '../ctx';
import { newSecret, secretHash } from './secret-token';

type Purpose = EmailToken['purpose'];

const WORKS_FOR_S: Record<Purpose, number> = { verify: 24 * 3600, reset: 3600 };
const QUIET_S = 15 * 60;
const MOST_IN_QUIET = 5;
const FORGOTTEN_S = 24 * 3600; // after it ran out, nothing of a link is kept

/** A new link's token, or null when that account was mailed enough for now: nobody's post is to be flooded. */
export async function newEmailToken(
  { tx, now }: Ctx,
  accountId: string,
  purpose: Purpose,
): Promise<string | null> {
  const recently = new Date(now.getTime() - QUIET_S * 1000);
  const recent = await tx.countBy(EmailToken, { accountId, createdAt: MoreThan(recently) });
  if (recent >= MOST_IN_QUIET) return null;
  await tx.delete(EmailToken, {
    accountId,
    expiresAt: LessThan(new Date(now.getTime() - FORGOTTEN_S * 1000)),
  });
  const { token, hash } = newSecret();
  await tx.insert(EmailToken, {
    id: randomUUID(),
    accountId,
    purpose,
    tokenHash: hash,
    createdAt: now,
    expiresAt: new Date(now.getTime() + WORKS_FOR_S[purpose] * 1000),
    usedAt: null,
  });
  return token;
}

/** The row of a mailed token, locked, if it still works; used ones are answered too, for the caller to judge. */
export async function emailToken({ tx, now }: Ctx, token: string, purpose: Purpose): Promise<EmailToken> {
  const row = await tx.findOne(EmailToken, {
    where: { tokenHash: secretHash(token), purpose },
    lock: { mode: 'pessimistic_write' },
  });
  if (!row || row.expiresAt <= now) throw linkDead();
  return row;
}

export const linkDead = () =>
  new Problem('invalid', 'This link no longer works', {
    detail: 'Links work once and for a limited time. Ask for a new one and open the newest mail.',
  });
