import { civilTime, DAY_MS, offsetSeconds } from '../time/zoned';

const two = (count: number): string => String(count).padStart(2, '0');

/** A UTC offset as +HHMM, with seconds where it has some. Source: RFC 5545 section 3.3.14. */
export function offsetValue(seconds: number): string {
  const size = Math.abs(seconds);
  const [hours, minutes, rest] = [Math.floor(size / 3600), Math.floor(size / 60) % 60, size % 60];
  return `${seconds < 0 ? '-' : '+'}${two(hours)}${two(minutes)}${rest === 0 ? '' : two(rest)}`;
}

/** An instant’s clock time without signs between its parts, 20270328T120000. */
export const clockValue = (at: Date, zone: string): string => civilTime(at, zone).replace(/[-:]/g, '');

type Change = { at: Date; fromS: number; toS: number };

/** Every move of a zone’s clock between two instants, to the second, found by its offset day by day. */
function changesBetween(from: Date, until: Date, zone: string): Change[] {
  const changes: Change[] = [];
  for (let start = from.getTime(); start < until.getTime(); start += DAY_MS) {
    const fromS = offsetSeconds(new Date(start), zone);
    const toS = offsetSeconds(new Date(start + DAY_MS), zone);
    if (fromS === toS) continue;
    let [before, after] = [start, start + DAY_MS];
    while (after - before > 1000) {
      const middle = Math.floor((before + after) / 2000) * 1000;
      if (offsetSeconds(new Date(middle), zone) === fromS) before = middle;
      else after = middle;
    }
    changes.push({ at: new Date(after), fromS, toS });
  }
  return changes;
}

/**
 * The lines of a VTIMEZONE that holds for a span: what the clock showed at its beginning and every move since, each
 * written out, so that no rule of another year is guessed. `zone`: IANA. Source: RFC 5545 section 3.6.5.
 */
export function zoneLines(zone: string, from: Date, until: Date): string[] {
  const begin = new Date(Math.floor(from.getTime() / DAY_MS) * DAY_MS - 366 * DAY_MS);
  const firstS = offsetSeconds(begin, zone);
  const changes = changesBetween(begin, new Date(until.getTime() + 366 * DAY_MS), zone);
  const standardS = Math.min(firstS, ...changes.map(({ toS }) => toS));
  const observance = ({ at, fromS, toS }: Change): string[] => {
    const kind = toS > standardS ? 'DAYLIGHT' : 'STANDARD';
    const shown = new Date(at.getTime() + fromS * 1000); // the clock before it was moved
    return [
      `BEGIN:${kind}`,
      `DTSTART:${clockValue(shown, 'UTC')}`,
      `TZOFFSETFROM:${offsetValue(fromS)}`,
      `TZOFFSETTO:${offsetValue(toS)}`,
      `END:${kind}`,
    ];
  };
  return [
    'BEGIN:VTIMEZONE',
    `TZID:${zone}`,
    ...[{ at: begin, fromS: firstS, toS: firstS }, ...changes].flatMap(observance),
    'END:VTIMEZONE',
  ];
}
