/** The days on which the demo's surveys and readings were made, so that it looks the same whenever it is started. */
export type DemoDays = {
  farOstleAutumn: Date;
  farOstleAutumnPublished: Date;
  westBayCut: Date;
  gullyDug: Date;
  reported: Date; // an angler found it otherwise
  farOstleFirst: Date;
  farOstleSecond: Date;
  farOstlePublished: Date;
  ostlePool: Date;
};

const DAY_MS = 86_400_000;

const atTen = (year: number, month: number, day: number): Date =>
  new Date(Date.UTC(year, month - 1, day, 9, 0));

/** The last April of which the eleventh and the publishing are past, and the autumn before; Ostle Pool three weeks before today. */
export function demoDays(now: Date): DemoDays {
  const thisYear = now.getUTCFullYear();
  const year = now.getTime() > atTen(thisYear, 4, 20).getTime() ? thisYear : thisYear - 1;
  const pool = new Date(now.getTime() - 21 * DAY_MS);
  return {
    farOstleAutumn: atTen(year - 1, 10, 3),
    farOstleAutumnPublished: atTen(year - 1, 10, 9),
    westBayCut: atTen(year - 1, 11, 14),
    gullyDug: atTen(year, 1, 22),
    reported: atTen(year, 3, 20),
    farOstleFirst: atTen(year, 4, 3),
    farOstleSecond: atTen(year, 4, 11),
    farOstlePublished: atTen(year, 4, 16),
    ostlePool: atTen(pool.getUTCFullYear(), pool.getUTCMonth() + 1, pool.getUTCDate()),
  };
}

/** The invented water level: highest in March, lowest in September, 0.12 m either side, a little unrest. */
export function demoLevelM(datumM: number, at: Date): number {
  const day = at.getTime() / DAY_MS;
  const season = Math.cos((2 * Math.PI * (day - 75)) / 365.25);
  const unrest = 0.02 * Math.sin(day / 5.3) + 0.012 * Math.sin(day / 2.1);
  return Math.round((datumM - 0.1 + 0.12 * season + unrest) * 100) / 100;
}
