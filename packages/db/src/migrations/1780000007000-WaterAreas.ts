import type { MigrationInterface, QueryRunner } from 'typeorm';

export class WaterAreas1780000007000 implements MigrationInterface {
  name = 'WaterAreas1780000007000';

  async up(q: QueryRunner): Promise<void> {
    // `place` orders the areas of a lake: a later one lies on top of those before it.
    await q.query(`
      CREATE TABLE water_area (
        id uuid PRIMARY KEY,
        lake_id uuid NOT NULL REFERENCES lake,
        peg_id uuid REFERENCES peg, -- null: nobody's water
        place int NOT NULL,
        details jsonb NOT NULL, -- WaterAreaDetails
        version int NOT NULL,
        created_by uuid NOT NULL REFERENCES account,
        created_at timestamptz NOT NULL,
        CONSTRAINT water_area_place UNIQUE (lake_id, place)
      )`);
    await q.query('CREATE INDEX water_area_peg ON water_area (peg_id)');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TABLE water_area');
  }
}
