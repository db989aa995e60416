import { Account } from '@mereward/db/entities/accounts/account';
import { Role, type AccountView } from '@mereward/shared/accounts/contract';
import { Problem } from '@mereward/shared/problems/problem';
import type { EntityManager } from 'typeorm';
import { z } from 'zod';

const HeldRole = z.object({ fisheryId: z.string(), fisheryName: z.string(), role: Role });

const HELD = `
  SELECT held.fishery_id AS "fisheryId", fishery.name AS "fisheryName", held.role
  FROM fishery_role held JOIN fishery ON fishery.id = held.fishery_id
  WHERE held.account_id = $1
  ORDER BY fishery.name, held.fishery_id, held.role`;

/** What an account's holder is told of it. */
export async function accountView(tx: EntityManager, accountId: string): Promise<AccountView> {
  const account = await tx.findOneBy(Account, { id: accountId });
  if (!account) throw new Problem('not-signed-in', 'This account is no longer there');
  const { id, name, email, units } = account;
  const roles = z.array(HeldRole).parse(await tx.query(HELD, [accountId]));
  return { id, name, email, units, roles };
}
