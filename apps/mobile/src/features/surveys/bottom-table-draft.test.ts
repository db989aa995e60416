import { BottomFeel } from '@mereward/shared/surveys/bottom-table-contract';
import { USUAL_FEEL } from '@mereward/shared/surveys/usual-feel';
import { describe, expect, test } from 'vitest';
import { editedFeel, percentText, readRow, rowKey, rowOf, typedRow } from './bottom-table-draft';

const gravel = { map: 'substrate', name: 'gravel' } as const;
const drop = rowOf(USUAL_FEEL, gravel, 'drop');
const parse = (feel: unknown) => BottomFeel.parse(feel);

describe('a row of the table as it is typed', () => {
  test('laid into the form and read back is the same row', () => {
    const read = readRow(typedRow(drop), drop);
    if (!read.ok) throw new Error(read.words);
    for (const [feel, share] of Object.entries(drop)) expect(read.shares[feel]).toBeCloseTo(share, 12);
  });

  test('that doesn’t add up is told by how much', () => {
    const short = readRow({ ...typedRow(drop), dull: '2' }, drop);
    expect(short).toMatchObject({ ok: false, words: expect.stringMatching(/90\.0 %: 10\.0 % short/) });
    const over = readRow({ ...typedRow(drop), dull: '22' }, drop);
    expect(over).toMatchObject({ ok: false, words: expect.stringMatching(/10\.0 % too much/) });
  });

  test.each([
    ['nothing', ''],
    ['a word', 'many'],
    ['a nought', '0'],
    ['less than nothing', '-3'],
  ])('with %s in it is refused', (_, text) => {
    expect(readRow({ ...typedRow(drop), dull: text }, drop).ok).toBe(false);
  });

  test('rounded to two decimals is evened out to 1', () => {
    const thirds = { a: 1 / 3, b: 1 / 3, c: 1 / 3 };
    const read = readRow({ a: '33.33', b: '33.33', c: '33.34' }, { ...thirds, c: 0.3 });
    if (!read.ok) throw new Error(read.words);
    expect(Object.values(read.shares).reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 12);
    expect(percentText(1 / 3)).toBe('33.33');
  });
});

describe('the edited table', () => {
  test('holds what was typed and leaves the rest', () => {
    const row = { ...typedRow(drop), sharp_crack: '28', firm_thud: '42' };
    const edited = editedFeel(
      USUAL_FEEL,
      { rows: { [rowKey(gravel, 'drop')]: row }, fade: { tall_weed: '2' } },
      parse,
    );
    if (!edited.ok) throw new Error(edited.words);
    expect(edited.feel.substrate.of.gravel.drop.firm_thud).toBeCloseTo(0.42, 12);
    expect(edited.feel.substrate.of.clay).toEqual(USUAL_FEEL.substrate.of.clay);
    expect(edited.feel.fadeMonths).toEqual({ ...USUAL_FEEL.fadeMonths, tall_weed: 2 });
    expect(USUAL_FEEL.substrate.of.gravel.drop.firm_thud).toBe(0.32);
  });

  test('is refused with a row that is not right, and with a half-life of nothing', () => {
    const row = { ...typedRow(drop), dull: '50' };
    expect(
      editedFeel(USUAL_FEEL, { rows: { [rowKey(gravel, 'drop')]: row }, fade: {} }, parse),
    ).toMatchObject({
      ok: false,
      words: expect.stringMatching(/^gravel/),
    });
    expect(editedFeel(USUAL_FEEL, { rows: {}, fade: { low_weed: '0' } }, parse).ok).toBe(false);
  });
});
