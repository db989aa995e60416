import { Column, Entity, PrimaryColumn } from 'typeorm';

/** One deed in the ledger; its postings come to nought. `kind` and `about` together are written once. */
@Entity('ledger_deed')
export class LedgerDeed {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('text') kind!: string;
  @Column('text') about!: string;
  @Column('uuid', { name: 'payment_id', nullable: true }) paymentId!: string | null;
  @Column('uuid', { name: 'refund_id', nullable: true }) refundId!: string | null;
  @Column('uuid', { name: 'booking_id', nullable: true }) bookingId!: string | null;
  @Column('timestamptz') at!: Date;
  @Column('uuid', { name: 'made_by', nullable: true }) madeBy!: string | null;
}
