import type { Lake } from '@mereward/db/entities/lakes/lake';
import { LakePicture } from '@mereward/db/entities/lakes/lake-picture';
import type {
  AddLakePicture,
  FixLakePicture,
  LakePictureList,
  LakePictureView,
} from '@mereward/shared/lakes/picture-contract';
import { FEWEST_POINTS } from '@mereward/shared/geometry/picture-fit';
import { placedPicture } from '@mereward/shared/lakes/picture-placing';
import { Problem, type ProblemError } from '@mereward/shared/problems/problem';
import { createHash } from 'node:crypto';
import { accountOf, type Ctx } from '../ctx';
import { pictureFile, pictureFolder } from '../files/file-key';
import { photoFault } from '../files/photo-fault';
import type { FileStore } from '../files/store';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, mustRepeat, staleVersion } from '../repeat';
import { findLake, originOfLake } from './found';
import { farFaults } from './marks';
import { LAKE_CHANGERS } from './policy';

const MOST_OF_ONE = 8;

/** A lake's pictures are for those who may change its outline; to everybody else there are none. */
function allowPictures({ actor }: Ctx, lake: Lake, what: 'lake' | 'picture'): void {
  allowOnly(actor, { fisheryId: lake.fisheryId, what }, LAKE_CHANGERS);
}

/** The lake, for somebody who may keep pictures of it; asked before a file is received, and again when it is kept. */
export async function lakeForPictures(ctx: Ctx, lakeId: string): Promise<Lake> {
  const lake = await findLake(ctx.tx, lakeId);
  allowPictures(ctx, lake, 'lake');
  return lake;
}

async function findPicture(ctx: Ctx, pictureId: string): Promise<{ picture: LakePicture; lake: Lake }> {
  if (ctx.actor.kind === 'stranger') throw new Problem('not-signed-in', 'Sign in first');
  const picture = await ctx.tx.findOneBy(LakePicture, { id: pictureId });
  if (!picture) throw notFound('picture');
  const lake = await findLake(ctx.tx, picture.lakeId);
  allowPictures(ctx, lake, 'picture');
  return { picture, lake };
}

const pictureView = (picture: LakePicture): LakePictureView => ({
  id: picture.id,
  lakeId: picture.lakeId,
  state: picture.state,
  refusal: picture.refusal,
  caption: picture.caption,
  widthPx: picture.widthPx,
  heightPx: picture.heightPx,
  fit: picture.fit,
  points: picture.points,
  placed:
    picture.transform && picture.rmsM !== null ? { transform: picture.transform, rmsM: picture.rmsM } : null,
  version: picture.version,
});

export async function picturesOf(ctx: Ctx, lakeId: string): Promise<LakePictureList> {
  await lakeForPictures(ctx, lakeId);
  const pictures = await ctx.tx.find(LakePicture, {
    where: { lakeId },
    order: { addedAt: 'DESC', id: 'ASC' },
  });
  return { pictures: pictures.map(pictureView) };
}

export async function pictureOf(ctx: Ctx, pictureId: string): Promise<LakePictureView> {
  return pictureView((await findPicture(ctx, pictureId)).picture);
}

type Sent = { lakeId: string; input: AddLakePicture; bytes: Buffer };

/** Keeps a picture as it was sent until a thread has turned it, resized it and taken its tags off. */
export async function keepPicture(ctx: Ctx, { lakeId, input, bytes }: Sent, store: FileStore) {
  const { tx, actor, now, jobs } = ctx;
  await lakeForPictures(ctx, lakeId);
  const fault = photoFault(bytes);
  if (fault !== null)
    throw new Problem('invalid', fault, { errors: [{ pointer: '/picture', detail: fault }] });
  const addedBy = accountOf(actor);
  const sha256 = createHash('sha256').update(bytes).digest();
  const repeated = async (): Promise<LakePictureView | null> => {
    const kept = await tx.findOneBy(LakePicture, { id: input.id });
    if (!kept) return null;
    if (kept.lakeId !== lakeId) throw notFound('picture');
    const content = (caption: string, digest: Buffer) => ({ caption, sha256: digest.toString('hex') });
    mustRepeat(
      { by: addedBy, content: content(input.caption, sha256) },
      { by: kept.addedBy, content: content(kept.caption, kept.sha256) },
    );
    return pictureView(kept);
  };
  const known = await repeated();
  if (known) return known;
  await refuseTooMany(ctx, lakeId);
  const row = {
    ...input,
    ...{ lakeId, sha256, addedBy, addedAt: now, version: 1 },
    ...{ state: 'waiting' as const, fit: 'similarity' as const, points: [] },
  };
  if (!(await insertOnce(tx, LakePicture, row))) {
    const kept = await repeated();
    if (kept) return kept;
  }
  await store.write(pictureFile(input.id, 'original'), bytes);
  await jobs.send(tx, 'picture.resize', { pictureId: input.id });
  return pictureView(await tx.findOneByOrFail(LakePicture, { id: input.id }));
}

async function refuseTooMany({ tx }: Ctx, lakeId: string): Promise<void> {
  const count = await tx.countBy(LakePicture, { lakeId });
  if (count < MOST_OF_ONE) return;
  throw new Problem('conflict', `There are ${count} pictures of this lake already`, {
    detail: 'Take an old one away first.',
  });
}

/** Says which pixels show which known places; how the picture lies follows from that. */
export async function fixPicture(ctx: Ctx, pictureId: string, input: FixLakePicture) {
  const { picture, lake } = await findPicture(ctx, pictureId);
  const { widthPx, heightPx } = picture;
  if (picture.state !== 'ready' || widthPx === null || heightPx === null)
    throw new Problem('conflict', 'This picture is not ready yet', {
      detail: 'Wait until it has been turned and resized, then set its points.',
    });
  const { points, fit, version } = input;
  refusePoints(points.flatMap((point, i) => pointFaults(lake, { point, i, widthPx, heightPx })));
  const enough = points.length >= FEWEST_POINTS[fit];
  const placed = enough ? placedPicture(points, { origin: originOfLake(lake), fit }) : null;
  if (enough && !placed) refusePoints([{ pointer: '/points', detail: UNFIT[fit] }]);
  const change = { points, fit, transform: placed?.transform ?? null, rmsM: placed?.rmsM ?? null };
  const { affected } = await ctx.tx.update(
    LakePicture,
    { id: pictureId, version },
    { ...change, version: version + 1 },
  );
  if (affected !== 1) throw staleVersion();
  return pictureOf(ctx, pictureId);
}

const UNFIT = {
  similarity: 'These points lie too close together to say how the picture lies. Choose points far apart.',
  affine:
    'These points lie too near one line, or two of them are swapped. Choose points all round the water, or fit without stretching.',
};

type Checked = { point: FixLakePicture['points'][number]; i: number; widthPx: number; heightPx: number };

function pointFaults(lake: Lake, { point, i, widthPx, heightPx }: Checked): ProblemError[] {
  const outside = point.xPx > widthPx || point.yPx > heightPx;
  return [
    ...(outside ? [{ pointer: `/points/${i}/xPx`, detail: 'This pixel lies outside the picture.' }] : []),
    ...farFaults(lake, point.position, 'point').map(({ words }) => ({
      pointer: `/points/${i}/position`,
      detail: words,
    })),
  ];
}

function refusePoints(errors: ProblemError[]): void {
  if (errors.length === 0) return;
  throw new Problem('invalid', errors[0]?.detail ?? 'The points are not right', {
    detail: 'Nothing was saved. Put right what is named below and send again.',
    errors,
  });
}

/** Takes a picture away, and its files once this is committed. */
export async function removePicture(ctx: Ctx, pictureId: string): Promise<void> {
  await findPicture(ctx, pictureId);
  await ctx.tx.delete(LakePicture, { id: pictureId });
  await ctx.jobs.send(ctx.tx, 'files.remove', { folder: pictureFolder(pictureId) });
}
