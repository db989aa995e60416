import { Column, Entity, PrimaryColumn } from 'typeorm';

/** What one booking in the way of a closure may choose, until when, and what was chosen. */
@Entity('closure_choice')
export class ClosureChoice {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'closure_id' }) closureId!: string;
  @Column('uuid', { name: 'booking_id' }) bookingId!: string;
  @Column('bytea', { name: 'token_digest' }) tokenDigest!: Buffer;
  @Column('timestamptz', { name: 'choose_until' }) chooseUntil!: Date;
  @Column('text', { nullable: true }) choice!:
    'move_date' | 'move_lake' | 'refund' | 'cancel' | 'kept' | null;
  @Column('text', { name: 'chosen_by', nullable: true }) chosenBy!: 'angler' | 'office' | 'deadline' | null;
  @Column('timestamptz', { name: 'chosen_at', nullable: true }) chosenAt!: Date | null;
  @Column('jsonb', { nullable: true }) outcome!: Record<string, unknown> | null;
}
