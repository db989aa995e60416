/** A civil day and clock time as pickers give it, without a zone: "2027-04-03T09:05". */
export type CivilTime = string;

const civilIn = (zone: string) =>
  new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
  });

/** What a clock in the zone shows at an instant, to the minute. */
export function civilTime(atMs: number, zone: string): CivilTime {
  const parts = civilIn(zone).formatToParts(atMs);
  const part = (type: string): string => parts.find((each) => each.type === type)?.value ?? '00';
  return `${part('year')}-${part('month')}-${part('day')}T${part('hour')}:${part('minute')}`;
}

/**
 * The instant at which a clock in the zone shows this, as ISO with Z; null when it is no time. A time that a change of
 * clocks leaves out is read as the clock would have shown it unchanged; of one that comes twice the first is taken.
 */
export function instantOf(civil: CivilTime, zone: string): string | null {
  if (!/^\d{4}-\d\d-\d\dT\d\d:\d\d$/.test(civil)) return null;
  const asUtcMs = Date.parse(`${civil}Z`);
  if (Number.isNaN(asUtcMs)) return null;
  const aheadMs = (atMs: number): number => Date.parse(`${civilTime(atMs, zone)}Z`) - atMs;
  const day = 24 * 3600_000;
  const candidates = [asUtcMs - aheadMs(asUtcMs - day), asUtcMs - aheadMs(asUtcMs + day)];
  const fitting = candidates.filter((atMs) => civilTime(atMs, zone) === civil);
  return new Date(Math.min(...(fitting.length > 0 ? fitting : candidates.slice(0, 1)))).toISOString();
}
