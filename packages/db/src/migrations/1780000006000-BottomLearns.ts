import type { MigrationInterface, QueryRunner } from 'typeorm';

export class BottomLearns1780000006000 implements MigrationInterface {
  name = 'BottomLearns1780000006000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE bottom_table (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        version int NOT NULL CHECK (version >= 1),
        kind text NOT NULL CHECK (kind IN ('usual', 'edited', 'learnt')),
        feel jsonb, -- BottomFeel; null: the built-in table
        knows uuid[] NOT NULL, -- confirmed bottoms that its figures already hold
        confirmed_casts int NOT NULL CHECK (confirmed_casts >= 0),
        reason text NOT NULL,
        made_by uuid NOT NULL REFERENCES account,
        made_at timestamptz NOT NULL,
        CONSTRAINT bottom_table_version UNIQUE (fishery_id, version),
        CONSTRAINT bottom_table_usual CHECK ((kind = 'usual') = (feel IS NULL))
      )`);
    await q.query(`
      CREATE TABLE confirmed_bottom (
        id uuid PRIMARY KEY,
        lake_id uuid NOT NULL REFERENCES lake,
        cast_id uuid REFERENCES survey_cast,
        lon double precision NOT NULL,
        lat double precision NOT NULL,
        position_sigma_m double precision NOT NULL CHECK (position_sigma_m > 0),
        substrate text CHECK (substrate IN ('silt', 'clay', 'sand', 'gravel', 'stones')),
        cover text CHECK (cover IN ('clear', 'low_weed', 'tall_weed', 'leaf_litter', 'snag')),
        method text NOT NULL CHECK (method IN ('grab', 'pronged_lead', 'drain_down', 'diver')),
        day date NOT NULL,
        note text NOT NULL,
        confirmed_by uuid NOT NULL REFERENCES account,
        received_at timestamptz NOT NULL,
        taken_back_at timestamptz,
        CONSTRAINT confirmed_bottom_says CHECK (substrate IS NOT NULL OR cover IS NOT NULL)
      )`);
    await q.query('CREATE INDEX confirmed_bottom_lake ON confirmed_bottom (lake_id, day DESC)');
    await q.query('CREATE INDEX confirmed_bottom_cast ON confirmed_bottom (cast_id)');
    await q.query(`
      CREATE TABLE bottom_event (
        id uuid PRIMARY KEY,
        lake_id uuid NOT NULL REFERENCES lake,
        kind text NOT NULL
          CHECK (kind IN ('weed_cut', 'snag_removed', 'dredged', 'leaf_fall', 'flood', 'drawdown', 'other')),
        area jsonb, -- LakePolygon; null: the whole lake
        happened_on date NOT NULL,
        ends text[] NOT NULL,
        note text NOT NULL,
        recorded_by uuid NOT NULL REFERENCES account,
        received_at timestamptz NOT NULL,
        taken_back_at timestamptz,
        CONSTRAINT bottom_event_ends
          CHECK (cardinality(ends) > 0 AND ends <@ ARRAY['cover', 'substrate', 'depth'])
      )`);
    await q.query('CREATE INDEX bottom_event_lake ON bottom_event (lake_id, happened_on DESC)');
    await q.query(`
      CREATE TABLE lead_calibration (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        name text NOT NULL,
        lead_g double precision NOT NULL CHECK (lead_g > 0),
        lead_shape text NOT NULL,
        line_type text NOT NULL,
        falls jsonb NOT NULL, -- KnownFall[], as counted
        calibration jsonb NOT NULL, -- LeadCalibration worked out of them
        calibrated_on date NOT NULL,
        note text NOT NULL,
        calibrated_by uuid NOT NULL REFERENCES account,
        received_at timestamptz NOT NULL,
        put_away_at timestamptz
      )`);
    await q.query('CREATE INDEX lead_calibration_fishery ON lead_calibration (fishery_id)');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TABLE lead_calibration, bottom_event, confirmed_bottom, bottom_table');
  }
}
