import type { MigrationInterface, QueryRunner } from 'typeorm';

export class LakesAndPegs1780000001000 implements MigrationInterface {
  name = 'LakesAndPegs1780000001000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE lake (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        name text NOT NULL,
        details jsonb NOT NULL, -- LakeDetails
        origin_lon double precision NOT NULL CHECK (origin_lon BETWEEN -180 AND 180),
        origin_lat double precision NOT NULL CHECK (origin_lat BETWEEN -90 AND 90),
        area_m2 double precision NOT NULL CHECK (area_m2 > 0),
        datum_m double precision NOT NULL,
        version int NOT NULL,
        created_by uuid NOT NULL REFERENCES account,
        created_at timestamptz NOT NULL,
        CONSTRAINT lake_name UNIQUE (fishery_id, name)
      )`);
    await q.query(`
      CREATE TABLE peg (
        id uuid PRIMARY KEY,
        lake_id uuid NOT NULL REFERENCES lake,
        number text NOT NULL,
        walking_order int NOT NULL,
        details jsonb NOT NULL, -- PegDetails
        version int NOT NULL,
        created_by uuid NOT NULL REFERENCES account,
        created_at timestamptz NOT NULL,
        CONSTRAINT peg_number UNIQUE (lake_id, number)
      )`);
    await q.query(`
      CREATE TABLE mark (
        id uuid PRIMARY KEY,
        lake_id uuid NOT NULL REFERENCES lake,
        code text NOT NULL,
        details jsonb NOT NULL, -- MarkDetails
        version int NOT NULL,
        created_by uuid NOT NULL REFERENCES account,
        created_at timestamptz NOT NULL,
        CONSTRAINT mark_code UNIQUE (lake_id, code)
      )`);
    await q.query(`
      CREATE TABLE gauge_board (
        id uuid PRIMARY KEY,
        lake_id uuid NOT NULL REFERENCES lake,
        code text NOT NULL,
        details jsonb NOT NULL, -- GaugeBoardDetails
        is_datum_board boolean NOT NULL,
        version int NOT NULL,
        created_by uuid NOT NULL REFERENCES account,
        created_at timestamptz NOT NULL,
        CONSTRAINT gauge_board_code UNIQUE (lake_id, code)
      )`);
    await q.query('CREATE UNIQUE INDEX gauge_board_datum ON gauge_board (lake_id) WHERE is_datum_board');
    await q.query(`
      CREATE TABLE level_reading (
        id uuid PRIMARY KEY,
        board_id uuid NOT NULL REFERENCES gauge_board,
        at timestamptz NOT NULL,
        level_m double precision NOT NULL CHECK (level_m BETWEEN -100 AND 9000),
        level_text text NOT NULL,
        note text NOT NULL,
        recorded_by uuid NOT NULL REFERENCES account,
        received_at timestamptz NOT NULL
      )`);
    await q.query('CREATE INDEX level_reading_board_at ON level_reading (board_id, at DESC)');
    await q.query(`
      CREATE TABLE photo (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        peg_id uuid REFERENCES peg,
        mark_id uuid REFERENCES mark,
        caption text NOT NULL,
        taken_on date,
        state text NOT NULL CHECK (state IN ('waiting', 'ready', 'refused')),
        refusal text,
        width_px int,
        height_px int,
        sha256 bytea NOT NULL,
        added_by uuid NOT NULL REFERENCES account,
        added_at timestamptz NOT NULL,
        CONSTRAINT photo_one_subject CHECK (num_nonnulls(peg_id, mark_id) = 1)
      )`);
    await q.query('CREATE INDEX photo_peg ON photo (peg_id)');
    await q.query('CREATE INDEX photo_mark ON photo (mark_id)');
    // A peg is never let twice: overlapping times of one peg exclude each other, whoever writes them.
    await q.query(`
      CREATE TABLE booking (
        id uuid PRIMARY KEY,
        peg_id uuid NOT NULL REFERENCES peg,
        account_id uuid NOT NULL REFERENCES account,
        during tstzrange NOT NULL,
        status text NOT NULL CHECK (status IN ('confirmed', 'cancelled')),
        written_by uuid NOT NULL REFERENCES account,
        written_at timestamptz NOT NULL,
        CONSTRAINT booking_bounds CHECK (
          lower_inc(during) AND NOT upper_inc(during) AND NOT isempty(during)
          AND upper(during) - lower(during) <= interval '31 days'),
        CONSTRAINT booking_peg_during EXCLUDE USING gist (peg_id WITH =, during WITH &&) WHERE (status = 'confirmed')
      )`);
    await q.query('CREATE INDEX booking_account ON booking (account_id)');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TABLE booking, photo, level_reading, gauge_board, mark, peg, lake');
  }
}
