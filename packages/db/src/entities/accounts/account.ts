import type { Units } from '@mereward/shared/accounts/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('account')
export class Account {
  @PrimaryColumn('uuid') id!: string;
  @Column('text') email!: string;
  @Column('text') name!: string;
  @Column('text', { name: 'password_hash' }) passwordHash!: string;
  @Column('timestamptz', { name: 'email_verified_at', nullable: true }) emailVerifiedAt!: Date | null;
  @Column('jsonb') units!: Units;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
  /** Access tokens made before this open nothing: set by “sign out everywhere” and by a new password. */
  @Column('timestamptz', { name: 'tokens_from', nullable: true }) tokensFrom!: Date | null;
}
