import { Account } from '@mereward/db/entities/accounts/account';
import { EmailToken } from '@mereward/db/entities/accounts/email-token';
import { mailedLink } from '@mereward/shared/accounts/mailed-links';
import { randomUUID } from 'node:crypto';
import type { Ctx } from '../ctx';
import { alreadyKnownMessage, verifyMessage } from '../mail/messages';
import { post } from '../mail/send';
import { emailToken, linkDead, newEmailToken } from './email-tokens';

type NewAccount = { name: string; email: string; passwordHash: string };

/** How a reader's lengths begin: metres, and sticks twelve feet apart. */
const FIRST_UNITS = { length: 'm', stickSpacingM: 3.6576 } as const;

/**
 * Makes an account that waits for its address to be confirmed. Whoever asks learns nothing about the address:
 * a known one gets a mail saying so. One never confirmed is taken over by the newest sign-up and its older links
 * die, so that nobody can lie in wait at another's address with a password of their own.
 */
export async function signUp(ctx: Ctx, input: NewAccount): Promise<void> {
  const { tx, now, publicUrl } = ctx;
  await tx
    .createQueryBuilder()
    .insert()
    .into(Account)
    .values({ ...input, id: randomUUID(), emailVerifiedAt: null, units: FIRST_UNITS, createdAt: now })
    .orIgnore()
    .execute();
  const account = await tx.findOneOrFail(Account, {
    where: { email: input.email },
    lock: { mode: 'pessimistic_write' },
  });
  if (account.emailVerifiedAt) return post(ctx, alreadyKnownMessage(account, `${publicUrl}/sign-in`));
  await tx.update(Account, account.id, { name: input.name, passwordHash: input.passwordHash });
  await tx.update(EmailToken, { accountId: account.id, purpose: 'verify' }, { expiresAt: now });
  await mailVerification(ctx, { ...account, name: input.name });
}

/** Mails the link again to an address still to be confirmed; otherwise nothing happens, and nobody is told. */
export async function verifyAgain(ctx: Ctx, email: string): Promise<void> {
  const account = await ctx.tx.findOneBy(Account, { email });
  if (account && !account.emailVerifiedAt) await mailVerification(ctx, account);
}

async function mailVerification(ctx: Ctx, account: Account): Promise<void> {
  const token = await newEmailToken(ctx, account.id, 'verify');
  if (token) await post(ctx, verifyMessage(account, mailedLink(ctx.publicUrl, 'verify', token)));
}

/** Confirms the address a link was mailed to. The same link again is no fault: it is a page loaded twice. */
export async function verifyEmail(ctx: Ctx, token: string): Promise<void> {
  const { tx, now } = ctx;
  const row = await emailToken(ctx, token, 'verify');
  const account = await tx.findOneBy(Account, { id: row.accountId });
  if (!account) throw linkDead();
  if (account.emailVerifiedAt) return;
  await tx.update(Account, account.id, { emailVerifiedAt: now });
  await tx.update(EmailToken, row.id, { usedAt: now });
}
