import { Column, Entity, PrimaryColumn } from 'typeorm';

/** One message of the provider, kept once by its id. */
@Entity('provider_event')
export class ProviderEvent {
  @PrimaryColumn('text') id!: string;
  @Column('uuid', { name: 'payment_id', nullable: true }) paymentId!: string | null;
  @Column('text') type!: string;
  @Column('timestamptz', { name: 'said_at' }) saidAt!: Date;
  @Column('timestamptz', { name: 'received_at' }) receivedAt!: Date;
  @Column('jsonb') told!: Record<string, unknown>;
}
