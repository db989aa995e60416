import type { Request, Response } from 'express';
import { pipeline } from 'node:stream/promises';
import { notFound } from '../http/deny';
import type { FileKey } from './file-key';
import type { FileAbout, FileStore, Span } from './store';

type Wanted = {
  key: FileKey;
  type: string;
  /** What it is, in the words for one that isn't there. */
  what: string;
  cacheControl: string;
};

/**
 * Answers with a file, or the part of it that was asked for (RFC 9110 §14), or that it hasn't changed (§13). It goes
 * from the store to the reader as it comes and is never whole in memory.
 */
export async function serveFile(req: Request, res: Response, from: Wanted & { store: FileStore }) {
  const { store, key, type, what, cacheControl } = from;
  const heads = ({ etag }: FileAbout) =>
    res.set({ 'Cache-Control': cacheControl, 'Accept-Ranges': 'bytes', ETag: etag }).type(type);
  const conditional = req.method === 'HEAD' || req.headers.range || req.headers['if-none-match'];
  let span: Span | null = null;
  if (conditional) {
    const about = await store.about(key);
    if (!about) throw notFound(what);
    heads(about);
    if (req.fresh) return void res.status(304).end();
    const asked = spanOf(req, about);
    if (asked === 'beyond')
      return void res.status(416).set('Content-Range', `bytes */${about.sizeBytes}`).end();
    span = asked;
    if (req.method === 'HEAD') return void res.set('Content-Length', String(about.sizeBytes)).end();
  }
  const file = await store.open(key, span ?? undefined);
  if (!file) throw notFound(what);
  heads(file);
  if (span) res.status(206).set('Content-Range', `bytes ${span.start}-${span.end}/${file.sizeBytes}`);
  res.set('Content-Length', String(span ? span.end - span.start + 1 : file.sizeBytes));
  try {
    await pipeline(file.stream, res); // a store that breaks off breaks the answer off: a reader sees it isn't whole
  } catch (error) {
    if (!req.destroyed && !isClosedByReader(error)) req.log.error({ err: error }, 'a file broke off');
  }
}

const isClosedByReader = (error: unknown): boolean =>
  error instanceof Error && 'code' in error && error.code === 'ERR_STREAM_PREMATURE_CLOSE';

/** The one span asked for; null for the whole file, also when several were asked for or the file is another now. */
function spanOf(req: Request, { sizeBytes, etag }: FileAbout): Span | 'beyond' | null {
  const onlyIf = req.get('if-range');
  if (onlyIf !== undefined && onlyIf !== etag) return null;
  const ranges = req.range(sizeBytes);
  if (ranges === -1) return 'beyond';
  if (ranges === undefined || ranges === -2 || ranges.type !== 'bytes' || ranges.length !== 1) return null;
  const [first] = ranges;
  return first ? { start: first.start, end: first.end } : null;
}
