import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('email_token')
export class EmailToken {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'account_id' }) accountId!: string;
  @Column('text') purpose!: 'verify' | 'reset';
  @Column('bytea', { name: 'token_hash' }) tokenHash!: Buffer;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
  @Column('timestamptz', { name: 'expires_at' }) expiresAt!: Date;
  @Column('timestamptz', { name: 'used_at', nullable: true }) usedAt!: Date | null;
}
