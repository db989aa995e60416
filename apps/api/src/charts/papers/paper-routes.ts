import { PaperAsked, SvgAsked } from '@mereward/shared/charts/paper-contract';
import type { Response } from 'express';
import { limitDrawings } from '../../http/limits';
import { parse } from '../../http/parse';
import { raw, type Route } from '../../http/route';
import { fileStoreOf } from '../../files/store';
import { idIn } from '../../http/route-id';
import { serverOf } from '../../http/server';
import { reading } from '../../http/transaction';
import { chartCastsCsv } from '../chart-casts';
import { chartSoundingsCsv } from '../chart-soundings';
import { chartLayersFile } from '../chart-geojson';
import { chartSheet } from './chart-sheet';
import { chartSvg } from './chart-svg';
import { pegCard } from './peg-card';
import { surveyReport } from './report';

const guards = [limitDrawings];

/** A printed page belongs to one reader and one hour. */
function sendPdf(res: Response, { filename, pdf }: { filename: string; pdf: Buffer }): void {
  res.setHeader('content-disposition', `inline; filename="${filename}"`);
  res.type('application/pdf').setHeader('cache-control', 'private, no-store').send(pdf);
}

/** What can be taken away of a chart or a peg: to print, to keep, to open in another program. */
export const paperRoutes: Route[] = [
  raw(
    {
      method: 'get',
      path: '/charts/:chartId/sheet.pdf',
      summary: 'A lake’s chart to print, true to scale, on A3 or A4',
      signIn: 'open',
      query: PaperAsked,
      answerType: 'application/pdf',
      guards,
    },
    async (req, res) => {
      const { size } = parse(PaperAsked, req.query);
      sendPdf(res, await reading(req, (ctx) => chartSheet(ctx, idIn(req, 'chartId'), size)));
    },
  ),
  raw(
    {
      method: 'get',
      path: '/charts/:chartId/report.pdf',
      summary: 'The whole account of a survey, for staff',
      signIn: 'needed',
      answerType: 'application/pdf',
      guards,
    },
    async (req, res) => {
      const store = fileStoreOf(serverOf(req).config);
      sendPdf(res, await reading(req, (ctx) => surveyReport(ctx, idIn(req, 'chartId'), store)));
    },
  ),
  raw(
    {
      method: 'get',
      path: '/charts/:chartId/casts.csv',
      summary: 'Every cast of a chart as a table, for staff',
      signIn: 'needed',
      answerType: 'text/csv',
    },
    async (req, res) => {
      const { filename, text } = await reading(req, (ctx) => chartCastsCsv(ctx, idIn(req, 'chartId')));
      res.attachment(filename).type('text/csv').send(text);
    },
  ),
  raw(
    {
      method: 'get',
      path: '/charts/:chartId/casts.csv.sha256',
      summary: 'The digest of that table, as sha256sum writes and checks it',
      signIn: 'needed',
      answerType: 'text/plain',
    },
    async (req, res) => {
      const { filename, sha256 } = await reading(req, (ctx) => chartCastsCsv(ctx, idIn(req, 'chartId')));
      res.attachment(`${filename}.sha256`).type('text/plain').send(`${sha256}  ${filename}\n`);
    },
  ),
  raw(
    {
      method: 'get',
      path: '/charts/:chartId/soundings.csv',
      summary: 'Every merged sounding of a chart’s logs as a table, for staff',
      signIn: 'needed',
      answerType: 'text/csv',
    },
    async (req, res) => {
      const { filename, text } = await reading(req, (ctx) => chartSoundingsCsv(ctx, idIn(req, 'chartId')));
      res.attachment(filename).type('text/csv').send(text);
    },
  ),
  raw(
    {
      method: 'get',
      path: '/charts/:chartId/geojson',
      summary: 'The same layers as GeoJSON',
      signIn: 'open',
      answerType: 'application/geo+json',
    },
    async (req, res) => {
      const { filename, collection } = await reading(req, (ctx) =>
        chartLayersFile(ctx, idIn(req, 'chartId')),
      );
      res.attachment(filename).type('application/geo+json').send(JSON.stringify(collection));
    },
  ),
  raw(
    {
      method: 'get',
      path: '/charts/:chartId/chart.svg',
      summary: 'The chart as the screen draws it',
      signIn: 'open',
      query: SvgAsked,
      answerType: 'image/svg+xml',
      guards,
    },
    async (req, res) => {
      const asked = parse(SvgAsked, req.query);
      const { filename, svg } = await reading(req, (ctx) => chartSvg(ctx, idIn(req, 'chartId'), asked));
      res.setHeader('content-disposition', `inline; filename="${filename}"`);
      res.type('image/svg+xml').send(svg);
    },
  ),
  raw(
    {
      method: 'get',
      path: '/pegs/:pegId/card.pdf',
      summary: 'A peg’s card, to print',
      signIn: 'open',
      answerType: 'application/pdf',
      guards,
    },
    async (req, res) => sendPdf(res, await reading(req, (ctx) => pegCard(ctx, idIn(req, 'pegId')))),
  ),
];
