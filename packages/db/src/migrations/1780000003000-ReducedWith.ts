import type { MigrationInterface, QueryRunner } from 'typeorm';

export class ReducedWith1780000003000 implements MigrationInterface {
  name = 'ReducedWith1780000003000';

  async up(q: QueryRunner): Promise<void> {
    // A digest of what the visit's casts were reduced with: when a mark or a peg is put right, it no longer fits.
    await q.query('ALTER TABLE survey_visit ADD COLUMN reduced_with bytea');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('ALTER TABLE survey_visit DROP COLUMN reduced_with');
  }
}
