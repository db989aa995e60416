import type { LettingTerms } from '@mereward/shared/bookings/letting-terms';
import { Column, Entity, PrimaryColumn } from 'typeorm';

/** How one fishery lets its pegs: money, VAT, cancelling, holds. `details` is the contract's LettingTerms. */
@Entity('letting_terms')
export class LettingTermsRow {
  @PrimaryColumn('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('jsonb') details!: LettingTerms;
  @Column('int') version!: number;
  @Column('uuid', { name: 'changed_by' }) changedBy!: string;
  @Column('timestamptz', { name: 'changed_at' }) changedAt!: Date;
}
