import { BottomTable } from '@mereward/db/entities/surveys/bottom-table';
import type { BottomFeel } from '@mereward/shared/surveys/bottom-table-contract';
import { USUAL_FEEL } from '@mereward/shared/surveys/usual-feel';
import type { EntityManager } from 'typeorm';

/** A fishery's likelihoods, and which version of its table they are; 0 is the built-in. */
export type FeelInForce = { version: number; feel: BottomFeel };

/** The newest table of a fishery; none made, the built-in. */
export async function feelInForce(tx: EntityManager, fisheryId: string): Promise<FeelInForce> {
  const row = await tx.findOne(BottomTable, { where: { fisheryId }, order: { version: 'DESC' } });
  return { version: row?.version ?? 0, feel: row?.feel ?? USUAL_FEEL };
}
