import type { MigrationInterface, QueryRunner } from 'typeorm';

export class KeptCasts1780000004000 implements MigrationInterface {
  name = 'KeptCasts1780000004000';

  async up(q: QueryRunner): Promise<void> {
    // A lake's list counts the casts of every visit: from the index alone, since a cast's row is wide.
    await q.query('CREATE INDEX survey_cast_kept ON survey_cast (visit_id) WHERE undone_at IS NULL');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP INDEX survey_cast_kept');
  }
}
