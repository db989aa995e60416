import type { MigrationInterface, QueryRunner } from 'typeorm';

/**
 * Ticket types, bookings of them, and the one calendar of every peg. `peg_time` says who has a peg and when, whatever
 * for: two rows of one peg may overlap only in the same lane. Each booking and each block has a lane of its own, so
 * none overlaps another; closures share lane 0, so that a peg may be closed twice over but never let while it is
 * closed; bookings of a peg that is let place by place share lane 1, and a trigger counts its people and rods.
 */
export class TicketsAndPegTime1780000020000 implements MigrationInterface {
  name = 'TicketsAndPegTime1780000020000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE letting_terms (
        fishery_id uuid PRIMARY KEY REFERENCES fishery,
        details jsonb NOT NULL,
        version int NOT NULL,
        changed_by uuid NOT NULL REFERENCES account,
        changed_at timestamptz NOT NULL
      )`);
    await q.query(`
      CREATE TABLE ticket_type (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        details jsonb NOT NULL,
        version int NOT NULL,
        withdrawn_at timestamptz,
        created_by uuid NOT NULL REFERENCES account,
        created_at timestamptz NOT NULL
      )`);
    await q.query(`CREATE UNIQUE INDEX ticket_type_name ON ticket_type (fishery_id, lower(details->>'name'))
                    WHERE withdrawn_at IS NULL`);
    await this.#widenBookings(q);
    await q.query(`
      CREATE TABLE booking_event (
        id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
        booking_id uuid NOT NULL REFERENCES booking,
        at timestamptz NOT NULL,
        by_account uuid REFERENCES account,
        kind text NOT NULL,
        told jsonb NOT NULL
      )`);
    await q.query('CREATE INDEX booking_event_booking ON booking_event (booking_id, at)');
    await this.#makePegTime(q);
    await this.#moveTickets(q);
    await this.#countRoom(q);
    await this.#tellOfChanges(q);
  }

  async #widenBookings(q: QueryRunner): Promise<void> {
    await q.query(`
      ALTER TABLE booking
        DROP CONSTRAINT booking_peg_during, DROP CONSTRAINT booking_bounds, DROP CONSTRAINT booking_status_check,
        ALTER COLUMN account_id DROP NOT NULL, ALTER COLUMN written_by DROP NOT NULL,
        ADD COLUMN fishery_id uuid REFERENCES fishery,
        ADD COLUMN lake_id uuid REFERENCES lake,
        ADD COLUMN ticket_type_id uuid REFERENCES ticket_type,
        ADD COLUMN code text,
        ADD COLUMN holder_name text,
        ADD COLUMN holder_email text,
        ADD COLUMN people int NOT NULL DEFAULT 1,
        ADD COLUMN rods int NOT NULL DEFAULT 1,
        ADD COLUMN gross_pence int NOT NULL DEFAULT 0,
        ADD COLUMN currency text NOT NULL DEFAULT 'GBP',
        ADD COLUMN hold_until timestamptz,
        ADD COLUMN source text NOT NULL DEFAULT 'office',
        ADD COLUMN details jsonb NOT NULL DEFAULT '{}',
        ADD COLUMN version int NOT NULL DEFAULT 1`);
    await q.query(`
      UPDATE booking b SET
        fishery_id = l.fishery_id, lake_id = l.id, holder_name = a.name, holder_email = a.email,
        status = CASE WHEN b.status = 'cancelled' THEN 'cancelled_by_fishery' ELSE b.status END,
        details = jsonb_build_object('ticketName', 'Ticket from the lodge', 'day', (lower(b.during) AT TIME ZONE f.zone)::date,
          'start', null, 'tickets', '[]'::jsonb, 'lines', '[]'::jsonb, 'turnaroundMinutes', 0,
          'cancellation', '{"tiers": [], "mostMoves": 0, "banRefundsUnused": true, "coolingOffDays": 0}'::jsonb, 'guardian', null, 'vehicle', '', 'emergencyContact', '', 'licence', null, 'note', '')
       FROM peg p JOIN lake l ON l.id = p.lake_id JOIN fishery f ON f.id = l.fishery_id, account a
      WHERE p.id = b.peg_id AND a.id = b.account_id`);
    // Six letters and figures to be read aloud: five drawn by lot, and a sixth that gives away one misread or two
    // swapped (the weighted sum is a multiple of 23). Only tickets that still count need codes of their own.
    await q.query(`
      CREATE FUNCTION booking_code_of(drawn bigint) RETURNS text LANGUAGE plpgsql IMMUTABLE STRICT AS $$
      DECLARE
        letters constant text := '234679CDFGHJKMNPQRTVWXY';
        rest bigint := drawn;
        total int := 0;
        code text := '';
      BEGIN
        FOR place IN 1..5 LOOP
          code := code || substr(letters, 1 + (rest % 23)::int, 1);
          total := total + place * (rest % 23)::int;
          rest := rest / 23;
        END LOOP;
        FOR final IN 0..22 LOOP
          IF (total + 6 * final) % 23 = 0 THEN RETURN code || substr(letters, 1 + final, 1); END IF;
        END LOOP;
      END $$`);
    await q.query(`
      CREATE FUNCTION booking_take_code() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN
        LOOP
          NEW.code := booking_code_of(floor(random() * 6436343)::bigint);
          EXIT WHEN NOT EXISTS (SELECT 1 FROM booking WHERE booking.code = NEW.code
            AND status IN ('hold', 'pending_payment', 'confirmed', 'checked_in', 'choosing'));
        END LOOP;
        RETURN NEW;
      END $$`);
    await q.query('UPDATE booking SET code = booking_code_of(abs(hashtext(id::text)) % 6436343)');
    await q.query(`
      ALTER TABLE booking
        ALTER COLUMN fishery_id SET NOT NULL, ALTER COLUMN holder_name SET NOT NULL, ALTER COLUMN code SET NOT NULL,
        ALTER COLUMN people DROP DEFAULT, ALTER COLUMN rods DROP DEFAULT, ALTER COLUMN gross_pence DROP DEFAULT,
        ALTER COLUMN currency DROP DEFAULT, ALTER COLUMN source DROP DEFAULT, ALTER COLUMN details DROP DEFAULT,
        ADD CONSTRAINT booking_numbers CHECK (people >= 0 AND rods >= 0 AND gross_pence >= 0),
        ADD CONSTRAINT booking_source CHECK (source IN ('web', 'bailiff', 'office', 'match')),
        ADD CONSTRAINT booking_hold CHECK (status NOT IN ('hold', 'pending_payment') OR hold_until IS NOT NULL),
        ADD CONSTRAINT booking_status CHECK (status IN ('hold', 'pending_payment', 'confirmed', 'checked_in',
          'completed', 'choosing', 'expired', 'cancelled_by_angler', 'cancelled_by_fishery', 'no_show')),
        ADD CONSTRAINT booking_bounds CHECK (
          lower_inc(during) AND NOT upper_inc(during) AND NOT isempty(during)
          AND upper(during) - lower(during) <= interval '367 days')`);
    await q.query(`CREATE TRIGGER booking_take_code BEFORE INSERT ON booking
      FOR EACH ROW WHEN (NEW.code IS NULL) EXECUTE FUNCTION booking_take_code()`);
    await q.query(`CREATE UNIQUE INDEX booking_code ON booking (code)
                    WHERE status IN ('hold', 'pending_payment', 'confirmed', 'checked_in', 'choosing')`);
    await q.query('CREATE INDEX booking_fishery_from ON booking (fishery_id, lower(during))');
    await q.query(
      `CREATE INDEX booking_hold_until ON booking (hold_until) WHERE status IN ('hold', 'pending_payment')`,
    );
  }

  async #makePegTime(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE TABLE closure (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        lake_ids uuid[] NOT NULL,
        reason text NOT NULL,
        effect text NOT NULL,
        during tstzrange NOT NULL,
        details jsonb NOT NULL,
        choose_until timestamptz,
        move_to_lake_id uuid REFERENCES lake,
        decided_by uuid NOT NULL REFERENCES account,
        decided_at timestamptz NOT NULL,
        lifted_at timestamptz,
        lifted_by uuid REFERENCES account,
        lift jsonb,
        version int NOT NULL,
        CONSTRAINT closure_bounds CHECK (lower_inc(during) AND NOT upper_inc(during) AND NOT isempty(during)
          AND lower(during) IS NOT NULL),
        CONSTRAINT closure_effect CHECK (effect IN ('block', 'move', 'refund', 'allow_with_warning'))
      )`);
    await q.query('CREATE INDEX closure_lakes ON closure USING gin (lake_ids)');
    await q.query('CREATE INDEX closure_fishery ON closure (fishery_id, lower(during))');
    await q.query(`
      CREATE TABLE peg_block (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        title text NOT NULL,
        during tstzrange NOT NULL,
        made_by uuid NOT NULL REFERENCES account,
        made_at timestamptz NOT NULL,
        CONSTRAINT peg_block_bounds CHECK (lower_inc(during) AND NOT upper_inc(during) AND NOT isempty(during)
          AND upper(during) - lower(during) <= interval '32 days')
      )`);
    await q.query('CREATE SEQUENCE peg_time_lane START 16');
    await q.query(`
      CREATE TABLE peg_time (
        id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
        lake_id uuid NOT NULL REFERENCES lake,
        peg_id uuid REFERENCES peg,
        during tstzrange NOT NULL,
        turnaround interval NOT NULL DEFAULT '0', -- the last part of it, in which nobody fishes
        lane bigint NOT NULL DEFAULT nextval('peg_time_lane'),
        state text NOT NULL,
        booking_id uuid REFERENCES booking,
        closure_id uuid REFERENCES closure,
        block_id uuid REFERENCES peg_block,
        people int NOT NULL DEFAULT 0,
        rods int NOT NULL DEFAULT 0,
        CONSTRAINT peg_time_state CHECK (state IN ('held', 'taken', 'blocked', 'closed')),
        CONSTRAINT peg_time_for CHECK (
          num_nonnulls(booking_id, closure_id, block_id) = 1
          AND (state IN ('held', 'taken')) = (booking_id IS NOT NULL) AND (state = 'closed') = (closure_id IS NOT NULL)),
        CONSTRAINT peg_time_peg CHECK (peg_id IS NOT NULL OR booking_id IS NOT NULL),
        CONSTRAINT peg_time_lane CHECK ((state = 'closed') = (lane = 0)),
        CONSTRAINT peg_time_bounds CHECK (
          lower_inc(during) AND NOT upper_inc(during) AND NOT isempty(during) AND lower(during) IS NOT NULL
          AND turnaround >= '0' AND (upper_inf(during) OR lower(during) < upper(during) - turnaround)
          AND (state = 'closed' OR (NOT upper_inf(during) AND upper(during) - lower(during) <= interval '32 days'))),
        CONSTRAINT peg_time_once EXCLUDE USING gist (peg_id WITH =, during WITH &&, lane WITH <>)
      )`);
    await q.query(`CREATE INDEX peg_time_from ON peg_time (peg_id, lower(during)) INCLUDE (during, state)
                    WHERE state <> 'closed'`);
    await q.query(`CREATE INDEX peg_time_closed ON peg_time (peg_id) WHERE state = 'closed'`);
    await q.query(
      `CREATE INDEX peg_time_lake ON peg_time (lake_id, lower(during)) WHERE state IN ('held', 'taken')`,
    );
    await q.query('CREATE INDEX peg_time_booking ON peg_time (booking_id) WHERE booking_id IS NOT NULL');
    await q.query('CREATE INDEX peg_time_closure ON peg_time (closure_id) WHERE closure_id IS NOT NULL');
  }

  async #moveTickets(q: QueryRunner): Promise<void> {
    await q.query(`
      INSERT INTO peg_time (lake_id, peg_id, during, state, booking_id, people, rods)
      SELECT lake_id, peg_id, during, 'taken', id, people, rods FROM booking WHERE status = 'confirmed'`);
    await q.query('ALTER TABLE booking DROP COLUMN peg_id');
  }

  /** Room for people and rods: of the peg, and of the lake where it has a limit. The lock makes the count true. */
  async #countRoom(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE FUNCTION peg_time_peak(of_lake uuid, of_peg uuid, over tstzrange, OUT people bigint, OUT rods bigint)
      LANGUAGE sql STABLE AS $$
        WITH here AS (
          SELECT tstzrange(lower(t.during), upper(t.during) - t.turnaround) AS during, t.people, t.rods FROM peg_time t
           WHERE t.lake_id = of_lake AND t.state IN ('held', 'taken') AND (of_peg IS NULL OR t.peg_id = of_peg)
             AND lower(t.during) > lower(over) - interval '32 days' AND lower(t.during) < upper(over)
             AND tstzrange(lower(t.during), upper(t.during) - t.turnaround) && over),
        starts AS (SELECT DISTINCT greatest(lower(during), lower(over)) AS at FROM here)
        SELECT coalesce(max(s.people), 0), coalesce(max(s.rods), 0)
          FROM starts, LATERAL (SELECT sum(h.people) AS people, sum(h.rods) AS rods FROM here h WHERE h.during @> starts.at) s
      $$`);
    await q.query(`
      CREATE FUNCTION peg_time_room() RETURNS trigger LANGUAGE plpgsql AS $$
      DECLARE
        room record;
        peak record;
        fishing tstzrange := tstzrange(lower(NEW.during), upper(NEW.during) - NEW.turnaround);
      BEGIN
        IF NEW.peg_id IS NOT NULL THEN
          IF NEW.lane = 1 THEN
            PERFORM 1 FROM peg WHERE id = NEW.peg_id FOR NO KEY UPDATE;
            SELECT * INTO peak FROM peg_time_peak(NEW.lake_id, NEW.peg_id, fishing);
          ELSE
            SELECT NEW.people::bigint AS people, NEW.rods::bigint AS rods INTO peak;
          END IF;
          SELECT (details->>'people')::int AS people, (details->>'rods')::int AS rods INTO room
            FROM peg WHERE id = NEW.peg_id;
          IF peak.people > room.people OR peak.rods > room.rods THEN
            RAISE EXCEPTION 'the peg has no room' USING ERRCODE = '23514', CONSTRAINT = 'peg_time_peg_room';
          END IF;
        END IF;
        SELECT (details->>'maxPeople')::int AS people, (details->>'maxRods')::int AS rods INTO room
          FROM lake WHERE id = NEW.lake_id;
        IF room.people IS NOT NULL OR room.rods IS NOT NULL THEN
          PERFORM 1 FROM lake WHERE id = NEW.lake_id FOR NO KEY UPDATE;
          SELECT * INTO peak FROM peg_time_peak(NEW.lake_id, NULL, fishing);
          IF peak.people > room.people OR peak.rods > room.rods THEN
            RAISE EXCEPTION 'the lake has no room' USING ERRCODE = '23514', CONSTRAINT = 'peg_time_lake_room';
          END IF;
        END IF;
        RETURN NULL;
      END $$`);
    await q.query(`CREATE TRIGGER peg_time_room AFTER INSERT OR UPDATE OF during, peg_id, people, rods, lane ON peg_time
      FOR EACH ROW WHEN (NEW.state IN ('held', 'taken')) EXECUTE FUNCTION peg_time_room()`);
  }

  /** Whoever looks at a lake's calendar hears that something in it changed, once the deed is committed. */
  async #tellOfChanges(q: QueryRunner): Promise<void> {
    await q.query(`
      CREATE FUNCTION peg_time_tell() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN
        PERFORM pg_notify('peg_time', lake_id::text) FROM (SELECT DISTINCT lake_id FROM changed) each;
        RETURN NULL;
      END $$`);
    for (const [deed, rows] of [
      ['INSERT', 'NEW'],
      ['UPDATE', 'NEW'],
      ['DELETE', 'OLD'],
    ])
      await q.query(`CREATE TRIGGER peg_time_tell_${deed} AFTER ${deed} ON peg_time
        REFERENCING ${rows} TABLE AS changed FOR EACH STATEMENT EXECUTE FUNCTION peg_time_tell()`);
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('ALTER TABLE booking ADD COLUMN peg_id uuid REFERENCES peg');
    await q.query(
      'UPDATE booking b SET peg_id = t.peg_id FROM peg_time t WHERE t.booking_id = b.id AND t.peg_id IS NOT NULL',
    );
    // Pegs let place by place were not known before: their tickets lie over one another and can't be kept.
    await q.query(`WITH shared AS (DELETE FROM peg_time WHERE lane = 1 RETURNING booking_id)
                   UPDATE booking SET peg_id = NULL FROM shared WHERE id = booking_id`);
    await q.query('DROP TABLE peg_time, peg_block, closure, booking_event');
    await q.query('DROP SEQUENCE peg_time_lane');
    await q.query('DROP FUNCTION peg_time_room(), peg_time_tell(), peg_time_peak(uuid, uuid, tstzrange)');
    await q.query('DROP TRIGGER booking_take_code ON booking');
    await q.query('DROP FUNCTION booking_take_code(), booking_code_of(bigint)');
    await q.query(`DELETE FROM booking WHERE peg_id IS NULL OR account_id IS NULL OR written_by IS NULL
                      OR upper(during) - lower(during) > interval '31 days'`);
    await q.query('DROP INDEX booking_code, booking_fishery_from, booking_hold_until');
    await q.query(`
      ALTER TABLE booking
        DROP CONSTRAINT booking_status, DROP CONSTRAINT booking_bounds, DROP CONSTRAINT booking_hold,
        DROP COLUMN fishery_id, DROP COLUMN lake_id, DROP COLUMN ticket_type_id, DROP COLUMN code,
        DROP COLUMN holder_name, DROP COLUMN holder_email, DROP COLUMN people, DROP COLUMN rods,
        DROP COLUMN gross_pence, DROP COLUMN currency, DROP COLUMN hold_until, DROP COLUMN source,
        DROP COLUMN details, DROP COLUMN version,
        ALTER COLUMN peg_id SET NOT NULL, ALTER COLUMN account_id SET NOT NULL, ALTER COLUMN written_by SET NOT NULL`);
    await q.query(`UPDATE booking SET status = CASE WHEN status IN ('confirmed', 'checked_in', 'completed')
                    THEN 'confirmed' ELSE 'cancelled' END`);
    await q.query(`
      ALTER TABLE booking
        ADD CONSTRAINT booking_status_check CHECK (status IN ('confirmed', 'cancelled')),
        ADD CONSTRAINT booking_bounds CHECK (
          lower_inc(during) AND NOT upper_inc(during) AND NOT isempty(during)
          AND upper(during) - lower(during) <= interval '31 days'),
        ADD CONSTRAINT booking_peg_during EXCLUDE USING gist (peg_id WITH =, during WITH &&) WHERE (status = 'confirmed')`);
    await q.query('DROP TABLE ticket_type, letting_terms');
  }
}
