import { Closure } from '@mereward/db/entities/closures/closure';
import {
  closedUntil,
  CLOSURE_REASON_WORDS,
  closureState,
  isLegal,
} from '@mereward/shared/closures/closure-effect';
import type { ClosureList, ClosureView } from '@mereward/shared/closures/deeds-contract';
import { whyNotLift } from '@mereward/shared/closures/lifting';
import type { EntityManager } from 'typeorm';
import { holdsAny, type Actor, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { notFound } from '../http/deny';
import { isStaff } from '../lakes/policy';
import { closureOf } from './closure-times';
import { talliesOf } from './closure-tally';
import { CLOSERS, OVERRIDERS } from './policy';

type Named = { id: string; name: string };
type Asked = { actor: Actor; now: Date; zone: string };

/** A fishery's closures in force and to come, the newest first; for staff those over too when asked. */
export async function closureList(
  { tx, actor, now }: Ctx,
  fisheryId: string,
  all: boolean,
): Promise<ClosureList> {
  const { zone } = await fisheryFound(tx, fisheryId);
  const rows = await tx.find(Closure, { where: { fisheryId }, order: { decidedAt: 'DESC' }, take: 500 });
  const staff = isStaff(actor, fisheryId);
  const shown = rows.filter((row) => (all && staff) || closureState(closureOf(row), now) !== 'over');
  return {
    closures: await closureViews(tx, shown, { actor, now, zone }),
    may: { close: holdsAny(actor, fisheryId, CLOSERS) },
  };
}

export async function closureView({ tx, actor, now }: Ctx, closureId: string): Promise<ClosureView> {
  const row = await tx.findOneBy(Closure, { id: closureId });
  if (!row) throw notFound('closure');
  const { zone } = await fisheryFound(tx, row.fisheryId);
  const [view] = await closureViews(tx, [row], { actor, now, zone });
  if (!view) throw notFound('closure');
  return view;
}

async function closureViews(
  tx: EntityManager,
  rows: readonly Closure[],
  asked: Asked,
): Promise<ClosureView[]> {
  const lakes: Named[] = await tx.query('SELECT id, name FROM lake WHERE id = ANY ($1) ORDER BY name', [
    rows.flatMap(({ lakeIds }) => lakeIds),
  ]);
  const pegIds = rows.flatMap(({ details: { scope } }) => (scope.kind === 'pegs' ? scope.pegIds : []));
  const pegs: { id: string; number: string }[] = await tx.query(
    'SELECT id, number FROM peg WHERE id = ANY ($1) ORDER BY walking_order',
    [pegIds],
  );
  const tallies = await talliesOf(
    tx,
    rows.map(({ id }) => id),
  );
  return rows.map((row) => {
    const scope = row.details.scope;
    const staff = isStaff(asked.actor, row.fisheryId);
    return {
      ...plainView(row, asked),
      lakes: lakes.filter(({ id }) => row.lakeIds.includes(id)),
      pegs: pegs.filter(({ id }) => scope.kind === 'pegs' && scope.pegIds.includes(id)),
      lift: staff ? row.lift : null,
      tally: staff ? (tallies.get(row.id) ?? null) : null,
    };
  });
}

function plainView(
  row: Closure,
  { actor, now, zone }: Asked,
): Omit<ClosureView, 'lakes' | 'pegs' | 'lift' | 'tally'> {
  const { id, fisheryId, reason, effect, details, version } = row;
  const closure = closureOf(row);
  const state = closureState(closure, now);
  const closes = holdsAny(actor, fisheryId, CLOSERS) && state !== 'over';
  const legal = isLegal(reason);
  const stands = closes ? standsAgainst(row, [], zone) : [];
  return {
    id,
    fisheryId,
    reason,
    reasonWords: CLOSURE_REASON_WORDS[reason],
    effect,
    details,
    zone,
    state,
    chooseUntil: row.chooseUntil?.toISOString() ?? null,
    moveToLakeId: row.moveToLakeId,
    liftedAt: row.liftedAt === null ? null : (closedUntil(closure)?.toISOString() ?? null),
    legal,
    standsAgainstLifting: stands,
    version,
    may: {
      lift: closes && !(legal && details.until !== null && state === 'in_force'),
      override: closes && !legal && holdsAny(actor, fisheryId, OVERRIDERS),
    },
  };
}

/** What stands against lifting. No oxygen readings are kept here yet, so that condition says so and is never met. */
export function standsAgainst({ details }: Closure, ticked: readonly string[], zone: string): string[] {
  const facts = { ticked: new Set(ticked), dawns: [], zone };
  return details.liftConditions.flatMap((condition) => {
    const words = whyNotLift([condition], facts);
    return condition.kind === 'tick' ? words : words.map((each) => `${each}. ${NO_READINGS}`);
  });
}

const NO_READINGS = 'Oxygen readings are not kept here yet: the owner may lift it with a reason.';
