import { LettingTermsRow } from '@mereward/db/entities/bookings/letting-terms';
import {
  USUAL_TERMS,
  type LettingTerms,
  type LettingTermsView,
  type PutLettingTerms,
} from '@mereward/shared/bookings/letting-terms';
import type { EntityManager } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { mayChangeFishery } from '../fisheries/policy';
import { allowOnly } from '../http/deny';
import { staleVersion } from '../repeat';
import { TERMS_SETTERS } from './policy';

/** The terms a fishery lets its pegs by: its own, or those to begin with. */
export async function termsOf(tx: EntityManager, fisheryId: string): Promise<LettingTerms> {
  const row = await tx.findOneBy(LettingTermsRow, { fisheryId });
  return row?.details ?? USUAL_TERMS;
}

export async function lettingTerms(
  { tx, actor, takesCards }: Ctx,
  fisheryId: string,
): Promise<LettingTermsView> {
  await fisheryFound(tx, fisheryId);
  const row = await tx.findOneBy(LettingTermsRow, { fisheryId });
  return {
    details: row?.details ?? USUAL_TERMS,
    version: row?.version ?? null,
    cardPayments: takesCards,
    may: { change: mayChangeFishery(actor, fisheryId) },
  };
}

/** Sets the terms. Tickets sold before keep the way of cancelling they were sold with. */
export async function putLettingTerms(ctx: Ctx, fisheryId: string, input: PutLettingTerms): Promise<void> {
  const { tx, actor, now } = ctx;
  await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, TERMS_SETTERS);
  const changedBy = accountOf(actor);
  const { details, version } = input;
  const rows: unknown[] =
    version === null
      ? await tx.query(
          `INSERT INTO letting_terms (fishery_id, details, version, changed_by, changed_at)
           VALUES ($1, $2, 1, $3, $4) ON CONFLICT DO NOTHING RETURNING 1`,
          [fisheryId, details, changedBy, now],
        )
      : await tx
          .createQueryBuilder()
          .update(LettingTermsRow)
          .set({ details, version: version + 1, changedBy, changedAt: now })
          .where({ fisheryId, version })
          .execute()
          .then(({ affected }) => (affected === 1 ? [1] : []));
  if (rows.length === 0) throw staleVersion();
}
