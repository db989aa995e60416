import { expect, test } from 'vitest';
import { EventDraft, eventOf } from './event-draft';

const typed = {
  id: '6a1f0d52-3c1e-4f9e-9a54-0d6a3b6f7c03',
  kind: 'weed_cut',
  happenedOn: '2027-06-01',
  where: 'area',
  corners: '52.1, -1.1\n52.2, -1.1\n52.2, -1.2',
  ends: ['cover'],
  note: '',
} as const;

test('an area typed corner by corner is a closed ring, longitude first', () => {
  const { area } = eventOf(EventDraft.parse({ ...typed, ends: [...typed.ends] }));
  expect(area?.coordinates).toEqual([
    [
      [-1.1, 52.1],
      [-1.1, 52.2],
      [-1.2, 52.2],
      [-1.1, 52.1],
    ],
  ]);
});

test('the whole lake has no area, whatever was drawn before', () => {
  expect(eventOf(EventDraft.parse({ ...typed, ends: ['cover'], where: 'whole' })).area).toBeNull();
});

test.each([
  ['two corners', { corners: '52.1, -1.1\n52.2, -1.1' }],
  ['a line that is no place', { corners: `${typed.corners}\nby the oak` }],
  ['nothing that it ends', { ends: [] }],
  ['no day', { happenedOn: '' }],
])('%s is refused', (_, wishes) => {
  expect(EventDraft.safeParse({ ...typed, ends: ['cover'], ...wishes }).success).toBe(false);
});
