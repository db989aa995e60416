/**
 * Source: fixtures/10_units.json, exact definitions (international yard and pound, 1959; UK and US legal units).
 * Tolerance 1e-9 as the fixture states: definitions are exact, only floating point is allowed for.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import {
  FATHOM_M,
  FOOT_M,
  fromMetres,
  INCH_M,
  MILE_M,
  toMetres,
  YARD_M,
} from '@mereward/shared/units/length';
import {
  ACRE_M2,
  celsiusToFahrenheit,
  DRAM_KG,
  fahrenheitToCelsius,
  GALLON_L,
  HECTARE_M2,
  kgToPoundsAndOunces,
  KNOT_M_PER_S,
  OUNCE_KG,
  POUND_KG,
  poundsAndOuncesToKg,
  STONE_KG,
  US_GALLON_L,
} from '@mereward/shared/units/measures';
import { metresToWraps, wrapsToMetres } from '@mereward/shared/units/wraps';

const TOLERANCE = 1e-9;
const Case = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('length'), ft: z.number(), m: z.number(), yd: z.number() }),
  z.object({ kind: z.literal('lb_oz_to_kg'), lb: z.number(), oz: z.number(), kg: z.number() }),
  z.object({ kind: z.literal('kg_to_lb_oz_nearest_oz'), kg: z.number(), lb: z.number(), oz: z.number() }),
  z.object({ kind: z.literal('temperature'), C: z.number(), F: z.number() }),
]);
const Fixture = z.object({
  exact: z.record(z.string(), z.union([z.number(), z.string()])),
  cases: z.array(Case),
  wraps: z.array(z.object({ wraps: z.number(), spacing_ft: z.number(), distance_m: z.number() })),
});
const fixture = Fixture.parse(
  JSON.parse(readFileSync(new URL('../fixtures/10_units.json', import.meta.url), 'utf8')),
);

const close = (got: number, expected: number) =>
  expect(Math.abs(got - expected)).toBeLessThanOrEqual(TOLERANCE);

describe('exact units', () => {
  test.each([
    ['foot_m', FOOT_M],
    ['yard_m', YARD_M],
    ['inch_m', INCH_M],
    ['fathom_m', FATHOM_M],
    ['mile_m', MILE_M],
    ['pound_kg', POUND_KG],
    ['ounce_kg', OUNCE_KG],
    ['stone_kg', STONE_KG],
    ['acre_m2', ACRE_M2],
    ['hectare_m2', HECTARE_M2],
    ['imperial_gallon_l', GALLON_L],
    ['us_gallon_l', US_GALLON_L],
    ['knot_m_s', KNOT_M_PER_S],
  ])('%s is its definition', (name, value) => close(value, Number(fixture.exact[name])));

  test('a dram is its definition', () => close(DRAM_KG * 1000, Number(fixture.exact['dram_g'])));

  test.each(fixture.cases)('$kind %#', (c) => {
    if (c.kind === 'length') {
      close(toMetres(c.ft, 'ft'), c.m);
      close(fromMetres(c.m, 'ft'), c.ft);
      close(fromMetres(c.m, 'yd'), c.yd);
    } else if (c.kind === 'lb_oz_to_kg') close(poundsAndOuncesToKg(c.lb, c.oz), c.kg);
    else if (c.kind === 'kg_to_lb_oz_nearest_oz') {
      expect(kgToPoundsAndOunces(c.kg)).toEqual({ pounds: c.lb, ounces: c.oz });
    } else {
      close(celsiusToFahrenheit(c.C), c.F);
      close(fahrenheitToCelsius(c.F), c.C);
    }
  });

  test.each(fixture.wraps)('$wraps wraps of $spacing_ft ft', ({ wraps, spacing_ft, distance_m }) => {
    const spacingM = toMetres(spacing_ft, 'ft');
    const whole = Math.floor(wraps);
    close(wrapsToMetres({ whole, remainderM: (wraps - whole) * spacingM }, spacingM), distance_m);
    const back = metresToWraps(distance_m, spacingM);
    close(back.whole + back.remainderM / spacingM, wraps);
  });
});
