import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { BottomTable } from '@mereward/db/entities/surveys/bottom-table';
import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { refineLikelihoods, type Confirmed } from '@mereward/shared/surveys/bottom-refinement';
import type {
  AcceptLearning,
  BottomFeel,
  BottomLearning,
  BottomTableView,
} from '@mereward/shared/surveys/bottom-table-contract';
import { confirmedPairs, PAIR_WORDS, type FeltCast } from '@mereward/shared/surveys/confirmed-pairs';
import { Cover, Substrate } from '@mereward/shared/surveys/contract';
import { USUAL_FEEL } from '@mereward/shared/surveys/usual-feel';
import { civilDay } from '@mereward/shared/time/civil-day';
import { In, IsNull, Not, type EntityManager } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { digestOf } from '../digest';
import { notFound } from '../http/deny';
import { mustRepeat } from '../repeat';
import { feelInForce } from './bottom-feel';
import { addVersion, fisheryFor, learntMeanwhile, readBottomTable } from './bottom-tables';
import { confirmedPlaces } from './confirmed-places';
import { endingsOf } from './endings';

/** How many casts the table before is worth for each class. Common practice, no published source. */
const WORTH_CASTS = 20;

/** What the confirmed bottoms of a fishery's lakes would make of its table. Nothing changes until a person takes it up. */
export async function readLearning(ctx: Ctx, fisheryId: string): Promise<BottomLearning> {
  await fisheryFor(ctx, fisheryId, 'read');
  return (await learning(ctx.tx, fisheryId)).view;
}

/** Takes the proposal up as it was shown; if what it was learnt from has changed since, it is shown anew first. */
export async function acceptLearning(
  ctx: Ctx,
  fisheryId: string,
  input: AcceptLearning,
): Promise<BottomTableView> {
  const { tx, actor } = ctx;
  await fisheryFor(ctx, fisheryId, 'change');
  const kept = await tx.findOneBy(BottomTable, { id: input.id });
  if (kept) {
    if (kept.fisheryId !== fisheryId) throw notFound('table');
    mustRepeat(
      { by: accountOf(actor), content: [input.after + 1, input.reason, 'learnt'] },
      { by: kept.madeBy, content: [kept.version, kept.reason, kept.kind] },
    );
    return readBottomTable(ctx, fisheryId);
  }
  const { view, knows, confirmedCasts } = await learning(tx, fisheryId);
  if (view.digest !== input.digest || view.after !== input.after || view.paired === 0)
    throw learntMeanwhile();
  const { id, after, reason } = input;
  await addVersion(ctx, {
    id,
    after,
    reason,
    fisheryId,
    kind: 'learnt',
    feel: view.learnt,
    knows,
    confirmedCasts,
  });
  return readBottomTable(ctx, fisheryId);
}

type Learning = { view: BottomLearning; knows: string[]; confirmedCasts: number };

/**
 * Always learnt from the newest table that was not itself learnt, with every confirmed bottom that one does not hold
 * already: so taking a proposal up twice teaches nothing twice.
 */
async function learning(tx: EntityManager, fisheryId: string): Promise<Learning> {
  const inForce = await feelInForce(tx, fisheryId);
  const base = await tx.findOne(BottomTable, {
    where: { fisheryId, kind: Not('learnt') },
    order: { version: 'DESC' },
  });
  const feel = base?.feel ?? USUAL_FEEL;
  const known = new Set(base?.knows ?? []);
  const { pairs, confirmed } = await pairsOf(tx, fisheryId, known);
  const paired = Math.max(pairs.substrate.length, pairs.cover.length);
  const learnt: BottomFeel = {
    substrate: learntTable(feel.substrate, pairs.substrate),
    cover: learntTable(feel.cover, pairs.cover),
    fadeMonths: feel.fadeMonths,
  };
  const count = <Class extends string>(seen: readonly Confirmed<Class>[], name: Class): number =>
    seen.filter(({ bottom }) => bottom === name).length;
  return {
    knows: [...known, ...confirmed].sort(),
    confirmedCasts: (base?.confirmedCasts ?? 0) + paired,
    view: {
      after: inForce.version,
      digest: digestOf([base?.version ?? 0, confirmed, pairs]).toString('hex'),
      confirmed: confirmed.length,
      paired,
      counts: [
        ...Substrate.options.map((name) => ({ name, casts: count(pairs.substrate, name) })),
        ...Cover.options.map((name) => ({ name, casts: count(pairs.cover, name) })),
      ],
      worthCasts: WORTH_CASTS,
      reachWords: PAIR_WORDS,
      before: inForce.feel,
      learnt,
    },
  };
}

function learntTable<Class extends string>(
  table: Parameters<typeof refineLikelihoods<Class>>[0],
  pairs: readonly Confirmed<Class>[],
): ReturnType<typeof refineLikelihoods<Class>> {
  if (pairs.length === 0) return table;
  return refineLikelihoods(table, pairs, WORTH_CASTS);
}

async function pairsOf(
  tx: EntityManager,
  fisheryId: string,
  known: ReadonlySet<string>,
): Promise<{ pairs: ReturnType<typeof confirmedPairs>; confirmed: string[] }> {
  const { zone } = await tx.findOneByOrFail(Fishery, { id: fisheryId });
  const lakes = await tx.find(Lake, { where: { fisheryId }, order: { id: 'ASC' } });
  const pairs: ReturnType<typeof confirmedPairs> = { substrate: [], cover: [] };
  const confirmed: string[] = [];
  for (const lake of lakes) {
    const places = (await confirmedPlaces(tx, lake)).filter(({ id }) => !known.has(id));
    if (places.length === 0) continue;
    confirmed.push(...places.map(({ id }) => id));
    const found = confirmedPairs(
      places,
      await feltCasts(tx, { lakeId: lake.id, zone }),
      await endingsOf(tx, lake),
    );
    pairs.substrate.push(...found.substrate);
    pairs.cover.push(...found.cover);
  }
  return { pairs, confirmed: confirmed.sort() };
}

async function feltCasts(
  tx: EntityManager,
  { lakeId, zone }: { lakeId: string; zone: string },
): Promise<FeltCast[]> {
  const visits = await tx.find(SurveyVisit, { where: { lakeId }, select: { id: true } });
  const casts = await tx.find(SurveyCast, {
    where: { visitId: In(visits.map(({ id }) => id)), undoneAt: IsNull() },
    order: { id: 'ASC' },
  });
  return casts.flatMap(({ id, observation, observedAt, reduced }) => {
    if (!reduced.ok) return [];
    const { xM, yM, covariance } = reduced.sounding;
    const { drop, drag, cameBack, smell } = observation;
    return [
      {
        id,
        xM,
        yM,
        sigmaM: Math.sqrt((covariance.xx + covariance.yy) / 2),
        day: civilDay(observedAt, zone),
        feels: { drop, drag, cameBack, smell },
      },
    ];
  });
}
