import type { FreeAsked } from '@mereward/shared/bookings/availability-contract';
import type { TicketType } from '@mereward/shared/tickets/contract';
import { grossOf, priceLines } from '@mereward/shared/tickets/ticket-price';
import type { EntityManager } from 'typeorm';

/** A kind of ticket that is sold. */
export type SoldKind = { id: string; type: TicketType };

export async function soldKinds(tx: EntityManager, fisheryId: string): Promise<SoldKind[]> {
  return tx.query(
    `SELECT id, details AS type FROM ticket_type WHERE fishery_id = $1 AND withdrawn_at IS NULL ORDER BY id`,
    [fisheryId],
  );
}

type Asked = Pick<FreeAsked, 'day' | 'people' | 'rods'>;

/**
 * The least a peg costs on a day, for so many people and rods: of the kinds given, those that reach it. Kinds with a
 * whole season, and kinds that not everybody may have, tell no price of a day.
 */
export function cheapestPence(
  kinds: readonly SoldKind[],
  at: { pegId: string; lakeId: string },
  asked: Asked,
): number | null {
  const prices = kinds
    .filter(({ type }) => reaches(type, at) && isSoldOn(type, asked))
    .flatMap(({ type }) => {
      const lines = priceLines(type, { ...asked, start: null });
      return 'refused' in lines ? [] : [grossOf(lines)];
    });
  return prices.length === 0 ? null : Math.min(...prices);
}

const reaches = ({ lakeIds, pegIds }: TicketType, at: { pegId: string; lakeId: string }): boolean =>
  lakeIds.includes(at.lakeId) && (pegIds?.includes(at.pegId) ?? true);

const isSoldOn = (type: TicketType, { day, people, rods }: Asked): boolean =>
  (type.firstDay === null || type.firstDay <= day) &&
  (type.lastDay === null || day <= type.lastDay) &&
  people <= type.peopleMost &&
  rods <= type.rodsMost;

/** Kinds anybody may have for a day. */
export const openKinds = (kinds: readonly SoldKind[]): SoldKind[] =>
  kinds.filter(({ type }) => type.audience === 'public' && type.duration.kind !== 'season');
