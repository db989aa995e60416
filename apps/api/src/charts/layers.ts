import type { Lake } from '@mereward/db/entities/lakes/lake';
import type { LayerNotes } from '@mereward/shared/charts/contract';
import type { LayerAudiences } from '@mereward/shared/lakes/contract';
import { rolesAt, type Ctx } from '../ctx';
import { maySeeLayer, whyNotLayer } from '../lakes/audience';
import { isStaff } from '../lakes/policy';
import { runningTicketAtLake } from '../lakes/running-ticket';

export type Layer = keyof LayerAudiences;

/** What one reader may see of a lake's charts. Every page, file and card asks this and nothing else. */
export type Sight = { staff: boolean; sees: Readonly<Record<Layer, boolean>>; notes: LayerNotes };

/** `ticketRunning`: on this peg when it is a peg's page, on any peg of the lake when it is the chart. */
export function sightOf({ actor }: Ctx, lake: Lake, ticketRunning: boolean): Sight {
  const roles = rolesAt(actor, lake.fisheryId);
  const reader = (layer: Layer) => ({ audience: lake.details.audiences[layer], roles, ticketRunning });
  const sees = (layer: Layer): boolean => maySeeLayer(reader(layer));
  const note = (layer: Layer): string | null => whyNotLayer(reader(layer));
  return {
    staff: isStaff(actor, lake.fisheryId),
    // A sounding is a depth: whoever may not see depths sees no soundings either.
    sees: {
      depth: sees('depth'),
      bottom: sees('bottom'),
      spots: sees('spots'),
      soundings: sees('soundings') && sees('depth'),
    },
    notes: {
      depth: note('depth'),
      bottom: note('bottom'),
      spots: note('spots'),
      soundings: note('soundings') ?? note('depth'),
    },
  };
}

export async function sightOnChart(ctx: Ctx, lake: Lake): Promise<Sight> {
  return sightOf(ctx, lake, (await runningTicketAtLake(ctx, lake.id)) !== null);
}
