import { ProblemBody } from '@mereward/shared/problems/problem';
import { z } from 'zod';

/** One deed made on this device and still to be done by the server, with what the screens show meanwhile. */
export const OutboxEvent = z.object({
  id: z.string(), // made here; the server does a deed with a known id once
  kind: z.string(), // 'keep-cast'
  group: z.string(), // what it belongs to, such as its visit: in a group nothing overtakes
  at: z.string(), // by this device's clock
  title: z.string(), // "Cast 3"
  note: z.string(), // "Far Ostle, peg FO7"
  method: z.enum(['POST', 'DELETE']),
  path: z.string(),
  body: z.unknown(),
  shown: z.unknown(), // as the answer would be, made on this device
  again: z.object({ href: z.string(), typed: z.unknown() }).nullable(), // the form it came from, as it was typed
  touches: z.array(z.array(z.string())), // keys of the readings it changes, the nearest first
});
export type OutboxEvent = z.infer<typeof OutboxEvent>;

/** What the server refused it with. */
export const Refusal = ProblemBody.pick({ kind: true, title: true, detail: true, errors: true });
export type Refusal = z.infer<typeof Refusal>;

/** An event in its place in the queue. `sent` ones stay until what they changed has been read again. */
export type OutboxEntry = OutboxEvent & {
  seq: number;
  state: 'waiting' | 'refused' | 'sent';
  attempts: number;
  refusal: Refusal | null;
};
