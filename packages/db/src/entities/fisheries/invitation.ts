import type { Role } from '@mereward/shared/accounts/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('invitation')
export class Invitation {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('text') email!: string;
  @Column('text') role!: Role;
  @Column('bytea', { name: 'token_hash' }) tokenHash!: Buffer;
  @Column('uuid', { name: 'invited_by' }) invitedBy!: string;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
  @Column('timestamptz', { name: 'expires_at' }) expiresAt!: Date;
  @Column('timestamptz', { name: 'accepted_at', nullable: true }) acceptedAt!: Date | null;
  @Column('timestamptz', { name: 'withdrawn_at', nullable: true }) withdrawnAt!: Date | null;
}
