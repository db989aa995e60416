import type { MigrationInterface, QueryRunner } from 'typeorm';

/**
 * What comes free while somebody waits for it. The calendar itself notes it, whichever deed freed the peg: a
 * cancellation, a hold that ran out, a move, a lifted closure. The note is taken up after the deed and then goes.
 */
export class FreedPegs1780000031000 implements MigrationInterface {
  name = 'FreedPegs1780000031000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      ALTER TABLE waiting_entry
        ADD COLUMN passed_over uuid[] NOT NULL DEFAULT '{}', -- freed places they let go by
        ADD COLUMN offer_of uuid`); // the freed place they were offered last
    await q.query(
      `CREATE UNIQUE INDEX waiting_entry_offered ON waiting_entry (booking_id) WHERE status = 'offered'`,
    );
    await q.query('CREATE INDEX waiting_entry_account ON waiting_entry (account_id, day)');
    await q.query(`
      CREATE TABLE peg_freed (
        id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
        number bigint GENERATED ALWAYS AS IDENTITY,
        lake_id uuid NOT NULL REFERENCES lake,
        peg_id uuid REFERENCES peg,
        during tstzrange NOT NULL,
        booking_id uuid REFERENCES booking,
        tries int NOT NULL DEFAULT 0,
        CONSTRAINT peg_freed_number UNIQUE (number)
      )`);
    for (const [deed, also] of [
      ['DELETE', ''],
      [
        'UPDATE',
        `AND NOT EXISTS (SELECT 1 FROM after a WHERE a.id = c.id AND a.peg_id IS NOT DISTINCT FROM c.peg_id AND a.during @> c.during)`,
      ],
    ] as const)
      await q.query(`
        CREATE FUNCTION peg_time_freed_${deed}() RETURNS trigger LANGUAGE plpgsql AS $$
        BEGIN
          INSERT INTO peg_freed (lake_id, peg_id, during, booking_id)
          SELECT c.lake_id, c.peg_id, c.during, c.booking_id FROM changed c
           WHERE EXISTS (SELECT 1 FROM waiting_entry w WHERE w.lake_id = c.lake_id AND w.status IN ('waiting', 'offered'))
             ${also}
           ORDER BY c.peg_id, c.during;
          IF FOUND THEN PERFORM pg_notify('peg_freed', ''); END IF;
          RETURN NULL;
        END $$`);
    await q.query(`CREATE TRIGGER peg_time_freed_DELETE AFTER DELETE ON peg_time
      REFERENCING OLD TABLE AS changed FOR EACH STATEMENT EXECUTE FUNCTION peg_time_freed_DELETE()`);
    await q.query(`CREATE TRIGGER peg_time_freed_UPDATE AFTER UPDATE ON peg_time
      REFERENCING OLD TABLE AS changed NEW TABLE AS after
      FOR EACH STATEMENT EXECUTE FUNCTION peg_time_freed_UPDATE()`);
    // However an offer comes to be confirmed (paid, at the lodge, nothing to pay), its place in the line is used up.
    await q.query(`
      CREATE FUNCTION booking_claims_offer() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN
        UPDATE waiting_entry SET status = 'claimed', claim_until = NULL WHERE booking_id = NEW.id AND status = 'offered';
        RETURN NULL;
      END $$`);
    await q.query(`CREATE TRIGGER booking_claims_offer AFTER UPDATE OF status ON booking FOR EACH ROW
      WHEN (NEW.status = 'confirmed' AND OLD.status IN ('hold', 'pending_payment')) EXECUTE FUNCTION booking_claims_offer()`);
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TRIGGER booking_claims_offer ON booking');
    await q.query('DROP TRIGGER peg_time_freed_DELETE ON peg_time');
    await q.query('DROP TRIGGER peg_time_freed_UPDATE ON peg_time');
    await q.query('DROP FUNCTION booking_claims_offer(), peg_time_freed_DELETE(), peg_time_freed_UPDATE()');
    await q.query('DROP TABLE peg_freed');
    await q.query('DROP INDEX waiting_entry_offered, waiting_entry_account');
    await q.query('ALTER TABLE waiting_entry DROP COLUMN passed_over, DROP COLUMN offer_of');
  }
}
