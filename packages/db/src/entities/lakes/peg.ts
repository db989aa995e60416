import type { PegDetails } from '@mereward/shared/lakes/contract';
import { Column, Entity, PrimaryColumn } from 'typeorm';

@Entity('peg')
export class Peg {
  @PrimaryColumn('uuid') id!: string;
  @Column('uuid', { name: 'lake_id' }) lakeId!: string;
  @Column('text') number!: string;
  @Column({ type: 'text', insert: false, update: false }) code!: string; // given by the database, for ever
  @Column('int', { name: 'walking_order' }) walkingOrder!: number;
  @Column('jsonb') details!: PegDetails;
  @Column('int') version!: number;
  @Column('uuid', { name: 'created_by' }) createdBy!: string;
  @Column('timestamptz', { name: 'created_at' }) createdAt!: Date;
}
