import type { CastView, VisitView, VisitWithCasts } from '@mereward/shared/surveys/contract';
import { NOTHING_FELT } from '@mereward/shared/surveys/nothing-felt';
import { expect, test } from 'vitest';
import { kitToStartFrom, kitOf, KitDraft } from './kit-draft';
import { openedHere, visitShown, visitsShown } from './shown-visit';

const id = (n: number): string => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;
const LAKE = id(900);
const PEG = id(800);
const FAILED = { ok: false as const, reason: 'not worked out', remedy: '', steps: [] };

const visit: VisitView = {
  id: id(1),
  lakeId: LAKE,
  lakeName: 'Far Ostle',
  title: 'Spring survey',
  surveyor: { id: id(700), name: 'Joan' },
  competence: 'lead',
  status: 'open',
  startedAt: '2027-04-03T08:05:00.000Z',
  endedAt: null,
  boardId: id(600),
  gaugeStartM: 0.62,
  gaugeEndM: null,
  datumM: 0.62,
  weather: { windForce: null, windFrom: null, note: '' },
  clarity: '',
  weedState: '',
  kit: kitOf(KitDraft.parse({ ...kitToStartFrom(null), wrapReference: 'lead_to_clip' })),
  consentToPublish: true,
  castCount: 0,
  soundingCount: 0,
  version: 1,
  may: { addCasts: true, correct: true },
};

const cast = (n: number, seq: number): CastView => ({
  id: id(n),
  visitId: visit.id,
  pegId: PEG,
  seq,
  lineId: id(n),
  observedAt: '2027-04-03T08:30:00.000Z',
  observation: {
    aim: { by: 'compass', bearingDeg: 10, method: 'estimated' },
    sidestepM: 0,
    wrapsWhole: 14,
    remainderM: 0,
    remainderStated: true,
    lineText: '14',
    rodElevationDeg: 0,
    ...NOTHING_FELT,
    flags: [],
  },
  reduced: FAILED,
});

type State = 'waiting' | 'refused' | 'sent';
let counted = 0;
const entry = (kind: string, what: { shown?: unknown; body?: unknown; state?: State }) => ({
  seq: (counted += 1),
  kind,
  group: `visit:${visit.id}`,
  state: what.state ?? 'waiting',
  body: what.body ?? null,
  shown: what.shown ?? null,
});
const keeping = (n: number, state: State = 'waiting') => entry('keep-cast', { shown: cast(n, 77), state });
const undoing = (n: number, state: State = 'waiting') =>
  entry('undo-cast', { shown: { castId: id(n) }, state });
const closing = (state: State = 'waiting') =>
  entry('close-visit', { body: { endedAt: '2027-04-03T10:00:00.000Z', gaugeEndM: 0.65 }, state });

const known = (...casts: CastView[]): VisitWithCasts => ({ visit, casts, coverage: [] });
const seqs = ({ casts }: VisitWithCasts): number[] => casts.map(({ seq }) => seq);

test('casts that wait follow the kept ones, numbered on', () => {
  const shown = visitShown(known(cast(10, 1), cast(11, 2)), [keeping(12), keeping(13)]);
  expect(seqs(shown)).toEqual([1, 2, 3, 4]);
  expect(shown.unsent).toEqual({ [id(12)]: 'waiting', [id(13)]: 'waiting' });
  expect(shown.visit.castCount).toBe(4);
});

test('a cast the server has already is shown once, and no longer as waiting', () => {
  const shown = visitShown(known(cast(12, 1)), [keeping(12), keeping(13)]);
  expect(seqs(shown)).toEqual([1, 2]);
  expect(shown.unsent).toEqual({ [id(13)]: 'waiting' });
});

test('a sent cast not read again yet is shown as kept', () => {
  const shown = visitShown(known(), [keeping(12, 'sent')]);
  expect(seqs(shown)).toEqual([1]);
  expect(shown.unsent).toEqual({});
});

test('a cast taken back is gone, and its number is not given again, as on the server', () => {
  const shown = visitShown(known(cast(10, 1)), [keeping(12), undoing(12), keeping(13)]);
  expect(seqs(shown)).toEqual([1, 3]);
});

test('a taking back that was refused takes nothing back', () => {
  expect(seqs(visitShown(known(cast(10, 1)), [undoing(10, 'refused')]))).toEqual([1]);
});

test('a visit closed here is closed, takes no more casts, and its casts are reduced with both readings', () => {
  const seen: (number | null)[] = [];
  const shown = visitShown(known(cast(10, 1)), [keeping(12), closing()], {
    reduce: (_cast, of) => {
      seen.push(of.visit.gaugeEndM);
      return { ...FAILED, reason: 'reduced anew' };
    },
    cover: () => null,
  });
  expect(shown.visit).toMatchObject({ status: 'closed', gaugeEndM: 0.65, may: { addCasts: false } });
  expect(seen).toEqual([0.65, 0.65]);
  expect(shown.casts.map(({ reduced }) => !reduced.ok && reduced.reason)).toEqual([
    'reduced anew',
    'reduced anew',
  ]);
});

test('a closing that was refused leaves the visit open', () => {
  const shown = visitShown(known(), [closing('refused')]);
  expect(shown.visit.status).toBe('open');
  expect(shown.closing).toBe('refused');
});

test('a cast is left as it was reduced when made where the lake or the peg was never read here', () => {
  const [first] = visitShown(known(), [keeping(12)]).casts;
  expect(first?.reduced).toEqual(FAILED);
});

test('another visit’s queue changes nothing, and what an older program left unreadable is passed by', () => {
  const other = { ...keeping(12), group: `visit:${id(2)}` };
  const unreadable = entry('keep-cast', { shown: { wraps: 'fourteen' } });
  expect(seqs(visitShown(known(cast(10, 1)), [other, unreadable]))).toEqual([1]);
});

test('a visit opened here is there before the server has it, and may be cast in but not corrected', () => {
  const opening = entry('open-visit', { shown: visit });
  const opened = openedHere([opening], visit.id);
  expect(opened?.casts).toEqual([]);
  const shown = visitShown(opened ?? known(), [opening, keeping(12)]);
  expect(shown).toMatchObject({ opening: 'waiting', visit: { may: { addCasts: true, correct: false } } });
  expect(openedHere([{ ...opening, state: 'sent' }], visit.id)).toBeNull();
});

test('a lake’s list begins with what was opened here and counts what waits', () => {
  const later = { ...visit, id: id(2), castCount: 5 };
  const queue = [entry('open-visit', { shown: visit }), keeping(12)];
  const { visits } = visitsShown({ visits: [later], may: { open: true } }, queue, LAKE);
  expect(visits.map((each) => [each.id, each.castCount])).toEqual([
    [visit.id, 1],
    [later.id, 5],
  ]);
  expect(visitsShown({ visits: [later], may: { open: true } }, queue, id(901)).visits).toHaveLength(1);
});
