import {
  FisheryListItem,
  InvitationView,
  PersonView,
  type PeopleView,
} from '@mereward/shared/fisheries/contract';
import type { EntityManager } from 'typeorm';
import { z } from 'zod';
import type { Ctx } from '../ctx';
import { admit, fisheryFound } from './found';
import { givableRoles, maySeePeople } from './policy';

const LIST = `
  SELECT fishery.id, fishery.name, fishery.details -> 'position' AS position,
    coalesce(jsonb_agg(jsonb_build_object(
      'id', lake.id,
      'name', lake.name,
      'areaM2', lake.area_m2,
      'pegs', (SELECT count(*) FROM peg WHERE peg.lake_id = lake.id),
      'nights', lake.details -> 'nights',
      'chart', (
        SELECT jsonb_build_object('id', chart.id, 'version', chart.version)
        FROM chart WHERE chart.lake_id = lake.id AND chart.status = 'published')
    ) ORDER BY lake.area_m2 DESC, lake.name) FILTER (WHERE lake.id IS NOT NULL), '[]') AS lakes
  FROM fishery LEFT JOIN lake ON lake.fishery_id = fishery.id
  GROUP BY fishery.id
  ORDER BY fishery.name, fishery.id`;

/** Every fishery with its lakes, the largest first. */
export async function fisheryList(tx: EntityManager): Promise<FisheryListItem[]> {
  return z.array(FisheryListItem).parse(await tx.query(LIST));
}

const PEOPLE = `
  SELECT account.id AS "accountId", account.name, account.email, array_agg(held.role ORDER BY held.role) AS roles
  FROM fishery_role held JOIN account ON account.id = held.account_id
  WHERE held.fishery_id = $1
  GROUP BY account.id
  ORDER BY lower(account.name), account.id`;

/** What became of an invitation, in one word, at the instant $2. */
export const INVITATION_STATE = `
  CASE WHEN accepted_at IS NOT NULL THEN 'accepted'
       WHEN withdrawn_at IS NOT NULL THEN 'withdrawn'
       WHEN expires_at <= $2 THEN 'expired'
       ELSE 'waiting' END`;

const INVITATIONS = `
  SELECT id, email, role, ${INVITATION_STATE} AS state,
    to_char(expires_at AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"') AS "expiresAt"
  FROM invitation WHERE fishery_id = $1
  ORDER BY created_at DESC, id
  LIMIT 200`;

/** Everybody with a role there, and the newest invitations. */
export async function peopleView({ tx, actor, now }: Ctx, fisheryId: string): Promise<PeopleView> {
  await fisheryFound(tx, fisheryId);
  admit(actor, fisheryId, maySeePeople(actor, fisheryId));
  return {
    people: z.array(PersonView).parse(await tx.query(PEOPLE, [fisheryId])),
    invitations: z.array(InvitationView).parse(await tx.query(INVITATIONS, [fisheryId, now])),
    mayGive: givableRoles(actor, fisheryId),
  };
}
