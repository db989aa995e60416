import { Problem } from '@mereward/shared/problems/problem';
import { QueryFailedError } from 'typeorm';
import { z } from 'zod';

const DriverError = z.object({ constraint: z.string() });

/** The name of the constraint that refused a statement, if that is why it failed. */
export function brokenConstraint(error: unknown): string | null {
  if (!(error instanceof QueryFailedError)) return null;
  const parsed = DriverError.safeParse(error.driverError);
  return parsed.success ? parsed.data.constraint : null;
}

/** Turns the breach of one named constraint into a conflict in words; anything else stays what it was. */
export async function orConflict<T>(deed: Promise<T>, constraint: string, title: string): Promise<T> {
  try {
    return await deed;
  } catch (error) {
    if (brokenConstraint(error) === constraint)
      throw new Problem('conflict', title, { detail: 'Nothing was saved. Change that, then save again.' });
    throw error;
  }
}
