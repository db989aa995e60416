import type { MigrationInterface, QueryRunner } from 'typeorm';

export class ReportsTakenBack1780000014000 implements MigrationInterface {
  name = 'ReportsTakenBack1780000014000';

  async up(q: QueryRunner): Promise<void> {
    // The decision and its evidence stay: charts were made with them.
    await q.query(`
      ALTER TABLE disagreement
        DROP CONSTRAINT disagreement_status_check,
        DROP CONSTRAINT disagreement_evidence,
        ADD COLUMN taken_back_by uuid REFERENCES account,
        ADD COLUMN taken_back_at timestamptz,
        ADD COLUMN taken_back_reason text,
        ADD CONSTRAINT disagreement_status CHECK (status IN ('waiting', 'accepted', 'declined', 'taken_back')),
        ADD CONSTRAINT disagreement_evidence CHECK ((status IN ('accepted', 'taken_back')) = (evidence IS NOT NULL)),
        ADD CONSTRAINT disagreement_taken_back CHECK (
          (status = 'taken_back') = (taken_back_by IS NOT NULL)
          AND (taken_back_by IS NULL) = (taken_back_at IS NULL)
          AND (taken_back_by IS NULL) = (taken_back_reason IS NULL)),
        ADD CONSTRAINT disagreement_taken_back_by_another CHECK (
          taken_back_by IS DISTINCT FROM reported_by OR taken_back_by IS NULL)`);
    await q.query('CREATE INDEX disagreement_taker_back ON disagreement (taken_back_by)');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP INDEX disagreement_taker_back');
    // Without the words for it, what was taken back counts as declined.
    await q.query(`
      ALTER TABLE disagreement DROP CONSTRAINT disagreement_evidence, DROP CONSTRAINT disagreement_status,
        DROP CONSTRAINT disagreement_taken_back, DROP CONSTRAINT disagreement_taken_back_by_another`);
    await q.query(`UPDATE disagreement SET status = 'declined', evidence = NULL WHERE status = 'taken_back'`);
    await q.query(`
      ALTER TABLE disagreement
        DROP COLUMN taken_back_by, DROP COLUMN taken_back_at, DROP COLUMN taken_back_reason,
        ADD CONSTRAINT disagreement_status_check CHECK (status IN ('waiting', 'accepted', 'declined')),
        ADD CONSTRAINT disagreement_evidence CHECK ((status = 'accepted') = (evidence IS NOT NULL))`);
  }
}
