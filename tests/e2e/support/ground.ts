import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buildApi, buildWeb } from '../../../scripts/lib/build.mjs';
import { callBuilt } from '../../../scripts/lib/database.mjs';
import { startTestCluster } from '../../support/test-cluster';

/** Where the journeys' seeded template is; set here, read by every worker. */
export interface Ground {
  clusterUrl: string;
  filesFolder: string;
}

const variable = 'MEREWARD_JOURNEYS';

export function readGround(): Ground {
  const text = process.env[variable];
  if (!text) throw new Error('The journeys run through playwright.config.ts, which prepares their database.');
  const { clusterUrl, filesFolder }: Ground = JSON.parse(text);
  return { clusterUrl, filesFolder };
}

/** Builds what has changed, then migrates and seeds one template that every journey file copies. */
export default async function setUp(): Promise<() => Promise<void>> {
  const quiet = (): void => undefined;
  await buildApi(quiet);
  await buildWeb(quiet);
  const filesFolder = mkdtempSync(join(tmpdir(), 'mereward-journeys-'));
  const cluster = await startTestCluster(async (templateUrl) => {
    const settings = { DATABASE_URL: templateUrl, FILES_DIR: filesFolder, DEMO: 'true' };
    await callBuilt('migrate.js', 'migrate', settings);
    await callBuilt('demo/seed.js', 'seed', settings);
  });
  const ground: Ground = { clusterUrl: cluster.url('mereward'), filesFolder };
  process.env[variable] = JSON.stringify(ground);
  return async () => {
    await cluster.stop();
    rmSync(filesFolder, { recursive: true, force: true });
  };
}
