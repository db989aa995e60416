import { makeDataSource } from '@mereward/db/data-source';
import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { FisheryRole } from '@mereward/db/entities/fisheries/fishery-role';
import { LevelReading } from '@mereward/db/entities/lakes/level-reading';
import type { DataSource, EntityManager } from 'typeorm';
import { passwordHash } from '../accounts/password';
import { readConfig } from '../config';
import type { Ctx } from '../ctx';
import { fileStoreOf, type FileStore } from '../files/store';
import { putBoard } from '../lakes/boards';
import { makeLake } from '../lakes/make-lake';
import { putMark } from '../lakes/marks';
import { makePeg } from '../lakes/pegs';
import { seedGrabs, seedSpotGrabs, seedLead, seedWeedCut, seedWorks } from './seed-bottom';
import { seedAreas } from './seed-areas';
import { seedCharts } from './seed-charts';
import { seedLetting } from './seed-letting';
import { seedPhotos } from './seed-photos';
import { seedSurvey } from './seed-survey';
import { seedWaiting } from './seed-reports';
import { demoSurveys } from './surveys';
import { demoCtx } from './demo-ctx';
import { DEMO_LAKES, OSTLEMERE, OSTLEMERE_ID, type DemoLake } from './fishery';
import { DEMO_PASSWORD, DEMO_PEOPLE, IDRIS, JOAN, MARIAN, PRIYA, SOFIA, TOM } from './people';
import { demoId } from './random';
import { demoDays, demoLevelM, type DemoDays } from './survey-days';
import { writeTicket } from '../bookings/service';

const DAY_MS = 86_400_000;

/**
 * Fills an empty database with the demo; one that holds it already is left as it is. Answers the sign-ins to
 * print. Where nothing says where files are kept the pegs have no pictures.
 */
export async function seed(
  databaseUrl: string,
  now: Date = new Date(),
  files: FileStore | null = filesNamedBy(process.env),
): Promise<string[]> {
  const source = await makeDataSource(databaseUrl).initialize();
  const days = demoDays(now);
  try {
    if (!(await source.manager.existsBy(Fishery, { id: OSTLEMERE_ID })))
      await fill(source, { days, now, files });
    await seedCharts(source, days);
    await source.transaction((tx) => seedWaiting(tx, now));
  } finally {
    await source.destroy();
  }
  return [
    `Sign in to the demo with the password “${DEMO_PASSWORD}” as`,
    ...DEMO_PEOPLE.map(({ email, can }) => `  ${email.padEnd(26)} ${can}`),
  ];
}

type Filling = { days: DemoDays; now: Date; files: FileStore | null };

const filesNamedBy = (env: NodeJS.ProcessEnv): FileStore | null =>
  env.FILES_DIR || env.FILES_S3_BUCKET ? fileStoreOf(readConfig(env)) : null;

/** Everything but the charts, in one transaction. */
async function fill(source: DataSource, { days, now, files }: Filling): Promise<void> {
  const made = new Date(days.farOstleAutumn.getTime() - 60 * DAY_MS);
  await source.transaction(async (tx) => {
    await seedPeople(demoCtx(tx, MARIAN, made));
    for (const lake of DEMO_LAKES) await seedLake(demoCtx(tx, MARIAN, made), lake);
    for (const lake of DEMO_LAKES) await seedLevels(demoCtx(tx, TOM, now), lake);
    for (const survey of demoSurveys(days))
      await seedSurvey(demoCtx(tx, survey.surveyor, new Date(survey.day.getTime() + DAY_MS)), survey);
    await seedGround(tx, days);
    await seedAreas(demoCtx(tx, IDRIS, made));
    await seedTicket(demoCtx(tx, PRIYA, now));
    await seedLetting(tx, now);
    if (files !== null) await seedPhotos(demoCtx(tx, JOAN, days.farOstleFirst), files);
  });
}

/** What is known of the bottoms beside the casts: grabs, a lead's rate of fall, weed cut. */
async function seedGround(tx: EntityManager, days: DemoDays): Promise<void> {
  const first = demoSurveys(days).find(({ key }) => key === 'FO 1');
  const evening = new Date(days.farOstleFirst.getTime() + DAY_MS);
  if (first) await seedGrabs(demoCtx(tx, JOAN, evening), first);
  const afterSecond = new Date(days.farOstleSecond.getTime() + DAY_MS);
  await seedSpotGrabs(demoCtx(tx, JOAN, afterSecond), days.farOstleSecond);
  await seedLead(demoCtx(tx, JOAN, evening), days.farOstleFirst);
  const cut = new Date(days.ostlePool.getTime() - 9 * DAY_MS);
  await seedWeedCut(demoCtx(tx, IDRIS, new Date(cut.getTime() + DAY_MS)), cut);
  await seedWorks(tx, days);
}

async function seedPeople({ tx, now }: Ctx): Promise<void> {
  const hash = await passwordHash(DEMO_PASSWORD);
  const accounts = DEMO_PEOPLE.map(({ id, email, name }) => ({
    id,
    email,
    name,
    passwordHash: hash,
    emailVerifiedAt: now,
    units: { length: 'm' as const, stickSpacingM: 3.6576 },
    createdAt: now,
  }));
  await tx.insert(Account, accounts);
  const { name, zone } = OSTLEMERE;
  await tx.insert(Fishery, {
    id: OSTLEMERE_ID,
    name,
    zone,
    details: OSTLEMERE,
    version: 1,
    createdBy: MARIAN.id,
    createdAt: now,
  });
  const roles = DEMO_PEOPLE.flatMap(({ id, roles: held }) =>
    held.map((role) => ({ fisheryId: OSTLEMERE_ID, accountId: id, role, givenBy: MARIAN.id, givenAt: now })),
  );
  await tx.insert(FisheryRole, roles);
}

async function seedLake(ctx: Ctx, lake: DemoLake): Promise<void> {
  await makeLake(ctx, OSTLEMERE_ID, { id: lake.id, details: lake.details });
  await putBoard(
    ctx,
    { lakeId: lake.id, boardId: lake.board.id },
    { details: lake.board.details, version: null },
  );
  for (const mark of lake.marks)
    await putMark(ctx, { lakeId: lake.id, markId: mark.id }, { details: mark.details, version: null });
  for (const peg of lake.pegs) await makePeg(ctx, lake.id, { id: peg.id, details: peg.details });
}

/** A reading every Saturday of the last year, and one this morning. */
async function seedLevels({ tx, now }: Ctx, lake: DemoLake): Promise<void> {
  const today = new Date(Date.UTC(now.getUTCFullYear(), now.getUTCMonth(), now.getUTCDate(), 6, 30));
  const newest = today.getTime() <= now.getTime() ? today : new Date(today.getTime() - DAY_MS);
  const times = [0, ...Array.from({ length: 52 }, (_, week) => (week + 1) * 7)].map(
    (daysAgo) => new Date(newest.getTime() - daysAgo * DAY_MS),
  );
  const readings = times.map((at) => {
    const levelM = demoLevelM(lake.details.datumM, at);
    return {
      id: demoId(`reading ${lake.prefix} ${at.toISOString()}`),
      boardId: lake.board.id,
      at,
      levelM,
      levelText: `${levelM.toFixed(2)} m`,
      note: '',
      recordedBy: TOM.id,
      receivedAt: at,
    };
  });
  await tx.insert(LevelReading, readings);
}

/** Sofia's day on FO7: today until tomorrow's sunrise hour. */
async function seedTicket(ctx: Ctx): Promise<void> {
  const { now } = ctx;
  const from = new Date(Date.UTC(now.getUTCFullYear(), now.getUTCMonth(), now.getUTCDate(), 0));
  const until = new Date(from.getTime() + DAY_MS);
  await writeTicket(ctx, demoId('peg FO7'), {
    id: demoId('ticket FO7'),
    email: SOFIA.email,
    from: from.toISOString(),
    until: until.toISOString(),
  });
}
