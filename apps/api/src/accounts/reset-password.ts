import { Account } from '@mereward/db/entities/accounts/account';
import { EmailToken } from '@mereward/db/entities/accounts/email-token';
import { mailedLink } from '@mereward/shared/accounts/mailed-links';
import { IsNull } from 'typeorm';
import type { Ctx } from '../ctx';
import { passwordChangedMessage, resetMessage } from '../mail/messages';
import { post } from '../mail/send';
import { emailToken, linkDead, newEmailToken } from './email-tokens';
import { endEverySignIn } from './sign-in';

/** Mails a link to choose a new password, if there is such an account; whoever asks is told nothing. */
export async function askReset(ctx: Ctx, email: string): Promise<void> {
  const account = await ctx.tx.findOneBy(Account, { email });
  if (!account) return;
  const token = await newEmailToken(ctx, account.id, 'reset');
  if (token) await post(ctx, resetMessage(account, mailedLink(ctx.publicUrl, 'reset', token)));
}

/** Sets a new password by a mailed link, which also shows that the address is theirs; every sign-in ends. */
export async function resetPassword(ctx: Ctx, input: { token: string; passwordHash: string }): Promise<void> {
  const { tx, now } = ctx;
  const row = await emailToken(ctx, input.token, 'reset');
  const account = await tx.findOneBy(Account, { id: row.accountId });
  if (!account || row.usedAt) throw linkDead();
  await tx.update(Account, account.id, {
    passwordHash: input.passwordHash,
    emailVerifiedAt: account.emailVerifiedAt ?? now,
  });
  await tx.update(EmailToken, { accountId: account.id, purpose: 'reset', usedAt: IsNull() }, { usedAt: now });
  await endEverySignIn(ctx, account.id);
  await post(ctx, passwordChangedMessage(account));
}
