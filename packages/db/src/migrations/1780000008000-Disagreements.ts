import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Disagreements1780000008000 implements MigrationInterface {
  name = 'Disagreements1780000008000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE disagreement (
        id uuid PRIMARY KEY,
        peg_id uuid NOT NULL REFERENCES peg,
        chart_id uuid REFERENCES chart, -- the chart published when it was told
        reported_by uuid NOT NULL REFERENCES account,
        reported_at timestamptz NOT NULL,
        day date NOT NULL,
        told jsonb NOT NULL, -- Disagree: as it was told; never changed
        place jsonb NOT NULL, -- ReportedPlace, with its words
        status text NOT NULL CHECK (status IN ('waiting', 'accepted', 'declined')),
        decided_by uuid REFERENCES account,
        decided_at timestamptz,
        decision jsonb, -- DecideDisagreement
        evidence jsonb, -- ReportEvidence: what charts are built from
        CONSTRAINT disagreement_decided CHECK (
          (status = 'waiting') = (decided_by IS NULL)
          AND (decided_by IS NULL) = (decided_at IS NULL)
          AND (decided_by IS NULL) = (decision IS NULL)),
        CONSTRAINT disagreement_evidence CHECK ((status = 'accepted') = (evidence IS NOT NULL)),
        CONSTRAINT disagreement_decided_by_another CHECK (decided_by IS DISTINCT FROM reported_by OR decided_by IS NULL)
      )`);
    await q.query('CREATE INDEX disagreement_peg ON disagreement (peg_id)');
    await q.query('CREATE INDEX disagreement_reporter ON disagreement (reported_by, reported_at DESC)');
    await q.query('CREATE INDEX disagreement_chart ON disagreement (chart_id)');
    await q.query('CREATE INDEX disagreement_decider ON disagreement (decided_by)');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TABLE disagreement');
  }
}
