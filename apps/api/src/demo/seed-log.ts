import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import { createHash } from 'node:crypto';
import { gzipSync } from 'node:zlib';
import pino from 'pino';
import type { DataSource } from 'typeorm';
import { bringLog } from '../surveys/bring-log';
import { closeVisit } from '../surveys/close-visit';
import { startLog } from '../surveys/log-deeds';
import { readLogRun } from '../surveys/log-jobs';
import { openVisit } from '../surveys/open-visit';
import { farOstleAutumnBed } from './bed';
import { boatLog } from './boat-log';
import { demoCtx } from './demo-ctx';
import { FAR_OSTLE_LAKE } from './fishery';
import { TOM } from './people';
import { demoId, seeded } from './random';
import { demoVisitId, visitBody } from './seed-survey';
import { demoLevelM, type DemoDays } from './survey-days';

const HOUR_MS = 3_600_000;
const KEY = 'FO boat';

export const BOAT_VISIT = demoVisitId({ key: KEY });
const LOG = demoId('log FO boat');

/** A boat's log over the gully on the day of the autumn survey: brought, read and taken in. What is there already stays. */
export async function seedLog(source: DataSource, days: DemoDays): Promise<void> {
  const known = await source.manager.findOneBy(SoundingImport, { id: LOG });
  if (known?.state === 'done') return;
  const day = new Date(days.farOstleAutumn.getTime() + 5 * HOUR_MS);
  const evening = new Date(day.getTime() + 3 * HOUR_MS);
  if (known === null) await source.transaction((tx) => bring(demoCtx(tx, TOM, evening), day));
  await readNow(source, evening);
  await source.transaction((tx) => startLog(demoCtx(tx, TOM, evening), LOG));
  await readNow(source, evening);
  const { state, error } = await source.manager.findOneByOrFail(SoundingImport, { id: LOG });
  if (state !== 'done') throw new Error(`The demo's log was not taken in: ${error ?? state}`);
}

async function bring(ctx: ReturnType<typeof demoCtx>, day: Date): Promise<void> {
  const { datumM } = FAR_OSTLE_LAKE.details;
  const gaugeM = demoLevelM(datumM, day);
  const title = 'The gully, by boat';
  await openVisit(ctx, FAR_OSTLE_LAKE.id, visitBody({ key: KEY, title, lake: FAR_OSTLE_LAKE, day }, gaugeM));
  const endedAt = new Date(day.getTime() + HOUR_MS).toISOString();
  await closeVisit(ctx, BOAT_VISIT, { endedAt, gaugeEndM: gaugeM });
  const text = boatLog({
    lake: FAR_OSTLE_LAKE,
    bed: farOstleAutumnBed,
    startedAt: day,
    aboveDatumM: gaugeM - datumM,
    random: seeded(20251004),
  });
  const bytes = Buffer.from(text);
  const sha256 = createHash('sha256').update(bytes).digest();
  const file = { name: 'gully.log', bytes: bytes.length, sha256, packed: gzipSync(bytes, { level: 1 }) };
  await bringLog(ctx, BOAT_VISIT, { id: LOG, files: [file] });
}

async function readNow(source: DataSource, now: Date): Promise<void> {
  const { attempt } = await source.manager.findOneByOrFail(SoundingImport, { id: LOG });
  await readLogRun({ source, now }, { logId: LOG, attempt }, pino({ level: 'warn' }));
}
