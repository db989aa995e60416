import type { Role } from '@mereward/shared/accounts/contract';
import type { Audience } from '@mereward/shared/lakes/contract';
import { STAFF } from './policy';

/** Who wants to see a layer: the roles held at the lake's fishery, and whether a ticket of theirs runs now. */
export type LayerReader = { audience: Audience; roles: ReadonlySet<Role>; ticketRunning: boolean };

const STAFF_ROLES: readonly Role[] = STAFF;

/** May this reader see a layer with this audience? Staff see all, as they have to answer for it. */
export function maySeeLayer({ audience, roles, ticketRunning }: LayerReader): boolean {
  if (STAFF_ROLES.some((role) => roles.has(role))) return true;
  switch (audience) {
    case 'public':
      return true;
    case 'ticket':
      return ticketRunning;
    case 'members':
      return roles.has('member');
    case 'staff':
      return false;
  }
}

const WORDS: Record<Exclude<Audience, 'public'>, string> = {
  ticket: 'Shown to anglers with a ticket for this peg, while it runs.',
  members: 'Shown to this fishery’s members.',
  staff: 'Kept by the fishery for its staff.',
};

/** Why the layer is missing for this reader, in words; null when it is there. */
export function whyNotLayer(reader: LayerReader): string | null {
  if (maySeeLayer(reader) || reader.audience === 'public') return null;
  return WORDS[reader.audience];
}
