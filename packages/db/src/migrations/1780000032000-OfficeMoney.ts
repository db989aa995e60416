import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Late payments are looked at by somebody; open payments of cards are found until they have ended, failed tries too. */
export class OfficeMoney1780000032000 implements MigrationInterface {
  name = 'OfficeMoney1780000032000';

  async up(q: QueryRunner): Promise<void> {
    await q.query(
      'ALTER TABLE refund ADD COLUMN seen_by uuid REFERENCES account, ADD COLUMN seen_at timestamptz',
    );
    await q.query(
      `ALTER TABLE refund ADD CONSTRAINT refund_seen CHECK ((seen_by IS NULL) = (seen_at IS NULL))`,
    );
    await q.query(
      `CREATE INDEX refund_unseen ON refund (fishery_id) WHERE cause = 'paid_too_late' AND seen_at IS NULL`,
    );
    await q.query('DROP INDEX payment_open');
    await q.query(`CREATE INDEX payment_open ON payment (made_at)
                    WHERE method = 'card_online' AND status NOT IN ('captured', 'cancelled')`);
    await q.query('CREATE INDEX receipt_fishery_issued ON receipt (fishery_id, issued_at)');
    await q.query('CREATE INDEX receipt_booking ON receipt (booking_id)');
    await q.query('CREATE INDEX dispute_payment ON dispute (payment_id)');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP INDEX dispute_payment, receipt_booking, receipt_fishery_issued, payment_open');
    await q.query(`CREATE INDEX payment_open ON payment (made_at)
                    WHERE method = 'card_online' AND status IN ('created', 'requires_action', 'authorised')`);
    await q.query('DROP INDEX refund_unseen');
    await q.query('ALTER TABLE refund DROP COLUMN seen_by, DROP COLUMN seen_at');
  }
}
