import { expect, test } from 'vitest';
import { lightWish, wishQuery } from './light-wish';

test.each([
  ['3.05', 3.05],
  ['3,05 m', 3.05],
  ['10 ft', 3.048],
  ["12'", 3.6576],
  ['', 3.6576],
])('%s are sticks %d m apart', (sticks, spacingM) => {
  const { units, sticksFault } = lightWish({ sticks });
  expect(units.stickSpacingM).toBeCloseTo(spacingM, 9);
  expect(sticksFault).toBeNull();
});

test.each(['far', '0.1', '40 ft', '-3', '1e3', '3 yd', '<b>'])('%s is said to be no spacing', (sticks) => {
  const { units, sticksFault } = lightWish({ sticks });
  expect(units.stickSpacingM).toBeCloseTo(3.6576, 9);
  expect(sticksFault).toContain('Type it like');
});

test('an address holds the wish it was made of', () => {
  for (const wish of [{}, { in: 'ft' }, { sticks: '3.05' }, { sticks: '10 ft', in: 'ft' }]) {
    const { units } = lightWish(wish);
    expect(lightWish(Object.fromEntries(new URLSearchParams(wishQuery(units)))).units).toEqual(units);
  }
});
