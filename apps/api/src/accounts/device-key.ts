import { DeviceKey } from '@mereward/db/entities/accounts/device-key';
import type { DeviceKeyView } from '@mereward/shared/accounts/contract';
import { randomBytes } from 'node:crypto';
import { accountOf, type Ctx } from '../ctx';

const KEY_BYTES = 32; // AES-256

/** This account's key for its phones: made at the first asking, of two at once by one of them, and the same ever after. */
export async function deviceKey({ tx, actor, now }: Ctx): Promise<DeviceKeyView> {
  const accountId = accountOf(actor);
  await tx
    .createQueryBuilder()
    .insert()
    .into(DeviceKey)
    .values({ accountId, key: randomBytes(KEY_BYTES), madeAt: now })
    .orIgnore()
    .execute();
  const { key } = await tx.findOneByOrFail(DeviceKey, { accountId });
  return { key: key.toString('base64url') };
}
