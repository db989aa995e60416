import type { MigrationInterface, QueryRunner } from 'typeorm';

export class ChartLeftOut1780000013000 implements MigrationInterface {
  name = 'ChartLeftOut1780000013000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE chart_left_out (
        id uuid PRIMARY KEY,
        chart_id uuid NOT NULL REFERENCES chart ON DELETE CASCADE,
        cast_id uuid REFERENCES survey_cast,
        log_id uuid REFERENCES sounding_import,
        part jsonb, -- LogCell or LogRun, of the log
        reason text NOT NULL CONSTRAINT chart_left_out_reason CHECK (length(reason) BETWEEN 1 AND 300),
        left_out_by uuid NOT NULL REFERENCES account,
        left_out_at timestamptz NOT NULL,
        put_back_by uuid REFERENCES account,
        put_back_at timestamptz,
        CONSTRAINT chart_left_out_one_thing CHECK (
          (cast_id IS NULL) <> (log_id IS NULL) AND (log_id IS NULL) = (part IS NULL)),
        CONSTRAINT chart_left_out_put_back CHECK ((put_back_by IS NULL) = (put_back_at IS NULL))
      )`);
    await q.query(
      'CREATE UNIQUE INDEX chart_left_out_cast ON chart_left_out (chart_id, cast_id) WHERE put_back_at IS NULL',
    );
    await q.query(
      'CREATE UNIQUE INDEX chart_left_out_part ON chart_left_out (chart_id, log_id, part) WHERE put_back_at IS NULL',
    );
    await q.query('CREATE INDEX chart_left_out_chart ON chart_left_out (chart_id)');
    await q.query('CREATE INDEX chart_left_out_of_cast ON chart_left_out (cast_id)');
    await q.query('CREATE INDEX chart_left_out_of_log ON chart_left_out (log_id)');
    // What was left out of a published chart is part of it, and as frozen. Discarding a draft takes its rows along.
    await q.query(`
      CREATE FUNCTION chart_left_out_frozen() RETURNS trigger LANGUAGE plpgsql AS $$
      DECLARE
        charted text;
      BEGIN
        SELECT status INTO charted FROM chart WHERE id = COALESCE(NEW.chart_id, OLD.chart_id);
        IF charted IS NOT NULL AND charted NOT IN ('draft', 'submitted') THEN
          RAISE EXCEPTION 'what a published chart leaves out never changes'
            USING ERRCODE = 'check_violation', CONSTRAINT = 'chart_left_out_frozen';
        END IF;
        IF TG_OP = 'DELETE' THEN RETURN OLD; END IF;
        RETURN NEW;
      END $$`);
    await q.query(
      'CREATE TRIGGER chart_left_out_frozen BEFORE INSERT OR UPDATE OR DELETE ON chart_left_out FOR EACH ROW EXECUTE FUNCTION chart_left_out_frozen()',
    );
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TABLE chart_left_out');
    await q.query('DROP FUNCTION chart_left_out_frozen');
  }
}
