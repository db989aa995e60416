import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import type { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { csvText } from '@mereward/shared/writing/csv-cells';
import { In } from 'typeorm';
import type { Ctx } from '../ctx';
import { CAST_COLUMNS_OUT, castRow, soundingCells, type CastCells } from './cast-cells';
import { visitToRead } from './find-visit';
import { castsToday } from './reduce-again';
import { visitSite } from './visit-site';

/** The casts of a visit as a table: as observed, and as reduced with its constants as they are today. */
export async function castsCsv(ctx: Ctx, visitId: string): Promise<{ filename: string; text: string }> {
  const { tx } = ctx;
  const found = await visitToRead(ctx, visitId);
  const site = await visitSite(tx, found);
  const casts = await castsToday(tx, site);
  const { zone } = await tx.findOneByOrFail(Fishery, { id: found.lake.fisheryId });
  const keepers = await tx.findBy(Account, { id: In(casts.map((cast) => cast.keptBy)) });
  const names = new Map(keepers.map((person) => [person.id, person.name]));
  const rows = casts.map((cast) =>
    castRow({ site, cast, zone, by: names.get(cast.keptBy) ?? '' }, reducedCells(cast)),
  );
  const day = found.visit.startedAt.toISOString().slice(0, 10);
  return {
    filename: `casts-${day}-${visitId.slice(0, 8)}.csv`,
    text: csvText([CAST_COLUMNS_OUT, ...rows]),
  };
}

const reducedCells = ({ reduced }: SurveyCast): CastCells =>
  reduced.ok ? soundingCells(reduced.sounding) : { not_reduced_because: reduced.reason };
