import type { MigrationInterface, QueryRunner } from 'typeorm';

export class SurveysAndCharts1780000002000 implements MigrationInterface {
  name = 'SurveysAndCharts1780000002000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE survey_visit (
        id uuid PRIMARY KEY,
        lake_id uuid NOT NULL REFERENCES lake,
        board_id uuid NOT NULL REFERENCES gauge_board,
        surveyor_id uuid NOT NULL REFERENCES account,
        title text NOT NULL,
        competence text NOT NULL CHECK (competence IN ('trainee', 'competent', 'lead')),
        started_at timestamptz NOT NULL,
        ended_at timestamptz,
        gauge_start_m double precision NOT NULL,
        gauge_end_m double precision,
        weather jsonb NOT NULL,
        clarity text NOT NULL,
        weed_state text NOT NULL,
        kit jsonb NOT NULL, -- Kit
        consent_to_publish boolean NOT NULL,
        version int NOT NULL,
        received_at timestamptz NOT NULL,
        CONSTRAINT survey_visit_closed CHECK ((ended_at IS NULL) = (gauge_end_m IS NULL)),
        CONSTRAINT survey_visit_order CHECK (ended_at IS NULL OR ended_at >= started_at)
      )`);
    await q.query('CREATE INDEX survey_visit_lake ON survey_visit (lake_id, started_at DESC)');
    await q.query(`
      CREATE TABLE cast_import (
        id uuid PRIMARY KEY,
        visit_id uuid NOT NULL REFERENCES survey_visit,
        filename text NOT NULL,
        sha256 bytea NOT NULL,
        rows int NOT NULL,
        imported_by uuid NOT NULL REFERENCES account,
        imported_at timestamptz NOT NULL,
        CONSTRAINT cast_import_once UNIQUE (visit_id, sha256)
      )`);
    // "cast" is a reserved word in SQL.
    await q.query(`
      CREATE TABLE survey_cast (
        id uuid PRIMARY KEY,
        visit_id uuid NOT NULL REFERENCES survey_visit,
        peg_id uuid NOT NULL REFERENCES peg,
        line_id uuid NOT NULL,
        import_id uuid REFERENCES cast_import,
        seq int NOT NULL,
        observed_at timestamptz NOT NULL,
        received_at timestamptz NOT NULL,
        kept_by uuid NOT NULL REFERENCES account,
        observation jsonb NOT NULL, -- CastObservation, exactly as observed; never changed
        undone_at timestamptz,
        reduced jsonb NOT NULL, -- Reduced: derived, made again when a constant is corrected
        CONSTRAINT survey_cast_seq UNIQUE (visit_id, seq)
      )`);
    await q.query('CREATE INDEX survey_cast_peg ON survey_cast (peg_id)');
    await q.query(`
      CREATE TABLE chart (
        id uuid PRIMARY KEY,
        lake_id uuid NOT NULL REFERENCES lake,
        title text NOT NULL,
        visit_ids uuid[] NOT NULL CHECK (cardinality(visit_ids) > 0),
        contour_step_m double precision NOT NULL,
        status text NOT NULL CHECK (status IN ('draft', 'submitted', 'published', 'superseded', 'withdrawn')),
        version text,
        datum_m double precision NOT NULL,
        surveyed_from date,
        surveyed_to date,
        input_sha256 bytea,
        built jsonb, -- isobaths, figures, hypsography, quality, checks, soundings: see apps/api/src/charts
        frame jsonb,
        depth bytea,
        sigma bytea,
        substrate bytea,
        cover bytea,
        built_at timestamptz,
        drafted_by uuid NOT NULL REFERENCES account,
        drafted_at timestamptz NOT NULL,
        submitted_by uuid REFERENCES account,
        submitted_at timestamptz,
        approved_by uuid REFERENCES account,
        published_at timestamptz,
        superseded_by uuid REFERENCES chart,
        withdrawn_reason text,
        withdrawn_at timestamptz,
        CONSTRAINT chart_version UNIQUE (lake_id, version),
        CONSTRAINT chart_approved_by_another CHECK (approved_by IS DISTINCT FROM submitted_by OR approved_by IS NULL),
        CONSTRAINT chart_published_whole CHECK (
          status IN ('draft', 'submitted')
          OR (version IS NOT NULL AND built IS NOT NULL AND depth IS NOT NULL AND approved_by IS NOT NULL
              AND published_at IS NOT NULL))
      )`);
    await q.query(`CREATE UNIQUE INDEX chart_one_published ON chart (lake_id) WHERE status = 'published'`);
    // Published rows never change: all that may happen to one is to be superseded or withdrawn.
    await q.query(`
      CREATE FUNCTION chart_frozen() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN
        IF TG_OP = 'DELETE' THEN
          IF OLD.status NOT IN ('draft', 'submitted') THEN
            RAISE EXCEPTION 'a published chart is kept' USING ERRCODE = 'check_violation', CONSTRAINT = 'chart_frozen';
          END IF;
          RETURN OLD;
        END IF;
        IF OLD.status IN ('draft', 'submitted') THEN RETURN NEW; END IF;
        IF (to_jsonb(NEW) - ARRAY['status', 'superseded_by', 'withdrawn_reason', 'withdrawn_at'])
             IS DISTINCT FROM (to_jsonb(OLD) - ARRAY['status', 'superseded_by', 'withdrawn_reason', 'withdrawn_at'])
           OR NOT (NEW.status = OLD.status
                   OR (OLD.status = 'published' AND NEW.status IN ('superseded', 'withdrawn'))
                   OR (OLD.status = 'superseded' AND NEW.status = 'withdrawn'))
           OR (OLD.superseded_by IS NOT NULL AND NEW.superseded_by IS DISTINCT FROM OLD.superseded_by)
           OR (OLD.withdrawn_at IS NOT NULL AND NEW IS DISTINCT FROM OLD) THEN
          RAISE EXCEPTION 'a published chart never changes' USING ERRCODE = 'check_violation', CONSTRAINT = 'chart_frozen';
        END IF;
        RETURN NEW;
      END $$`);
    await q.query(
      'CREATE TRIGGER chart_frozen BEFORE UPDATE OR DELETE ON chart FOR EACH ROW EXECUTE FUNCTION chart_frozen()',
    );
    await q.query(`
      CREATE TABLE chart_build (
        chart_id uuid PRIMARY KEY REFERENCES chart ON DELETE CASCADE,
        attempt uuid NOT NULL,
        state text NOT NULL CHECK (state IN ('queued', 'running', 'done', 'failed', 'cancelled')),
        step text NOT NULL,
        share double precision NOT NULL CHECK (share BETWEEN 0 AND 1),
        error text,
        cancel_asked_at timestamptz,
        tries int NOT NULL DEFAULT 0,
        updated_at timestamptz NOT NULL
      )`);
    await q.query(`
      CREATE TABLE spot (
        id uuid PRIMARY KEY,
        peg_id uuid NOT NULL REFERENCES peg,
        details jsonb NOT NULL, -- SpotDetails
        version int NOT NULL,
        created_by uuid NOT NULL REFERENCES account,
        created_at timestamptz NOT NULL
      )`);
    await q.query('CREATE INDEX spot_peg ON spot (peg_id)');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TABLE spot, chart_build, chart, survey_cast, cast_import, survey_visit');
    await q.query('DROP FUNCTION chart_frozen');
  }
}
