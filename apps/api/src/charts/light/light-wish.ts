import type { Units } from '@mereward/shared/accounts/contract';
import { FOOT_M } from '@mereward/shared/units/length';
import { USUAL_SPACING_M } from '@mereward/shared/units/wraps';

/** How a reader without a script likes lengths and counts: all of it stands in the page's address. */
export type LightWish = { units: Units; sticksFault: string | null };

export const LEAST_STICKS_M = 0.3;
export const MOST_STICKS_M = 10;

const TYPED = /^(\d{1,3}(?:[.,]\d{1,6})?)\s*(m|metres?|ft|feet|')?$/i;

/** Reads `?sticks=3.05&in=ft`; "10 ft" is taken too. What can't be read is said, and the usual sticks stand in. */
export function lightWish(query: Readonly<Record<string, unknown>>): LightWish {
  const length = query['in'] === 'ft' ? 'ft' : 'm';
  const usual: Units = { length, stickSpacingM: USUAL_SPACING_M };
  const typed = typeof query['sticks'] === 'string' ? query['sticks'].trim() : '';
  if (typed === '') return { units: usual, sticksFault: null };
  const [, figure = '', unit = 'm'] = TYPED.exec(typed) ?? [];
  const stickSpacingM = Number(figure.replace(',', '.')) * (/^m/i.test(unit) ? 1 : FOOT_M);
  if (figure !== '' && stickSpacingM >= LEAST_STICKS_M && stickSpacingM <= MOST_STICKS_M)
    return { units: { length, stickSpacingM }, sticksFault: null };
  return {
    units: usual,
    sticksFault: `Sticks stand between ${LEAST_STICKS_M} m and ${MOST_STICKS_M} m apart. Type it like 3.05 m or 10 ft. The counts below are for 12 ft.`,
  };
}

/** The same page's address with another wish. */
export function wishQuery({ length, stickSpacingM }: Units): string {
  const asked = new URLSearchParams();
  if (stickSpacingM !== USUAL_SPACING_M) asked.set('sticks', String(Number(stickSpacingM.toFixed(6))));
  if (length === 'ft') asked.set('in', 'ft');
  const text = asked.toString();
  return text === '' ? '?' : `?${text}`;
}
