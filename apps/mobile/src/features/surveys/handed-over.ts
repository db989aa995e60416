import { RecordLevel } from '@mereward/shared/lakes/contract';
import { CloseVisit, KeepCast, OpenVisit } from '@mereward/shared/surveys/contract';
import { z } from 'zod';
import { visitGroup } from '@/features/surveys/visit-events';
import { OutboxEvent, type OutboxEntry } from '@/lib/outbox-event';

/** Some two thousand casts; a larger file is none of ours. */
export const LARGEST_BYTES = 8_000_000;
const MOST_THINGS = 5_000;
const VERSION = 1;

/** What every version of the file says first. */
const Head = z.object({ what: z.literal('mereward-waiting'), version: z.int() });

/** What waits on one phone, to be sent from another: a person's own things, readable, each with its own id. */
const HandOver = Head.extend({
  version: z.literal(VERSION),
  account: z.object({ id: z.string(), name: z.string() }),
  savedAt: z.iso.datetime(), // by the clock of the phone that saved it
  things: z.array(OutboxEvent).min(1).max(MOST_THINGS), // in their order
});
export type HandOver = z.infer<typeof HandOver>;

type Deed = {
  method: OutboxEvent['method'];
  path: RegExp;
  /** What the thing is known by, from the ids its path names and what it sends; undefined when those are not of the deed. */
  id: (ids: readonly string[], body: unknown) => string | undefined;
  /** What it belongs to; undefined where only the queue knows. */
  group: (ids: readonly string[], id: string) => string | undefined;
};

const UUID = '([0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12})';
const pathOf = (pattern: string): RegExp => new RegExp(`^${pattern.replaceAll('*', UUID)}$`);
const ofFirst = ([visitId = '']: readonly string[]): string => visitGroup(visitId);

/** Every deed that can be handed over. A file is only believed as far as it could have been made by our own forms. */
const DEEDS: Readonly<Record<string, Deed>> = {
  'open-visit': {
    method: 'POST',
    path: pathOf('/lakes/*/visits'),
    id: (_ids, body) => OpenVisit.safeParse(body).data?.id,
    group: (_ids, id) => visitGroup(id),
  },
  'keep-cast': {
    method: 'POST',
    path: pathOf('/visits/*/casts'),
    id: (_ids, body) => KeepCast.safeParse(body).data?.id,
    group: ofFirst,
  },
  'undo-cast': {
    method: 'DELETE',
    path: pathOf('/visits/*/casts/*'),
    id: ([, castId = '']) => `undo:${castId}`,
    group: ofFirst,
  },
  'close-visit': {
    method: 'POST',
    path: pathOf('/visits/*/close'),
    id: ([visitId = ''], body) => (CloseVisit.safeParse(body).success ? `close:${visitId}` : undefined),
    group: ofFirst,
  },
  'record-level': {
    method: 'POST',
    path: pathOf('/boards/*/readings'),
    id: (_ids, body) => RecordLevel.safeParse(body).data?.id,
    group: ([boardId = '']) => `board:${boardId}`,
  },
  'take-back-level': {
    method: 'DELETE',
    path: pathOf('/readings/*'),
    id: ([readingId = '']) => `undo:${readingId}`,
    group: () => undefined,
  },
};

const FORMS = /^\/bank\/[\w/?=&-]*$/;

/** Whether one of our own forms could have made it. */
export function mayBeHandedOver(event: OutboxEvent): boolean {
  const deed = Object.hasOwn(DEEDS, event.kind) ? DEEDS[event.kind] : undefined;
  const ids = deed?.path.exec(event.path)?.slice(1);
  if (!deed || !ids || deed.method !== event.method) return false;
  if (event.again && !FORMS.test(event.again.href)) return false;
  const id = deed.id(ids, event.body);
  return id === event.id && (deed.group(ids, id) ?? event.group) === event.group;
}

type Terms = { account: HandOver['account']; savedAt: string };

/** What waits, refused things with it. `left`: how many are of another make and stay where they are. */
export function handOver(
  entries: readonly OutboxEntry[],
  { account: { id, name }, savedAt }: Terms,
): { file: HandOver; left: number } {
  const open = entries.filter(({ state }) => state !== 'sent').sort((a, b) => a.seq - b.seq);
  const things = open.map((entry) => OutboxEvent.parse(entry)).filter(mayBeHandedOver);
  const file = {
    what: 'mereward-waiting',
    version: VERSION,
    account: { id, name },
    savedAt,
    things,
  } as const;
  return { file, left: open.length - things.length };
}

export type Taken =
  | { state: 'fits'; savedAt: string; things: readonly OutboxEvent[] }
  | { state: 'refused'; title: string; whatToDo: string };

const refused = (title: string, whatToDo: string): Taken => ({ state: 'refused', title, whatToDo });

const parsed = (text: string): unknown => {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
};

/** Reads what was handed over, for that account: all of it or nothing, with words for what is wrong. */
export function takenOver(text: string, accountId: string): Taken {
  const another = 'Choose the one that was saved on the other phone under “Waiting to be sent”.';
  if (text.length > LARGEST_BYTES)
    return refused('This file is larger than any of ours', `Nothing was brought in. ${another}`);
  const content = parsed(text);
  const head = Head.safeParse(content).data;
  if (!head) return refused('This is no file of what waits to be sent', `Nothing was brought in. ${another}`);
  if (head.version !== VERSION)
    return refused(
      'This file was saved by another version of the program',
      'Nothing was brought in. Reload this page where there is a signal, then bring it in again.',
    );
  const file = HandOver.safeParse(content).data;
  if (!file || !file.things.every(mayBeHandedOver))
    return refused(
      'Something in this file is damaged',
      'Nothing was brought in. Save it anew on the other phone and bring that in.',
    );
  if (file.account.id !== accountId)
    return refused(
      'These are another person’s things',
      `Nothing was brought in. ${file.account.name} signs in here to bring them in: they are sent in the name of whoever made them.`,
    );
  return { state: 'fits', savedAt: file.savedAt, things: file.things };
}
