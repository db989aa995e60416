import type { MigrationInterface, QueryRunner } from 'typeorm';

export class DeviceKeys1780000012000 implements MigrationInterface {
  name = 'DeviceKeys1780000012000';

  async up(q: QueryRunner): Promise<void> {
    // With this key a phone seals what this account has still to send. It never changes: what lies sealed would be lost.
    await q.query(`
      CREATE TABLE device_key (
        account_id uuid PRIMARY KEY REFERENCES account ON DELETE CASCADE,
        key bytea NOT NULL CONSTRAINT device_key_length CHECK (octet_length(key) = 32),
        made_at timestamptz NOT NULL
      )`);
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TABLE device_key');
  }
}
