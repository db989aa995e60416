import type { MigrationInterface, QueryRunner } from 'typeorm';

export class AccountsAndFisheries1780000000000 implements MigrationInterface {
  name = 'AccountsAndFisheries1780000000000';

  async up(q: QueryRunner): Promise<void> {
    await q.query('CREATE EXTENSION IF NOT EXISTS btree_gist');
    await q.query(`
      CREATE TABLE account (
        id uuid PRIMARY KEY,
        email text NOT NULL CONSTRAINT account_email UNIQUE CHECK (email = lower(email)),
        name text NOT NULL,
        password_hash text NOT NULL,
        email_verified_at timestamptz,
        units jsonb NOT NULL,
        created_at timestamptz NOT NULL,
        tokens_from timestamptz -- access tokens made before this open nothing
      )`);
    // One row per refresh token; a family is one sign-in on one device. A used token seen again ends its family.
    await q.query(`
      CREATE TABLE session (
        id uuid PRIMARY KEY,
        account_id uuid NOT NULL REFERENCES account ON DELETE CASCADE,
        family_id uuid NOT NULL,
        token_hash bytea NOT NULL CONSTRAINT session_token UNIQUE,
        created_at timestamptz NOT NULL,
        expires_at timestamptz NOT NULL,
        used_at timestamptz,
        revoked_at timestamptz
      )`);
    await q.query('CREATE INDEX session_family ON session (family_id)');
    await q.query('CREATE INDEX session_account ON session (account_id)');
    await q.query(`
      CREATE TABLE email_token (
        id uuid PRIMARY KEY,
        account_id uuid NOT NULL REFERENCES account ON DELETE CASCADE,
        purpose text NOT NULL CHECK (purpose IN ('verify', 'reset')),
        token_hash bytea NOT NULL CONSTRAINT email_token_token UNIQUE,
        created_at timestamptz NOT NULL,
        expires_at timestamptz NOT NULL,
        used_at timestamptz
      )`);
    await q.query('CREATE INDEX email_token_account ON email_token (account_id)');
    await q.query(`
      CREATE TABLE fishery (
        id uuid PRIMARY KEY,
        name text NOT NULL,
        zone text NOT NULL,
        details jsonb NOT NULL, -- FisheryDetails
        version int NOT NULL,
        created_by uuid NOT NULL REFERENCES account,
        created_at timestamptz NOT NULL
      )`);
    await q.query(`
      CREATE TABLE fishery_role (
        fishery_id uuid NOT NULL REFERENCES fishery,
        account_id uuid NOT NULL REFERENCES account ON DELETE CASCADE,
        role text NOT NULL CHECK (role IN ('owner', 'manager', 'head_bailiff', 'bailiff', 'office', 'member', 'angler')),
        given_by uuid REFERENCES account,
        given_at timestamptz NOT NULL,
        PRIMARY KEY (fishery_id, account_id, role)
      )`);
    await q.query('CREATE INDEX fishery_role_account ON fishery_role (account_id)');
    await q.query(`
      CREATE TABLE invitation (
        id uuid PRIMARY KEY,
        fishery_id uuid NOT NULL REFERENCES fishery,
        email text NOT NULL CHECK (email = lower(email)),
        role text NOT NULL,
        token_hash bytea NOT NULL CONSTRAINT invitation_token UNIQUE,
        invited_by uuid NOT NULL REFERENCES account,
        created_at timestamptz NOT NULL,
        expires_at timestamptz NOT NULL,
        accepted_at timestamptz,
        withdrawn_at timestamptz
      )`);
    await q.query('CREATE INDEX invitation_fishery ON invitation (fishery_id)');
  }

  async down(q: QueryRunner): Promise<void> {
    await q.query('DROP TABLE invitation, fishery_role, fishery, email_token, session, account');
  }
}
