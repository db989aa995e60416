import { Column, Entity, PrimaryColumn } from 'typeorm';

/** What happened to a booking: held, paid, moved, cancelled. Never changed. */
@Entity('booking_event')
export class BookingEvent {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'booking_id' }) bookingId!: string;
  @Column('timestamptz') at!: Date;
  @Column('uuid', { name: 'by_account', nullable: true }) byAccount!: string | null;
  @Column('text') kind!: string;
  @Column('jsonb') told!: Record<string, unknown>;
}
