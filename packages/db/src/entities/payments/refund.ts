import type { RefundStatus } from '@mereward/shared/payments/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('refund')
export class Refund {
  @PrimaryColumn('uuid') id!: string; // also the idempotency key towards the provider
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('uuid', { name: 'booking_id' }) bookingId!: string;
  @Column('uuid', { name: 'payment_id' }) paymentId!: string;
  @Column('int', { name: 'amount_pence' }) amountPence!: number;
  @Column('text') cause!: string; // the deed it belongs to; once for each payment
  @Column('text') reason!: string;
  @Column('text') status!: RefundStatus;
  @Column('text', { name: 'provider_ref', nullable: true }) providerRef!: string | null;
  @Column('uuid', { name: 'asked_by', nullable: true }) askedBy!: string | null;
  @Column('timestamptz', { name: 'asked_at' }) askedAt!: Date;
  @Column('uuid', { name: 'approved_by', nullable: true }) approvedBy!: string | null;
  @Column('timestamptz', { name: 'approved_at', nullable: true }) approvedAt!: Date | null;
  @Column('timestamptz', { name: 'done_at', nullable: true }) doneAt!: Date | null;
  @Column('text') fault!: string;
  @Column('uuid', { name: 'seen_by', nullable: true }) seenBy!: string | null;
  @Column('timestamptz', { name: 'seen_at', nullable: true }) seenAt!: Date | null;
}
