import { Peg } from '@mereward/db/entities/lakes/peg';
import type { SoundingMissView } from '@mereward/shared/charts/sounding-miss';
import { In, type EntityManager } from 'typeorm';
import type { Built } from './built';

/** The soundings a person must look at: those out of line with their neighbours and the ten that fit worst, worst first. */
export async function soundingMisses(
  tx: EntityManager,
  { quality, soundings, visits }: Pick<Built, 'quality' | 'soundings' | 'visits'>,
): Promise<SoundingMissView[]> {
  const flagged = new Set(quality.flagged);
  const missed = new Map([...quality.worst, ...quality.flaggedBy].map((miss) => [miss.id, miss]));
  const found = soundings.filter(({ id }) => missed.has(id));
  const pegs = await tx.find(Peg, {
    where: { id: In([...new Set(found.map(({ pegId }) => pegId))]) },
    select: { id: true, number: true },
  });
  const numberOf = new Map(pegs.map(({ id, number }) => [id, number]));
  const titleOf = new Map(visits.map(({ id, title }) => [id, title]));
  const views = found.flatMap((sounding) => {
    const miss = missed.get(sounding.id);
    if (!miss) return [];
    return [
      {
        ...miss,
        flagged: flagged.has(sounding.id),
        visitId: sounding.visitId,
        visitTitle: titleOf.get(sounding.visitId) ?? '',
        castNumber: sounding.seq,
        pegNumber: numberOf.get(sounding.pegId) ?? null,
        depthM: sounding.depthM,
        foretoldM: sounding.depthM + miss.errorM,
        rangeM: sounding.lineOutM,
        bearingDeg: sounding.bearingDeg,
        xM: sounding.xM,
        yM: sounding.yM,
      },
    ];
  });
  return views.sort((a, b) => b.standardised - a.standardised || (a.id < b.id ? -1 : 1));
}
