import type { PaymentMethod, PaymentState } from '@mereward/shared/payments/payment-state';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('payment')
export class Payment {
  @PrimaryColumn('uuid') id!: string; // also the idempotency key towards the provider
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('uuid', { name: 'booking_id' }) bookingId!: string;
  @Column('text') method!: PaymentMethod;
  @Column('int', { name: 'amount_pence' }) amountPence!: number;
  @Column('text') currency!: string;
  @Column('text') status!: PaymentState;
  @Column('text', { name: 'provider_session', nullable: true }) providerSession!: string | null;
  @Column('text', { name: 'provider_intent', nullable: true }) providerIntent!: string | null;
  @Column('text', { name: 'page_url', nullable: true }) pageUrl!: string | null;
  @Column('uuid', { name: 'made_by', nullable: true }) madeBy!: string | null;
  @Column('timestamptz', { name: 'made_at' }) madeAt!: Date;
  @Column('timestamptz', { name: 'taken_at', nullable: true }) takenAt!: Date | null;
  @Column('timestamptz', { name: 'looked_at', nullable: true }) lookedAt!: Date | null; // the provider was last asked
  @Column('text') fault!: string; // why the provider said no, in words
}
