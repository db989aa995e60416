import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Pictures from above that an outline is traced over, and the points that say how they lie. */
export class LakePictures1780000010000 implements MigrationInterface {
  name = 'LakePictures1780000010000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE lake_picture (
        id uuid PRIMARY KEY,
        lake_id uuid NOT NULL REFERENCES lake,
        caption text NOT NULL,
        state text NOT NULL CONSTRAINT lake_picture_state CHECK (state IN ('waiting', 'ready', 'refused')),
        refusal text,
        width_px int,
        height_px int,
        sha256 bytea NOT NULL,
        fit text NOT NULL CONSTRAINT lake_picture_fit CHECK (fit IN ('similarity', 'affine')),
        points jsonb NOT NULL,
        transform jsonb,
        rms_m double precision,
        version int NOT NULL,
        added_by uuid NOT NULL REFERENCES account,
        added_at timestamptz NOT NULL,
        CONSTRAINT lake_picture_placed CHECK ((transform IS NULL) = (rms_m IS NULL))
      )`);
    await q.query('CREATE INDEX lake_picture_lake ON lake_picture (lake_id)');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TABLE lake_picture');
  }
}
