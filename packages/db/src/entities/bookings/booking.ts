import type { BookingState } from '@mereward/shared/bookings/booking-state';
import type { BookingDetails, BookingSource } from '@mereward/shared/bookings/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

/** A ticket. `during` is the fishing time; the pegs it takes, turnaround and all, are its rows of `peg_time`. */
@Entity('booking')
export class Booking {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('uuid', { name: 'lake_id', nullable: true }) lakeId!: string | null; // null: good on every lake
  @Column('uuid', { name: 'ticket_type_id', nullable: true }) ticketTypeId!: string | null; // null: written at the lodge
  @Column('text') code!: string; // given by the database
  @Column('uuid', { name: 'account_id', nullable: true }) accountId!: string | null; // null: holder has no account
  @Column('text', { name: 'holder_name' }) holderName!: string;
  @Column('text', { name: 'holder_email', nullable: true }) holderEmail!: string | null;
  @Column('tstzrange') during!: string;
  @Column('text') status!: BookingState;
  @Column('int') people!: number;
  @Column('int') rods!: number;
  @Column('int', { name: 'gross_pence' }) grossPence!: number;
  @Column('text') currency!: string;
  @Column('timestamptz', { name: 'hold_until', nullable: true }) holdUntil!: Date | null;
  @Column('text') source!: BookingSource;
  @Column('jsonb') details!: BookingDetails;
  @Column('uuid', { name: 'written_by', nullable: true }) writtenBy!: string | null;
  @Column('timestamptz', { name: 'written_at' }) writtenAt!: Date;
  @Column('int') version!: number;
}
