import type { BoardEvent } from '@mereward/shared/bookings/availability-contract';
import { Problem } from '@mereward/shared/problems/problem';
import type { Request, Response } from 'express';
import { randomUUID } from 'node:crypto';
import { listenTo, type Listener } from '../http/database-listener';
import type { Server } from '../http/server';
import { tellingLakes } from './told-lakes';

const BEAT_MS = 20_000;
/** How long a browser waits before it comes again. */
const RETRY_MS = 3000;
/** A lodge full of anglers shares one address. */
const MOST_OF_ONE_ADDRESS = 60;
const MOST = 2000;
/** What a reader that doesn’t read may leave lying here before it is let go. */
const MOST_UNREAD_BYTES = 64 * 1024;

type Stream = { fisheryId: string; address: string; res: Response };

export type BoardStreams = {
  /** Answers a request with a stream of a fishery’s changes. Throws a Problem when there are too many of them. */
  open: (req: Request, res: Response, fisheryId: string) => void;
  count: () => number;
  close: () => Promise<void>;
};

type Wishes = { beatMs?: number; failed?: (error: unknown) => void };

/**
 * The streams of this process: one connection listens to the database and what it hears goes to every stream of that
 * fishery. It listens from the first stream to the last. Nothing in a stream says more than which lake changed.
 */
export function openBoardStreams(
  { config, source }: Pick<Server, 'config' | 'source'>,
  { beatMs = BEAT_MS, failed = () => undefined }: Wishes = {},
): BoardStreams {
  const streams = new Set<Stream>();
  const fisheryOf = new Map<string, string>(); // of each lake; a lake never changes hands
  const changedAt = new Map<string, number>(); // each lake’s newest event since it listens
  let listener: Listener | null = null;
  let beat: NodeJS.Timeout | null = null;
  let era = ''; // one unbroken stretch of listening
  let events = 0;
  let closed = false;

  const lakes = tellingLakes((lakeId) => void tellLake(lakeId).catch(failed));

  async function tellLake(lakeId: string): Promise<void> {
    const known = fisheryOf.get(lakeId);
    if (known === undefined) {
      const rows: { id: string; fisheryId: string }[] = await source.query(
        'SELECT id, fishery_id AS "fisheryId" FROM lake WHERE id = $1',
        [lakeId],
      );
      for (const row of rows) fisheryOf.set(row.id, row.fisheryId);
    }
    const fisheryId = fisheryOf.get(lakeId);
    if (fisheryId === undefined) return;
    events += 1;
    changedAt.set(lakeId, events);
    for (const stream of streams) if (stream.fisheryId === fisheryId) say(stream, lakeId);
  }

  /** What was told while nobody listened is unknown: every lake may have changed. */
  async function tellAll(to: Iterable<Stream>): Promise<void> {
    const behind = new Map<string, Stream[]>();
    for (const stream of to) behind.set(stream.fisheryId, [...(behind.get(stream.fisheryId) ?? []), stream]);
    const rows: { id: string; fisheryId: string }[] = await source.query(
      'SELECT id, fishery_id AS "fisheryId" FROM lake WHERE fishery_id = ANY ($1)',
      [[...behind.keys()]],
    );
    for (const { id, fisheryId } of rows) {
      fisheryOf.set(id, fisheryId);
      for (const stream of behind.get(fisheryId) ?? []) say(stream, id);
    }
  }

  function say(stream: Stream, lakeId: string): void {
    const event: BoardEvent = { lakeId };
    write(stream, `id: ${era}.${events}\nevent: board\ndata: ${JSON.stringify(event)}\n\n`);
  }

  function write(stream: Stream, text: string): void {
    if (stream.res.writableLength > MOST_UNREAD_BYTES) stream.res.destroy();
    else stream.res.write(text);
  }

  function start(): void {
    if (listener) return;
    listener = listenTo(config.databaseUrl, 'peg_time', {
      heard: lakes.changed,
      listening: () => {
        era = randomUUID().slice(0, 8);
        changedAt.clear();
        void tellAll(streams).catch(failed);
      },
      failed,
    });
    beat = setInterval(() => {
      for (const stream of streams) write(stream, 'event: beat\ndata: {}\n\n');
    }, beatMs);
    beat.unref();
  }

  async function stop(): Promise<void> {
    if (beat) clearInterval(beat);
    lakes.stop();
    const running = listener;
    listener = null;
    await running?.stop();
  }

  /** What came while this reader was away: the lakes that changed since, or all of them when that is not known. */
  function catchUp(stream: Stream, last: string): void {
    const [lastEra, lastEvent] = last.split('.');
    if (lastEra !== era) return void tellAll([stream]).catch(failed);
    for (const [lakeId, event] of changedAt)
      if (event > Number(lastEvent) && fisheryOf.get(lakeId) === stream.fisheryId) say(stream, lakeId);
  }

  return {
    open(req, res, fisheryId) {
      if (closed)
        throw new Problem('internal', 'The server is stopping', { detail: 'Come again in a minute.' });
      const address = req.ip ?? '';
      const ofAddress = [...streams].filter((each) => each.address === address).length;
      if (ofAddress >= MOST_OF_ONE_ADDRESS || streams.size >= MOST)
        throw new Problem('too-many', 'Too many boards are being watched from here', {
          detail: 'Close some of them. What is free can still be asked for at any time.',
        });
      const stream = { fisheryId, address, res };
      streams.add(stream);
      res.on('close', () => {
        streams.delete(stream);
        if (streams.size === 0) void stop().catch(failed);
      });
      res.writeHead(200, {
        'Content-Type': 'text/event-stream; charset=utf-8',
        'Cache-Control': 'no-store, no-transform', // no-transform: never packed, so that each word leaves at once
        'X-Accel-Buffering': 'no',
      });
      res.write(`retry: ${RETRY_MS}\n\n`);
      const last = req.get('Last-Event-ID');
      if (listener && last) catchUp(stream, last);
      start();
    },
    count: () => streams.size,
    async close() {
      closed = true;
      for (const { res } of streams) res.end();
      await stop();
    },
  };
}

const OPENED = new WeakMap<Server, BoardStreams>();

/** The streams of a server, made when the first is asked for. */
export function boardStreamsOf(server: Server, failed: (error: unknown) => void): BoardStreams {
  const known = OPENED.get(server);
  if (known) return known;
  const made = openBoardStreams(server, { failed });
  OPENED.set(server, made);
  return made;
}

/** Ends every stream of a server; for when it stops. */
export async function closeBoardStreams(server: Server): Promise<void> {
  await OPENED.get(server)?.close();
}
