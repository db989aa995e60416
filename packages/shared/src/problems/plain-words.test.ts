import { expect, test } from 'vitest';
import { z } from 'zod';
import { plainWords } from './plain-words';

const said = (schema: z.ZodType, input: unknown): string | undefined =>
  schema.safeParse(input, { error: plainWords }).error?.issues[0]?.message;

test('what is missing is asked for', () => {
  for (const schema of [z.string().min(1), z.string().min(12), z.email(), z.iso.date()])
    expect(said(schema, '')).toBe('Fill this in');
  expect(said(z.number(), undefined)).toBe('Fill this in');
  expect(said(z.enum(['a', 'b']), null)).toBe('Choose one');
});

test('bounds are told', () => {
  expect(said(z.string().min(12), 'short')).toBe('At least 12 characters are needed');
  expect(said(z.string().max(3), 'long')).toBe('At most 3 characters fit');
  expect(said(z.number().min(0.3), 0)).toBe('It must be 0.3 or more');
  expect(said(z.number().lt(10), 10)).toBe('It must be less than 10');
  expect(said(z.array(z.string()).min(1), [])).toBe('At least one is needed');
});

test('formats are shown by example', () => {
  expect(said(z.email(), 'nobody')).toBe('An e-mail address looks like name@example.org');
  expect(said(z.number(), 'x')).toBe('Give a number, like 2.4');
  expect(said(z.strictObject({}), { odd: 1 })).toBe('Not known here: odd');
});

test('a schema’s own words win', () => {
  expect(said(z.string().min(3, { error: 'A name has three letters' }), 'a')).toBe(
    'A name has three letters',
  );
});
