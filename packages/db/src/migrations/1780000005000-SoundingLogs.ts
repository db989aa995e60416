import type { MigrationInterface, QueryRunner } from 'typeorm';

export class SoundingLogs1780000005000 implements MigrationInterface {
  name = 'SoundingLogs1780000005000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE sounding_import (
        id uuid PRIMARY KEY,
        visit_id uuid NOT NULL REFERENCES survey_visit,
        filenames text[] NOT NULL CHECK (cardinality(filenames) > 0),
        sha256 bytea NOT NULL, -- of the files' own digests in order
        options jsonb NOT NULL, -- LogOptions
        goal text NOT NULL CHECK (goal IN ('look', 'keep')),
        attempt uuid NOT NULL,
        state text NOT NULL CHECK (state IN ('queued', 'running', 'looked', 'done', 'failed', 'cancelled')),
        step text NOT NULL,
        share double precision NOT NULL CHECK (share BETWEEN 0 AND 1),
        error text,
        cancel_asked_at timestamptz,
        tries int NOT NULL DEFAULT 0,
        updated_at timestamptz NOT NULL,
        preview jsonb, -- LogPreview, as last looked at
        report jsonb, -- LogReport, of what was taken in
        imported_by uuid NOT NULL REFERENCES account,
        imported_at timestamptz NOT NULL,
        undone_at timestamptz,
        CONSTRAINT sounding_import_reported CHECK ((state = 'done') = (report IS NOT NULL))
      )`);
    await q.query(
      'CREATE UNIQUE INDEX sounding_import_files ON sounding_import (visit_id, sha256) WHERE undone_at IS NULL',
    );
    await q.query(`
      CREATE TABLE sounding_file (
        import_id uuid NOT NULL REFERENCES sounding_import ON DELETE CASCADE,
        seq int NOT NULL,
        name text NOT NULL,
        bytes int NOT NULL, -- before packing
        packed bytea NOT NULL, -- gzip
        PRIMARY KEY (import_id, seq)
      )`);
    await q.query(`
      CREATE TABLE sounding (
        import_id uuid NOT NULL REFERENCES sounding_import ON DELETE CASCADE,
        seq int NOT NULL,
        lon double precision NOT NULL CHECK (lon BETWEEN -180 AND 180),
        lat double precision NOT NULL CHECK (lat BETWEEN -90 AND 90),
        depth_as_read_m double precision NOT NULL CHECK (depth_as_read_m > 0 AND depth_as_read_m <= 60),
        observed_at timestamptz,
        PRIMARY KEY (import_id, seq)
      )`);
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TABLE sounding, sounding_file, sounding_import');
  }
}
