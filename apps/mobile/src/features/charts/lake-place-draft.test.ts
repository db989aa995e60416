import { expect, test } from 'vitest';
import { draftOfPlace, newPlace, PlaceDraft, placeOfDraft } from './lake-place-draft';

const ID = '00000000-0000-4000-8000-000000000001';

test('a hazard is everybody’s, and a place that was a line before keeps its first point', () => {
  const typed = {
    ...newPlace(ID),
    name: 'Stakes',
    points: '53.6, 1.62\n53.7, 1.63',
    audience: 'staff' as const,
  };
  expect(placeOfDraft(PlaceDraft.parse({ ...typed, kind: 'hazard' }))).toMatchObject({
    at: [[1.62, 53.6]],
    audience: 'public',
  });
  const line = placeOfDraft(PlaceDraft.parse({ ...typed, kind: 'overhead_line' }));
  expect(line.at).toEqual([
    [1.62, 53.6],
    [1.63, 53.7],
  ]);
  expect(placeOfDraft(PlaceDraft.parse({ ...typed, kind: 'gate' })).audience).toBe('staff');
  expect(placeOfDraft(PlaceDraft.parse(draftOfPlace(line)))).toEqual(line);
});

test('a place that is nowhere and a line of one post are refused in words', () => {
  const faults = (wishes: object) =>
    PlaceDraft.safeParse({ ...newPlace(ID), name: 'It', ...wishes }).error?.issues.map(
      ({ message }) => message,
    );
  expect(faults({})).toEqual(['Tap it on the lake, or type its latitude and longitude.']);
  expect(faults({ kind: 'overhead_line', points: '53.6, 1.62' })).toEqual([
    'A line takes two posts or more.',
  ]);
});
