import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('dispute')
export class Dispute {
  @PrimaryColumn('text') id!: string; // the provider's
  @Column('uuid', { name: 'payment_id' }) paymentId!: string;
  @Column('int', { name: 'amount_pence' }) amountPence!: number;
  @Column('text') reason!: string;
  @Column('text') status!: string;
  @Column('timestamptz', { name: 'opened_at' }) openedAt!: Date;
  @Column('timestamptz', { name: 'closed_at', nullable: true }) closedAt!: Date | null;
}
