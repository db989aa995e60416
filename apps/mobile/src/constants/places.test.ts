import { expect, test } from 'vitest';
import { placesFor } from './places';

const keys = (...roles: Parameters<typeof placesFor>[0]) => placesFor(roles).map((place) => place.key);

test('everybody has the water, tickets and themselves', () => {
  expect(keys()).toEqual(['water', 'tickets', 'me']);
  expect(keys('angler', 'member')).toEqual(['water', 'tickets', 'me']);
});

test('a bailiff has the bank, the office has the office, a head bailiff and an owner both', () => {
  expect(keys('bailiff')).toEqual(['water', 'tickets', 'bank', 'me']);
  expect(keys('head_bailiff')).toEqual(['water', 'tickets', 'bank', 'office', 'me']);
  expect(keys('office')).toEqual(['water', 'tickets', 'office', 'me']);
  expect(keys('owner')).toEqual(['water', 'tickets', 'bank', 'office', 'me']);
  expect(keys('bailiff', 'office')).toEqual(['water', 'tickets', 'bank', 'office', 'me']);
});
