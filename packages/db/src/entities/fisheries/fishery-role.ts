import type { Role } from '@mereward/shared/accounts/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('fishery_role')
export class FisheryRole {
  @PrimaryColumn('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @PrimaryColumn('uuid', { name: 'account_id' }) accountId!: string;
  @PrimaryColumn('text') role!: Role;
  @Column('uuid', { name: 'given_by', nullable: true }) givenBy!: string | null;
  @Column('timestamptz', { name: 'given_at' }) givenAt!: Date;
}
