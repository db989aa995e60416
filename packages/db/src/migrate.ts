import { makeDataSource } from './data-source';

/** Brings the database at `url` up to the newest migration; nothing happens when it is there already. */
export async function migrate(url: string): Promise<void> {
  const source = await makeDataSource(url, 1).initialize();
  try {
    await source.runMigrations();
  } finally {
    await source.destroy();
  }
}
