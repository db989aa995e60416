/**
 * Files of casts held against the samples and verdicts of fixtures/09_formats_manifest.json (RFC 4180, RFC 3629;
 * cells checked there with another CSV reader). Cells must be the very same text: no tolerance.
 */
import { readCastsText } from '@mereward/api/surveys/casts-table';
import { Problem } from '@mereward/shared/problems/problem';
import { readCasts, type CastsGround } from '@mereward/shared/surveys/casts-file';
import { csvCell, csvText } from '@mereward/shared/writing/csv-cells';
import { readFileText } from '@mereward/shared/surveys/file-text';
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { aKit } from '../../support/kit';

const fixtures = new URL('../fixtures/', import.meta.url);
const Manifest = z.object({
  files: z.array(
    z.object({ kind: z.string(), file: z.string(), valid: z.boolean(), expect: z.unknown().optional() }),
  ),
});
const manifest = Manifest.parse(
  JSON.parse(readFileSync(new URL('09_formats_manifest.json', fixtures), 'utf8')),
);
const samples = manifest.files.filter((sample) => sample.kind === 'csv');

const bytesOf = (file: string): Uint8Array => readFileSync(new URL(file, fixtures));

function tableOf(file: string): string[][] {
  const read = readFileText(bytesOf(file));
  if (!read.ok) throw new Problem('invalid', read.reason);
  const { table } = readCastsText(read.text);
  return [table.heading, ...table.rows.map(({ cells }) => cells)];
}

const ground: CastsGround = {
  pegs: ['1', '2', '3', '4'].map((number) => ({
    id: `00000000-0000-4000-8000-00000000000${number}`,
    number,
  })),
  marks: [],
  kit: aKit(),
  startedAt: '2027-04-03T08:05:00.000Z',
};

function readWhole(file: string) {
  const read = readFileText(bytesOf(file));
  if (!read.ok) throw new Problem('invalid', read.reason);
  return readCasts(readCastsText(read.text).table, null, ground);
}

test('every sample of the manifest is among those checked here', () => {
  expect(samples).toHaveLength(14);
});

const exact = samples.filter((sample) => Array.isArray(sample.expect));
test.each(exact)('$file gives the cells the manifest states', ({ file, expect: cells }) => {
  expect(tableOf(file)).toEqual(cells);
});

test('a file parted by semicolons with decimal commas gives its numbers', () => {
  const { casts, errors } = readWhole('09_formats/csv/semicolon_decimal_comma.csv');
  expect(errors).toEqual([]);
  expect(casts[0]?.observation).toMatchObject({ aim: { by: 'compass', bearingDeg: 135.5 }, wrapsWhole: 12 });
  expect(casts[0]?.observation.remainderM).toBeCloseTo(aKit().stickSpacingM / 2, 12);
});

test('a quote in the middle of a cell is taken for the text it is', () => {
  expect(tableOf('09_formats/csv/stray_quote.csv')).toEqual([
    ['a', 'b'],
    ['1', '2"3'],
  ]);
});

test('a UTF-16 file with its mark is read, letters and all', () => {
  expect(tableOf('09_formats/csv/utf16.csv')).toEqual(tableOf('09_formats/csv/rfc4180.csv'));
});

describe('files that can’t be trusted are refused in words', () => {
  test.each([
    ['latin1.csv', /not in UTF-8/],
    ['empty.csv', /can’t be read as a table/],
    ['open_quote.csv', /can’t be read as a table/],
  ])('%s', (file, words) => {
    expect(() => tableOf(`09_formats/csv/${file}`)).toThrow(words);
  });

  test('letters already lost before the file came are noticed', () => {
    expect(() => readCastsText('peg,note\n1,\uFFFDtang')).toThrow(Problem);
  });

  test('a row with too few cells is named', () => {
    const { errors, casts } = readCasts(
      readCastsText('peg,bearing,wraps\n1,135,12\n2,90').table,
      null,
      ground,
    );
    expect(errors).toMatchObject([{ row: 3, value: '2 | 90' }]);
    expect(casts).toHaveLength(1);
    expect(tableOf('09_formats/csv/ragged.csv').map((row) => row.length)).toEqual([3, 3, 2]);
  });

  test('two columns of one name are named', () => {
    const { errors, casts } = readWhole('09_formats/csv/dup_header.csv');
    expect(errors).toContainEqual(expect.objectContaining({ row: 1, value: 'depth_m' }));
    expect(casts).toEqual([]);
  });
});

test('what a spreadsheet would run as a formula goes out as text, and numbers stay numbers', () => {
  const notes = tableOf('09_formats/csv/formula.csv')
    .slice(1)
    .map((row) => row[1] ?? '');
  expect(notes.map(csvCell)).toEqual([`"'=HYPERLINK(""http://x"")"`, "'@SUM(1)", '-2.5', "'+44 1234"]);
  expect(['\t=1', '\r=1', '-1+2'].map(csvCell)).toEqual([`"'\t=1"`, `"'\r=1"`, "'-1+2"]);
});

test.each(exact)('$file survives going out and coming in again', ({ file }) => {
  const cells = tableOf(file);
  const { table } = readCastsText(csvText(cells));
  expect([table.heading, ...table.rows.map((row) => row.cells)]).toEqual(cells);
});
