import type { TicketTypeView } from '@mereward/shared/tickets/contract';
import type { PartyMember } from '@/features/bookings/find-choice';

/** Whose a ticket of a kind is. */
export const kindOfMember = ({ details: { audience } }: TicketTypeView): PartyMember['kind'] =>
  audience === 'junior' ? 'junior' : audience === 'guest' ? 'guest' : 'holder';

type Wish = { pegId: string | null; kind: TicketTypeView; rods: number };

export const aMember = ({ pegId, kind, rods }: Wish): PartyMember => ({
  pegId,
  ticketTypeId: kind.id,
  kind: kindOfMember(kind),
  rods: Math.min(rods, kind.details.rodsMost),
  people: 1,
});

/** Kinds that can stand in one booking with another: their hours are the same. */
export const kindsBeside = (kinds: readonly TicketTypeView[], kind: TicketTypeView): TicketTypeView[] =>
  kinds.filter(({ details }) => JSON.stringify(details.duration) === JSON.stringify(kind.details.duration));

/** A party with one ticket more; on a peg it has already nothing changes. */
export const withMember = (party: readonly PartyMember[], member: PartyMember): PartyMember[] =>
  party.some(({ pegId }) => pegId !== null && pegId === member.pegId) ? [...party] : [...party, member];

/** A party with one of its tickets changed; null takes it out. */
export const withChange = (
  party: readonly PartyMember[],
  index: number,
  change: Partial<PartyMember> | null,
): PartyMember[] =>
  party.flatMap((member, i) => (i !== index ? [member] : change ? [{ ...member, ...change }] : []));
