import type { VisitView } from '@mereward/shared/surveys/contract';
import { NOTHING_FELT } from '@mereward/shared/surveys/nothing-felt';
import { describe, expect, test } from 'vitest';
import type { OutboxEntry } from '@/lib/outbox-event';
import { handOver, LARGEST_BYTES, mayBeHandedOver, takenOver, type HandOver } from './handed-over';
import { kitOf, KitDraft, kitToStartFrom } from './kit-draft';
import { castsFrom, closingOf, keepingOf, lakeOf, movedTo, openingOf, undoingOf } from './visit-events';

const id = (n: number): string => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;
const JOAN = { id: id(700), name: 'Joan' };
const LAKE = id(900);
const AT = '2027-04-03T08:30:00.000Z';
const kit = kitOf(KitDraft.parse({ ...kitToStartFrom(null), wrapReference: 'lead_to_clip' }));
const weather = { windForce: null, windFrom: null, note: '' };

const opened = (n: number, title: string) => ({
  id: id(n),
  title,
  competence: 'lead' as const,
  boardId: id(600),
  startedAt: AT,
  gaugeStartM: 0.62,
  weather,
  clarity: '',
  weedState: '',
  kit,
  consentToPublish: true,
});

const visit = (n: number, title: string): VisitView => ({
  ...opened(n, title),
  lakeId: LAKE,
  lakeName: 'Far Ostle',
  surveyor: JOAN,
  status: 'open',
  endedAt: null,
  gaugeEndM: null,
  datumM: 0.62,
  castCount: 0,
  soundingCount: 0,
  version: 1,
  may: { addCasts: true, correct: true },
});

const observation = {
  aim: { by: 'compass' as const, bearingDeg: 10, method: 'estimated' as const },
  sidestepM: 0,
  wrapsWhole: 14,
  remainderM: 0,
  remainderStated: true,
  lineText: '14',
  rodElevationDeg: 0,
  ...NOTHING_FELT,
  flags: [],
};
const reduced = { ok: false as const, reason: 'not worked out', remedy: '', steps: [] };

const first = visit(1, 'Spring survey');
const second = visit(2, 'Afternoon');
const cast = (n: number) => ({ id: id(n), pegId: id(800), lineId: id(n), observedAt: AT, observation });
const keeping = (n: number) =>
  keepingOf({
    visit: first,
    cast: cast(n),
    shown: { ...cast(n), visitId: first.id, seq: n - 9, reduced },
    words: 'FO7, 14 wraps',
    typed: { wraps: '14' },
  });

type Standing = Partial<Pick<OutboxEntry, 'state' | 'attempts'>>;
const entry = (seq: number, event: ReturnType<typeof keeping>, standing: Standing = {}): OutboxEntry => ({
  ...event,
  seq,
  state: 'waiting',
  attempts: 0,
  refusal: null,
  ...standing,
});

const queue = [
  entry(1, openingOf(opened(1, 'Spring survey'), first, {}), { state: 'sent' }),
  entry(4, closingOf(first, { endedAt: AT, gaugeEndM: 0.6 }, {})),
  entry(2, keeping(10), { state: 'refused', attempts: 1 }),
  entry(3, keeping(11)),
];
const made = () => handOver(queue, { account: JOAN, savedAt: AT });
const fileWith = (change: object): string => JSON.stringify({ ...made().file, ...change });
const refusal = (text: string): string => {
  const taken = takenOver(text, JOAN.id);
  return taken.state === 'refused' ? taken.title : 'fits';
};

describe('what waits, handed over', () => {
  test('comes out as it went in, in order, with its ids, and without what is sent', () => {
    const { file, left } = made();
    expect(left).toBe(0);
    const taken = takenOver(JSON.stringify(file), JOAN.id);
    expect(taken).toEqual({ state: 'fits', savedAt: AT, things: file.things });
    expect(file.things.map((thing) => thing.id)).toEqual([id(10), id(11), `close:${id(1)}`]);
    expect(file.things[0]).toEqual(keeping(10));
  });

  test('holds nothing of how it stood on the phone it comes from', () => {
    expect(Object.keys(made().file.things[0] ?? {})).not.toContain('state');
    expect(Object.keys(made().file.things[0] ?? {})).not.toContain('refusal');
  });

  test('leaves behind what no form of this program makes', () => {
    const odd = entry(5, { ...keeping(12), kind: 'of-a-newer-program' });
    expect(handOver([...queue, odd], { account: JOAN, savedAt: AT })).toMatchObject({ left: 1 });
  });

  test('is refused in words when it is another’s, of another version, damaged, too large or no such file', () => {
    expect(refusal(fileWith({}))).toBe('fits');
    expect(refusal(fileWith({ account: { id: id(701), name: 'Tom' } }))).toBe(
      'These are another person’s things',
    );
    expect(refusal(fileWith({ version: 2, things: 'of another shape' }))).toContain('another version');
    expect(refusal(fileWith({ things: [] }))).toContain('damaged');
    expect(refusal(fileWith({}).slice(0, -3))).toContain('no file of what waits');
    expect(refusal('[]')).toContain('no file of what waits');
    expect(refusal(' '.repeat(LARGEST_BYTES + 1))).toContain('larger');
  });
});

describe('a thing in a file', () => {
  const forged = (change: Partial<HandOver['things'][number]>): boolean =>
    mayBeHandedOver({ ...keeping(10), ...change });

  test('of each deed of the bank is believed as our forms make it', () => {
    const shown = { ...cast(10), visitId: first.id, seq: 1, reduced };
    const deeds = [
      openingOf(opened(1, 'Spring survey'), first, {}),
      keeping(10),
      undoingOf(first, shown, AT),
      closingOf(first, { endedAt: AT, gaugeEndM: 0.6 }, {}),
    ];
    expect(deeds.filter((deed) => !mayBeHandedOver(deed))).toEqual([]);
  });

  test('is not believed when it would do anything else in its owner’s name', () => {
    expect(forged({})).toBe(true);
    expect(forged({ path: '/accounts/me/erasure' })).toBe(false);
    expect(forged({ path: `/visits/${id(1)}/casts/../close` })).toBe(false);
    expect(forged({ path: `/visits/${id(1)}/casts?x=1` })).toBe(false);
    expect(forged({ path: `/visits/${id(2)}/casts` })).toBe(false); // its place in the queue is the first visit's
    expect(forged({ method: 'DELETE' })).toBe(false);
    expect(forged({ kind: 'close-visit' })).toBe(false);
    expect(forged({ kind: 'toString' })).toBe(false);
    expect(forged({ id: id(11) })).toBe(false);
    expect(forged({ body: { ...cast(10), observation: { ...observation, wrapsWhole: -1 } } })).toBe(false);
    expect(forged({ again: { href: 'https://elsewhere.example/', typed: {} } })).toBe(false);
    expect(forged({ again: { href: '//elsewhere.example/', typed: {} } })).toBe(false);
  });
});

describe('a cast moved to another visit', () => {
  const moved = movedTo(second, keeping(10));

  test('is the same cast, sent to that visit and shown in it', () => {
    expect(moved).toMatchObject({ id: id(10), body: cast(10), at: AT, group: `visit:${id(2)}` });
    expect(moved.path).toBe(`/visits/${id(2)}/casts`);
    expect(moved.shown).toMatchObject({ id: id(10), visitId: id(2) });
    expect(moved.again).toEqual({ href: `/bank/surveys/${id(2)}/cast`, typed: { wraps: '14' } });
    expect(moved.note).toContain('Spring survey');
    expect(lakeOf(moved)).toBe(LAKE);
    expect(mayBeHandedOver(moved)).toBe(true);
  });

  test('may take along the casts behind it, save what has left and what is of another visit', () => {
    const behind = [
      entry(1, keeping(9), { state: 'sent' }),
      entry(2, keeping(10), { state: 'refused', attempts: 1 }),
      entry(3, keeping(11)),
      entry(4, keeping(12), { attempts: 1 }),
      entry(5, movedTo(second, keeping(13))),
      entry(6, closingOf(first, { endedAt: AT, gaugeEndM: 0.6 }, {})),
    ];
    const [, refused] = behind;
    expect(refused && castsFrom(behind, refused).map(({ seq }) => seq)).toEqual([2, 3]);
  });
});
