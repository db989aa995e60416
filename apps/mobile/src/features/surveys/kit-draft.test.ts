import { expect, test } from 'vitest';
import { KitDraft, kitOf, kitToStartFrom, typedKit, USUAL_KIT } from './kit-draft';

const chosen = { ...USUAL_KIT, wrapReference: 'lead_to_clip' as const };

test('a kit without its wrap reference is refused: it is never guessed', () => {
  expect(KitDraft.safeParse(USUAL_KIT).success).toBe(false);
  expect(KitDraft.safeParse(chosen).success).toBe(true);
});

test('sticks, rod and pulls are kept in metres', () => {
  expect(kitOf(KitDraft.parse(chosen))).toMatchObject({
    stickSpacingM: 3.6576,
    rodLengthM: 3.6576,
    pullM: 0.3048,
    floatOffsetM: 0.25,
    stickDiameterM: null,
    stickCheckedOn: null,
  });
});

test('another spacing has to be typed', () => {
  expect(KitDraft.safeParse({ ...chosen, sticks: 'other', stickSpacingM: '' }).success).toBe(false);
  const read = KitDraft.parse({ ...chosen, sticks: 'other', stickSpacingM: '1,5' });
  expect(kitOf(read).stickSpacingM).toBe(1.5);
});

test('a kit comes through the form unchanged', () => {
  const kit = kitOf(
    KitDraft.parse({ ...chosen, stickDiameterMm: '12', stickCheckedOn: '2027-03-01', lineType: 'mono' }),
  );
  expect(kitOf(KitDraft.parse(typedKit(kit)))).toEqual(kit);
});

test('a calibrated lead comes through the form, and none is none', () => {
  const leadId = '6a1f0d52-3c1e-4f9e-9a54-0d6a3b6f7c03';
  const kit = kitOf(KitDraft.parse({ ...chosen, leadId }));
  expect(kit.leadId).toBe(leadId);
  expect(kitOf(KitDraft.parse(typedKit(kit)))).toEqual(kit);
  expect(kitOf(KitDraft.parse(chosen))).not.toHaveProperty('leadId');
});

test('the last visit’s kit is carried over, but what wraps are read to is asked afresh', () => {
  const kit = { ...kitOf(KitDraft.parse(chosen)), floatOffsetM: 0.31 };
  expect(kitToStartFrom(kit)).toMatchObject({ floatOffsetM: '0.31', wrapReference: null });
  expect(kitToStartFrom(null)).toBe(USUAL_KIT);
});
