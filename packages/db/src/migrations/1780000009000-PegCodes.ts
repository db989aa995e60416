import type { MigrationInterface, QueryRunner } from 'typeorm';

/**
 * Every peg gets a short code for its address on a card: six letters and figures, none of which is read as another,
 * and no vowels, so that no code is a word. It is worked out from the peg's id, so that it comes out the same wherever
 * the same pegs are brought up, and a peg keeps it for ever: cards outlive everything else.
 */
export class PegCodes1780000009000 implements MigrationInterface {
  name = 'PegCodes1780000009000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE FUNCTION peg_code_of(peg_id uuid, attempt int) RETURNS text LANGUAGE sql IMMUTABLE STRICT AS $$
        SELECT string_agg(
                 substr('34679CDFGHJKMNPQRTVWXY', 1 + (get_byte(mixed, 2 * i) * 256 + get_byte(mixed, 2 * i + 1)) % 22, 1),
                 '' ORDER BY i)
          FROM decode(md5(peg_id::text || '/' || attempt), 'hex') AS mixed, generate_series(0, 5) AS i
      $$`);
    await q.query(`
      CREATE FUNCTION peg_take_code() RETURNS trigger LANGUAGE plpgsql AS $$
      DECLARE
        attempt int := 0;
      BEGIN
        LOOP
          NEW.code := peg_code_of(NEW.id, attempt);
          EXIT WHEN NOT EXISTS (SELECT 1 FROM peg WHERE peg.code = NEW.code AND peg.id <> NEW.id);
          attempt := attempt + 1;
        END LOOP;
        RETURN NEW;
      END $$`);
    await q.query('ALTER TABLE peg ADD COLUMN code text');
    await q.query(`
      DO $$
      DECLARE
        each peg%ROWTYPE;
        attempt int;
      BEGIN
        FOR each IN SELECT * FROM peg ORDER BY id LOOP
          attempt := 0;
          WHILE EXISTS (SELECT 1 FROM peg WHERE code = peg_code_of(each.id, attempt)) LOOP
            attempt := attempt + 1;
          END LOOP;
          UPDATE peg SET code = peg_code_of(each.id, attempt) WHERE id = each.id;
        END LOOP;
      END $$`);
    await q.query(`
      ALTER TABLE peg
        ALTER COLUMN code SET NOT NULL,
        ADD CONSTRAINT peg_code UNIQUE (code),
        ADD CONSTRAINT peg_code_letters CHECK (code ~ '^[34679CDFGHJKMNPQRTVWXY]{6}$')`);
    await q.query(`
      CREATE TRIGGER peg_take_code BEFORE INSERT ON peg
        FOR EACH ROW WHEN (NEW.code IS NULL) EXECUTE FUNCTION peg_take_code()`);
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TRIGGER peg_take_code ON peg');
    await q.query('ALTER TABLE peg DROP COLUMN code');
    await q.query('DROP FUNCTION peg_take_code()');
    await q.query('DROP FUNCTION peg_code_of(uuid, int)');
  }
}
