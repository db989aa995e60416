import type { EntityManager } from 'typeorm';

/** Everybody who surveyed these visits: who led one, or kept a cast of it at the water. */
export async function surveyorsOf(tx: EntityManager, visitIds: readonly string[]): Promise<Set<string>> {
  const rows = await tx.query<{ id: string }[]>(
    `SELECT surveyor_id AS id FROM survey_visit WHERE id = ANY ($1)
      UNION
     SELECT kept_by FROM survey_cast WHERE visit_id = ANY ($1) AND import_id IS NULL AND undone_at IS NULL`,
    [visitIds],
  );
  return new Set(rows.map(({ id }) => id));
}
