import { test as base, expect } from '@playwright/test';
import { closeSync, cpSync, mkdirSync, mkdtempSync, openSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import { freePort } from '../../../scripts/lib/port.mjs';
import { startCardProvider } from '../../../scripts/lib/card-provider.mjs';
import { startServer } from '../../../scripts/lib/server.mjs';
import { copyDatabase } from '../../support/test-cluster';
import { readGround } from './ground';

/** The built program, running for one journey file on a seeded database of its own. */
export interface Site {
  url: string;
  databaseUrl: string;
  /** Ends the server without a word, as a power cut does; `startServer` brings it back at the same address. */
  killServer: () => Promise<void>;
  startServer: () => Promise<void>;
  /** Moves a clock that is held still (`test.use({ now })`) to another instant. */
  setNow: (now: string) => void;
  stop: () => Promise<void>;
}

interface Wish {
  /** Says which file and settings this site is for: the same name again is the same site. */
  name: string;
  /** The instant the server takes for now, held still; undefined leaves the machine's clock. */
  now: string | undefined;
}

async function openSite({ name, now }: Wish): Promise<Site> {
  const ground = readGround();
  const folder = mkdtempSync(join(tmpdir(), 'mereward-site-'));
  const filesFolder = join(folder, 'files');
  cpSync(ground.filesFolder, filesFolder, { recursive: true });
  const database = await copyDatabase(ground.clusterUrl, 'template');
  const clockFile = join(folder, 'clock');
  if (now) writeFileSync(clockFile, now);
  mkdirSync('test-results/servers', { recursive: true });
  const log = openSync(join('test-results/servers', `${basename(name)}.log`), 'a');
  const settings = {
    DATABASE_URL: database.url,
    FILES_DIR: filesFolder,
    DEMO: 'true',
    LOG_LEVEL: 'info',
    ...(now ? { CLOCK_FILE: clockFile } : {}),
  };
  const port = await freePort();
  const cards = await startCardProvider({ folder, serverPort: port, log });
  const start = () => startServer(port, { ...settings, ...cards.settings }, { log });
  let server = start();
  await server.ready;
  return {
    url: server.url,
    databaseUrl: database.url,
    killServer: () => server.kill(),
    async startServer() {
      server = start();
      await server.ready;
    },
    setNow(instant) {
      if (!now) throw new Error('This site keeps the machine’s time: give its file a `now` first.');
      writeFileSync(clockFile, instant);
    },
    async stop() {
      await server.stop();
      await cards.stop();
      closeSync(log);
      await database.drop();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

/** Keeps one site open in a worker, and opens another when the next file begins. */
class SiteKeeper {
  private open: { key: string; site: Site } | undefined;

  async siteFor(wish: Wish): Promise<Site> {
    const key = `${wish.name} ${wish.now ?? ''}`;
    if (this.open?.key === key) return this.open.site;
    await this.close();
    const site = await openSite(wish);
    this.open = { key, site };
    return site;
  }

  async close(): Promise<void> {
    await this.open?.site.stop();
    this.open = undefined;
  }
}

/**
 * Playwright's test with a site of the file's own: `page.goto('/water')` reaches it. `test.use({ now })`
 * holds the server's clock at one instant.
 */
export const test = base.extend<{ now: string | undefined; site: Site }, { sites: SiteKeeper }>({
  now: [undefined, { option: true }],
  sites: [
    async ({}, use) => {
      const keeper = new SiteKeeper();
      await use(keeper);
      await keeper.close();
    },
    { scope: 'worker', timeout: 60_000 },
  ],
  site: async ({ sites, now }, use, testInfo) => {
    await use(await sites.siteFor({ name: `${testInfo.project.name}-${basename(testInfo.file)}`, now }));
  },
  baseURL: async ({ site }, use) => {
    await use(site.url);
  },
});

export { expect };
