import {
  CastView,
  CloseVisit,
  CorrectKit,
  ImportCasts,
  ImportDone,
  ImportPreview,
  KeepCast,
  OpenVisit,
  VisitList,
  VisitView,
  VisitWithCasts,
} from '@mereward/shared/surveys/contract';
import { deed, raw, read, type Route } from '../http/route';
import { idIn } from '../http/route-id';
import { reading } from '../http/transaction';
import { castsCsv } from './casts-csv';
import { closeVisit } from './close-visit';
import { correctKit } from './correct-kit';
import { importCasts, previewCasts } from './import-casts';
import { keepCast } from './keep-cast';
import { openVisit } from './open-visit';
import { listVisits, readVisit } from './queries';
import { undoCast } from './undo-cast';

const signIn = 'needed';

export const surveyRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/lakes/:lakeId/visits',
      summary: 'Survey visits of a lake',
      signIn,
      answer: VisitList,
    },
    (ctx, { id }) => listVisits(ctx, id('lakeId')),
  ),
  deed(
    {
      method: 'post',
      path: '/lakes/:lakeId/visits',
      summary: 'Open a survey visit',
      signIn,
      body: OpenVisit,
      answer: VisitView,
      status: 201,
    },
    (ctx, { id, body }) => openVisit(ctx, id('lakeId'), body),
  ),
  read(
    {
      method: 'get',
      path: '/visits/:visitId',
      summary: 'A visit with its casts',
      signIn,
      answer: VisitWithCasts,
    },
    (ctx, { id }) => readVisit(ctx, id('visitId')),
  ),
  deed(
    {
      method: 'patch',
      path: '/visits/:visitId/kit',
      summary: 'Correct a constant and reduce every cast again',
      signIn,
      body: CorrectKit,
      answer: VisitView,
    },
    (ctx, { id, body }) => correctKit(ctx, id('visitId'), body),
  ),
  deed(
    {
      method: 'post',
      path: '/visits/:visitId/close',
      summary: 'Close a visit with the last gauge reading',
      signIn,
      body: CloseVisit,
      answer: VisitView,
    },
    (ctx, { id, body }) => closeVisit(ctx, id('visitId'), body),
  ),
  deed(
    {
      method: 'post',
      path: '/visits/:visitId/casts',
      summary: 'Keep a cast as observed',
      signIn,
      body: KeepCast,
      answer: CastView,
      status: 201,
    },
    (ctx, { id, body }) => keepCast(ctx, id('visitId'), body),
  ),
  deed(
    { method: 'delete', path: '/visits/:visitId/casts/:castId', summary: 'Take back the last cast', signIn },
    (ctx, { id }) => undoCast(ctx, id('visitId'), id('castId')),
  ),
  deed(
    {
      method: 'post',
      path: '/visits/:visitId/imports/preview',
      summary: 'How a casts file would be read',
      signIn,
      body: ImportCasts,
      answer: ImportPreview,
    },
    (ctx, { id, body }) => previewCasts(ctx, id('visitId'), body),
  ),
  deed(
    {
      method: 'post',
      path: '/visits/:visitId/imports',
      summary: 'Take in the casts of a file, all or none',
      signIn,
      body: ImportCasts,
      answer: ImportDone,
    },
    (ctx, { id, body }) => importCasts(ctx, id('visitId'), body),
  ),
  raw(
    {
      method: 'get',
      path: '/visits/:visitId/casts.csv',
      summary: 'The casts of a visit as a table',
      signIn,
      answerType: 'text/csv',
    },
    async (req, res) => {
      const { filename, text } = await reading(req, (ctx) => castsCsv(ctx, idIn(req, 'visitId')));
      res
        .attachment(filename)
        .type('text/csv')
        .send('\uFEFF' + text); // the mark tells spreadsheets that it is UTF-8
    },
  ),
];
