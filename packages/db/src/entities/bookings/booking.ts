import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('booking')
export class Booking {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'peg_id' }) pegId!: string;
  @Column('uuid', { name: 'account_id' }) accountId!: string;
  @Column('tstzrange') during!: string;
  @Column('text') status!: 'confirmed' | 'cancelled';
  @Column('uuid', { name: 'written_by' }) writtenBy!: string;
  @Column('timestamptz', { name: 'written_at' }) writtenAt!: Date;
}
