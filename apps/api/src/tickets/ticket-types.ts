import { TicketType } from '@mereward/db/entities/tickets/ticket-type';
import type {
  ChangeTicketType,
  SaveTicketType,
  TicketTypeList,
  TicketType as TicketTypeDetails,
  TicketTypeView,
} from '@mereward/shared/tickets/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { IsNull, type EntityManager } from 'typeorm';
import { orConflict } from '../conflict';
import { accountOf, type Actor, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, mustRepeat, refuseFaults, staleVersion } from '../repeat';
import { maySetPrices, PRICE_SETTERS } from './policy';

const view = ({ id, fisheryId, details, version }: TicketType, actor: Actor): TicketTypeView => ({
  id,
  fisheryId,
  details,
  version,
  may: { change: maySetPrices(actor, fisheryId) },
});

/** A kind of ticket, sold or withdrawn; `what` is not there for nobody. */
export async function findTicketType(tx: EntityManager, id: string): Promise<TicketType> {
  const found = await tx.findOneBy(TicketType, { id });
  if (!found) throw notFound('kind of ticket');
  return found;
}

/** Every kind of ticket a fishery sells, by name. */
export async function ticketTypes({ tx, actor }: Ctx, fisheryId: string): Promise<TicketTypeList> {
  await fisheryFound(tx, fisheryId);
  const rows = await tx.findBy(TicketType, { fisheryId, withdrawnAt: IsNull() });
  const byName = (a: TicketType, b: TicketType): number => a.details.name.localeCompare(b.details.name, 'en');
  return { ticketTypes: rows.sort(byName).map((row) => view(row, actor)) };
}

export async function ticketType({ tx, actor }: Ctx, id: string): Promise<TicketTypeView> {
  return view(await findTicketType(tx, id), actor);
}

const NAME_TAKEN = 'Another kind of ticket has this name already';

export async function makeTicketType(ctx: Ctx, fisheryId: string, input: SaveTicketType): Promise<void> {
  const { tx, actor, now } = ctx;
  await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, PRICE_SETTERS);
  await refuseElsewhere(tx, fisheryId, input.details);
  const createdBy = accountOf(actor);
  const { id, details } = input;
  const row = { id, fisheryId, details, version: 1, withdrawnAt: null, createdBy, createdAt: now };
  if (await insertOnce(tx, TicketType, row)) return;
  const there = await tx.findOneBy(TicketType, { id });
  if (!there) throw new Problem('conflict', NAME_TAKEN, { detail: 'Nothing was saved. Give it another.' });
  if (there.fisheryId !== fisheryId) throw notFound('kind of ticket');
  mustRepeat({ by: createdBy, content: details }, { by: there.createdBy, content: there.details });
}

/** Lakes and pegs it names must be the fishery's own. */
async function refuseElsewhere(
  tx: EntityManager,
  fisheryId: string,
  { lakeIds, pegIds }: TicketTypeDetails,
): Promise<void> {
  const lakes: { id: string }[] = await tx.query(
    'SELECT id FROM lake WHERE fishery_id = $1 AND id = ANY ($2)',
    [fisheryId, lakeIds],
  );
  const known = new Set(lakes.map(({ id }) => id));
  refuseFaults(
    lakeIds.flatMap((id, index) =>
      known.has(id) ? [] : [{ field: `lakeIds/${index}`, words: 'This lake is not one of the fishery’s.' }],
    ),
  );
  if (!pegIds) return;
  const pegs: { id: string }[] = await tx.query(
    'SELECT id FROM peg WHERE lake_id = ANY ($1) AND id = ANY ($2)',
    [lakeIds, pegIds],
  );
  const there = new Set(pegs.map(({ id }) => id));
  refuseFaults(
    pegIds.flatMap((id, index) =>
      there.has(id) ? [] : [{ field: `pegIds/${index}`, words: 'This peg is not on one of these lakes.' }],
    ),
  );
}

/** Changes what is sold from now on. What was sold keeps its price and its terms. */
export async function changeTicketType(ctx: Ctx, id: string, input: ChangeTicketType): Promise<void> {
  const { tx, actor } = ctx;
  const { fisheryId } = await toChange(ctx, id);
  allowOnly(actor, { fisheryId, what: 'kind of ticket' }, PRICE_SETTERS);
  await refuseElsewhere(tx, fisheryId, input.details);
  const changed = orConflict(
    tx.update(
      TicketType,
      { id, version: input.version, withdrawnAt: IsNull() },
      { details: input.details, version: input.version + 1 },
    ),
    'ticket_type_name',
    NAME_TAKEN,
  );
  if ((await changed).affected !== 1) throw staleVersion();
}

/** Takes it off sale. Tickets already sold are good all the same; taking it off twice is no fault. */
export async function withdrawTicketType(ctx: Ctx, id: string): Promise<void> {
  const { fisheryId } = await toChange(ctx, id);
  allowOnly(ctx.actor, { fisheryId, what: 'kind of ticket' }, PRICE_SETTERS);
  await ctx.tx.update(TicketType, { id, withdrawnAt: IsNull() }, { withdrawnAt: ctx.now });
}

async function toChange({ tx, actor }: Ctx, id: string): Promise<TicketType> {
  accountOf(actor);
  return findTicketType(tx, id);
}
