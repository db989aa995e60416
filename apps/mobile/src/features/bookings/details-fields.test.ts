import type { BookingView } from '@mereward/shared/bookings/contract';
import { expect, test } from 'vitest';
import {
  detailsSchema,
  detailsStart,
  fillInOf,
  licenceOf,
  needsGuardian,
  type Asked,
} from './details-fields';

const JUNIOR = { leastAge: 8, mostAge: 15, guardianBelowAge: 16 };
const ANY_AGE = { leastAge: null, mostAge: null, guardianBelowAge: null };

const asked = (
  kind: 'holder' | 'junior',
  { day = '2027-07-18', rodLicence = true, vehicle = false } = {},
): Asked => ({
  booking: {
    version: 3,
    details: {
      day,
      tickets: [{ kind, rods: 1, people: 1, name: '', bornOn: null }],
      guardian: null,
      licence: null,
      vehicle: '',
      emergencyContact: '',
      note: '',
    },
  } as unknown as BookingView,
  jurisdiction: 'ENG',
  asks: [
    {
      ages: kind === 'junior' ? JUNIOR : ANY_AGE,
      needs: { rodLicence, vehicle, emergencyContact: false },
    },
  ],
});

const typed = (wish: Asked, name: string, bornOn = '') => ({
  ...detailsStart(wish.booking),
  tickets: [{ name, bornOn }],
});
const faults = (wish: Asked, value: ReturnType<typeof typed>) =>
  (detailsSchema(wish).safeParse(value).error?.issues ?? []).map(({ path }) => path.join('.'));

test('a grown-up in England types a name and ticks the licence', () => {
  const wish = asked('holder');
  expect(faults(wish, typed(wish, 'Sofia Marsh'))).toEqual(['licenceHeld']);
  const done = { ...typed(wish, 'Sofia Marsh'), licenceHeld: true, lastSix: 'AB12CD' };
  expect(faults(wish, done)).toEqual([]);
  expect(fillInOf(wish, done)).toMatchObject({
    version: 3,
    tickets: [{ name: 'Sofia Marsh', bornOn: null }],
    guardian: null,
    licence: { held: true, lastSix: 'AB12CD', expiresOn: null },
  });
});

test('a junior of twelve needs a guardian, consent and somebody to ring, and no licence', () => {
  const wish = asked('junior');
  const kit = typed(wish, 'Kit Marsh', '2014-09-20');
  expect(licenceOf(wish, kit)?.needed).toBe('no');
  expect(faults(wish, kit)).toEqual(['guardianName', 'guardianPhone', 'consent', 'emergencyContact']);
  const done = {
    ...kit,
    guardianName: 'Sofia Marsh',
    guardianPhone: '07700 900123',
    consent: true,
    emergencyContact: 'Sofia, 07700 900123',
  };
  expect(faults(wish, done)).toEqual([]);
  expect(fillInOf(wish, done)).toMatchObject({
    guardian: { name: 'Sofia Marsh', consent: true },
    licence: null,
  });
});

test('the same junior is thirteen by September and needs the licence declared', () => {
  const wish = asked('junior', { day: '2027-09-25' });
  expect(licenceOf(wish, typed(wish, 'Kit Marsh', '2014-09-20'))?.needed).toBe('yes');
  expect(faults(wish, typed(wish, 'Kit Marsh', '2014-09-20'))).toContain('licenceHeld');
});

test('a junior whose birth is not typed yet is taken to need a guardian', () => {
  const wish = asked('junior');
  expect(needsGuardian(wish, typed(wish, 'Kit Marsh'))).toBe(true);
  expect(faults(wish, typed(wish, 'Kit Marsh'))).toContain('tickets.0.bornOn');
});

test('a fishery that asks for no licence gets no declaration, one that asks for the vehicle gets it', () => {
  const wish = asked('holder', { rodLicence: false, vehicle: true });
  expect(licenceOf(wish, typed(wish, 'Sofia Marsh'))).toBeNull();
  expect(faults(wish, typed(wish, 'Sofia Marsh'))).toEqual(['vehicle']);
});
