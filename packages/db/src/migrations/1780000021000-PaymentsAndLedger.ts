import type { MigrationInterface, QueryRunner } from 'typeorm';

/**
 * Money: what was asked for and taken, what was given back, the ledger in which every deed balances, and receipts in
 * an unbroken row of numbers a year. Nothing of a card is kept: the provider's own references only.
 */
export class PaymentsAndLedger1780000021000 implements MigrationInterface {
  name = 'PaymentsAndLedger1780000021000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE payment (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        booking_id uuid NOT NULL REFERENCES booking,
        method text NOT NULL,
        amount_pence int NOT NULL,
        currency text NOT NULL,
        status text NOT NULL,
        provider_session text,
        provider_intent text,
        page_url text,
        made_by uuid REFERENCES account,
        made_at timestamptz NOT NULL,
        taken_at timestamptz,
        looked_at timestamptz,
        fault text NOT NULL DEFAULT '',
        CONSTRAINT payment_method CHECK (method IN
          ('card_online', 'card_reader', 'cash', 'bank_transfer', 'credit_note', 'complimentary')),
        CONSTRAINT payment_status CHECK (status IN
          ('created', 'requires_action', 'authorised', 'captured', 'failed', 'cancelled')),
        CONSTRAINT payment_amount CHECK (amount_pence >= 0),
        CONSTRAINT payment_taken CHECK ((status = 'captured') = (taken_at IS NOT NULL)),
        CONSTRAINT payment_session UNIQUE (provider_session),
        CONSTRAINT payment_intent UNIQUE (provider_intent)
      )`);
    await q.query('CREATE INDEX payment_booking ON payment (booking_id)');
    await q.query('CREATE INDEX payment_fishery ON payment (fishery_id, taken_at)');
    await q.query(`CREATE INDEX payment_open ON payment (made_at)
                    WHERE method = 'card_online' AND status IN ('created', 'requires_action', 'authorised')`);
    await q.query(`
      CREATE TABLE provider_event (
        id text PRIMARY KEY,
        payment_id uuid REFERENCES payment,
        type text NOT NULL,
        said_at timestamptz NOT NULL,
        received_at timestamptz NOT NULL,
        told jsonb NOT NULL
      )`);
    await q.query('CREATE INDEX provider_event_payment ON provider_event (payment_id, said_at)');
    await q.query(`
      CREATE TABLE refund (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        booking_id uuid NOT NULL REFERENCES booking,
        payment_id uuid NOT NULL REFERENCES payment,
        amount_pence int NOT NULL,
        cause text NOT NULL,
        reason text NOT NULL,
        status text NOT NULL,
        provider_ref text,
        asked_by uuid REFERENCES account,
        asked_at timestamptz NOT NULL,
        approved_by uuid REFERENCES account,
        approved_at timestamptz,
        done_at timestamptz,
        fault text NOT NULL DEFAULT '',
        CONSTRAINT refund_amount CHECK (amount_pence > 0),
        CONSTRAINT refund_status CHECK (status IN ('proposed', 'queued', 'done', 'failed', 'declined')),
        CONSTRAINT refund_once UNIQUE (payment_id, cause)
      )`);
    await q.query('CREATE INDEX refund_booking ON refund (booking_id)');
    await q.query(
      `CREATE INDEX refund_open ON refund (fishery_id, asked_at) WHERE status IN ('proposed', 'queued', 'failed')`,
    );
    // Never more back than was taken, however many ask at once: the payment's row is locked before it is counted.
    await q.query(`
      CREATE FUNCTION refund_within_payment() RETURNS trigger LANGUAGE plpgsql AS $$
      DECLARE
        taken int;
        back bigint;
      BEGIN
        SELECT amount_pence INTO taken FROM payment WHERE id = NEW.payment_id AND status = 'captured' FOR NO KEY UPDATE;
        SELECT sum(amount_pence) INTO back FROM refund WHERE payment_id = NEW.payment_id AND status <> 'declined';
        IF taken IS NULL OR back > taken THEN
          RAISE EXCEPTION 'more back than was taken' USING ERRCODE = '23514', CONSTRAINT = 'refund_within_payment';
        END IF;
        RETURN NULL;
      END $$`);
    await q.query(`CREATE TRIGGER refund_within_payment AFTER INSERT OR UPDATE OF amount_pence, status ON refund
      FOR EACH ROW WHEN (NEW.status <> 'declined') EXECUTE FUNCTION refund_within_payment()`);
    await q.query(`
      CREATE TABLE dispute (
        id text PRIMARY KEY,
        payment_id uuid NOT NULL REFERENCES payment,
        amount_pence int NOT NULL,
        reason text NOT NULL,
        status text NOT NULL,
        opened_at timestamptz NOT NULL,
        closed_at timestamptz
      )`);
    await this.#makeLedger(q);
    await this.#makeReceipts(q);
  }

  async #makeLedger(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE ledger_deed (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        kind text NOT NULL,
        about text NOT NULL,
        payment_id uuid REFERENCES payment,
        refund_id uuid REFERENCES refund,
        booking_id uuid REFERENCES booking,
        at timestamptz NOT NULL,
        made_by uuid REFERENCES account,
        CONSTRAINT ledger_deed_once UNIQUE (kind, about)
      )`);
    await q.query('CREATE INDEX ledger_deed_fishery ON ledger_deed (fishery_id, at)');
    await q.query(`
      CREATE TABLE ledger_posting (
        id bigint GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
        deed_id uuid NOT NULL REFERENCES ledger_deed,
        account text NOT NULL,
        amount_pence bigint NOT NULL,
        currency text NOT NULL,
        tags jsonb NOT NULL DEFAULT '{}',
        CONSTRAINT ledger_posting_amount CHECK (amount_pence <> 0)
      )`);
    await q.query('CREATE INDEX ledger_posting_deed ON ledger_posting (deed_id)');
    // Debits are positive, credits negative: a deed's postings come to nought in each currency before it is committed.
    await q.query(`
      CREATE FUNCTION ledger_balances() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN
        IF EXISTS (SELECT 1 FROM ledger_posting WHERE deed_id = NEW.deed_id GROUP BY currency HAVING sum(amount_pence) <> 0) THEN
          RAISE EXCEPTION 'the deed does not balance' USING ERRCODE = '23514', CONSTRAINT = 'ledger_balances';
        END IF;
        RETURN NULL;
      END $$`);
    await q.query(`CREATE CONSTRAINT TRIGGER ledger_balances AFTER INSERT ON ledger_posting
      DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION ledger_balances()`);
    await q.query(`
      CREATE FUNCTION written_in_ink() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN
        RAISE EXCEPTION 'what is written here stays' USING ERRCODE = '23514', CONSTRAINT = 'written_in_ink';
      END $$`);
    for (const table of ['ledger_deed', 'ledger_posting'])
      await q.query(`CREATE TRIGGER ${table}_stays BEFORE UPDATE OR DELETE ON ${table}
        FOR EACH ROW EXECUTE FUNCTION written_in_ink()`);
  }

  async #makeReceipts(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE receipt_counter (
        fishery_id uuid NOT NULL REFERENCES fishery,
        year int NOT NULL,
        last int NOT NULL,
        PRIMARY KEY (fishery_id, year)
      )`);
    await q.query(`
      CREATE TABLE receipt (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        year int NOT NULL,
        number int NOT NULL,
        kind text NOT NULL,
        payment_id uuid REFERENCES payment,
        refund_id uuid REFERENCES refund,
        booking_id uuid NOT NULL REFERENCES booking,
        tax_point date NOT NULL,
        issued_at timestamptz NOT NULL,
        told jsonb NOT NULL,
        CONSTRAINT receipt_number UNIQUE (fishery_id, year, number),
        CONSTRAINT receipt_payment UNIQUE (payment_id),
        CONSTRAINT receipt_refund UNIQUE (refund_id),
        CONSTRAINT receipt_kind CHECK ((kind = 'receipt') = (payment_id IS NOT NULL)
          AND (kind = 'credit_note') = (refund_id IS NOT NULL) AND kind IN ('receipt', 'credit_note'))
      )`);
    await q.query(`CREATE TRIGGER receipt_stays BEFORE UPDATE OR DELETE ON receipt
      FOR EACH ROW EXECUTE FUNCTION written_in_ink()`);
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query(
      'DROP TABLE receipt, receipt_counter, ledger_posting, ledger_deed, dispute, refund, provider_event, payment',
    );
    await q.query('DROP FUNCTION written_in_ink(), ledger_balances(), refund_within_payment()');
  }
}
