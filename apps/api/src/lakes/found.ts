import { GaugeBoard } from '@mereward/db/entities/lakes/gauge-board';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { Mark } from '@mereward/db/entities/lakes/mark';
import { Peg } from '@mereward/db/entities/lakes/peg';
import type { LonLat } from '@mereward/shared/geometry/geodesic';
import type { EntityManager } from 'typeorm';
import { notFound } from '../http/deny';

export const originOfLake = ({ originLon, originLat }: Lake): LonLat => [originLon, originLat];

export async function findLake(tx: EntityManager, lakeId: string): Promise<Lake> {
  const lake = await tx.findOneBy(Lake, { id: lakeId });
  if (!lake) throw notFound('lake');
  return lake;
}

/** A peg with the lake it lies on. */
export async function findPeg(tx: EntityManager, pegId: string): Promise<{ peg: Peg; lake: Lake }> {
  const peg = await tx.findOneBy(Peg, { id: pegId });
  if (!peg) throw notFound('peg');
  return { peg, lake: await findLake(tx, peg.lakeId) };
}

/** A far-bank mark with its lake. */
export async function findMark(tx: EntityManager, markId: string): Promise<{ mark: Mark; lake: Lake }> {
  const mark = await tx.findOneBy(Mark, { id: markId });
  if (!mark) throw notFound('mark');
  return { mark, lake: await findLake(tx, mark.lakeId) };
}

/** A gauge board with its lake. */
export async function findBoard(
  tx: EntityManager,
  boardId: string,
): Promise<{ board: GaugeBoard; lake: Lake }> {
  const board = await tx.findOneBy(GaugeBoard, { id: boardId });
  if (!board) throw notFound('gauge board');
  return { board, lake: await findLake(tx, board.lakeId) };
}
