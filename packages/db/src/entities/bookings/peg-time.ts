import { Column, Entity, PrimaryColumn } from 'typeorm';

/** Who has a peg and when, whatever for: the one calendar of bookings, closures and blocks. */
@Entity('peg_time')
export class PegTime {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'lake_id' }) lakeId!: string;
  @Column('uuid', { name: 'peg_id', nullable: true }) pegId!: string | null; // null: a rover with no peg yet
  @Column('tstzrange') during!: string; // turnaround included
  @Column('interval') turnaround!: string; // its last part, in which nobody fishes
  @Column('bigint') lane!: string;
  @Column('text') state!: 'held' | 'taken' | 'blocked' | 'closed';
  @Column('uuid', { name: 'booking_id', nullable: true }) bookingId!: string | null;
  @Column('uuid', { name: 'closure_id', nullable: true }) closureId!: string | null;
  @Column('uuid', { name: 'block_id', nullable: true }) blockId!: string | null;
  @Column('int') people!: number;
  @Column('int') rods!: number;
}
