import { makeDataSource } from '@mereward/db/data-source';
import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { OSTLEMERE_ID } from './fishery';

/** Whether a database may show the demo: it holds it already, or nobody at all. Real people are never joined by invented ones. */
export async function roomForDemo(databaseUrl: string): Promise<boolean> {
  const source = await makeDataSource(databaseUrl, 1).initialize();
  try {
    if (await source.manager.existsBy(Fishery, { id: OSTLEMERE_ID })) return true;
    return (await source.manager.count(Account)) === 0;
  } finally {
    await source.destroy();
  }
}
