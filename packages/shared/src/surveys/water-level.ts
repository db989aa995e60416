import type { ReductionStep } from './contract';
import type { VisitGauge } from './cast-site';
import { GAUGE_AWAY_DAYS, SIGMA } from './error-budget';
import { metres, plusMinus, step } from './reduction-step';

const DAY_MS = 86_400_000;

/** Water over chart datum at an instant, metres (negative when the water is lower), with what is wrong with it. */
export type LevelAt = {
  aboveDatumM: number;
  readingM: number;
  sigmaM: number;
  warnings: string[];
  known: boolean; // read within a fortnight
};

/**
 * The board's reading at an instant, linear between the readings at the visit's ends and level beyond them, and the
 * water's height over chart datum that follows. Instants are ISO 8601.
 */
export function levelAt(gauge: VisitGauge, at: string): LevelAt {
  const atMs = Date.parse(at);
  const startMs = Date.parse(gauge.startAt);
  const endMs = gauge.endAt === null || gauge.endM === null ? null : Date.parse(gauge.endAt);
  const readingM =
    endMs === null
      ? gauge.startM
      : between({ startMs, endMs, atMs }, gauge.startM, gauge.endM ?? gauge.startM);
  const awayMs = Math.min(Math.abs(atMs - startMs), endMs === null ? Infinity : Math.abs(atMs - endMs));
  const inside =
    endMs !== null && atMs >= startMs && atMs <= endMs && endMs - startMs <= GAUGE_AWAY_DAYS * DAY_MS;
  const known = inside || awayMs <= GAUGE_AWAY_DAYS * DAY_MS;
  const sign = gauge.higherNumberHigherWater ? 1 : -1;
  return {
    aboveDatumM: sign * (readingM - gauge.datumM),
    readingM,
    sigmaM: known ? (endMs === null ? SIGMA.levelOneEndM : SIGMA.levelBothEndsM) : SIGMA.levelFarM,
    warnings: known ? [] : [farWords(awayMs)],
    known,
  };
}

function between(t: { startMs: number; endMs: number; atMs: number }, startM: number, endM: number): number {
  if (t.endMs <= t.startMs) return (startM + endM) / 2;
  const share = Math.min(1, Math.max(0, (t.atMs - t.startMs) / (t.endMs - t.startMs)));
  return startM + share * (endM - startM);
}

function farWords(awayMs: number): string {
  const days = Math.round(awayMs / DAY_MS);
  return `The nearest reading of the gauge board is ${days} days from this cast; the water may have moved since`;
}

export function levelStep(
  level: LevelAt,
  datumM: number,
  depth: { asReadM: number; depthM: number; sigmaM: number },
): ReductionStep {
  return step(
    ['datum', 'Depth below chart datum', 'depth = d − water above datum'],
    [
      ['d', metres(depth.asReadM)],
      ['board at that hour', metres(level.readingM, 2)],
      ['chart datum on the board', metres(datumM, 2)],
      ['water above datum', metres(level.aboveDatumM)],
    ],
    { value: metres(depth.depthM), sigma: plusMinus(depth.sigmaM, 'm') },
  );
}
