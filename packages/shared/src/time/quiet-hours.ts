import { addDays, civilTime, instantOf } from './zoned';

/** Nobody is written to or asked anything from 22:00 to 07:00, danger apart. Common practice, no published source. */
export const QUIET_FROM = '22:00';
export const QUIET_UNTIL = '07:00';

/** Is it night for letters by a zone’s clock? */
export function isQuiet(at: Date, zone: string): boolean {
  const clock = civilTime(at, zone).slice(11, 16);
  return clock >= QUIET_FROM || clock < QUIET_UNTIL;
}

/** The next time the quiet hours end, after an instant. */
export function quietEnd(at: Date, zone: string): Date {
  const [day = '', clock = ''] = civilTime(at, zone).split('T');
  return instantOf(`${clock < QUIET_UNTIL ? day : addDays(day, 1)}T${QUIET_UNTIL}`, zone).at;
}

/** When a letter that is ready now goes out: at once by day and in danger, else when the quiet hours end. */
export const sendingTime = (ready: Date, zone: string, danger = false): Date =>
  danger || !isQuiet(ready, zone) ? ready : quietEnd(ready, zone);
