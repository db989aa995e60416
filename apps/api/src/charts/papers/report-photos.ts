import { Photo } from '@mereward/db/entities/files/photo';
import { dayWords } from '@mereward/shared/time/civil-day';
import { In } from 'typeorm';
import type { Ctx } from '../../ctx';
import { photoFile } from '../../files/file-key';
import { readWhole, type FileStore } from '../../files/store';
import type { ChartCasts } from '../chart-casts';
import type { PaperBlock, PaperPicture } from '../../pdf/paper-pages';

/** So many photos are printed at most; a survey of a whole lake would else be an album. */
const MOST_PHOTOS = 24;

export type ReportPhotos = { pictures: PaperPicture[]; missing: number; more: number };

/** Photos of the pegs the survey was cast from and of the marks it was aimed over, in that order, newest first. */
export async function reportPhotos(
  { tx }: Ctx,
  { visits }: ChartCasts,
  store: FileStore,
): Promise<ReportPhotos> {
  const titles = new Map<string, string>();
  for (const { site, casts } of visits)
    for (const { pegId } of casts) titles.set(pegId, `Peg ${site.pegs.get(pegId)?.number ?? ''}`);
  const pegs = [...titles.keys()];
  for (const { site, casts } of visits)
    for (const {
      observation: { aim },
    } of casts)
      if (aim.by === 'mark') titles.set(aim.markId, markTitle(site.marks.get(aim.markId)?.details));
  const marks = [...titles.keys()].slice(pegs.length);
  const photos = await tx.find(Photo, {
    where: [
      { pegId: In(pegs), state: 'ready' },
      { markId: In(marks), state: 'ready' },
    ],
    order: { addedAt: 'DESC', id: 'ASC' },
  });
  const turn = [...titles.keys()];
  const subjectOf = ({ pegId, markId }: Photo): string => pegId ?? markId ?? '';
  const sorted = photos.sort((a, b) => turn.indexOf(subjectOf(a)) - turn.indexOf(subjectOf(b)));
  const out: ReportPhotos = { pictures: [], missing: 0, more: Math.max(0, sorted.length - MOST_PHOTOS) };
  for (const photo of sorted.slice(0, MOST_PHOTOS)) {
    const jpeg = await jpegOf(store, photo.id);
    const taken = photo.takenOn === null ? 'day not known' : dayWords(photo.takenOn);
    const caption = [titles.get(subjectOf(photo)), photo.caption, taken].filter(Boolean).join('. ');
    if (jpeg === null) out.missing += 1;
    else out.pictures.push({ jpeg, caption });
  }
  return out;
}

const markTitle = (details?: { code: string; name: string }): string =>
  details ? `Mark ${details.code}, ${details.name}` : 'A mark';

/** A report is worth having without a picture that can't be fetched; it then says how many are missing. */
async function jpegOf(store: FileStore, photoId: string): Promise<Uint8Array | null> {
  try {
    return await readWhole(store, photoFile(photoId, 'small.jpg'));
  } catch {
    return null;
  }
}

export function photosBlocks({ pictures, missing, more }: ReportPhotos): PaperBlock[] {
  const words = (text: string): PaperBlock => ({ kind: 'words', words: text });
  const said =
    'Of the pegs the casts were thrown from and the marks they were thrown over; no photos are kept with a cast itself.';
  if (pictures.length + missing === 0) return [words(`${said} There are none yet.`)];
  return [
    words(
      [
        said,
        missing > 0 ? `${missing} could not be fetched when this was written.` : '',
        more > 0 ? `${more} more are kept with the pegs and marks.` : '',
      ]
        .filter(Boolean)
        .join(' '),
    ),
    { kind: 'pictures', pictures },
  ];
}
