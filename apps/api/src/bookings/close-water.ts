import { Closure as ClosureRow } from '@mereward/db/entities/closures/closure';
import type { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { CLOSURE_REASON_WORDS, type Closure } from '@mereward/shared/closures/closure-effect';
import type { CloseWater, ClosurePreview, PreviewClosure } from '@mereward/shared/closures/deeds-contract';
import type { ClosureScope } from '@mereward/shared/closures/contract';
import type { NoticeDetails } from '@mereward/shared/notices/contract';
import { moneyWords, sumPence } from '@mereward/shared/money/money';
import { Problem } from '@mereward/shared/problems/problem';
import { In, type EntityManager } from 'typeorm';
import { closureOf, rangeOf } from '../closures/closure-times';
import { CLOSERS } from '../closures/policy';
import { accountOf, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { noticeOfClosure } from '../notices/write-notice';
import { currencyOf } from '../payments/currency';
import { insertOnce, mustRepeat } from '../repeat';
import { closePegs, cutBlocks } from './closed-time';
import { biteOf } from './closure-bites';
import { groundOf, hitsOf, type Hit } from './closure-hits';

/** However many bookings slip in while it is closed, each round sees those of the one before. */
const MOST_ROUNDS = 50;

/**
 * Closes water in one deed: the closure, its notice, its pegs in the calendar, and everything that lies in the way. The
 * same again writes nothing twice and picks up what came in between; nothing stays confirmed inside it.
 */
export async function closeWater(ctx: Ctx, fisheryId: string, input: CloseWater): Promise<void> {
  const { tx, now } = ctx;
  const repeated = await tx.existsBy(ClosureRow, { id: input.id });
  const { fishery, closure, ground } = await readied(ctx, fisheryId, { ...input, repeated });
  const row = await keepClosure(ctx, fishery, { input, lakeIds: ground.lakeIds });
  if (row.liftedAt !== null)
    throw new Problem('conflict', 'This closure was lifted already', {
      detail: 'Make a new one if the water must be closed again.',
    });
  await noticeOfClosure(ctx, {
    closureId: row.id,
    fisheryId,
    lakeIds: input.details.scope.kind === 'fishery' ? [] : ground.lakeIds,
    ...{ from: now < closure.from ? now.toISOString() : input.details.from, until: input.details.until },
    details: await noticeWords(tx, closure, { ...input, lakeIds: ground.lakeIds }),
  });
  const range = rangeOf(closure.from, closure.until);
  const over = { fisheryId, closure, lakeIds: ground.lakeIds, zone: fishery.zone };
  const takesPegs = closure.scope.kind !== 'method' && closure.effect !== 'allow_with_warning';
  const done = new Set<string>();
  for (let round = 0; round < MOST_ROUNDS; round += 1) {
    const hits = (await hitsOf(tx, over, true)).filter(({ id }) => !done.has(id));
    for (const hit of hits) {
      done.add(hit.id);
      await biteOf(ctx, { closure: row, fishery }, hit);
    }
    if (!takesPegs) return;
    if (closure.effect !== 'block') await cutBlocks(tx, { pegIds: ground.pegIds, range });
    const written = await closePegs(tx, { closureId: row.id, pegIds: ground.pegIds, range });
    if (written === 0 && hits.length === 0) return;
  }
  throw new Problem('conflict', 'Too many bookings came in while it was closed', {
    detail: 'Nothing was closed. Try once more.',
  });
}

/** “Far Ostle: flood”, “Pegs FO1, FO2: works”, “No keepnets: low oxygen”; a notice says closed by itself. */
async function noticeWords(
  tx: EntityManager,
  closure: Closure,
  { details, lakeIds }: Pick<CloseWater, 'details'> & { lakeIds: string[] },
): Promise<NoticeDetails> {
  const reason = CLOSURE_REASON_WORDS[closure.reason].toLowerCase();
  const title = `${await whatWords(tx, closure.scope, lakeIds)}: ${reason}`;
  return { title: title.length > MOST_TITLE ? reason : title, text: details.publicWords, audience: 'public' };
}

const MOST_TITLE = 120;

async function whatWords(tx: EntityManager, scope: ClosureScope, lakeIds: string[]): Promise<string> {
  switch (scope.kind) {
    case 'fishery':
      return 'The whole fishery';
    case 'method':
      return METHOD_WORDS[scope.method];
    case 'lakes': {
      const lakes = await tx.find(Lake, { where: { id: In(lakeIds) }, order: { name: 'ASC' } });
      return lakes.map(({ name }) => name).join(', ');
    }
    case 'pegs': {
      const pegs = await tx.find(Peg, { where: { id: In(scope.pegIds) }, order: { walkingOrder: 'ASC' } });
      return `${pegs.length === 1 ? 'Peg' : 'Pegs'} ${pegs.map(({ number }) => number).join(', ')}`;
    }
  }
}

const METHOD_WORDS = { keepnets: 'No keepnets', boats: 'No boats', night: 'No night fishing' } as const;

type Readied = {
  fishery: Fishery;
  closure: Closure;
  ground: { lakeIds: string[]; pegIds: string[] };
};

/** What is asked for, looked over. Sent again it may be told late, when its times are past. */
async function readied(
  ctx: Ctx,
  fisheryId: string,
  input: PreviewClosure & { repeated: boolean },
): Promise<Readied> {
  const { tx, actor, now } = ctx;
  const fishery = await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, CLOSERS);
  const { details, moveToLakeId, chooseUntil, repeated } = input;
  const refuse = (pointer: string, title: string) => {
    throw new Problem('invalid', title, {
      detail: 'Nothing was closed. Put that right and send it again.',
      errors: [{ pointer, detail: title }],
    });
  };
  if (!repeated && details.until !== null && Date.parse(details.until) <= now.getTime())
    refuse('/details/until', 'That time is over already');
  if (!repeated && chooseUntil !== null && Date.parse(chooseUntil) <= now.getTime())
    refuse('/chooseUntil', 'The time to choose is over already');
  const ground = await groundOf(tx, fisheryId, details.scope);
  if (moveToLakeId !== null) {
    if (!(await tx.existsBy(Lake, { id: moveToLakeId, fisheryId }))) throw notFound('lake');
    if (
      details.scope.kind === 'fishery' ||
      (details.scope.kind === 'lakes' && ground.lakeIds.includes(moveToLakeId))
    )
      refuse('/moveToLakeId', 'The lake to move to is closed as well');
  }
  return { fishery, closure: closureOf({ details, liftedAt: null }), ground };
}

type Kept = { input: CloseWater; lakeIds: string[] };

async function keepClosure(
  { tx, actor, now }: Ctx,
  fishery: Fishery,
  { input, lakeIds }: Kept,
): Promise<ClosureRow> {
  const decidedBy = accountOf(actor);
  const { id, details, moveToLakeId } = input;
  const chooseUntil = input.chooseUntil === null ? null : new Date(input.chooseUntil);
  const made = await insertOnce(tx, ClosureRow, {
    id,
    fisheryId: fishery.id,
    lakeIds,
    reason: details.reason,
    effect: details.effect,
    during: rangeOf(details.from, details.until),
    details,
    chooseUntil,
    moveToLakeId,
    decidedBy,
    decidedAt: now,
    liftedAt: null,
    liftedBy: null,
    lift: null,
    version: 1,
  });
  const row = await tx.findOneOrFail(ClosureRow, { where: { id }, lock: { mode: 'for_no_key_update' } });
  if (made) return row;
  if (row.fisheryId !== fishery.id) throw notFound('closure');
  const content = { details, moveToLakeId, chooseUntil };
  mustRepeat(
    { by: decidedBy, content },
    {
      by: row.decidedBy,
      content: { details: row.details, moveToLakeId: row.moveToLakeId, chooseUntil: row.chooseUntil },
    },
  );
  return row;
}

/** What a closure would hit, with nothing done yet. */
export async function previewClosure(
  ctx: Ctx,
  fisheryId: string,
  input: PreviewClosure,
): Promise<ClosurePreview> {
  const { fishery, closure, ground } = await readied(ctx, fisheryId, { ...input, repeated: false });
  const over = { fisheryId, closure, lakeIds: ground.lakeIds, zone: fishery.zone };
  const all = await hitsOf(ctx.tx, over, false);
  const hits = all.filter(({ bite, status }) => isHit(bite) && status !== 'hold');
  const currency = currencyOf(hits[0]?.currency);
  const valuePence = sumPence(hits.map(({ paidPence }) => paidPence));
  const closes = closure.scope.kind !== 'method' && closure.effect !== 'allow_with_warning';
  return {
    bookings: hits.length,
    valuePence,
    currency,
    told: all.filter(({ bite }) => bite === 'tell' || bite === 'warn').length,
    pegs: closes ? ground.pegIds.length : 0,
    words: hitWords(hits.length, moneyWords(valuePence, currency)),
    kinds: kindsOf(hits),
  };
}

const isHit = (bite: Hit['bite']): boolean => bite === 'choose' || bite === 'refund';

const hitWords = (count: number, worth: string): string =>
  count === 0
    ? 'Hits no booking'
    : `Hits ${String(count)} ${count === 1 ? 'booking' : 'bookings'} worth ${worth}`;

function kindsOf(hits: readonly Hit[]): ClosurePreview['kinds'] {
  const kinds = new Map<string, ClosurePreview['kinds'][number]>();
  for (const { details, paidPence } of hits) {
    const kind = kinds.get(details.ticketName) ?? { ticketName: details.ticketName, count: 0, valuePence: 0 };
    kinds.set(details.ticketName, {
      ...kind,
      count: kind.count + 1,
      valuePence: kind.valuePence + paidPence,
    });
  }
  return [...kinds.values()].sort((a, b) => b.count - a.count);
}
