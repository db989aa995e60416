import {
  BringLog,
  LOG_MOST_BYTES,
  LOG_MOST_FILES,
  LogList,
  LogView,
  LookAgain,
} from '@mereward/shared/surveys/log-contract';
import type { Request, Response } from 'express';
import { parse } from '../http/parse';
import { deed, raw, read, type Route } from '../http/route';
import { idIn } from '../http/route-id';
import { inTransaction } from '../http/transaction';
import { receiveFiles } from '../http/upload';
import { bringLog, packFiles } from './bring-log';
import { visitToKeep } from './find-visit';
import { cancelLog, lookAgain, startLog, undoLog } from './log-deeds';
import { listLogs, readLogView } from './log-view';

const signIn = 'needed';

const WANTED = { field: 'files', mostBytes: LOG_MOST_BYTES, mostFiles: LOG_MOST_FILES };

/** Asks who may before the files come in, and once more when they are kept. */
async function bring(req: Request, res: Response): Promise<void> {
  const visitId = idIn(req, 'visitId');
  await inTransaction(req, (ctx) => visitToKeep(ctx, visitId));
  const view = await receiveFiles({ req, res, wanted: WANTED }, async ({ files, fields }) => {
    const { id } = parse(BringLog, fields);
    const packed = await packFiles(files);
    return inTransaction(req, (ctx) => bringLog(ctx, visitId, { id, files: packed }));
  });
  res.status(202).json(view);
}

const deedOn = (
  { path, summary }: { path: string; summary: string },
  run: (ctx: Parameters<typeof startLog>[0], logId: string) => Promise<LogView>,
): Route =>
  deed({ method: 'post', path, summary, signIn, answer: LogView, status: 202 }, (ctx, { id }) =>
    run(ctx, id('logId')),
  );

export const logRoutes: Route[] = [
  raw(
    {
      method: 'post',
      path: '/visits/:visitId/logs',
      summary: 'Bring the files of a log of soundings (multipart form data: id, files)',
      signIn,
      answer: LogView,
      status: 202,
    },
    bring,
  ),
  read(
    {
      method: 'get',
      path: '/visits/:visitId/logs',
      summary: 'The logs of soundings of a visit',
      signIn,
      answer: LogList,
    },
    (ctx, { id }) => listLogs(ctx, id('visitId')),
  ),
  read(
    {
      method: 'get',
      path: '/logs/:logId',
      summary: 'A log of soundings: how it would be read, how far it is, what was taken in',
      signIn,
      answer: LogView,
    },
    (ctx, { id }) => readLogView(ctx, id('logId')),
  ),
  deed(
    {
      method: 'post',
      path: '/logs/:logId/look',
      summary: 'Read a log again in another way',
      signIn,
      body: LookAgain,
      answer: LogView,
      status: 202,
    },
    (ctx, { id, body }) => lookAgain(ctx, id('logId'), body),
  ),
  deedOn({ path: '/logs/:logId/start', summary: 'Take in what was shown of a log' }, startLog),
  deedOn({ path: '/logs/:logId/cancel', summary: 'Stop reading a log' }, cancelLog),
  deed(
    { method: 'delete', path: '/logs/:logId', summary: 'Take a log back with all its soundings', signIn },
    (ctx, { id }) => undoLog(ctx, id('logId')),
  ),
];
