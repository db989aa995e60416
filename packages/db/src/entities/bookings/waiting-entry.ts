import type { WaitingWish } from '@mereward/shared/bookings/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

/** A place in the line for a lake's full day. `place` gives the order, from the server's own clock of joining. */
@Entity('waiting_entry')
export class WaitingEntry {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'fishery_id' }) fisheryId!: string;
  @Column('uuid', { name: 'lake_id' }) lakeId!: string;
  @Column('uuid', { name: 'account_id' }) accountId!: string;
  @Column('date') day!: string;
  @Column('jsonb') wish!: WaitingWish;
  @Column({ type: 'bigint', insert: false, update: false }) place!: string;
  @Column('timestamptz', { name: 'joined_at' }) joinedAt!: Date;
  @Column('text') status!: 'waiting' | 'offered' | 'claimed' | 'passed' | 'left';
  @Column('uuid', { name: 'booking_id', nullable: true }) bookingId!: string | null;
  @Column('timestamptz', { name: 'claim_until', nullable: true }) claimUntil!: Date | null;
  @Column('uuid', { name: 'passed_over', array: true, default: [] }) passedOver!: string[]; // freed places they let go by
  @Column('uuid', { name: 'offer_of', nullable: true }) offerOf!: string | null; // the freed place they were offered last
}
