import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Rule sheets and who has read them, notices, the choices closures give, waiting lists, calendar feeds. */
export class RulesNoticesAndWaiting1780000022000 implements MigrationInterface {
  name = 'RulesNoticesAndWaiting1780000022000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE rule_sheet (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        major int,
        minor int,
        status text NOT NULL,
        rules jsonb NOT NULL,
        weight text,
        changes jsonb,
        made_by uuid NOT NULL REFERENCES account,
        made_at timestamptz NOT NULL,
        published_by uuid REFERENCES account,
        published_at timestamptz,
        version int NOT NULL,
        CONSTRAINT rule_sheet_version UNIQUE (fishery_id, major, minor),
        CONSTRAINT rule_sheet_status CHECK (status IN ('draft', 'published')),
        CONSTRAINT rule_sheet_weight CHECK (weight IN ('minor', 'change', 'safety')),
        CONSTRAINT rule_sheet_published CHECK ((status = 'published') =
          (major IS NOT NULL AND minor IS NOT NULL AND weight IS NOT NULL AND published_at IS NOT NULL))
      )`);
    await q.query(`CREATE UNIQUE INDEX rule_sheet_draft ON rule_sheet (fishery_id) WHERE status = 'draft'`);
    await q.query(`CREATE TRIGGER rule_sheet_stays BEFORE UPDATE OR DELETE ON rule_sheet
      FOR EACH ROW WHEN (OLD.status = 'published') EXECUTE FUNCTION written_in_ink()`);
    await q.query(`
      CREATE TABLE rule_acknowledgement (
        id uuid PRIMARY KEY,
        rule_sheet_id uuid NOT NULL REFERENCES rule_sheet,
        account_id uuid REFERENCES account,
        booking_id uuid REFERENCES booking,
        method text NOT NULL,
        witness uuid REFERENCES account,
        language text NOT NULL,
        device_at timestamptz NOT NULL,
        at timestamptz NOT NULL,
        device text NOT NULL,
        CONSTRAINT rule_acknowledgement_of CHECK (account_id IS NOT NULL OR booking_id IS NOT NULL),
        CONSTRAINT rule_acknowledgement_method CHECK (method IN ('online', 'paper', 'verbal')
          AND (method = 'online') = (witness IS NULL)),
        CONSTRAINT rule_acknowledgement_once UNIQUE NULLS NOT DISTINCT (rule_sheet_id, account_id, booking_id)
      )`);
    await q.query('CREATE INDEX rule_acknowledgement_account ON rule_acknowledgement (account_id)');
    await q.query('CREATE INDEX rule_acknowledgement_booking ON rule_acknowledgement (booking_id)');
    await q.query(`CREATE TRIGGER rule_acknowledgement_stays BEFORE UPDATE ON rule_acknowledgement
      FOR EACH ROW EXECUTE FUNCTION written_in_ink()`);
    await q.query(`
      CREATE TABLE notice (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        lake_ids uuid[] NOT NULL,
        severity text NOT NULL,
        during tstzrange NOT NULL,
        closure_id uuid REFERENCES closure,
        details jsonb NOT NULL,
        written_by uuid NOT NULL REFERENCES account,
        written_at timestamptz NOT NULL,
        taken_down_at timestamptz,
        version int NOT NULL,
        CONSTRAINT notice_severity CHECK (severity IN ('info', 'caution', 'danger', 'closed'))
      )`);
    await q.query('CREATE INDEX notice_fishery ON notice (fishery_id, lower(during))');
    await q.query(`
      CREATE TABLE closure_choice (
        id uuid PRIMARY KEY,
        closure_id uuid NOT NULL REFERENCES closure,
        booking_id uuid NOT NULL REFERENCES booking,
        token_digest bytea NOT NULL,
        choose_until timestamptz NOT NULL,
        choice text,
        chosen_by text,
        chosen_at timestamptz,
        outcome jsonb,
        CONSTRAINT closure_choice_once UNIQUE (closure_id, booking_id),
        CONSTRAINT closure_choice_token UNIQUE (token_digest),
        CONSTRAINT closure_choice_choice CHECK (choice IN ('move_date', 'move_lake', 'refund', 'cancel', 'kept')),
        CONSTRAINT closure_choice_chosen CHECK (num_nonnulls(choice, chosen_by, chosen_at) IN (0, 3)
          AND chosen_by IN ('angler', 'office', 'deadline'))
      )`);
    await q.query('CREATE INDEX closure_choice_open ON closure_choice (choose_until) WHERE choice IS NULL');
    await q.query('CREATE INDEX closure_choice_booking ON closure_choice (booking_id)');
    await q.query(`
      CREATE TABLE waiting_entry (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        lake_id uuid NOT NULL REFERENCES lake,
        account_id uuid NOT NULL REFERENCES account,
        day date NOT NULL,
        wish jsonb NOT NULL,
        place bigint GENERATED ALWAYS AS IDENTITY,
        joined_at timestamptz NOT NULL,
        status text NOT NULL,
        booking_id uuid REFERENCES booking,
        claim_until timestamptz,
        CONSTRAINT waiting_entry_status CHECK (status IN ('waiting', 'offered', 'claimed', 'passed', 'left')),
        CONSTRAINT waiting_entry_offer CHECK ((status = 'offered') = (claim_until IS NOT NULL))
      )`);
    await q.query(
      `CREATE INDEX waiting_entry_day ON waiting_entry (lake_id, day, place) WHERE status IN ('waiting', 'offered')`,
    );
    await q.query(`CREATE UNIQUE INDEX waiting_entry_once ON waiting_entry (lake_id, day, account_id)
                    WHERE status IN ('waiting', 'offered')`);
    await q.query(`
      CREATE TABLE calendar_feed (
        id uuid PRIMARY KEY,
        account_id uuid NOT NULL REFERENCES account,
        lake_id uuid REFERENCES lake,
        token_digest bytea NOT NULL,
        made_at timestamptz NOT NULL,
        revoked_at timestamptz,
        CONSTRAINT calendar_feed_token UNIQUE (token_digest)
      )`);
    await q.query('CREATE INDEX calendar_feed_account ON calendar_feed (account_id)');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query(
      'DROP TABLE calendar_feed, waiting_entry, closure_choice, notice, rule_acknowledgement, rule_sheet',
    );
  }
}
