import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('session')
export class Session {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'account_id' }) accountId!: string;
  @Column('uuid', { name: 'family_id' }) familyId!: string;
  @Column('bytea', { name: 'token_hash' }) tokenHash!: Buffer;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
  @Column('timestamptz', { name: 'expires_at' }) expiresAt!: Date;
  @Column('timestamptz', { name: 'used_at', nullable: true }) usedAt!: Date | null;
  @Column('timestamptz', { name: 'revoked_at', nullable: true }) revokedAt!: Date | null;
}
