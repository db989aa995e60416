import type { ReceiptTold } from '@mereward/shared/payments/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('receipt')
export class Receipt {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('int') year!: number;
  @Column('int') number!: number;
  @Column('text') kind!: 'receipt' | 'credit_note';
  @Column('uuid', { name: 'payment_id', nullable: true }) paymentId!: string | null;
  @Column('uuid', { name: 'refund_id', nullable: true }) refundId!: string | null;
  @Column('uuid', { name: 'booking_id' }) bookingId!: string;
  @Column('date', { name: 'tax_point' }) taxPoint!: string;
  @Column('timestamptz', { name: 'issued_at' }) issuedAt!: Date;
  @Column('jsonb') told!: ReceiptTold; // as printed: seller, lines, VAT by rate
}
