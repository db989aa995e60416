import { USUAL_TERMS } from '@mereward/shared/bookings/letting-terms';
import { expect, test } from 'vitest';
import { TermsDraft, typedTerms } from './terms-draft';

const usual = typedTerms(USUAL_TERMS);
const faults = (typed: unknown): string[] =>
  TermsDraft.safeParse(typed).error?.issues.map(({ path, message }) => `${path.join('.')}: ${message}`) ?? [];

test('the usual terms go through the form unchanged', () => {
  expect(TermsDraft.parse(usual)).toEqual(USUAL_TERMS);
});

test('a week is typed as days, two days as hours', () => {
  expect(usual.cancellation.tiers.map(({ notice, unit }) => `${notice} ${unit}`)).toEqual([
    '7 days',
    '48 hours',
    '0 hours',
  ]);
});

test('two steps at the same notice are refused, whichever unit they are typed in', () => {
  const [tier] = usual.cancellation.tiers;
  const tiers = [tier, { ...tier, notice: '168', unit: 'hours' }];
  expect(faults({ ...usual, cancellation: { ...usual.cancellation, tiers } })).toEqual([
    'cancellation.tiers: Two steps begin at the same notice',
  ]);
});

test('half an hour’s notice is refused on its field', () => {
  const tiers = [{ ...usual.cancellation.tiers[0], notice: '0.5', unit: 'hours' }];
  expect(faults({ ...usual, cancellation: { ...usual.cancellation, tiers } })).toEqual([
    'cancellation.tiers.0.notice: Whole hours or days, a year at most',
  ]);
});
