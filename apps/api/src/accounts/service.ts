import { Account } from '@mereward/db/entities/accounts/account';
import type { AccountView, ChangeDetails } from '@mereward/shared/accounts/contract';
import { accountOf, type Ctx } from '../ctx';
import { accountView } from './queries';

/** Changes what the holder may change about the account: their name and how lengths are shown. */
export async function changeDetails(ctx: Ctx, input: ChangeDetails): Promise<AccountView> {
  const accountId = accountOf(ctx.actor);
  await ctx.tx.update(Account, accountId, input);
  return accountView(ctx.tx, accountId);
}
